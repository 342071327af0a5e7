import { ModelError } from '../domain/errors.ts';

export const LINE_FEED = 0x0a;
export const CARRIAGE_RETURN = 0x0d;
export const SPACE = 0x20;
export const QUOTATION = 0x22;
export const HASH = 0x23;
export const DOLLAR = 0x24;
export const APOSTROPHE = 0x27;
export const OPEN = 0x28;
export const CLOSE = 0x29;
export const ASTERISK = 0x2a;
export const PLUS = 0x2b;
export const COMMA = 0x2c;
export const MINUS = 0x2d;
export const POINT = 0x2e;
export const SLASH = 0x2f;
export const DIGIT_0 = 0x30;
export const DIGIT_9 = 0x39;
export const SEMICOLON = 0x3b;
export const EQUALS = 0x3d;
export const LETTER_E = 0x45;
export const LETTER_S = 0x53;
export const BACKSLASH = 0x5c;

/** 1 for the bytes of a keyword after its first: letters, digits, underscore, and the `!` before user-defined names. */
export const IN_KEYWORD = tableOf(/[A-Za-z0-9_!]/);
/** 1 for the bytes a keyword may begin with. */
export const STARTS_KEYWORD = tableOf(/[A-Za-z_!]/);
/** The upper-case form of each byte in a keyword; 0 for all other bytes. */
export const UPPER_IN_KEYWORD = IN_KEYWORD.map((isIn, byte) => (isIn === 1 ? upper(byte) : 0));

function tableOf(pattern: RegExp): Uint8Array {
  return Uint8Array.from({ length: 256 }, (_, code) => (pattern.test(String.fromCharCode(code)) ? 1 : 0));
}

export function isDigit(byte: number): boolean {
  return byte >= DIGIT_0 && byte <= DIGIT_9;
}

/** Lower-case letters made upper-case, everything else as it is. */
export function upper(byte: number): number {
  return byte >= 0x61 && byte <= 0x7a ? byte - 0x20 : byte;
}

/** The first offset from `at` on that is neither white space nor inside a comment; `bytes.length` at the end. */
export function skipBlank(bytes: Uint8Array, at: number): number {
  let p = at;
  while (p < bytes.length) {
    if (bytes[p] <= SPACE) p++;
    else if (bytes[p] === SLASH && bytes[p + 1] === ASTERISK) p = afterComment(bytes, p);
    else break;
  }
  return p;
}

/** The offset after the comment that opens at `at`. Throws ModelError where it is not closed. */
export function afterComment(bytes: Uint8Array, at: number): number {
  for (let p = bytes.indexOf(ASTERISK, at + 2); p !== -1; p = bytes.indexOf(ASTERISK, p + 1)) {
    if (bytes[p + 1] === SLASH) return p + 2;
  }
  throw new ModelError(`The file is damaged: a comment that opens on line ${lineOf(bytes, at)} is never closed.`);
}

/** The offset after the closing apostrophe of the string whose text begins at `at`; `''` inside counts as text for callers that go on. -1 where the file ends first. */
export function afterString(bytes: Uint8Array, at: number): number {
  for (let p = at; p < bytes.length; p++) {
    if (bytes[p] === APOSTROPHE && !isShiftedApostrophe(bytes, p)) return p + 1;
  }
  return -1;
}

/** The offset after the line ending at `at`; `at` where there is none. */
export function afterLineEnding(bytes: Uint8Array, at: number): number {
  if (bytes[at] === CARRIAGE_RETURN) return bytes[at + 1] === LINE_FEED ? at + 2 : at + 1;
  return bytes[at] === LINE_FEED ? at + 1 : at;
}

/**
 * ISO 10303-21 lets `\S\'` stand for U+00A7, so that an apostrophe there does not close its string. Exporters that do not double
 * their backslashes also end a path with `\S\'`; what follows decides: after a string only a comma or a bracket can.
 */
export function isShiftedApostrophe(bytes: Uint8Array, at: number): boolean {
  if (bytes[at - 1] !== BACKSLASH || bytes[at - 2] !== LETTER_S || bytes[at - 3] !== BACKSLASH) return false;
  let next = at + 1;
  while (next < bytes.length && bytes[next] <= SPACE) next++;
  return bytes[next] !== COMMA && bytes[next] !== CLOSE;
}

/** Whether `word` (upper-case) stands at `at`, in any case, and ends there. */
export function isWordAt(bytes: Uint8Array, at: number, word: string): boolean {
  for (let i = 0; i < word.length; i++) {
    if (upper(bytes[at + i]) !== word.charCodeAt(i)) return false;
  }
  return at + word.length >= bytes.length || IN_KEYWORD[bytes[at + word.length]] === 0;
}

/** The bytes from `from` to `to` as characters of the same number. */
export function latin1(bytes: Uint8Array, from: number, to: number): string {
  return asBuffer(bytes).toString('latin1', from, to);
}

/** The same bytes as a Buffer, which makes strings of them without a copy. */
export function asBuffer(bytes: Uint8Array): Buffer {
  return bytes instanceof Buffer ? bytes : Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

/** The number of the line, from 1, that `at` stands on. */
export function lineOf(bytes: Uint8Array, at: number): number {
  return new LineCounter(bytes).lineOf(at);
}

/** Numbers lines for offsets that mostly ascend, going over the file once in all. */
export class LineCounter {
  private readonly bytes: Uint8Array;
  private counted = 0;
  private line = 1;

  constructor(bytes: Uint8Array) {
    this.bytes = bytes;
  }

  lineOf(at: number): number {
    if (at < this.counted) return lineOf(this.bytes, at);
    for (;;) {
      const lineFeed = this.bytes.indexOf(LINE_FEED, this.counted);
      if (lineFeed === -1 || lineFeed >= at) return this.line;
      this.counted = lineFeed + 1;
      this.line++;
    }
  }
}

/** A few words of the file made fit for a message: short, one line, printable. */
export function excerpt(bytes: Uint8Array, from: number, to: number): string {
  const text = latin1(bytes, from, Math.min(to, from + 24)).replace(/[^\x20-\x7e]/g, '?');
  return to - from > 24 ? `${text}...` : text;
}
