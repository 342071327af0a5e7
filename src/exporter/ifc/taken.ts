import { type ReferenceVisitor, walkReferences } from '../../step/reference-walk.ts';
import type { StepFile } from '../../step/step-file.ts';
import { UsedGlobalIds } from './used-global-ids.ts';

/** What new instances must keep clear of. */
export interface Taken {
  readonly globalIds: UsedGlobalIds;
  /** The highest number that an instance has, or that is referred to as if one had it. */
  readonly highestId: number;
  /** Numbers that are referred to and that no instance has: a new instance of such a number would be taken for it. */
  readonly dangling: () => ReadonlySet<number>;
}

/** Walks over the model once, our own block left out; a second time only where `dangling` is asked for. */
export function takenIn(file: StepFile): Taken {
  const globalIds = new UsedGlobalIds();
  let highestId = file.maxId;
  walkModel(file, {
    text: (begin, end) => globalIds.addText(file.bytes, begin, end),
    reference: (_, to) => {
      if (to > highestId) highestId = to;
    },
  });
  return { globalIds, highestId, dangling: () => danglingIn(file) };
}

function danglingIn(file: StepFile): Set<number> {
  const dangling = new Set<number>();
  walkModel(file, {
    reference: (_, to) => {
      if (!file.has(to)) dangling.add(to);
    },
  });
  return dangling;
}

function walkModel({ bytes, block }: StepFile, visitor: ReferenceVisitor): void {
  walkReferences(bytes, 0, block?.begin ?? bytes.length, visitor);
  if (block !== null) walkReferences(bytes, block.end, bytes.length, visitor);
}
