import type { Result } from '../../domain/result.ts';
import { count, envelopeTitle } from '../../domain/verdict.ts';
import { columns, harmless, kilonewtons, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';

/** The bars with the greatest forces of the envelope, the greatest first. */
export function worstBars(result: Result, options: SummaryOptions): string[] {
  const greatest = (entry: Result['envelope'][number]): number =>
    Math.max(entry.tension?.force ?? 0, -(entry.compression?.force ?? 0));
  const loaded = result.envelope.filter((entry) => greatest(entry) > 0).sort((a, b) => greatest(b) - greatest(a));
  if (loaded.length === 0) return [];
  const shown = loaded.slice(0, options.bars);

  const barOf = new Map(result.bars.map((bar) => [bar.id, bar]));
  const memberOf = new Map(result.members.map((member) => [member.globalId, member]));
  const inKilonewtons = kilonewtons(shown.map(greatest));
  const names: string[] = [];
  const numberOf = (name: string | undefined): string => {
    if (name === undefined) return '';
    if (!names.includes(name)) names.push(name);
    return `(${names.indexOf(name) + 1})`;
  };
  const rows = shown.map(({ bar: id, tension, compression }) => {
    const bar = barOf.get(id);
    return [
      id,
      harmless(bar?.name ?? id),
      harmless(memberOf.get(bar?.member ?? '')?.section?.name ?? '-'),
      inKilonewtons(tension?.force ?? null),
      numberOf(tension?.from),
      inKilonewtons(compression?.force ?? null),
      numberOf(compression?.from),
    ];
  });
  const table = columns(
    [
      { head: 'bar', align: 'left' },
      { head: 'name', align: 'left', most: 14 },
      { head: 'section', align: 'left', most: 17 },
      { head: 'tension', align: 'right' },
      { head: 'from', align: 'left' },
      { head: 'compression', align: 'right' },
      { head: 'from', align: 'left' },
    ],
    rows,
  );
  const more = loaded.length - shown.length;
  const idle = result.envelope.length - loaded.length;
  return [
    ...wrapped(`Worst bars, kN (${envelopeTitle(result)})`, options.width, '', '  '),
    ...table,
    ...(more > 0 || idle > 0 ? [`  and ${count(more, 'more bar')}${idle > 0 ? `, ${idle} of no force` : ''}`] : []),
    ...names.flatMap((name, i) => wrapped(`(${i + 1}) ${described(name, result)}`, options.width, '  ', '      ')),
  ];
}

/** "strength: snow leads = 1.35 dead + 1.5 snow"; a case has its name alone. */
function described(name: string, { combinations }: Result): string {
  const combination = combinations.find((one) => one.name === name);
  if (combination === undefined) return harmless(name);
  const terms = Object.entries(combination.factors).map(([loadCase, factor]) => `${factor} ${harmless(loadCase)}`);
  return `${harmless(name)} = ${terms.join(' + ').replaceAll('+ -', '- ')}`;
}
