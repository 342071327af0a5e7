import type { StepRef } from '../../step/values.ts';
import { type InstanceWriter, refs, typed, type ValueToWrite } from '../../step/write.ts';
import { type Block, label, measured } from './block.ts';
import {
  definitionOf,
  holdsQuantities,
  type Measure,
  type PropertyDefinition,
  type PropertyValue,
  type SetName,
  type SetValues,
  type Value,
  type ValueTable,
} from './set-definitions.ts';

/** What all sets of a block share. */
export interface Common {
  readonly owner: StepRef | null;
  /** Units are always said, since forces and lengths here are SI whatever the project's own units. */
  readonly units: Readonly<Partial<Record<Measure, StepRef>>>;
}

/** Where sets are written to. */
export type SetWriter = Pick<InstanceWriter, 'add'> & Pick<Block, 'globalId' | 'isIfc2x3'>;

/**
 * Writes a property set with its properties and ties it to objects. `of` is the GlobalId of the object, from which
 * those of the set and of its relationship are drawn.
 */
export function writeSet<S extends SetName>(
  block: SetWriter,
  { owner, units }: Common,
  name: S,
  values: SetValues<S>,
  of: string,
  objects: readonly number[],
): StepRef {
  const properties: StepRef[] = [];
  const set = definitionOf(name);
  for (const [property, definition] of Object.entries(set.properties)) {
    const value = (values as Readonly<Record<string, PropertyValue | undefined>>)[property];
    if (value === null || value === undefined || (Array.isArray(value) && value.length === 0)) continue;
    properties.push(writeProperty(block, units[definition.measure] ?? null, property, definition, value));
  }
  const globalId = block.globalId(name, of);
  const written = holdsQuantities(set)
    ? block.add('IFCELEMENTQUANTITY', globalId, owner, name, null, 'Pinwright', properties)
    : block.add('IFCPROPERTYSET', globalId, owner, name, null, properties);
  const tie = block.globalId('defines', globalId);
  block.add('IFCRELDEFINESBYPROPERTIES', tie, owner, null, null, refs(objects), written);
  return written;
}

function writeProperty(
  block: SetWriter,
  unit: StepRef | null,
  name: string,
  { kind, measure }: PropertyDefinition,
  value: NonNullable<PropertyValue>,
): StepRef {
  if (kind === 'quantity') {
    const formula: ValueToWrite[] = block.isIfc2x3 ? [] : [null];
    return block.add('IFCQUANTITYLENGTH', name, null, unit, value as number, ...formula);
  }
  if (kind === 'single') {
    return block.add('IFCPROPERTYSINGLEVALUE', name, null, measured(measure, value as Value), unit);
  }
  if (kind === 'list') {
    const items = (value as readonly Value[]).map((item) => measured(measure, item));
    return block.add('IFCPROPERTYLISTVALUE', name, null, items, unit);
  }
  const rows = value as ValueTable;
  const labels = distinctLabels(rows.map(([run]) => run)).map((text) => typed('IFCLABEL', text));
  const numbers = rows.map(([, number]) => measured(measure, number));
  const interpolation: ValueToWrite[] = block.isIfc2x3 ? [] : [null];
  return block.add('IFCPROPERTYTABLEVALUE', name, null, labels, numbers, null, null, unit, ...interpolation);
}

/** Labels for a list that allows none twice: names that are equal once cut to a label's length get a number. */
function distinctLabels(names: readonly string[]): string[] {
  const taken = new Set<string>();
  return names.map((name) => {
    let text = label(name);
    for (let k = 2; taken.has(text); k++) text = label(`(${k}) ${name}`);
    taken.add(text);
    return text;
  });
}
