import { CLOSE, COMMA, DIGIT_0, HASH, isDigit, LETTER_E, latin1, MINUS, OPEN, PLUS, POINT, SPACE } from './bytes.ts';
import { exactReal } from './exact-real.ts';

/** Values that stand in a list which PlainLists has found plain, so that nothing about them needs to be tried again. */

/** The ids in the list of nothing but references at `at` in a plain list; null where something else stands there. */
export function plainRefs(bytes: Uint8Array, at: number): number[] | null {
  if (bytes[at] !== OPEN) return null;
  let p = afterBlank(bytes, at + 1);
  if (bytes[p] === CLOSE) return [];
  // Most lists have one or two items, and an array that grows takes room for seventeen.
  const ids = new Array<number>(itemsFrom(bytes, p));
  for (let i = 0; ; i++) {
    if (bytes[p] !== HASH) return null;
    let id = 0;
    for (p++; isDigit(bytes[p]); p++) id = id * 10 + (bytes[p] - DIGIT_0);
    ids[i] = id;
    p = afterBlank(bytes, p);
    if (bytes[p] === CLOSE) return ids;
    p = afterBlank(bytes, p + 1);
  }
}

function itemsFrom(bytes: Uint8Array, at: number): number {
  let count = 1;
  for (let p = at; bytes[p] !== CLOSE; p++) if (bytes[p] === COMMA) count++;
  return count;
}

function afterBlank(bytes: Uint8Array, at: number): number {
  let p = at;
  while (bytes[p] <= SPACE) p++;
  return p;
}

/** A number of so many characters, its exponent of two digits at most, cannot overflow. */
const LONGEST_NUMBER = 40;

/** Reads single numbers; the value stands in an array because a number given back would be an object of its own. */
export class NumberScanner {
  readonly value = new Float64Array(1);

  /** The offset after the number at `at`; -1 where anything about it is out of the ordinary. */
  scan(bytes: Uint8Array, at: number): number {
    let p = at;
    const isNegative = bytes[p] === MINUS;
    if (isNegative || bytes[p] === PLUS) p++;
    let digit = bytes[p] - DIGIT_0;
    if (!(digit >= 0 && digit <= 9)) return -1;
    let mantissa = 0;
    let exponent = 0;
    for (; digit >= 0 && digit <= 9; digit = bytes[++p] - DIGIT_0) mantissa = mantissa * 10 + digit;
    if (bytes[p] === POINT) {
      for (digit = bytes[++p] - DIGIT_0; digit >= 0 && digit <= 9; digit = bytes[++p] - DIGIT_0) {
        mantissa = mantissa * 10 + digit;
        exponent--;
      }
    }
    if (bytes[p] === LETTER_E) {
      const isDownward = bytes[++p] === MINUS;
      if (isDownward || bytes[p] === PLUS) p++;
      const end = p + 2;
      let power = 0;
      if (!isDigit(bytes[p])) return -1;
      for (; p < end && isDigit(bytes[p]); p++) power = power * 10 + (bytes[p] - DIGIT_0);
      exponent += isDownward ? -power : power;
    }
    if (p - at > LONGEST_NUMBER) return -1;
    let size = exactReal(mantissa, exponent);
    if (!(size >= 0)) size = Math.abs(Number(latin1(bytes, at, p)));
    this.value[0] = isNegative ? -size : size;
    return p;
  }
}

const scanner = new NumberScanner();

/**
 * Fills `into` with the list of nothing but numbers at `at`, which need not stand in a plain list.
 * @param isOnly whether it has to be the last parameter
 * @returns how many there are, `into` or not; -1 where anything about them is out of the ordinary.
 */
export function plainNumbers(bytes: Uint8Array, at: number, into: Float64Array, isOnly = false): number {
  if (bytes[at] !== OPEN) return -1;
  let count = 0;
  let p = at;
  do {
    p = scanner.scan(bytes, afterBlank(bytes, p + 1));
    if (p < 0) return -1;
    if (count < into.length) into[count] = scanner.value[0];
    count++;
    while (bytes[p] <= SPACE) p++;
  } while (bytes[p] === COMMA);
  return bytes[p] === CLOSE && (!isOnly || bytes[p + 1] === CLOSE) ? count : -1;
}
