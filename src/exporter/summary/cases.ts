import type { Result } from '../../domain/result.ts';
import { count } from '../verdict.ts';
import { type Column, columns, harmless, kilonewtons, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';

/** Every load case with the sum of its loads and how well it is balanced; refused ones with the reason. */
export function loadCases(result: Result, { extras, width }: SummaryOptions): string[] {
  const { cases } = result;
  const { loadAsked } = extras;
  if (cases.length === 0) return [];
  const inKilonewtons = kilonewtons(cases.flatMap((loadCase) => loadCase.loadSum));
  const heads: Column[] = [
    { head: 'case', align: 'left', most: 22 },
    { head: 'nature', align: 'left' },
    ...['Fx kN', 'Fy kN', 'Fz kN'].map((head): Column => ({ head, align: 'right' })),
    ...(loadAsked === undefined ? [] : [{ head: 'asked Fz', align: 'right' } as const]),
    { head: 'imbalance', align: 'right' },
  ];
  const rows = cases.map((loadCase) => [
    harmless(loadCase.name),
    loadCase.nature,
    ...loadCase.loadSum.map(inKilonewtons),
    ...(loadAsked === undefined ? [] : [inKilonewtons(loadAsked[loadCase.name]?.[2] ?? null)]),
    loadCase.refused !== undefined ? 'refused' : (loadCase.residual?.toExponential(0) ?? '-'),
  ]);
  return ['Load cases', ...columns(heads, rows), ...refusals(result, width), ...combinations(result, width)];
}

function refusals({ cases, combinations }: Result, width: number): string[] {
  return [...cases, ...combinations].flatMap(({ name, refused }) =>
    refused === undefined ? [] : wrapped(`${harmless(name)} refused: ${harmless(refused)}`, width, '  ', '    '),
  );
}

function combinations({ combinations: all }: Result, width: number): string[] {
  if (all.length === 0) return [];
  const limits = [...new Set(all.map(({ limit }) => limit))];
  const words = limits.map((limit) => `${all.filter((one) => one.limit === limit).length} ${limit}`);
  return wrapped(`${count(all.length, 'combination')}: ${words.join(', ')}`, width, '  ', '  ');
}
