import { unzipSync, zipSync } from 'fflate';
import type { Result } from '../../domain/result.ts';
import { NO_TIME } from '../zip-one.ts';
import { aboutRows } from './about.ts';
import { filledRows, type SheetRows, widths } from './cells.ts';
import { SHEETS } from './sheets.ts';

/**
 * The tables of the result as an Office Open XML workbook (.xlsx), a sheet each: heads frozen, with filters, numbers with
 * the digits they deserve, texts as texts. The same result gives the same bytes.
 */
export async function* workbook(result: Result): AsyncGenerator<Uint8Array, void> {
  // Loaded only when a workbook is asked for.
  const { default: writeExcelFile } = await import('write-excel-file/node');
  const { autoFilter, normalStyle } = await import('./features.ts');
  const sizes = new Map<string, readonly [rows: number, columns: number]>();
  const tables = SHEETS.flatMap(({ title, table }) => {
    const { heads, rows } = table(result);
    const data = filledRows(heads, rows);
    if (data.length === 1) return [];
    sizes.set(title, [data.length, heads.length]);
    return [{ ...sheet(title, data), stickyRowsCount: 1, stickyColumnsCount: 1 }];
  });
  const written = await writeExcelFile([sheet('about', aboutRows(result)), ...tables], {
    features: [autoFilter(sizes), normalStyle],
  }).toBuffer();
  yield atNoTime(written);
}

function sheet(title: string, data: SheetRows) {
  return { sheet: title, data, columns: widths(data).map((width) => ({ width })) };
}

/** The library dates its files by the clock. */
function atNoTime(zip: Uint8Array): Uint8Array {
  return zipSync(unzipSync(zip), { level: 6, mtime: NO_TIME });
}
