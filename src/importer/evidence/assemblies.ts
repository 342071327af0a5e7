import type { StepFile } from '../../step/step-file.ts';
import { asString } from '../../step/values.ts';
import { type Relations, wholesAbove } from '../relations.ts';
import { globalIdOf } from './global-id.ts';
import type { Assembly } from './types.ts';

/** By GlobalId and not by name: the twin trusses of a roof are assemblies of one name. */
export function readAssemblies(file: StepFile, relations: Relations): Map<string, Assembly> {
  const known = new Map<number, Assembly>();
  const assemblies = new Map<string, Assembly>();
  for (const part of relations.wholeOf.keys()) {
    const id = wholesAbove(relations, part).find((whole) => file.typeOf(whole) === 'IFCELEMENTASSEMBLY');
    if (id === undefined) continue;
    const assembly = known.get(id) ?? { globalId: globalIdOf(file, id), name: nameOf(file, id) };
    known.set(id, assembly);
    assemblies.set(globalIdOf(file, part), assembly);
  }
  return assemblies;
}

function nameOf(file: StepFile, id: number): string | null {
  const name = asString(file.args(id)[2])?.trim() ?? '';
  return name === '' ? null : name;
}
