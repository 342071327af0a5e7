import { TextDecoder } from 'node:util';
import { APOSTROPHE, BACKSLASH, LETTER_S, latin1 } from './bytes.ts';

/** A decoded string and whether something in it had to be guessed or given up. */
export interface DecodedString {
  readonly text: string;
  readonly broken: boolean;
}

const LETTER_P = 0x50;
const LETTER_X = 0x58;
const REPLACEMENT = '\ufffd';

/** Windows code page 1252 where it differs from ISO 8859-1 (bytes 80 to 9F; five are unassigned), which is what programs that write single bytes mean. */
const WINDOWS_80_TO_9F = '€\ufffd‚ƒ„…†‡ˆ‰Š‹Œ\ufffdŽ\ufffd\ufffd‘’“”•–—˜™š›œ\ufffdžŸ';

/** ISO 8859-2 to 8859-9 by the letter of the `\P?\` directive, made when first met. */
const pageDecoders = new Map<string, TextDecoder>();

/**
 * The text of a string (ISO 10303-21, 6.4.3) whose bytes between the apostrophes are `from` to `to`.
 *
 * Raw bytes above 7E are read as UTF-8 where they are that (edition 3 allows it) and as Windows-1252 otherwise, which counts as broken.
 * Raw line feeds are kept. An escape that is not one stays as written and counts as broken.
 */
export function decodeString(bytes: Uint8Array, from: number, to: number): DecodedString {
  for (let p = from; p < to; p++) {
    const byte = bytes[p];
    if (byte === BACKSLASH || byte === APOSTROPHE || byte > 0x7e) return decodeSlowly(bytes, from, to, p);
  }
  return { text: latin1(bytes, from, to), broken: false };
}

function decodeSlowly(bytes: Uint8Array, from: number, to: number, firstSpecial: number): DecodedString {
  const decoder = new EscapeDecoder(latin1(bytes, from, to));
  return decoder.decode(firstSpecial - from);
}

/** Works through the bytes as characters of the same number. */
class EscapeDecoder {
  private readonly raw: string;
  private readonly parts: string[] = [];
  private page = 'A';
  private broken = false;

  constructor(raw: string) {
    this.raw = raw;
  }

  decode(firstSpecial: number): DecodedString {
    const { raw } = this;
    let plainFrom = 0;
    let at = firstSpecial;
    while (at < raw.length) {
      const code = raw.charCodeAt(at);
      if (code !== BACKSLASH && code !== APOSTROPHE && code <= 0x7e) {
        at++;
        continue;
      }
      this.parts.push(raw.slice(plainFrom, at));
      at = code === BACKSLASH ? this.escape(at) : code === APOSTROPHE ? this.apostrophe(at) : this.highBytes(at);
      plainFrom = at;
    }
    this.parts.push(raw.slice(plainFrom));
    const text = this.parts.join('');
    return { text, broken: this.broken };
  }

  private apostrophe(at: number): number {
    this.parts.push("'");
    return this.raw.charCodeAt(at + 1) === APOSTROPHE ? at + 2 : at + 1;
  }

  private highBytes(at: number): number {
    let end = at + 1;
    while (end < this.raw.length && this.raw.charCodeAt(end) > 0x7e) end++;
    const run = this.raw.slice(at, end);
    const bytes = Buffer.from(run, 'latin1');
    // Decoding without an exception: files written in single bytes have hundreds of thousands of these.
    const text = bytes.toString('utf8');
    if (text.includes(REPLACEMENT)) {
      this.broken = true;
      this.parts.push(run.replace(/[\x80-\x9f]/g, (byte) => WINDOWS_80_TO_9F.charAt(byte.charCodeAt(0) - 0x80)));
    } else this.parts.push(text);
    return end;
  }

  private escape(at: number): number {
    const { raw } = this;
    const directive = raw.charCodeAt(at + 1);
    if (directive === BACKSLASH) {
      this.parts.push('\\');
      return at + 2;
    }
    if (directive === LETTER_S && raw[at + 2] === '\\' && at + 3 < raw.length) return this.shifted(at + 3);
    if (directive === LETTER_P && /^[A-I]\\/.test(raw.slice(at + 2, at + 4))) {
      this.page = raw.charAt(at + 2);
      return at + 4;
    }
    if (directive === LETTER_X) {
      if (raw[at + 2] === '\\') return this.oneByte(at);
      if (raw.startsWith('2\\', at + 2)) return this.codes(at, 4);
      if (raw.startsWith('4\\', at + 2)) return this.codes(at, 8);
    }
    return this.asWritten(at);
  }

  private asWritten(at: number): number {
    this.broken = true;
    this.parts.push('\\');
    return at + 1;
  }

  /** `\S\c`: the character 80 above `c` in the current page of ISO 8859. */
  private shifted(at: number): number {
    const code = this.raw.charCodeAt(at);
    if (code < 0x20 || code > 0x7e) {
      this.broken = true;
      return at;
    }
    const text = this.page === 'A' ? String.fromCharCode(code + 0x80) : decodeOnPage(this.page, code + 0x80);
    if (text === REPLACEMENT) this.broken = true;
    this.parts.push(text);
    return at + 1;
  }

  /** `\X\hh` */
  private oneByte(at: number): number {
    const hex = this.raw.slice(at + 3, at + 5);
    if (!/^[0-9A-Fa-f]{2}$/.test(hex)) return this.asWritten(at);
    this.parts.push(String.fromCharCode(Number.parseInt(hex, 16)));
    return at + 5;
  }

  /** `\X2\hhhh...\X0\` and `\X4\hhhhhhhh...\X0\` */
  private codes(at: number, width: number): number {
    const { raw } = this;
    const digit = /[0-9A-Fa-f]/;
    let end = at + 4;
    while (end < raw.length && digit.test(raw.charAt(end))) end++;
    const whole = at + 4 + Math.floor((end - at - 4) / width) * width;
    const closed = raw.startsWith('\\X0\\', end);
    if (!closed || whole !== end || whole === at + 4) this.broken = true;
    if (whole === at + 4 && !closed) return this.asWritten(at);
    let text = '';
    for (let p = at + 4; p < whole; p += width) {
      const code = Number.parseInt(raw.slice(p, p + width), 16);
      text += width === 4 ? String.fromCharCode(code) : this.character(code);
    }
    this.parts.push(this.wellFormed(text), raw.slice(whole, end));
    return closed ? end + 4 : end;
  }

  private character(codePoint: number): string {
    const valid = codePoint <= 0x10ffff && !(codePoint >= 0xd800 && codePoint <= 0xdfff);
    if (!valid) this.broken = true;
    return valid ? String.fromCodePoint(codePoint) : REPLACEMENT;
  }

  private wellFormed(text: string): string {
    const loneSurrogate = /\p{Surrogate}/gu;
    if (!loneSurrogate.test(text)) return text;
    this.broken = true;
    return text.replace(loneSurrogate, REPLACEMENT);
  }
}

function decodeOnPage(page: string, code: number): string {
  let decoder = pageDecoders.get(page);
  if (decoder === undefined) {
    decoder = new TextDecoder(`iso-8859-${page.charCodeAt(0) - 0x40}`);
    pageDecoders.set(page, decoder);
  }
  return decoder.decode(Uint8Array.of(code));
}
