import type { Vec3 } from '../domain/vector.ts';

/** One cell; null is an empty one. */
export type Cell = string | number | null;

/** A table of the result. Heads carry the unit in brackets; rows come one at a time, since a large roof has many. */
export interface Table {
  readonly heads: readonly string[];
  readonly rows: Iterable<readonly Cell[]>;
}

/** Several names in one cell. */
export const joined = (words: readonly string[]): string | null => (words.length === 0 ? null : words.join(' '));
export const coordinates = (at: Vec3 | null): readonly Cell[] => at ?? [null, null, null];

/** A row for each item. */
export function* each<T>(
  items: readonly T[],
  row: (item: T, index: number) => readonly Cell[],
): Generator<readonly Cell[]> {
  for (const [index, item] of items.entries()) yield row(item, index);
}
