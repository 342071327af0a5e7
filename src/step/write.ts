import { DERIVED, StepBinary, StepEnum, StepRef, StepTyped, type StepValue } from './values.ts';

/** A whole number, written without a decimal point. A bare number is written as a real. */
export class StepInteger {
  readonly value: number;
  constructor(value: number) {
    this.value = value;
  }
}

/** A value with its type, of what is to be written. */
export class TypedToWrite {
  readonly type: string;
  readonly value: ValueToWrite;
  constructor(type: string, value: ValueToWrite) {
    this.type = type;
    this.value = value;
  }
}

/** What can stand in the parameter list of an instance to be written. */
export type ValueToWrite =
  | Exclude<StepValue, readonly StepValue[]>
  | StepInteger
  | TypedToWrite
  | readonly ValueToWrite[];

export const ref = (id: number): StepRef => new StepRef(id);
export const refs = (ids: readonly number[]): readonly StepRef[] => ids.map(ref);
export const integer = (value: number): StepInteger => new StepInteger(value);
export const enumeration = (name: string): StepEnum => new StepEnum(name);
export const typed = (type: string, value: ValueToWrite): TypedToWrite => new TypedToWrite(type, value);

/** Reals between these are written without an exponent. */
const PLAIN_FROM = 1e-4;
const PLAIN_BELOW = 1e15;
const HIGHEST_ID = 2 ** 32 - 1;

/**
 * `#12=IFCX(...);` in ASCII, without a line ending. Throws RangeError where the id, the type or a value cannot stand in a STEP
 * file, so that a fault of ours never reaches one.
 */
export function instanceLine(id: number, type: string, args: readonly ValueToWrite[]): string {
  return `${encodeRef(id)}=${encodeKeyword(type)}${encodeList(args)};`;
}

/** Numbers new instances one after another and keeps their lines until they are taken. */
export class InstanceWriter {
  private readonly nextId: () => number;
  private lines: string[] = [];

  /** From the first free id upward, or by a function that gives a free id at each call. */
  constructor(ids: number | (() => number)) {
    let id = typeof ids === 'number' ? ids : 0;
    this.nextId = typeof ids === 'number' ? () => id++ : ids;
  }

  add(type: string, ...args: readonly ValueToWrite[]): StepRef {
    const id = this.nextId();
    this.lines.push(instanceLine(id, type, args));
    return new StepRef(id);
  }

  /** The lines since the last time. */
  take(): string[] {
    const { lines } = this;
    this.lines = [];
    return lines;
  }
}

/** One value as it stands in a STEP file. Throws RangeError where it cannot. */
export function encodeValue(value: ValueToWrite): string {
  if (value === null) return '$';
  if (value === DERIVED) return '*';
  if (typeof value === 'number') return encodeReal(value);
  if (typeof value === 'string') return encodeString(value);
  if (typeof value === 'boolean') return value ? '.T.' : '.F.';
  if (value instanceof StepRef) return encodeRef(value.id);
  if (value instanceof StepInteger) return encodeInteger(value.value);
  if (value instanceof StepEnum) return `.${encodeKeyword(value.name)}.`;
  if (value instanceof StepTyped || value instanceof TypedToWrite) {
    return `${encodeKeyword(value.type)}(${encodeValue(value.value)})`;
  }
  if (value instanceof StepBinary) return encodeBinary(value.digits);
  return encodeList(value);
}

/**
 * A string with its apostrophes (ISO 10303-21, 6.4.3): `'` and `\` doubled, what is not printable ASCII as `\X2\` or, beyond the
 * basic plane, `\X4\`. Lone surrogates, which are no characters, become U+FFFD.
 */
export function encodeString(text: string): string {
  return `'${text.replace(/['\\]|[^\x20-\x7e]+/gu, escapeOf)}'`;
}

function escapeOf(part: string): string {
  if (part === "'") return "''";
  if (part === '\\') return '\\\\';
  let escaped = '';
  let width = 0;
  for (const character of part) {
    const code = character.codePointAt(0) ?? 0;
    const needed = code > 0xffff ? 8 : 4;
    if (needed !== width) {
      if (width !== 0) escaped += '\\X0\\';
      escaped += needed === 8 ? '\\X4\\' : '\\X2\\';
      width = needed;
    }
    const isLoneSurrogate = code >= 0xd800 && code <= 0xdfff;
    escaped += (isLoneSurrogate ? 0xfffd : code).toString(16).toUpperCase().padStart(width, '0');
  }
  return `${escaped}\\X0\\`;
}

/**
 * A real with the point and the capital E that ISO 10303-21 asks for, in the fewest digits that read back as the same number:
 * `1.`, `0.25`, `-2.5E-05`. Throws RangeError for what is not finite.
 */
export function encodeReal(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`${value} cannot be written as a real`);
  if (value === 0) return '0.';
  const size = Math.abs(value);
  if (size >= PLAIN_FROM && size < PLAIN_BELOW) return Number.isInteger(value) ? `${value}.` : String(value);
  const [mantissa = '', exponent = ''] = value.toExponential().split('e');
  const sign = exponent.startsWith('-') ? '-' : '+';
  const digits = exponent.slice(1).padStart(2, '0');
  return `${mantissa.includes('.') ? mantissa : `${mantissa}.`}E${sign}${digits}`;
}

/** Throws RangeError for what is no whole number, or too large to be one exactly. */
export function encodeInteger(value: number): string {
  if (!Number.isSafeInteger(value)) throw new RangeError(`${value} cannot be written as an integer`);
  return String(value === 0 ? 0 : value);
}

function encodeRef(id: number): string {
  if (!Number.isInteger(id) || id < 1 || id > HIGHEST_ID)
    throw new RangeError(`${id} cannot be the number of an instance`);
  return `#${id}`;
}

function encodeKeyword(name: string): string {
  if (!/^[A-Z][A-Z0-9_]*$/.test(name)) throw new RangeError(`"${name}" cannot be a keyword`);
  return name;
}

function encodeBinary(digits: string): string {
  if (!/^[0-3][0-9A-F]*$/.test(digits)) throw new RangeError(`"${digits}" cannot be a binary`);
  return `"${digits}"`;
}

function encodeList(values: readonly ValueToWrite[]): string {
  return `(${values.map(encodeValue).join(',')})`;
}
