import type { Result } from '../domain/result.ts';
import { type Chunks, encodeText } from './chunks.ts';
import type { Cell, Table } from './table.ts';
import { TABLES, type TableName } from './tables.ts';

/** One table of the result as comma separated values: RFC 4180, UTF-8 without a mark, units in the heads, SI. */
export function tableToCsv(result: Result, name: TableName): Chunks {
  return encodeText(csvLines(TABLES[name](result)));
}

/** The lines of a table, each with its line end. */
export function* csvLines(table: Table): Generator<string> {
  yield csvLine(table.heads);
  for (const row of table.rows) yield csvLine(row);
}

function csvLine(cells: readonly Cell[]): string {
  return `${cells.map(csvCell).join(',')}\r\n`;
}

/** A cell as it stands in the file. */
export function csvCell(cell: Cell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return String(cell);
  const safe = neutralised(cell);
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** Names come from strangers' models: a spreadsheet must not run one that looks like a formula. */
function neutralised(text: string): string {
  return /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
}
