import type { Range } from '../types.ts';

/** m: coordinates are compared as they are printed, to 0.1 mm, so that a level of 6.2 m takes what is shown as 6.2 m. */
export const LENGTH_PRECISION = 1e-4;

/** rad; about a 0.1 mm rise on a metre. */
export const ANGLE_PRECISION = 1e-4;

/** Whether a value lies in a range, its ends included, to within `precision`. */
export function isWithin(value: number, [from, to]: Range, precision: number): boolean {
  return (from === null || value >= from - precision) && (to === null || value <= to + precision);
}
