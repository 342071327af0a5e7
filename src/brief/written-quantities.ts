import { z } from 'zod';
import { didYouMean } from '../domain/nearest-word.ts';
import {
  parseQuantity,
  QuantityError,
  type QuantityKind,
  splitQuantity,
  UNIT_NAMES,
  wordsFor,
} from '../domain/units.ts';
import type { Range } from './types.ts';

/** Quantities and ranges as a brief writes them; they come out in SI. */

export type Problems = { addIssue(issue: { code: 'custom'; message: string; path?: (string | number)[] }): void };

function inSi(value: number | string, kind: QuantityKind, problems: Problems): number {
  if (typeof value === 'number') return value;
  try {
    return parseQuantity(value, kind);
  } catch (error) {
    if (!(error instanceof QuantityError)) throw error;
    const hint = error.unknownUnit === null ? '' : didYouMean(error.unknownUnit, UNIT_NAMES);
    problems.addIssue({ code: 'custom', message: error.message + hint });
    return 0;
  }
}

/** A bare number in SI, or a text with its unit. */
export const quantity = (kind: QuantityKind) =>
  z
    .union([z.number(), z.string()], { error: `${wordsFor(kind)} is due` })
    .transform((value, context) => inSi(value, kind, context))
    .describe(`${wordsFor(kind)}; a bare number is SI`);

/** As `quantity`, but never below zero. */
export const positive = (kind: QuantityKind) =>
  quantity(kind).refine((value) => value > 0, 'this must be greater than zero');

export const vector = (kind: QuantityKind) => z.tuple([quantity(kind), quantity(kind), quantity(kind)]);

const end = z.union([z.number(), z.string(), z.null()], { error: 'a quantity, or null for an open end, is due' });

/** `[from, to]` or "from..to"; an end that is null or left out is open. */
export const range = (kind: QuantityKind) =>
  z
    .union([z.tuple([end, end]), z.string()], {
      error: `a range, [from, to] or "from..to", of ${wordsFor(kind)} is due`,
    })
    .transform((written, context) => readRange(written, kind, context))
    .describe(`[from, to] or "from..to", either end open: ${wordsFor(kind)}; bare numbers are SI`);

function readRange(
  written: readonly (number | string | null)[] | string,
  kind: QuantityKind,
  problems: Problems,
): Range {
  const ends = typeof written === 'string' ? splitRange(written, kind, problems) : written;
  const [from, to] = ends.map((value) => (value === null ? null : inSi(value, kind, problems))) as [
    number | null,
    number | null,
  ];
  const say = (message: string) => problems.addIssue({ code: 'custom', message });
  const bare = ends.filter((value) => typeof value === 'number' && value !== 0).length;
  const named = ends.filter((value) => typeof value === 'string').length;
  if (bare > 0 && named > 0) say('one end has a unit and the other has none: give both their unit');
  else if (from === null && to === null) say('both ends are open: leave the key out');
  else if (from !== null && to !== null && from > to) say('the range runs backwards: the lower end comes first');
  return [from, to];
}

function splitRange(written: string, kind: QuantityKind, problems: Problems): (number | string | null)[] {
  const parts = written.split('..').map((part) => part.trim());
  if (parts.length !== 2) {
    problems.addIssue({ code: 'custom', message: `a range is written [from, to] or "from..to", of ${wordsFor(kind)}` });
    return [0, 0];
  }
  return parts.map((part) => {
    if (part === '') return null;
    try {
      const { value, unit: name } = splitQuantity(part, kind);
      return name === '' ? value : part;
    } catch {
      return part;
    }
  });
}

/** Slopes lie between 0 and 90 degrees, so a number beyond is one of degrees without its unit. */
export const slopeRange = range('angle').refine(
  (ends) => ends.every((value) => value === null || (value >= 0 && value <= Math.PI / 2 + 1e-9)),
  'a slope lies between 0 and 90 deg, and a bare number is in radians: write "20 deg..40 deg"',
);
