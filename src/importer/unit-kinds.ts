import type { Dimension } from './unit-sizes.ts';

/** A kind of quantity: where the file assigns its unit, and what holds where it does not. */
interface KindOfUnit {
  readonly words: string;
  /** What it is in SI, as written in a sentence. */
  readonly si: string;
  /** IfcUnitEnum or IfcDerivedUnitEnum, the first that is assigned. */
  readonly types: readonly string[];
  readonly dimension: Dimension;
  /** Kinds and powers it is made of where it has no unit of its own; none where SI is taken. */
  readonly of: readonly (readonly [kind: 'length' | 'force', power: number])[];
  /** IFC measure types whose values are of this kind. */
  readonly measures: readonly string[];
}

const FORCE: Dimension = [1, 1, -2, 0];

/**
 * What has no unit of its own in the file is taken as the product of the project's lengths and forces, as an exporter in kN
 * and m means it. Mass and pressure are left in SI: files in millimetres still write kg/m3 and Pa.
 */
export const UNIT_KINDS = {
  length: {
    words: 'length',
    si: 'm',
    types: ['LENGTHUNIT'],
    dimension: [1, 0, 0, 0],
    of: [],
    measures: ['IFCLENGTHMEASURE', 'IFCPOSITIVELENGTHMEASURE', 'IFCNONNEGATIVELENGTHMEASURE'],
  },
  angle: {
    words: 'plane angle',
    si: 'rad',
    types: ['PLANEANGLEUNIT'],
    dimension: [0, 0, 0, 0],
    of: [],
    measures: ['IFCPLANEANGLEMEASURE', 'IFCPOSITIVEPLANEANGLEMEASURE'],
  },
  area: {
    words: 'area',
    si: 'm2',
    types: ['AREAUNIT'],
    dimension: [2, 0, 0, 0],
    of: [['length', 2]],
    measures: ['IFCAREAMEASURE'],
  },
  volume: {
    words: 'volume',
    si: 'm3',
    types: ['VOLUMEUNIT'],
    dimension: [3, 0, 0, 0],
    of: [['length', 3]],
    measures: ['IFCVOLUMEMEASURE'],
  },
  mass: {
    words: 'mass',
    si: 'kg',
    types: ['MASSUNIT'],
    dimension: [0, 1, 0, 0],
    of: [],
    measures: ['IFCMASSMEASURE'],
  },
  temperature: {
    words: 'temperature',
    si: 'K',
    types: ['THERMODYNAMICTEMPERATUREUNIT'],
    dimension: [0, 0, 0, 1],
    of: [],
    measures: ['IFCTHERMODYNAMICTEMPERATUREMEASURE'],
  },
  force: {
    words: 'force',
    si: 'N',
    types: ['FORCEUNIT'],
    dimension: FORCE,
    of: [],
    measures: ['IFCFORCEMEASURE'],
  },
  pressure: {
    words: 'pressure',
    si: 'Pa',
    types: ['PRESSUREUNIT'],
    dimension: [-1, 1, -2, 0],
    of: [],
    measures: ['IFCPRESSUREMEASURE'],
  },
  elasticModulus: {
    words: 'modulus of elasticity',
    si: 'Pa',
    types: ['MODULUSOFELASTICITYUNIT', 'PRESSUREUNIT'],
    dimension: [-1, 1, -2, 0],
    of: [],
    measures: ['IFCMODULUSOFELASTICITYMEASURE'],
  },
  shearModulus: {
    words: 'shear modulus',
    si: 'Pa',
    types: ['SHEARMODULUSUNIT', 'MODULUSOFELASTICITYUNIT', 'PRESSUREUNIT'],
    dimension: [-1, 1, -2, 0],
    of: [],
    measures: ['IFCSHEARMODULUSMEASURE'],
  },
  moment: {
    words: 'moment',
    si: 'Nm',
    types: ['TORQUEUNIT'],
    dimension: [2, 1, -2, 0],
    of: [
      ['force', 1],
      ['length', 1],
    ],
    measures: ['IFCTORQUEMEASURE'],
  },
  linearForce: {
    words: 'force per length',
    si: 'N/m',
    types: ['LINEARFORCEUNIT'],
    dimension: [0, 1, -2, 0],
    of: [
      ['force', 1],
      ['length', -1],
    ],
    measures: ['IFCLINEARFORCEMEASURE'],
  },
  planarForce: {
    words: 'force per area',
    si: 'N/m2',
    types: ['PLANARFORCEUNIT', 'PRESSUREUNIT'],
    dimension: [-1, 1, -2, 0],
    of: [
      ['force', 1],
      ['length', -2],
    ],
    measures: ['IFCPLANARFORCEMEASURE'],
  },
  linearStiffness: {
    words: 'stiffness',
    si: 'N/m',
    types: ['LINEARSTIFFNESSUNIT'],
    dimension: [0, 1, -2, 0],
    of: [
      ['force', 1],
      ['length', -1],
    ],
    measures: ['IFCLINEARSTIFFNESSMEASURE'],
  },
  massDensity: {
    words: 'density',
    si: 'kg/m3',
    types: ['MASSDENSITYUNIT'],
    dimension: [-3, 1, 0, 0],
    of: [],
    measures: ['IFCMASSDENSITYMEASURE'],
  },
  massPerLength: {
    words: 'mass per length',
    si: 'kg/m',
    types: ['MASSPERLENGTHUNIT'],
    dimension: [-1, 1, 0, 0],
    of: [],
    measures: ['IFCMASSPERLENGTHMEASURE'],
  },
  secondMoment: {
    words: 'second moment of area',
    si: 'm4',
    types: ['MOMENTOFINERTIAUNIT'],
    dimension: [4, 0, 0, 0],
    of: [['length', 4]],
    measures: ['IFCMOMENTOFINERTIAMEASURE'],
  },
  sectionModulus: {
    words: 'section modulus',
    si: 'm3',
    types: ['SECTIONMODULUSUNIT'],
    dimension: [3, 0, 0, 0],
    of: [['length', 3]],
    measures: ['IFCSECTIONMODULUSMEASURE'],
  },
  warpingConstant: {
    words: 'warping constant',
    si: 'm6',
    types: ['WARPINGCONSTANTUNIT'],
    dimension: [6, 0, 0, 0],
    of: [['length', 6]],
    measures: ['IFCWARPINGCONSTANTMEASURE'],
  },
  thermalExpansion: {
    words: 'thermal expansion',
    si: '1/K',
    types: ['THERMALEXPANSIONCOEFFICIENTUNIT'],
    dimension: [0, 0, 0, -1],
    of: [],
    measures: ['IFCTHERMALEXPANSIONCOEFFICIENTMEASURE'],
  },
} as const satisfies Record<string, KindOfUnit>;

export type UnitKind = keyof typeof UNIT_KINDS;

const BY_MEASURE = new Map(
  Object.entries(UNIT_KINDS).flatMap(([kind, { measures }]) =>
    measures.map((type) => [type as string, kind as UnitKind]),
  ),
);

/** The kind of quantity of `IFCAREAMEASURE(...)` and the like; null for measures that have no unit or are of no use here. */
export const kindOfMeasure = (type: string): UnitKind | null => BY_MEASURE.get(type) ?? null;

export const kindOf = (kind: UnitKind): KindOfUnit => UNIT_KINDS[kind];
