import { z } from 'zod';
import { type Result, resultSchema } from '../domain/result.ts';
import { type Chunks, encodeText } from './chunks.ts';

/** Characters up to which a value stays on its line. */
const ROOM = 100;

/** Items of an array beyond which it is written piece by piece. */
const LARGE = 256;

/** The result as JSON: keys in the schema's order, short objects and all arrays of numbers on one line. */
export function resultToJson(result: Result): Chunks {
  return encodeText(jsonPieces(result));
}

/** The JSON Schema (draft 2020-12) of the result. */
export function resultJsonSchema(): Record<string, unknown> {
  return { title: 'Pinwright result', ...z.toJSONSchema(resultSchema) };
}

/**
 * Readable JSON of any plain value, in pieces that may be written one after another, ending in a line feed.
 * Throws on a number that is not finite: JSON would make a silent null of it.
 */
export function* jsonPieces(value: unknown): Generator<string> {
  yield* pieces(value, '');
  yield '\n';
}

/** Piece by piece where a value is large; a generator for every small one would take most of the time. */
function* pieces(value: unknown, indent: string): Generator<string> {
  if (isScalar(value) || !isLarge(value as object)) yield textOf(value, indent);
  else if (!Array.isArray(value)) yield* objectPieces(value as Record<string, unknown>, indent);
  else if (value.every(isNumberOrNull)) yield* numberPieces(value);
  else yield* arrayPieces(value, indent);
}

function* objectPieces(object: Record<string, unknown>, indent: string): Generator<string> {
  const inner = `${indent}  `;
  let head = '{\n';
  for (const [key, value] of Object.entries(object)) {
    if (value === undefined) continue;
    yield `${head}${inner}${JSON.stringify(key)}: `;
    yield* pieces(value, inner);
    head = ',\n';
  }
  yield `\n${indent}}`;
}

function* arrayPieces(items: readonly unknown[], indent: string): Generator<string> {
  const inner = `${indent}  `;
  let head = '[\n';
  for (const item of items) {
    yield head + inner;
    yield* pieces(item, inner);
    head = ',\n';
  }
  yield `\n${indent}]`;
}

function* numberPieces(items: readonly unknown[]): Generator<string> {
  for (let k = 0; k < items.length; k += LARGE) {
    const text = items
      .slice(k, k + LARGE)
      .map(scalar)
      .join(', ');
    yield k === 0 ? `[${text}` : `, ${text}`;
  }
  yield ']';
}

/** A small value with its line breaks; what `pieces` gives, at once. */
function textOf(value: unknown, indent: string): string {
  if (isScalar(value)) return scalar(value);
  const short = onOneLine(value, ROOM - indent.length);
  if (short !== null) return short;
  const inner = `${indent}  `;
  if (Array.isArray(value)) {
    if (value.every(isNumberOrNull)) return `[${value.map(scalar).join(', ')}]`;
    return `[\n${value.map((item) => inner + textOf(item, inner)).join(',\n')}\n${indent}]`;
  }
  const entries = Object.entries(value as object).filter(([, item]) => item !== undefined);
  const lines = entries.map(([key, item]) => `${inner}${JSON.stringify(key)}: ${textOf(item, inner)}`);
  return `{\n${lines.join(',\n')}\n${indent}}`;
}

function isLarge(value: object): boolean {
  if (Array.isArray(value) && value.length > LARGE) return true;
  for (const item of Object.values(value)) if (!isScalar(item) && isLarge(item)) return true;
  return false;
}

/** The value on one line if it takes at most `room` characters, else null; gives up as soon as that is plain. */
function onOneLine(value: unknown, room: number): string | null {
  if (isScalar(value)) {
    const text = scalar(value);
    return text.length <= room ? text : null;
  }
  const list = Array.isArray(value);
  const parts: string[] = [];
  let left = room - 2;
  for (const [key, item] of list ? value.entries() : Object.entries(value as object)) {
    if (item === undefined) continue;
    const head = list ? '' : `${JSON.stringify(key)}: `;
    const part = onOneLine(item, left - head.length);
    if (part === null) return null;
    left -= head.length + part.length + 2;
    parts.push(head + part);
  }
  return list ? `[${parts.join(', ')}]` : `{${parts.join(', ')}}`;
}

function isScalar(value: unknown): boolean {
  return value === null || typeof value !== 'object';
}

function isNumberOrNull(item: unknown): boolean {
  return item === null || typeof item === 'number';
}

function scalar(value: unknown): string {
  if (typeof value !== 'number') return JSON.stringify(value ?? null);
  if (!Number.isFinite(value)) throw new Error(`${value} cannot stand in a result`);
  return String(value);
}
