import type { Result } from '../../domain/result.ts';
import { envelopeTitle } from '../verdict.ts';
import { columns, harmless, kilonewtons } from './layout.ts';
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
  const rows = shown.map(({ bar: id, tension, compression }) => {
    const bar = barOf.get(id);
    return [
      harmless(bar?.name ?? id),
      harmless(memberOf.get(bar?.member ?? '')?.section?.name ?? '-'),
      inKilonewtons(tension?.force ?? null),
      harmless(tension?.from ?? ''),
      inKilonewtons(compression?.force ?? null),
      harmless(compression?.from ?? ''),
    ];
  });
  const table = columns(
    [
      { head: 'bar', align: 'left', most: 14 },
      { head: 'section', align: 'left', most: 15 },
      { head: 'tension', align: 'right' },
      { head: 'from', align: 'left', most: 11 },
      { head: 'compression', align: 'right' },
      { head: 'from', align: 'left', most: 11 },
    ],
    rows,
  );
  const more = loaded.length - shown.length;
  return [`Worst bars, kN (${envelopeTitle(result)})`, ...table, ...(more > 0 ? [`  and ${more} more bars`] : [])];
}
