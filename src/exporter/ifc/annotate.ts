import type { Result } from '../../domain/result.ts';
import { withBlock, withoutBlock } from '../../step/splice.ts';
import type { StepFile } from '../../step/step-file.ts';
import { DERIVED, type StepRef } from '../../step/values.ts';
import { enumeration } from '../../step/write.ts';
import type { Chunks } from '../chunks.ts';
import { Block } from './block.ts';
import { findElements } from './element-index.ts';
import { elementForces, listedByKey } from './member-forces.ts';
import { elementLengths } from './member-lengths.ts';
import { forbidForeignInBlock, forbidReferencesIntoBlock } from './own-block.ts';
import { ownerHistory } from './owner-history.ts';
import { type Common, writeSet } from './property-set.ts';
import type { SetName, SetValues } from './set-definitions.ts';
import { findingValues, forceValues, runValues } from './set-values.ts';
import { writeTemplates } from './templates.ts';

/**
 * The model with the result's property sets in it: its own bytes untouched, one block of new instances before the end of
 * its data, in the place of an earlier one. The same model and result give the same bytes, annotated before or not.
 * Throws a ModelError where something foreign stands in an earlier block, or refers into it.
 */
export function annotate(file: StepFile, result: Result): Chunks {
  forbidForeignInBlock(file);
  forbidReferencesIntoBlock(file);
  return withBlock(file, blockLines(file, result));
}

/** The model without our block: the bytes as they were before `annotate`. Throws as that does. */
export function clean(file: StepFile): Chunks {
  forbidForeignInBlock(file);
  forbidReferencesIntoBlock(file);
  return withoutBlock(file);
}

function* blockLines(file: StepFile, result: Result): Generator<string> {
  const elements = elementsConcerned(file, result);
  const block = new Block(file, mostInstances(elements.length));
  const project = projectOf(file);
  const owner = ownerHistory(file, project?.id ?? null, result.generator.version, block);
  const common: Common = { owner, units: writeUnits(block) };
  const setsByName = new Map<SetName, StepRef[]>();
  const write = <S extends SetName>(name: S, values: SetValues<S>, { globalId, ids }: Target) => {
    const sets = setsByName.get(name) ?? [];
    setsByName.set(name, sets);
    sets.push(writeSet(block, common, name, values, globalId, ids));
  };

  if (project !== null) write('Pinwright_Run', runValues(result), { globalId: project.globalId, ids: [project.id] });
  const forcesOf = result.cases.length > 0 ? elementForces(result) : () => null;
  const lengthsOf = elementLengths(result);
  const findingsOf = listedByKey(result.findings, (finding) => [...new Set(finding.members)]);
  for (const element of elements) {
    const forces = forcesOf(element.globalId);
    if (forces !== null) write('Pinwright_Forces', forceValues(forces, result), element);
    const lengths = lengthsOf(element.globalId);
    if (lengths !== null) write('Pinwright_Lengths', lengths, element);
    const findings = findingsOf.get(element.globalId)?.map((k) => result.findings[k]);
    if (findings !== undefined) write('Pinwright_Findings', findingValues(findings), element);
    yield* block.take();
  }
  if (!block.isIfc2x3 && project !== null) writeTemplates(block, common, project, setsByName);
  yield* block.take();
}

function writeUnits(block: Block): Common['units'] {
  const unit = (kind: string, name: string) =>
    block.add('IFCSIUNIT', DERIVED, enumeration(kind), null, enumeration(name));
  return { IfcForceMeasure: unit('FORCEUNIT', 'NEWTON'), IfcLengthMeasure: unit('LENGTHUNIT', 'METRE') };
}

/** The instances of one GlobalId: several where it stands twice in the file. */
interface Target {
  readonly globalId: string;
  readonly ids: readonly number[];
}

/** The elements that bars or findings speak of, as far as they are in the file, in the order of the result. */
function elementsConcerned(file: StepFile, result: Result): Target[] {
  const concerned = new Set<string>();
  for (const bar of result.bars) for (const globalId of bar.members ?? [bar.member]) concerned.add(globalId);
  for (const finding of result.findings) for (const globalId of finding.members) concerned.add(globalId);
  const found = findElements(file, concerned, new Set(result.members.map((member) => member.class)));
  return [...concerned].flatMap((globalId) => {
    const ids = found.get(globalId);
    return ids === undefined ? [] : [{ globalId, ids }];
  });
}

function projectOf(file: StepFile): { readonly id: number; readonly globalId: string } | null {
  const [id] = file.idsOf('IFCPROJECT');
  if (id === undefined) return null;
  const globalId = file.args(id)[0];
  return { id, globalId: typeof globalId === 'string' ? globalId : '' };
}

/** More than are ever written: properties, sets and relationships of an element, then the templates and the rest once. */
function mostInstances(elements: number): number {
  return 45 * elements + 300;
}
