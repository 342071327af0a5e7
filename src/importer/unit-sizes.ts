/** Sizes of units in SI, and the dimension each has. */

/** Powers of length, mass, time and temperature; an angle has none. */
export type Dimension = readonly [length: number, mass: number, time: number, temperature: number];

export interface UnitSize {
  /** What a number in this unit is multiplied by to be in m, kg, s, K, rad and what is derived of them. */
  readonly factor: number;
  readonly dimension: Dimension;
}

const PURE: Dimension = [0, 0, 0, 0];
const LENGTH: Dimension = [1, 0, 0, 0];
const AREA: Dimension = [2, 0, 0, 0];
const VOLUME: Dimension = [3, 0, 0, 0];
const MASS: Dimension = [0, 1, 0, 0];
const TIME: Dimension = [0, 0, 1, 0];
const TEMPERATURE: Dimension = [0, 0, 0, 1];
const FORCE: Dimension = [1, 1, -2, 0];
const PRESSURE: Dimension = [-1, 1, -2, 0];

/** IfcSIPrefix. */
const PREFIX: Readonly<Record<string, number>> = {
  EXA: 1e18,
  PETA: 1e15,
  TERA: 1e12,
  GIGA: 1e9,
  MEGA: 1e6,
  KILO: 1e3,
  HECTO: 1e2,
  DECA: 1e1,
  DECI: 1e-1,
  CENTI: 1e-2,
  MILLI: 1e-3,
  MICRO: 1e-6,
  NANO: 1e-9,
  PICO: 1e-12,
  FEMTO: 1e-15,
  ATTO: 1e-18,
};

/** Those of IfcSIUnitName that a structure is described with. */
const SI: Readonly<Record<string, UnitSize>> = {
  METRE: { factor: 1, dimension: LENGTH },
  SQUARE_METRE: { factor: 1, dimension: AREA },
  CUBIC_METRE: { factor: 1, dimension: VOLUME },
  GRAM: { factor: 1e-3, dimension: MASS },
  SECOND: { factor: 1, dimension: TIME },
  HERTZ: { factor: 1, dimension: [0, 0, -1, 0] },
  KELVIN: { factor: 1, dimension: TEMPERATURE },
  // Only differences of temperature are read, so the zero does not matter.
  DEGREE_CELSIUS: { factor: 1, dimension: TEMPERATURE },
  RADIAN: { factor: 1, dimension: PURE },
  STERADIAN: { factor: 1, dimension: PURE },
  NEWTON: { factor: 1, dimension: FORCE },
  PASCAL: { factor: 1, dimension: PRESSURE },
  JOULE: { factor: 1, dimension: [2, 1, -2, 0] },
  WATT: { factor: 1, dimension: [2, 1, -3, 0] },
};

/** The size of an SI unit; null where name or prefix is not one of the standard's, or of no use here. */
export function siUnit(name: string, prefix: string | null): UnitSize | null {
  const size = own(SI, name);
  const multiple = prefix === null ? 1 : own(PREFIX, prefix);
  if (size === null || multiple === null) return null;
  // A milli square metre is a square millimetre, as the prefix belongs to the metre (ISO 80000-1, 6.5.4, from memory).
  const power = name === 'SQUARE_METRE' ? 2 : name === 'CUBIC_METRE' ? 3 : 1;
  return { ...size, factor: size.factor * multiple ** power };
}

// Exact by definition: the international inch and pound (1959), the US survey foot, standard gravity (CGPM 1901).
const INCH = 0.0254;
const FOOT = 0.3048;
const POUND = 0.45359237;
const POUND_FORCE = POUND * 9.80665;

const length = (factor: number): UnitSize => ({ factor, dimension: LENGTH });
const area = (factor: number): UnitSize => ({ factor, dimension: AREA });
const volume = (factor: number): UnitSize => ({ factor, dimension: VOLUME });
const mass = (factor: number): UnitSize => ({ factor, dimension: MASS });
const force = (factor: number): UnitSize => ({ factor, dimension: FORCE });
const pressure = (factor: number): UnitSize => ({ factor, dimension: PRESSURE });

/** By name, for units whose factor the file leaves out. Most names are of ISO 16739, IfcConversionBasedUnit; others are usual. */
const NAMED: Readonly<Record<string, UnitSize>> = {
  INCH: length(INCH),
  FOOT: length(FOOT),
  YARD: length(3 * FOOT),
  MILE: length(5280 * FOOT),
  'US SURVEY FOOT': length(1200 / 3937),
  'SQUARE INCH': area(INCH ** 2),
  'SQUARE FOOT': area(FOOT ** 2),
  'SQUARE YARD': area((3 * FOOT) ** 2),
  'CUBIC INCH': volume(INCH ** 3),
  'CUBIC FOOT': volume(FOOT ** 3),
  'CUBIC YARD': volume((3 * FOOT) ** 3),
  DEGREE: { factor: Math.PI / 180, dimension: PURE },
  GON: { factor: Math.PI / 200, dimension: PURE },
  GRAD: { factor: Math.PI / 200, dimension: PURE },
  OUNCE: mass(POUND / 16),
  POUND: mass(POUND),
  TONNE: mass(1000),
  'METRIC TON': mass(1000),
  'TON US': mass(2000 * POUND),
  'TON UK': mass(2240 * POUND),
  'POUND FORCE': force(POUND_FORCE),
  LBF: force(POUND_FORCE),
  KIP: force(1000 * POUND_FORCE),
  'KILOGRAM FORCE': force(9.80665),
  PSI: pressure(POUND_FORCE / INCH ** 2),
  KSI: pressure((1000 * POUND_FORCE) / INCH ** 2),
  'POUND FORCE PER SQUARE INCH': pressure(POUND_FORCE / INCH ** 2),
  'KIP PER SQUARE INCH': pressure((1000 * POUND_FORCE) / INCH ** 2),
  BAR: pressure(1e5),
  FAHRENHEIT: { factor: 5 / 9, dimension: TEMPERATURE },
};

/** 'pound-force', 'POUND_FORCE' and 'Pound  Force' are one name; null where it is none that is known. */
export function namedUnit(name: string): UnitSize | null {
  const plain = name
    .toUpperCase()
    .replace(/[-_\s]+/g, ' ')
    .replace(/ FEET\b/, ' FOOT')
    .trim();
  return own(NAMED, plain);
}

/** The product of `size` and `other` to a power. */
export function times(size: UnitSize, other: UnitSize, power: number): UnitSize {
  const [a, b] = [size.dimension, other.dimension];
  const raised = (i: 0 | 1 | 2 | 3) => a[i] + power * b[i];
  return {
    factor: size.factor * other.factor ** power,
    dimension: [raised(0), raised(1), raised(2), raised(3)],
  };
}

export const NO_UNIT: UnitSize = { factor: 1, dimension: PURE };

export const isSameDimension = (a: Dimension, b: Dimension): boolean => a.every((power, i) => power === b[i]);

const own = <T>(table: Readonly<Record<string, T>>, key: string): T | null =>
  Object.hasOwn(table, key) ? (table[key] as T) : null;
