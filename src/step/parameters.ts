import {
  APOSTROPHE,
  ASTERISK,
  afterString,
  asBuffer,
  CLOSE,
  COMMA,
  DIGIT_0,
  DOLLAR,
  EQUALS,
  excerpt,
  HASH,
  IN_KEYWORD,
  isDigit,
  LETTER_E,
  latin1,
  MINUS,
  OPEN,
  PLUS,
  POINT,
  QUOTATION,
  SEMICOLON,
  SPACE,
  STARTS_KEYWORD,
  skipBlank,
  upper,
} from './bytes.ts';
import { decodeString } from './decode-string.ts';
import { exactReal } from './exact-real.ts';
import { IS_PLAIN } from './plain-list.ts';
import type { StepProblemKind } from './problems.ts';
import { ShortTexts } from './short-texts.ts';
import { DERIVED, StepBinary, StepEnum, StepRef, StepTyped, type StepValue } from './values.ts';

/** Told what is wrong with a value and where. */
export type FaultSink = (kind: StepProblemKind, what: string) => void;

/** One record of an instance: its keyword and its parameters. */
export interface StepRecord {
  readonly type: string;
  readonly args: readonly StepValue[];
}

/** No schema nests lists beyond a handful; a file that does would exhaust the stack. */
const DEEPEST_NESTING = 200;

/** Reads parameter lists out of the bytes of a STEP file. Never throws on what it meets: a value that cannot be read is null and a fault. */
export class ParameterReader {
  /** Where reading stopped. */
  at = 0;
  private readonly bytes: Uint8Array;
  private readonly texts: ShortTexts;
  private fault: FaultSink = () => {};
  private depth = 0;

  constructor(bytes: Uint8Array) {
    this.bytes = asBuffer(bytes);
    this.texts = new ShortTexts(bytes);
  }

  /** The one value at `at`, which stands in a plain list and so has no fault. */
  readPlain(at: number): StepValue {
    this.at = at;
    this.depth = 0;
    return this.value() as StepValue;
  }

  /** The parameters of the list that opens at `at`; null where brackets and commas do not fit, with a fault told. */
  readList(at: number, fault: FaultSink): StepValue[] | null {
    this.fault = fault;
    this.at = at;
    this.depth = 0;
    const values = this.list();
    if (values === null) fault('unreadable-element', 'its parameters cannot be told apart');
    return values;
  }

  /** The records `A(...)B(...)` of an instance of several types, whose bracket opens at `at`; null where it cannot be read. */
  readRecords(at: number, fault: FaultSink): StepRecord[] | null {
    const { bytes } = this;
    const records: StepRecord[] = [];
    let p = skipBlank(bytes, at + 1);
    while (p < bytes.length && bytes[p] !== CLOSE) {
      const type = this.keywordAt(p);
      const open = skipBlank(bytes, p + type.length);
      const args = type !== '' && bytes[open] === OPEN ? this.readList(open, fault) : null;
      if (args === null) return null;
      records.push({ type, args });
      p = skipBlank(bytes, this.at);
    }
    this.at = p + 1;
    return records;
  }

  private keywordAt(at: number): string {
    const { bytes } = this;
    if (STARTS_KEYWORD[bytes[at]] !== 1) return '';
    let end = at + 1;
    while (IN_KEYWORD[bytes[end]] === 1) end++;
    return latin1(bytes, at, end).toUpperCase();
  }

  private list(): StepValue[] | null {
    const { bytes } = this;
    if (bytes[this.at] !== OPEN || this.depth >= DEEPEST_NESTING) return null;
    this.depth++;
    const values: StepValue[] = [];
    let p = this.blank(this.at + 1);
    if (bytes[p] === CLOSE) {
      this.at = p + 1;
      this.depth--;
      return values;
    }
    for (;;) {
      this.at = p;
      const value = this.value();
      if (value === undefined) return null;
      values.push(value);
      p = this.blank(this.at);
      const delimiter = bytes[p];
      p++;
      if (delimiter === CLOSE) break;
      if (delimiter !== COMMA) return null;
      p = this.blank(p);
    }
    this.at = p;
    this.depth--;
    return values;
  }

  private blank(at: number): number {
    const byte = this.bytes[at];
    return byte <= SPACE || byte === 0x2f ? skipBlank(this.bytes, at) : at;
  }

  /** The value at `this.at`; undefined where the list around it cannot be read on. */
  private value(): StepValue | undefined {
    const { bytes } = this;
    const byte = bytes[this.at];
    switch (byte) {
      case HASH:
        return this.reference();
      case APOSTROPHE:
        return this.string();
      case DOLLAR:
        return this.single(null);
      case ASTERISK:
        return this.single(DERIVED);
      case OPEN:
        return this.list() ?? undefined;
      case QUOTATION:
        return this.binary();
      case POINT:
        return isDigit(bytes[this.at + 1]) ? this.number() : this.enumeration();
      case COMMA:
      case CLOSE:
        this.fault('unreadable-element', 'a value is missing between two commas');
        return null;
      default:
        if (isDigit(byte) || byte === MINUS || byte === PLUS) return this.number();
        return STARTS_KEYWORD[byte] === 1 ? this.typed() : this.unreadable(this.at);
    }
  }

  private single(value: StepValue): StepValue | undefined {
    const from = this.at;
    this.at++;
    return this.endsHere() ? value : this.unreadable(from);
  }

