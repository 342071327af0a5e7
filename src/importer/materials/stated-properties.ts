import { pushTo } from '../../domain/group.ts';
import { asRef, asRefs, asString } from '../../step/values.ts';
import { propertyNumber } from '../property-number.ts';
import type { Reading } from '../reading.ts';
import type { UnitKind } from '../unit-kinds.ts';

/** Numbers that the file states of a material, SI. */
export interface StatedNumbers {
  elasticModulus?: number;
  density?: number;
  expansion?: number;
  yieldStrength?: number;
  ultimateStrength?: number;
}

type Key = keyof StatedNumbers;

/** Names of Pset_MaterialCommon, ...Mechanical and ...Steel, and of the attributes of IFC2X3. */
const NAMED: Readonly<Record<string, readonly [key: Key, kind: UnitKind]>> = {
  YOUNGMODULUS: ['elasticModulus', 'elasticModulus'],
  MASSDENSITY: ['density', 'massDensity'],
  THERMALEXPANSIONCOEFFICIENT: ['expansion', 'thermalExpansion'],
  YIELDSTRESS: ['yieldStrength', 'pressure'],
  ULTIMATESTRESS: ['ultimateStrength', 'pressure'],
};

/** IFC2X3: attributes by position, the material is the first. */
const ATTRIBUTES: Readonly<Record<string, readonly (readonly [at: number, name: string])[]>> = {
  IFCGENERALMATERIALPROPERTIES: [[3, 'MASSDENSITY']],
  IFCMECHANICALMATERIALPROPERTIES: [
    [2, 'YOUNGMODULUS'],
    [5, 'THERMALEXPANSIONCOEFFICIENT'],
  ],
  IFCMECHANICALSTEELMATERIALPROPERTIES: [
    [2, 'YOUNGMODULUS'],
    [5, 'THERMALEXPANSIONCOEFFICIENT'],
    [6, 'YIELDSTRESS'],
    [7, 'ULTIMATESTRESS'],
  ],
};

/** By material: what its property instances state; each property instance is passed over once. */
export function readStatedMaterials(reading: Reading): ReadonlyMap<number, StatedNumbers> {
  const found = new Map<number, StatedNumbers>();
  const put = (material: number | null, name: string, read: (kind: UnitKind) => number | null) => {
    const known = NAMED[name.toUpperCase()];
    if (material === null || known === undefined) return;
    const [key, kind] = known;
    const number = read(kind);
    if (number === null) return;
    const numbers = found.get(material) ?? {};
    numbers[key] ??= number;
    found.set(material, numbers);
  };

  const { file } = reading;
  for (const [type, attributes] of Object.entries(ATTRIBUTES)) {
    for (const id of file.idsOf(type)) {
      const args = file.args(id);
      for (const [at, name] of attributes) {
        put(asRef(args[0]), name, (kind) => propertyNumber(reading, args[at], null, kind));
      }
    }
  }
  for (const [material, properties] of propertySets(reading)) {
    for (const property of properties) {
      if (file.typeOf(property) !== 'IFCPROPERTYSINGLEVALUE') continue;
      const args = file.args(property);
      put(material, asString(args[0])?.trim() ?? '', (kind) => propertyNumber(reading, args[2], asRef(args[3]), kind));
    }
  }
  return found;
}

/** IfcMaterialProperties of IFC4, IfcExtendedMaterialProperties of IFC2X3. */
function propertySets({ file }: Reading): Map<number, number[]> {
  const sets = new Map<number, number[]>();
  for (const [type, material, properties] of [
    ['IFCMATERIALPROPERTIES', 3, 2],
    ['IFCEXTENDEDMATERIALPROPERTIES', 0, 1],
  ] as const) {
    for (const id of file.idsOf(type)) {
      const args = file.args(id);
      const owner = asRef(args[material]);
      if (owner !== null) for (const property of asRefs(args[properties])) pushTo(sets, owner, property);
    }
  }
  return sets;
}
