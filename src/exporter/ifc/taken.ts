import { walkReferences } from '../../step/reference-walk.ts';
import type { StepFile } from '../../step/step-file.ts';
import { UsedGlobalIds } from './used-global-ids.ts';

/** What new instances must keep clear of. */
export interface Taken {
  readonly globalIds: UsedGlobalIds;
  /** Every number that an instance has, or that is referred to as if one had it. */
  readonly highestId: number;
  /** Numbers that are referred to and that no instance has: a new instance of such a number would be taken for it. */
  readonly dangling: ReadonlySet<number>;
}

/** Walks over the model once, our own block left out. */
export function takenIn(file: StepFile): Taken {
  const { bytes, block } = file;
  const globalIds = new UsedGlobalIds();
  const dangling = new Set<number>();
  let highestId = file.maxId;
  const visitor = {
    text: (begin: number, end: number) => globalIds.addText(bytes, begin, end),
    reference: (_: number, to: number) => {
      if (file.has(to)) return;
      dangling.add(to);
      if (to > highestId) highestId = to;
    },
  };
  walkReferences(bytes, 0, block?.begin ?? bytes.length, visitor);
  if (block !== null) walkReferences(bytes, block.end, bytes.length, visitor);
  return { globalIds, highestId, dangling };
}
