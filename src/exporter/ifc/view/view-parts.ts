import type { Result } from '../../../domain/result.ts';
import type { StepRef } from '../../../step/values.ts';
import type { FileFrame, NewFile } from '../new-file.ts';

/** What the writers of the parts of a view share. */
export interface View {
  readonly file: NewFile;
  readonly frame: FileFrame;
  readonly result: Result;
  /** Names that GlobalIds are drawn from: the same for a node or a bar as long as its members and their order stay. */
  readonly nodeKeys: readonly string[];
  readonly barKeys: readonly string[];
}

export const ROLE = 'view';

export function viewOf(file: NewFile, frame: FileFrame, result: Result): View {
  return {
    file,
    frame,
    result,
    nodeKeys: numbered(result.nodes.map((node) => [...node.members].sort().join(' '))),
    barKeys: numbered(result.bars.map((bar) => (bar.members ?? [bar.member]).join(' '))),
  };
}

/** Each name with its number among its like. */
function numbered(names: readonly string[]): string[] {
  const seen = new Map<string, number>();
  return names.map((name) => {
    const number = (seen.get(name) ?? 0) + 1;
    seen.set(name, number);
    return `${name} ${number}`;
  });
}

/** Instances that are alike written once. */
export class Once {
  private readonly written = new Map<string, StepRef>();

  of(key: string, write: () => StepRef): StepRef {
    let found = this.written.get(key);
    if (found === undefined) {
      found = write();
      this.written.set(key, found);
    }
    return found;
  }
}
