import type { Remark } from '../findings-log.ts';
import { whose } from '../findings-log.ts';
import { type Kind, STEEL } from './kinds.ts';
import type { StatedNumbers } from './stated-properties.ts';

type Key = keyof StatedNumbers;
type Bounds = Readonly<Record<Key, readonly [least: number, most: number]>>;

/** What structural steels of any kind stay within, with room: common practice. */
const STEEL_BOUNDS: Bounds = {
  elasticModulus: [150e9, 250e9],
  density: [7000, 8600],
  expansion: [5e-6, 25e-6],
  yieldStrength: [100e6, 2000e6],
  ultimateStrength: [150e6, 2500e6],
};

/** Anything that is built with. */
const ANY_BOUNDS: Bounds = {
  elasticModulus: [1e6, 1e12],
  density: [10, 25e3],
  expansion: [1e-7, 1e-3],
  yieldStrength: [1e5, 5e9],
  ultimateStrength: [1e5, 5e9],
};

const isSteel = (kind: Kind): boolean => kind.kind.endsWith('steel');

function boundsFor(kind: Kind | null): Bounds {
  if (kind === null) return ANY_BOUNDS;
  if (isSteel(kind)) return STEEL_BOUNDS;
  const around = (value: number, factor: number) => [value / factor, value * factor] as const;
  return {
    ...ANY_BOUNDS,
    elasticModulus: around(kind.elasticModulus, 10),
    density: around(kind.density, 4),
    expansion: around(kind.expansion, 10),
  };
}

const WORDS: Readonly<Record<Key, readonly [what: string, unit: string, size: number]>> = {
  elasticModulus: ['modulus of elasticity', 'MPa', 1e6],
  density: ['density', 'kg/m3', 1],
  expansion: ['thermal expansion', '1/K', 1],
  yieldStrength: ['yield strength', 'MPa', 1e6],
  ultimateStrength: ['ultimate strength', 'MPa', 1e6],
};

/**
 * Of the numbers that the file states of material `name` those that can be true, with a remark on each of the others. Zeros
 * are what exporters write for what they do not know.
 */
export function plausibleNumbers(
  name: string,
  stated: StatedNumbers,
  kind: Kind | null,
): { numbers: StatedNumbers; doubts: Remark[] } {
  const bounds = boundsFor(kind);
  const numbers: StatedNumbers = {};
  const doubts: Remark[] = [];
  for (const key of Object.keys(stated) as Key[]) {
    const value = stated[key]!;
    const [least, most] = bounds[key];
    if (value === 0) continue;
    if (value >= least && value <= most) numbers[key] = value;
    else doubts.push(implausible(name, key, value, kind));
  }
  const { yieldStrength, ultimateStrength } = numbers;
  if (yieldStrength !== undefined && ultimateStrength !== undefined && ultimateStrength < yieldStrength) {
    delete numbers.ultimateStrength;
    doubts.push(implausible(name, 'ultimateStrength', ultimateStrength, kind));
  }
  return { numbers, doubts };
}

function implausible(name: string, key: Key, value: number, kind: Kind | null): Remark {
  const [what, unit, size] = WORDS[key];
  const written = `${Number((value / size).toPrecision(4))} ${unit}`;
  const called = kind === STEEL ? 'a steel' : kind === null ? 'a material' : kind.kind;
  return {
    code: 'material-implausible',
    key: `${name} ${key}`,
    say: (count, first) =>
      `${whose(count, first, 'have', 'has')} the material '${name}', of which the file states a ${what} of ${written}; ${called} has no such value, and it is set aside.`,
    advice: 'Look at the units of the material in the model and export it again.',
  };
}
