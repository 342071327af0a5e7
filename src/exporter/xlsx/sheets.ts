import type { Result } from '../../domain/result.ts';
import type { Table } from '../table.ts';
import { TABLES } from '../tables.ts';

/** The sheets of the workbook in their order; one without rows is left out. */
export const SHEETS: readonly { readonly title: string; readonly table: (result: Result) => Table }[] = [
  { title: 'members', table: TABLES.members },
  { title: 'bars', table: TABLES.bars },
  { title: 'nodes', table: TABLES.nodes },
  { title: 'reactions', table: TABLES.reactions },
  { title: 'bearings', table: TABLES.bearings },
  { title: 'envelope', table: TABLES.envelope },
  { title: 'joints', table: TABLES.joints },
  { title: 'cases', table: TABLES.cases },
  { title: 'combinations', table: TABLES.combinations },
  { title: 'findings', table: TABLES.findings },
];
