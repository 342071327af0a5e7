import type { Result } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { type Column, columns, harmless, kilonewtons, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';
import { asAWhole } from './whole.ts';

/** Every load case with the sum of its loads and how well it is balanced; refused ones with the reason. */
export function loadCases(result: Result, { extras, width }: SummaryOptions): string[] {
  const { cases } = result;
  if (cases.length === 0) return [];
  const inKilonewtons = kilonewtons(cases.flatMap((loadCase) => loadCase.loadSum));
  const heads: Column[] = [
    { head: 'case', align: 'left', most: 22 },
    { head: 'nature', align: 'left' },
    ...['Fx kN', 'Fy kN', 'Fz kN'].map((head): Column => ({ head, align: 'right' })),
    { head: 'imbalance', align: 'right' },
  ];
  const rows = cases.map((loadCase) => [
    harmless(loadCase.name),
    loadCase.nature,
    ...loadCase.loadSum.map(inKilonewtons),
    loadCase.refused !== undefined ? 'refused' : (loadCase.residual?.toExponential(0) ?? '-'),
  ]);
  return [
    'Load cases',
    ...columns(heads, rows),
    ...covered(extras, width),
    ...refusals(result, width),
    ...combinations(result, width),
    ...asAWhole(result, width),
  ];
}

/** Area loads by the area they cover, the first thing a reader checks by hand. */
function covered({ coverage = [] }: SummaryOptions['extras'], width: number): string[] {
  const byArea = new Map<string, string[]>();
  for (const { case: name, area, planArea } of coverage) {
    const words = `${area.toFixed(1)} m2 (${planArea.toFixed(1)} m2 in plan)`;
    byArea.set(words, [...(byArea.get(words) ?? []), harmless(name)]);
  }
  return [...byArea].flatMap(([words, names]) =>
    wrapped(`area loads (${names.join(', ')}) cover ${words}`, width, '  ', '    '),
  );
}

/** Each reason once, with all it keeps from being carried; combinations fall with their cases. */
function refusals({ cases, combinations }: Result, width: number): string[] {
  const byReason = new Map<string, string[]>();
  for (const { name, refused } of cases) {
    if (refused !== undefined) byReason.set(refused, [...(byReason.get(refused) ?? []), harmless(name)]);
  }
  const fell = new Set(cases.filter(({ refused }) => refused !== undefined).map(({ name }) => name));
  const withCase = ({ factors }: Result['combinations'][number]) =>
    Object.keys(factors).some((name) => fell.has(name) || !cases.some((one) => one.name === name));
  for (const one of combinations)
    if (one.refused !== undefined && !withCase(one))
      byReason.set(one.refused, [...(byReason.get(one.refused) ?? []), harmless(one.name)]);
  const lines = [...byReason].flatMap(([reason, names]) =>
    wrapped(`refused (${names.join(', ')}): ${harmless(reason)}`, width, '  ', '    '),
  );
  const fallen = combinations.filter((one) => one.refused !== undefined && withCase(one));
  const words = `refused with their cases: ${fallen.map(({ name }) => harmless(name)).join('; ')}`;
  return fallen.length === 0 ? lines : [...lines, ...wrapped(words, width, '  ', '    ')];
}

function combinations({ combinations: all }: Result, width: number): string[] {
  if (all.length === 0) return [];
  const limits = [...new Set(all.map(({ limit }) => limit))];
  const words = limits.map((limit) => `${all.filter((one) => one.limit === limit).length} ${limit}`);
  return wrapped(`${count(all.length, 'combination')}: ${words.join(', ')}`, width, '  ', '  ');
}
