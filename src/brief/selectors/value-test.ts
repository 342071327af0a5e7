import type { Range } from '../types.ts';
import { textTest } from './pattern.ts';
import { isWithin } from './within-range.ts';

type Value = string | number | boolean;

/** Numbers of a model are rounded when written, and again when brought to SI. */
const PRECISION = 1e-6;

/**
 * A test for one value of a property. A text is a pattern, which numbers and truth values meet as they are written; a number
 * or range meets numbers only, its ends included, to a millionth of their size.
 */
export function valueTest(wanted: boolean | number | string | Range): (value: Value) => boolean {
  if (typeof wanted === 'boolean') return (value) => value === wanted;
  if (typeof wanted === 'string') {
    const fits = textTest(wanted);
    return (value) => fits(String(value));
  }
  const range: Range = typeof wanted === 'number' ? [wanted, wanted] : wanted;
  const largest = Math.max(...range.map((end) => Math.abs(end ?? 0)));
  return (value) => typeof value === 'number' && isWithin(value, range, PRECISION * largest);
}
