import { APOSTROPHE, afterString, IN_KEYWORD, isWordAt, latin1, OPEN, SEMICOLON, skipBlank } from './bytes.ts';
import { ParameterReader } from './parameters.ts';
import type { StepProblems } from './problems.ts';
import { unclosedString } from './unclosed.ts';
import { asList, asString, type StepValue } from './values.ts';

/** The header section. */
export interface StepHeader {
  /** The parameters of each entry by its upper-case keyword. */
  readonly entries: ReadonlyMap<string, readonly StepValue[]>;
  readonly schema: string;
  readonly timeStamp: string | null;
}

/** Reads the header that follows at `at`, and where what comes after it begins. Exporters leave out or garble entries; what cannot be read is absent. */
export function readHeader(
  bytes: Uint8Array,
  at: number,
  problems: StepProblems,
): { readonly header: StepHeader; readonly end: number } {
  const entries = new Map<string, readonly StepValue[]>();
  const reader = new ParameterReader(bytes);
  let p = skipBlank(bytes, at);
  if (isWordAt(bytes, p, 'HEADER')) p = skipStatement(bytes, p);
  for (p = skipBlank(bytes, p); p < bytes.length; p = skipBlank(bytes, p)) {
    if (isWordAt(bytes, p, 'DATA')) break;
    if (isWordAt(bytes, p, 'ENDSEC')) {
      p = skipStatement(bytes, p);
      break;
    }
    let nameEnd = p;
    while (IN_KEYWORD[bytes[nameEnd]] === 1) nameEnd++;
    const name = latin1(bytes, p, nameEnd).toUpperCase();
    const open = skipBlank(bytes, nameEnd);
    const args =
      name !== '' && bytes[open] === OPEN
        ? reader.readList(open, (kind, what) => {
            if (kind === 'encoding-broken') problems.add(kind, null, `In ${name} of the header, ${what}.`);
          })
        : null;
    if (args !== null) entries.set(name, args);
    p = skipStatement(bytes, args === null ? p : reader.at);
  }
  return { header: { entries, schema: schemaOf(entries), timeStamp: timeStampOf(entries) }, end: p };
}

/** The offset after the semicolon that ends the statement at `at`, or the file's end. */
export function skipStatement(bytes: Uint8Array, at: number): number {
  let p = at;
  while (p < bytes.length) {
    const byte = bytes[p];
    if (byte === SEMICOLON) return p + 1;
    if (byte === APOSTROPHE) {
      p = afterString(bytes, p + 1);
      if (p < 0) throw unclosedString(bytes, null);
    } else {
      const next = skipBlank(bytes, p);
      p = next > p ? next : p + 1;
    }
  }
  return p;
}

/** `IFC4` also where an object identifier follows in the same string, or where there are no inner brackets. */
function schemaOf(entries: StepHeader['entries']): string {
  const first = (entries.get('FILE_SCHEMA') ?? [])[0];
  const name = asString(asList(first)[0]) ?? asString(first) ?? '';
  return (name.trim().split(/[\s{]/)[0] ?? '').toUpperCase();
}

function timeStampOf(entries: StepHeader['entries']): string | null {
  const text = asString((entries.get('FILE_NAME') ?? [])[1])?.trim() ?? '';
  return text === '' ? null : text;
}
