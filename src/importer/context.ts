import { asEnum, asRef, asString } from '../step/values.ts';
import { writtenClass } from './class-names.ts';
import type { Reading } from './reading.ts';
import { type Relations, wholesAbove } from './relations.ts';

/** What stands around an element: words for selectors and reports. */
export interface ElementContext {
  readonly predefinedType: string | null;
  readonly type: string | null;
  readonly assembly: string | null;
  readonly partOf: string | null;
  readonly storey: string | null;
}

const SPATIAL = new Set([
  'IFCPROJECT',
  'IFCSITE',
  'IFCBUILDING',
  'IFCBUILDINGSTOREY',
  'IFCSPACE',
  'IFCFACILITY',
  'IFCFACILITYPART',
  'IFCBRIDGE',
  'IFCBRIDGEPART',
]);

export function contextOf(reading: Reading, relations: Relations, id: number): ElementContext {
  const { file } = reading;
  const wholes = wholesAbove(relations, id);
  const elements = wholes.filter((whole) => !SPATIAL.has(file.typeOf(whole)));
  const assembly = elements.find((whole) => file.typeOf(whole) === 'IFCELEMENTASSEMBLY') ?? elements[0];
  // A baluster within an assembly within a stair is part of the stair.
  const foreign = elements.find((whole) => file.typeOf(whole) !== 'IFCELEMENTASSEMBLY');
  const whole = foreign ?? assembly;
  const typeId = relations.typeOf.get(id);
  const storey = storeyOf(reading, relations, [id, ...wholes]);
  return {
    predefinedType: predefinedType(reading, id, typeId),
    type: typeId === undefined ? null : named(reading, typeId),
    assembly: assembly === undefined ? null : assemblyName(reading, assembly),
    partOf: whole === undefined ? null : writtenClass(file.typeOf(whole)),
    storey: storey === null ? null : named(reading, storey),
  };
}

const named = (reading: Reading, id: number): string | null => asString(reading.file.args(id)[2]);

function assemblyName(reading: Reading, id: number): string | null {
  const args = reading.file.args(id);
  const texts = [asString(args[2]), asString(args[7]), asString(args[0])];
  return texts.find((text) => text !== null && text.trim() !== '') ?? null;
}

/** IFC2X3 has a predefined type on the element's type only. */
function predefinedType(reading: Reading, id: number, typeId: number | undefined): string | null {
  const own = reading.family === 'IFC2X3' ? null : asEnum(reading.file.args(id)[8]);
  if (own !== null && own !== 'NOTDEFINED') return own;
  const ofType = typeId === undefined ? null : asEnum(reading.file.args(typeId)[9]);
  return ofType ?? own;
}

/** From the element or the first of its wholes that is contained somewhere, up to a storey. */
function storeyOf(reading: Reading, relations: Relations, chain: readonly number[]): number | null {
  for (const id of chain) {
    const container = relations.containerOf.get(id);
    const up = container === undefined ? [id] : [container, ...wholesAbove(relations, container)];
    const storey = up.find((at) => reading.file.typeOf(at) === 'IFCBUILDINGSTOREY');
    if (storey !== undefined) return storey;
  }
  return null;
}

/** The layer of an element's shape: of one of its representations, or of an item in one. */
export function layerOf(reading: Reading, relations: Relations, shape: number | null): string | null {
  if (shape === null || relations.layerOf.size === 0) return null;
  const representations = reading.file.args(shape)[2];
  for (const value of Array.isArray(representations) ? representations : []) {
    const id = asRef(value);
    if (id === null) continue;
    const items = reading.file.args(id)[3];
    for (const candidate of [id, ...(Array.isArray(items) ? items.map(asRef) : [])]) {
      const layer = candidate === null ? undefined : relations.layerOf.get(candidate);
      if (layer !== undefined) return layer;
    }
  }
  return null;
}
