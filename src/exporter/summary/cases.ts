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
    ...asked(result, width),
    ...covered(extras, width),
    ...slackBars(result, width),
    ...refusals(result, width),
    ...(result.imperfections === undefined
      ? []
      : wrapped(`imperfections: ${result.imperfections}`, width, '  ', '    ')),
    ...combinations(result, width),
    ...asAWhole(result, width),
  ];
}

/** Each load of the brief: what it asks for beside what the nodes got. */
function asked({ asked: loads = [] }: Result, width: number): string[] {
  if (loads.length === 0) return [];
  const inKilonewtons = kilonewtons(loads.flatMap((load) => [...load.applied, ...(load.asked ?? [])]));
  const spelled = (force: readonly number[] | null) => (force === null ? '-' : force.map(inKilonewtons).join(' '));
  const forces = loads.filter((load) => load.applied.some((v) => v !== 0) || load.asked?.some((v) => v !== 0));
  const rows = forces.map((load) => [
    String(load.line),
    harmless(load.case),
    harmless(load.what),
    spelled(load.asked),
    spelled(load.applied),
  ]);
  // Numbers are never cut: the words get what they leave of the line.
  const numbers = [rows.map((row) => row[3]), rows.map((row) => row[4])];
  const taken = numbers.reduce((sum, cells) => sum + Math.max(10, ...cells.map(({ length }) => length)), 0);
  const words = Math.max(16, width - taken - 'line'.length - 2 * 5);
  const heads: Column[] = [
    { head: 'line', align: 'right' },
    { head: 'case', align: 'left', most: Math.floor(words / 2) - 1 },
    { head: 'load', align: 'left', most: Math.ceil(words / 2) + 1 },
    { head: 'asked kN', align: 'right' },
    { head: 'applied kN', align: 'right' },
  ];
  return rows.length === 0 ? [] : columns(heads, rows);
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

/** Bars that only pull or only push, and how many of them are slack in each case. */
function slackBars({ oneWay, cases }: Result, width: number): string[] {
  if (oneWay === undefined) return [];
  const { tensionOnly, compressionOnly } = oneWay;
  const kinds = [
    ...(tensionOnly.length > 0 ? [`${count(tensionOnly.length, 'bar')} only pull`] : []),
    ...(compressionOnly.length > 0 ? [`${count(compressionOnly.length, 'bar')} only push`] : []),
  ];
  const slack = cases.flatMap(({ name, slack: bars }) =>
    bars === undefined ? [] : [`${harmless(name)} ${bars.length}`],
  );
  const words = `${kinds.join(', ')}; without force: ${slack.join(', ')}. Forces of cases do not add up: every combination is solved for itself.`;
  return wrapped(words, width, '  ', '    ');
}

/** Of many refused combinations the first few are named. */
const FALLEN_NAMED = 5;

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
  const named = fallen.slice(0, FALLEN_NAMED).map(({ name }) => harmless(name));
  const more = fallen.length - named.length;
  const words = `refused with their cases: ${named.join('; ')}${more > 0 ? `; and ${more} more combinations` : ''}`;
  return fallen.length === 0 ? lines : [...lines, ...wrapped(words, width, '  ', '    ')];
}

function combinations({ combinations: all, combining }: Result, width: number): string[] {
  if (all.length === 0) return [];
  const tally = combining?.solved ?? tallyOf(all.map(({ limit }) => limit));
  const words = Object.entries(tally).map(([limit, number]) => `${number} ${limit}`);
  const total = Object.values(tally).reduce((sum, number) => sum + number, 0);
  const by = combining === undefined ? '' : ` by ${combining.rule}`;
  const between =
    combining === undefined || combining.between === 0
      ? ''
      : `; ${combining.between} more lie between two of these and can never govern`;
  return [
    ...wrapped(`${count(total, 'combination')}${by}: ${words.join(', ')}${between}`, width, '  ', '    '),
    ...(combining?.notes ?? []).flatMap((note) => wrapped(harmless(note), width, '  - ', '    ')),
  ];
}

function tallyOf(words: readonly string[]): Record<string, number> {
  const tally: Record<string, number> = {};
  for (const word of words) tally[word] = (tally[word] ?? 0) + 1;
  return tally;
}
