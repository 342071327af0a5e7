import { RequestError } from './errors.ts';

/** Powers of the base dimensions. Angle and mass count as dimensions so that degrees and kilograms cannot pass for others. */
type Powers = readonly [length: number, force: number, mass: number, temperature: number, angle: number];

const NONE: Powers = [0, 0, 0, 0, 0];
const LENGTH: Powers = [1, 0, 0, 0, 0];
const FORCE: Powers = [0, 1, 0, 0, 0];
const MASS: Powers = [0, 0, 1, 0, 0];
const TEMPERATURE: Powers = [0, 0, 0, 1, 0];
const ANGLE: Powers = [0, 0, 0, 0, 1];
const FORCE_PER_LENGTH: Powers = [-1, 1, 0, 0, 0];
const FORCE_PER_AREA: Powers = [-2, 1, 0, 0, 0];

// Exact by definition: the international foot, inch and avoirdupois pound (1959) and standard gravity (CGPM 1901).
const FOOT = 0.3048;
const INCH = 0.0254;
const POUND = 0.45359237;
const POUND_FORCE = POUND * 9.80665;

/** Size in SI and dimension of every unit that may be written, alone or in a quotient such as `kN/m2`. */
const UNITS: Readonly<Record<string, { readonly size: number; readonly powers: Powers }>> = {
  mm: { size: 1e-3, powers: LENGTH },
  cm: { size: 1e-2, powers: LENGTH },
  m: { size: 1, powers: LENGTH },
  km: { size: 1e3, powers: LENGTH },
  in: { size: INCH, powers: LENGTH },
  ft: { size: FOOT, powers: LENGTH },
  N: { size: 1, powers: FORCE },
  kN: { size: 1e3, powers: FORCE },
  MN: { size: 1e6, powers: FORCE },
  lbf: { size: POUND_FORCE, powers: FORCE },
  kip: { size: 1e3 * POUND_FORCE, powers: FORCE },
  plf: { size: POUND_FORCE / FOOT, powers: FORCE_PER_LENGTH },
  klf: { size: (1e3 * POUND_FORCE) / FOOT, powers: FORCE_PER_LENGTH },
  Pa: { size: 1, powers: FORCE_PER_AREA },
  kPa: { size: 1e3, powers: FORCE_PER_AREA },
  MPa: { size: 1e6, powers: FORCE_PER_AREA },
  GPa: { size: 1e9, powers: FORCE_PER_AREA },
  psf: { size: POUND_FORCE / FOOT ** 2, powers: FORCE_PER_AREA },
  ksf: { size: (1e3 * POUND_FORCE) / FOOT ** 2, powers: FORCE_PER_AREA },
  psi: { size: POUND_FORCE / INCH ** 2, powers: FORCE_PER_AREA },
  ksi: { size: (1e3 * POUND_FORCE) / INCH ** 2, powers: FORCE_PER_AREA },
  kg: { size: 1, powers: MASS },
  t: { size: 1e3, powers: MASS },
  lb: { size: POUND, powers: MASS },
  K: { size: 1, powers: TEMPERATURE },
  rad: { size: 1, powers: ANGLE },
  deg: { size: Math.PI / 180, powers: ANGLE },
};

/** What a quantity of the brief can be, with the words an error uses for it. */
const KINDS = {
  length: { words: 'a length', examples: 'mm, m, in, ft', powers: LENGTH },
  force: { words: 'a force', examples: 'N, kN, lbf, kip', powers: FORCE },
  forcePerLength: { words: 'a force per length', examples: 'kN/m, N/mm, kip/ft', powers: FORCE_PER_LENGTH },
  forcePerArea: { words: 'a force per area', examples: 'kN/m2, kPa, psf', powers: FORCE_PER_AREA },
  temperature: { words: 'a difference of temperature', examples: 'K', powers: TEMPERATURE },
  angle: { words: 'an angle', examples: 'deg, rad', powers: ANGLE },
} as const;

/** Only so that a wrong dimension can be named. */
const OTHER_DIMENSIONS: readonly { readonly words: string; readonly powers: Powers }[] = [
  { words: 'an area', powers: [2, 0, 0, 0, 0] },
  { words: 'a volume', powers: [3, 0, 0, 0, 0] },
  { words: 'a moment', powers: [1, 1, 0, 0, 0] },
  { words: 'a force per volume', powers: [-3, 1, 0, 0, 0] },
  { words: 'a mass', powers: MASS },
  { words: 'a mass per length', powers: [-1, 0, 1, 0, 0] },
  { words: 'a mass per area', powers: [-2, 0, 1, 0, 0] },
  { words: 'a mass per volume', powers: [-3, 0, 1, 0, 0] },
];

