import {
  APOSTROPHE,
  ASTERISK,
  afterComment,
  afterString,
  DIGIT_0,
  EQUALS,
  HASH,
  isDigit,
  SEMICOLON,
  SLASH,
  skipBlank,
} from './bytes.ts';

/** What a walk over a file's statements meets, in file order. */
export interface ReferenceVisitor {
  /** Instance `id` refers to instance `to`; called once for each time it does. */
  readonly reference: (id: number, to: number) => void;
  /** Instance `id` stood in the bytes from its `#` up to `end`, after its semicolon. */
  readonly instance?: (id: number, begin: number, end: number) => void;
  /** The characters of a string stand between these offsets, its apostrophes left out. */
  readonly text?: (begin: number, end: number) => void;
}

/** 1 for the bytes at which the walk has to look closer. */
const STOPS = new Uint8Array(256);
for (const byte of [APOSTROPHE, HASH, SLASH, SEMICOLON]) STOPS[byte] = 1;

/**
 * Walks over the bytes between two offsets, each between statements, and tells every instance and whatever it refers to. Nothing is
 * parsed, so this costs a fraction of reading the instances and finds references wherever they stand.
 */
export function walkReferences(bytes: Uint8Array, from: number, to: number, visitor: ReferenceVisitor): void {
  let id = 0;
  let begin = from;
  let p = from;
  while (p < to) {
    while (p < to && STOPS[bytes[p]] === 0) p++;
    if (p >= to) return;
    switch (bytes[p]) {
      case APOSTROPHE: {
        const end = afterString(bytes, p + 1);
        if (end < 0) return;
        visitor.text?.(p + 1, end - 1);
        p = end;
        break;
      }
      case SLASH:
        p = bytes[p + 1] === ASTERISK ? afterComment(bytes, p) : p + 1;
        break;
      case SEMICOLON:
        p++;
        if (id > 0) visitor.instance?.(id, begin, p);
        id = 0;
        break;
      default: {
        const hash = p++;
        let number = 0;
        while (isDigit(bytes[p])) number = number * 10 + (bytes[p++] - DIGIT_0);
        if (p === hash + 1) break;
        if (bytes[skipBlank(bytes, p)] === EQUALS) {
          id = number;
          begin = hash;
        } else if (id > 0) visitor.reference(id, number);
      }
    }
  }
}
