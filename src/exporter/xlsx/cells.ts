import type { CellObject, Row } from 'write-excel-file/node';
import type { Cell } from '../table.ts';

export type SheetRows = Row[];

/** What a sheet holds besides its heads (ECMA-376: 1,048,576 rows). */
const MOST_ROWS = 1_048_575;
/** Characters that a cell may hold. */
const LONGEST_TEXT = 32_767;

/** Number formats by the unit that a head names in brackets. */
const FORMATS: Readonly<Record<string, string>> = {
  m: '0.000',
  N: '#,##0',
  m2: '0.000000',
  m4: '0.000E+00',
  Pa: '0.000E+00',
  rad: '0.0000',
  deg: '0.0',
  'kg/m3': '0',
};
/** Of numbers without a unit that are not whole. */
const PLAIN = '0.000';

const HEAD = { fontWeight: 'bold', backgroundColor: '#E7E6E6', wrap: true, alignVertical: 'top' } as const;

/** Heads and rows as the workbook's cells; rows beyond what a sheet holds are counted in its last row. */
export function filledRows(heads: readonly string[], rows: Iterable<readonly Cell[]>): SheetRows {
  const formats = heads.map((head) => FORMATS[/\(([^)]*)\)$/.exec(head)?.[1] ?? ''] ?? null);
  const filled: SheetRows = [heads.map((head): CellObject => ({ value: head, type: String, ...HEAD }))];
  let beyond = 0;
  for (const row of rows) {
    if (filled.length < MOST_ROWS) filled.push(row.map((cell, k) => filledCell(cell, formats[k] ?? null)));
    else beyond++;
  }
  if (beyond > 0)
    filled.push([text(`and ${beyond} more rows, which a sheet does not hold; the .csv/ folder has them all`)]);
  return filled;
}

function filledCell(cell: Cell, format: string | null): CellObject | null {
  if (cell === null || cell === '') return null;
  if (typeof cell === 'string') return text(cell);
  const shown = format ?? (Number.isInteger(cell) ? null : PLAIN);
  return shown === null ? { value: cell, type: Number } : { value: cell, type: Number, format: shown };
}

/** Typed as text, whatever it looks like: a name from a model is never run as a formula. */
export const text = (value: string): CellObject => ({ value: value.slice(0, LONGEST_TEXT), type: String });

const NARROWEST = 7;
const WIDEST = 48;
/** Rows that are looked at to tell how wide a column has to be. */
const SAMPLE = 200;

/** In characters: as wide as what stands in the first rows, within reason. */
export function widths(rows: SheetRows): number[] {
  const columns = Math.max(0, ...rows.slice(0, 1).map((row) => row.length));
  return Array.from({ length: columns }, (_, k) => {
    const sizes = rows.slice(0, SAMPLE).map((row, i) => (i === 0 ? longestWord(shown(row[k])) : shown(row[k]).length));
    return Math.min(WIDEST, Math.max(NARROWEST, ...sizes) + 2);
  });
}

/** Heads wrap between words. */
const longestWord = (head: string): number => Math.max(0, ...head.split(' ').map((word) => word.length));

function shown(cell: Row[number]): string {
  const value = cell !== null && typeof cell === 'object' && 'value' in cell ? cell.value : cell;
  if (typeof value !== 'number') return value === null || value === undefined ? '' : String(value);
  return Number.isInteger(value) ? String(value) : value.toFixed(3);
}