export type QuantityKind = keyof typeof KINDS;

export const UNIT_NAMES: readonly string[] = Object.keys(UNITS);

/** "a length (mm, m, in, ft)": what is due, in words for an error. */
export const wordsFor = (kind: QuantityKind): string => `${KINDS[kind].words} (${KINDS[kind].examples})`;

/** A text that is not the quantity that was due. */
export class QuantityError extends RequestError {
  /** The quantity as it was written. */
  readonly text: string;
  readonly expected: QuantityKind;
  /** The part that is no unit we know; null where the fault is another. */
  readonly unknownUnit: string | null;
  constructor(text: string, expected: QuantityKind, fault: string, unknownUnit: string | null = null) {
    super(`${fault}; ${wordsFor(expected)} is due`);
    this.text = text;
    this.expected = expected;
    this.unknownUnit = unknownUnit;
  }
}

const QUANTITY = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*(.*)$/su;

/** A number with the unit it was written with; `unit` is empty for a bare number. */
export interface WrittenQuantity {
  readonly value: number;
  readonly unit: string;
}

/**
 * Splits "150 mm" into its number and its unit, without judging the unit.
 * @throws QuantityError where no finite number stands first.
 */
export function splitQuantity(text: string, expected: QuantityKind): WrittenQuantity {
  const match = QUANTITY.exec(text.trim());
  if (match === null) throw new QuantityError(text, expected, 'this does not begin with a number');
  const value = Number(match[1]);
  if (!Number.isFinite(value)) throw new QuantityError(text, expected, 'the number is too large');
  const unit = match[2].trim();
  if (/^[,']\d/u.test(unit)) throw new QuantityError(text, expected, 'write numbers with a decimal point');
  return { value, unit };
}

/**
 * Reads "150 mm", "0.6 kN/m2", "1.2e3 kip", "20 deg" ... and returns SI: m, N, N/m, Pa, K, rad.
 * @throws QuantityError for no number, no unit, an unknown unit or another dimension than `expected`.
 */
export function parseQuantity(text: string, expected: QuantityKind): number {
  const { value, unit } = splitQuantity(text, expected);
  if (unit === '')
    throw new QuantityError(text, expected, 'the unit is missing (a bare number, without quotes, is SI)');
  const { size, powers } = readUnit(text, unit, expected);
  if (!samePowers(powers, KINDS[expected].powers)) {
    throw new QuantityError(text, expected, `this is ${nameOf(powers)}`);
  }
  const inSi = value * size;
  if (!Number.isFinite(inSi)) throw new QuantityError(text, expected, 'the number is too large');
  return inSi;
}

/** A product and quotient of units, `kN/m2`, `N*m`, `kip/ft^2`; everything after a slash up to the next sign divides. */
function readUnit(text: string, unit: string, expected: QuantityKind): { size: number; powers: Powers } {
  let size = 1;
  let powers = NONE;
  const parts = unit.split(/([/*·])/u);
  for (let i = 0; i < parts.length; i += 2) {
    const match = /^([A-Za-z]+)\^?([1-4²³])?$/u.exec(parts[i].trim());
    const name = match?.[1] ?? parts[i].trim();
    const known = Object.hasOwn(UNITS, name) ? UNITS[name] : undefined;
    if (match === null || known === undefined) {
      throw new QuantityError(
        text,
        expected,
        name === '' ? 'the unit is cut off' : `"${name}" is no unit known here`,
        name,
      );
    }
    const sign = i > 0 && parts[i - 1] === '/' ? -1 : 1;
    const power = sign * exponent(match[2]);
    size *= known.size ** power;
    powers = powers.map((p, k) => p + power * known.powers[k]) as unknown as Powers;
  }
  return { size, powers };
}

function exponent(written: string | undefined): number {
  if (written === undefined) return 1;
  if (written === '²') return 2;
  return written === '³' ? 3 : Number(written);
}

const samePowers = (a: Powers, b: Powers): boolean => a.every((power, k) => power === b[k]);

function nameOf(powers: Powers): string {
  const known = [...Object.values(KINDS), ...OTHER_DIMENSIONS].find((kind) => samePowers(kind.powers, powers));
  return known?.words ?? 'something else';
}
