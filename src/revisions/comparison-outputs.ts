import { encodeText, type Output } from '../exporter/chunks.ts';
import { csvLines } from '../exporter/csv.ts';
import { jsonPieces } from '../exporter/json.ts';
import type { Formats } from '../exporter/outputs/formats.ts';
import type { Comparison } from './comparison.ts';
import { COMPARISON_TABLE_NAMES, COMPARISON_TABLES, type ComparisonTableName } from './comparison-tables.ts';

/** What a file of a comparison holds. */
export type ComparisonContent =
  | { readonly kind: 'json' }
  | { readonly kind: 'csv'; readonly table: ComparisonTableName };

/** One CSV file holds the forces, what most compare for. */
export const COMPARISON_FORMATS: Formats<ComparisonContent> = {
  json: { kind: 'json' },
  byEnding: { '.json': () => ({ kind: 'json' }), '.csv': () => ({ kind: 'csv', table: 'forces' }) },
  tables: COMPARISON_TABLE_NAMES.map((table) => ({ name: table, content: { kind: 'csv', table } })),
};

export function comparisonContent(comparison: Comparison): (content: ComparisonContent) => Output {
  return (content) =>
    encodeText(
      content.kind === 'json' ? jsonPieces(comparison) : csvLines(COMPARISON_TABLES[content.table](comparison)),
    );
}
