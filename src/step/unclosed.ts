import { ModelError } from '../domain/errors.ts';
import { APOSTROPHE, afterString, EQUALS, HASH, isDigit, LINE_FEED, lineOf, SPACE } from './bytes.ts';

/** A string that is never closed turns text and strings about from there on; the first that swallows the start of an instance is to blame. */
export function unclosedString(bytes: Uint8Array, lastId: number | null): ModelError {
  let line = lineOf(bytes, bytes.length);
  let at = 0;
  for (let p = bytes.indexOf(APOSTROPHE); p !== -1; p = bytes.indexOf(APOSTROPHE, at)) {
    const end = afterString(bytes, p + 1);
    at = end === -1 ? bytes.length : end;
    if (end === -1 || swallowsInstance(bytes, p, at)) {
      line = lineOf(bytes, p);
      break;
    }
  }
  const last = lastId === null ? '' : ` The last instance read is #${lastId}.`;
  return new ModelError(`The file is damaged or cut off: a text that begins on line ${line} is never closed.${last}`);
}

function swallowsInstance(bytes: Uint8Array, from: number, to: number): boolean {
  for (let p = bytes.indexOf(LINE_FEED, from); p !== -1 && p < to; p = bytes.indexOf(LINE_FEED, p + 1)) {
    if (bytes[p + 1] !== HASH) continue;
    let q = p + 2;
    while (isDigit(bytes[q])) q++;
    if (q > p + 2 && bytes[skipSpaces(bytes, q)] === EQUALS) return true;
  }
  return false;
}

function skipSpaces(bytes: Uint8Array, at: number): number {
  let p = at;
  while (bytes[p] === SPACE) p++;
  return p;
}
