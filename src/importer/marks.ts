import { markOf } from '../domain/mark.ts';
import type { StepFile } from '../step/step-file.ts';

/** What is named in findings without being read as a member. */
const OTHERS = ['POINTCONNECTION', 'POINTACTION', 'LINEARACTION', 'LINEARACTIONVARYING', 'CURVEACTION'].map(
  (kind) => `IFCSTRUCTURAL${kind}`,
);

/**
 * Says what people call the element of a GlobalId: its mark, else its name, else the GlobalId. `elements` are the instances
 * read, `globalIds` theirs; looked up only where a finding names one.
 */
export function markNamer(file: StepFile, elements: readonly number[], globalIds: readonly string[]) {
  let others: ReadonlyMap<string, number> | null = null;
  return (globalId: string): string => {
    // Without a GlobalId an element is called by its number in the file.
    const index = globalId.startsWith('#') ? elements.indexOf(Number(globalId.slice(1))) : globalIds.indexOf(globalId);
    others ??= index >= 0 ? null : otherIds(file);
    const id = elements[index] ?? others?.get(globalId);
    return id === undefined ? globalId : (markOf({ tag: tagOf(file, id), name: file.stringAt(id, 2) }) ?? globalId);
  };
}

const tagOf = (file: StepFile, id: number): string | null =>
  file.typeOf(id).startsWith('IFCSTRUCTURAL') ? null : file.stringAt(id, 7);

function otherIds(file: StepFile): ReadonlyMap<string, number> {
  const found = new Map<string, number>();
  for (const id of OTHERS.flatMap((type) => [...file.idsOf(type)])) {
    const globalId = file.stringAt(id, 0);
    if (globalId !== null) found.set(globalId, id);
  }
  return found;
}