  private endsHere(): boolean {
    const byte = this.bytes[this.at];
    if (byte === COMMA || byte === CLOSE) return true;
    const next = this.bytes[this.blank(this.at)];
    return next === COMMA || next === CLOSE;
  }

  private reference(): StepValue | undefined {
    const { bytes } = this;
    const from = this.at;
    let p = from + 1;
    let id = 0;
    while (isDigit(bytes[p])) id = id * 10 + (bytes[p++] - DIGIT_0);
    this.at = p;
    return p > from + 1 && this.endsHere() ? new StepRef(id) : this.unreadable(from);
  }

  private string(): StepValue | undefined {
    const { bytes } = this;
    const from = this.at + 1;
    let end = from;
    while (IS_PLAIN[bytes[end]] === 1) end++;
    if (bytes[end] === APOSTROPHE && bytes[end + 1] !== APOSTROPHE) {
      this.at = end + 1;
      return this.texts.textOf(from, end);
    }
    end = afterString(bytes, from);
    while (end !== -1 && bytes[end] === APOSTROPHE) end = afterString(bytes, end + 1);
    if (end === -1) return undefined;
    this.at = end;
    const { text, broken } = decodeString(bytes, from, end - 1);
    if (broken) {
      const written = excerpt(bytes, from, end - 1);
      this.fault('encoding-broken', `the text "${written}" is not encoded as the standard asks and was guessed`);
    }
    return text;
  }

  private binary(): StepValue | undefined {
    const { bytes } = this;
    const from = this.at;
    let p = from + 1;
    while (isHexDigit(bytes[p])) p++;
    if (bytes[p] !== QUOTATION) return this.unreadable(from);
    this.at = p + 1;
    return new StepBinary(latin1(bytes, from + 1, p));
  }

  private enumeration(): StepValue | undefined {
    const { bytes } = this;
    const from = this.at;
    let p = from + 1;
    while (IN_KEYWORD[bytes[p]] === 1) p++;
    if (bytes[p] !== POINT || p === from + 1) return this.unreadable(from);
    this.at = p + 1;
    if (p === from + 2) {
      const letter = upper(bytes[from + 1]);
      if (letter === 0x54) return true;
      if (letter === 0x46) return false;
    }
    return new StepEnum(this.texts.textOf(from + 1, p).toUpperCase());
  }

  private typed(): StepValue | undefined {
    const from = this.at;
    const type = this.keywordAt(from);
    const open = this.blank(from + type.length);
    if (this.bytes[open] !== OPEN) return this.unreadable(from);
    this.at = open;
    const values = this.list();
    if (values === null) return undefined;
    return new StepTyped(type, values.length === 1 ? (values[0] as StepValue) : values);
  }

  /** Reals as the standard writes them and as others do (`.5`, `5`, `1e-5`); what overflows is null and a fault. */
  private number(): StepValue | undefined {
    const { bytes } = this;
    const from = this.at;
    let p = from;
    const negative = bytes[p] === MINUS;
    if (negative || bytes[p] === PLUS) p++;
    let mantissa = 0;
    let digits = 0;
    let fractionDigits = 0;
    for (; isDigit(bytes[p]); p++, digits++) mantissa = mantissa * 10 + (bytes[p] - DIGIT_0);
    if (bytes[p] === POINT) {
      p++;
      for (; isDigit(bytes[p]); p++, fractionDigits++) mantissa = mantissa * 10 + (bytes[p] - DIGIT_0);
    }
    if (digits + fractionDigits === 0) return this.unreadable(from);
    let exponent = 0;
    if (upper(bytes[p]) === LETTER_E) {
      const downward = bytes[++p] === MINUS;
      if (downward || bytes[p] === PLUS) p++;
      if (!isDigit(bytes[p])) return this.unreadable(from);
      for (; isDigit(bytes[p]); p++) exponent = exponent * 10 + (bytes[p] - DIGIT_0);
      if (downward) exponent = -exponent;
    }
    this.at = p;
    if (!this.endsHere()) return this.unreadable(from);
    const size = exactReal(mantissa, exponent - fractionDigits);
    if (size >= 0) return negative ? -size : size;
    const value = Number(latin1(bytes, from, p));
    return Number.isFinite(value) ? value : this.unreadable(from);
  }

  /** Passes over what is no value, to the comma or bracket that ends it. */
  private unreadable(from: number): StepValue | undefined {
    const { bytes } = this;
    let depth = 0;
    let p = from;
    for (; p < bytes.length; p++) {
      const byte = bytes[p];
      // Neither stands inside a parameter list; going on would read the rest of a broken file again for each instance.
      if (byte === SEMICOLON || byte === EQUALS) return undefined;
      if (byte === APOSTROPHE) {
        p = afterString(bytes, p + 1) - 1;
        if (p < 0) return undefined;
      } else if (byte === OPEN) depth++;
      else if (depth === 0 && (byte === COMMA || byte === CLOSE)) break;
      else if (byte === CLOSE) depth--;
    }
    this.at = p;
    this.fault('unreadable-element', `"${excerpt(bytes, from, p).trim()}" is no value and was taken as absent`);
    return null;
  }
}

function isHexDigit(byte: number): boolean {
  return isDigit(byte) || (upper(byte) >= 0x41 && upper(byte) <= 0x46);
}
