import { asBuffer } from './bytes.ts';

/** Longer texts are names, which seldom come again. */
const LONGEST = 20;
const SLOTS = 1 << 10;

/**
 * Short texts that come again and again (`Axis`, `MEMBER`, `SweptSolid`), each made once: making a string costs several times
 * what reading its characters does. A slot holds the text that was met last, so that a file of many texts costs no memory.
 */
export class ShortTexts {
  private readonly bytes: Buffer;
  private readonly texts: string[] = new Array<string>(SLOTS).fill('');

  constructor(bytes: Uint8Array) {
    this.bytes = asBuffer(bytes);
  }

  /** The bytes from `from` to `to` as characters of the same number. */
  textOf(from: number, to: number): string {
    const { bytes, texts } = this;
    if (to - from > LONGEST) return bytes.toString('latin1', from, to);
    let hash = to - from;
    for (let p = from; p < to; p++) hash = Math.imul(hash ^ bytes[p], 0x01000193);
    const slot = (hash ^ (hash >>> 15)) & (SLOTS - 1);
    const known = texts[slot] as string;
    if (isSame(known, bytes, from, to)) return known;
    const text = bytes.toString('latin1', from, to);
    texts[slot] = text;
    return text;
  }
}

function isSame(text: string, bytes: Uint8Array, from: number, to: number): boolean {
  if (text.length !== to - from) return false;
  for (let i = 0; i < text.length; i++) if (text.charCodeAt(i) !== bytes[from + i]) return false;
  return true;
}
