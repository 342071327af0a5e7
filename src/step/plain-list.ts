import {
  APOSTROPHE,
  ASTERISK,
  BACKSLASH,
  CLOSE,
  COMMA,
  DIGIT_0,
  DIGIT_9,
  DOLLAR,
  HASH,
  IN_KEYWORD,
  isDigit,
  LETTER_E,
  MINUS,
  OPEN,
  PLUS,
  POINT,
  SPACE,
} from './bytes.ts';

/** 1 for the bytes that stand for themselves in a string. */
export const IS_PLAIN = Uint8Array.from({ length: 256 }, (_, byte) =>
  byte === APOSTROPHE || byte === BACKSLASH || byte > 0x7e ? 0 : 1,
);

/** Few entities have more attributes; of those the values are read the long way. */
const MOST_PARAMETERS = 32;
/** A power of two: an element and all that its shape is made of. */
const KEPT = 64;
/** The list has no such parameter. */
export const ABSENT = -1;
/** The list has to be read whole. */
export const MIXED = -2;
/** The parameter is no reference. */
export const NO_REF = -3;
/** A number of so many characters cannot overflow unless its exponent has three digits. */
const LONGEST_NUMBER = 40;

/**
 * Where the parameters of lists begin and what they refer to, found in one pass without making values of them, so that one
 * of them can be read alone. Only of plain lists: references, unescaped strings, numbers, enumerations, `$`, `*` and lists
 * of these, which cannot hold a fault. Any other list has to be read whole, so that its faults are told whichever of its
 * values is asked for.
 */
export class PlainLists {
  private readonly bytes: Uint8Array;
  /** Of the lists marked last: the offset of each one's bracket (0 for none), how many parameters it has, or MIXED. */
  private readonly opens = new Uint32Array(KEPT);
  private readonly counts = new Int8Array(KEPT);
  /** Where their parameters begin, and the ids they refer to, or NO_REF. */
  private readonly starts = new Uint32Array(KEPT * MOST_PARAMETERS);
  private readonly refs = new Float64Array(KEPT * MOST_PARAMETERS);

  constructor(bytes: Uint8Array) {
    this.bytes = bytes;
  }

  /** Where parameter `index` of the list that opens at `open` begins; ABSENT or MIXED (each below 0) where that is not known. */
  startOf(open: number, row: number, index: number): number {
    const slot = this.slotOf(open, row);
    const count = this.counts[slot];
    if (index < count) return this.starts[slot * MOST_PARAMETERS + index];
    return count === MIXED ? MIXED : ABSENT;
  }

  /** The id that the parameter refers to; NO_REF, ABSENT or MIXED (each below 0) where there is none, or it is not known. */
  refOf(open: number, row: number, index: number): number {
    const slot = this.slotOf(open, row);
    const count = this.counts[slot];
    if (index < count) return this.refs[slot * MOST_PARAMETERS + index];
    return count === MIXED ? MIXED : ABSENT;
  }

  /** Where the marks of the list are. */
  private slotOf(open: number, row: number): number {
    const slot = row & (KEPT - 1);
    if (this.opens[slot] !== open) {
      this.opens[slot] = open;
      this.counts[slot] = this.scan(open, slot * MOST_PARAMETERS);
    }
    return slot;
  }

  /** Marks the parameters from `first` on; how many there are, or MIXED. */
  private scan(open: number, first: number): number {
    const { bytes, starts, refs } = this;
    let count = 0;
    let depth = 1;
    let p = afterBlank(bytes, open + 1);
    if (bytes[p] === CLOSE) return 0;
    for (;;) {
      let id = NO_REF;
      const from = p;
      if (bytes[p] === HASH) {
        id = 0;
        for (let digit = bytes[++p] - DIGIT_0; digit >= 0 && digit <= 9; digit = bytes[++p] - DIGIT_0)
          id = id * 10 + digit;
        if (p === from + 1) return MIXED;
      } else if (bytes[p] !== OPEN) p = afterPlainValue(bytes, p);
      if (depth === 1) {
        if (count === MOST_PARAMETERS || p < 0) return MIXED;
        starts[first + count] = from;
        refs[first + count++] = id;
      } else if (p < 0) return MIXED;
      if (p === from) {
        p = afterBlank(bytes, p + 1);
        depth++;
        if (bytes[p] !== CLOSE) continue;
      }
      if (bytes[p] === COMMA && bytes[p + 1] > SPACE) {
        p++;
        continue;
      }
      while (bytes[p] <= SPACE) p++;
      while (bytes[p] === CLOSE) {
        p++;
        if (--depth === 0) return count;
        while (bytes[p] <= SPACE) p++;
      }
      if (bytes[p] !== COMMA) return MIXED;
      p = afterBlank(bytes, p + 1);
    }
  }
}

function afterBlank(bytes: Uint8Array, at: number): number {
  let p = at;
  while (bytes[p] <= SPACE) p++;
  return p;
}

/** The offset after the value at `at`, which is neither a reference nor a list; -1 where it is not plain. */
function afterPlainValue(bytes: Uint8Array, at: number): number {
  let p = at + 1;
  switch (bytes[at]) {
    case APOSTROPHE:
      while (IS_PLAIN[bytes[p]] === 1) p++;
      return bytes[p] === APOSTROPHE && bytes[p + 1] !== APOSTROPHE ? p + 1 : -1;
    case DOLLAR:
    case ASTERISK:
      return p;
    case POINT:
      while (IN_KEYWORD[bytes[p]] === 1) p++;
      return bytes[p] === POINT && p > at + 1 && !isDigit(bytes[at + 1]) ? p + 1 : -1;
    default:
      return afterPlainNumber(bytes, at);
  }
}

function afterPlainNumber(bytes: Uint8Array, at: number): number {
  let p = at;
  if (bytes[p] === MINUS || bytes[p] === PLUS) p++;
  if (!isDigit(bytes[p])) return -1;
  while (bytes[p] >= DIGIT_0 && bytes[p] <= DIGIT_9) p++;
  if (bytes[p] === POINT) {
    p++;
    while (bytes[p] >= DIGIT_0 && bytes[p] <= DIGIT_9) p++;
  }
  if (bytes[p] === LETTER_E) {
    p++;
    if (bytes[p] === MINUS || bytes[p] === PLUS) p++;
    if (!isDigit(bytes[p++])) return -1;
    if (isDigit(bytes[p])) p++;
  }
  return p - at <= LONGEST_NUMBER ? p : -1;
}
