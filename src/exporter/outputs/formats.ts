import { basename } from 'node:path';
import { RequestError } from '../../domain/errors.ts';
import { TABLE_NAMES, type TableName } from '../tables.ts';

/** What a file of a result holds. */
export type Content =
  | { readonly kind: 'json' }
  | { readonly kind: 'html' }
  | { readonly kind: 'ifc' }
  | { readonly kind: 'ifczip'; readonly name: string }
  | { readonly kind: 'svg' }
  | { readonly kind: 'bcf' }
  | { readonly kind: 'xlsx' }
  | { readonly kind: 'view' }
  | { readonly kind: 'picture' }
  | { readonly kind: 'csv'; readonly table: TableName };

/** What may be written of something, and by which endings it is asked for. */
export interface Formats<C> {
  /** What standard output gets. */
  readonly json: C;
  /** By ending, lower case with its dot; `name` is the file's own name without it. */
  readonly byEnding: Readonly<Record<string, (name: string) => C>>;
  /** What a folder ending in `.csv/` gets, by the name of the file. */
  readonly tables: readonly { readonly name: string; readonly content: C }[];
}

export const RESULT_FORMATS: Formats<Content> = {
  json: { kind: 'json' },
  byEnding: {
    '.json': () => ({ kind: 'json' }),
    '.csv': () => ({ kind: 'csv', table: 'bars' }),
    '.xlsx': () => ({ kind: 'xlsx' }),
    '.html': () => ({ kind: 'html' }),
    '.ifc': () => ({ kind: 'ifc' }),
    '.ifczip': (name) => ({ kind: 'ifczip', name: `${name}.ifc` }),
    '.svg': () => ({ kind: 'svg' }),
    '.bcf': () => ({ kind: 'bcf' }),
    '.bcfzip': () => ({ kind: 'bcf' }),
  },
  tables: TABLE_NAMES.map((table) => ({ name: table, content: { kind: 'csv', table } })),
};

/** Throws a RequestError where the path's ending asks for nothing that can be written. */
export function contentByEnding<C>(given: string, { byEnding }: Formats<C>): C {
  if (given.endsWith('/')) throw new RequestError(`${given}: is a folder; only one ending in .csv/ can be written`);
  const ending = /\.[a-z0-9]+$/i.exec(basename(given))?.[0] ?? '';
  const content = byEnding[ending.toLowerCase()];
  if (content) return content(basename(given, ending));
  const written = Object.keys(byEnding).join(' ').replace('.csv', '.csv .csv/');
  throw new RequestError(`${given}: the ending picks the format; use one of ${written}, or - for JSON on stdout`);
}
