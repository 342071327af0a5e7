import type { Result } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { harmless, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';

type Family = NonNullable<Result['families']>[number];

/** The few members that differ in length from many like them, the oddest first. Nothing where all is regular. */
export function oddMembers(result: Result, { width, families: shown }: SummaryOptions): string[] {
  const families = result.families ?? [];
  const odd = families.filter(({ oddBeside }) => oddBeside !== null);
  if (odd.length === 0) return [];
  const marks = new Map(result.members.map(({ globalId, tag, name }) => [globalId, tag || name || globalId]));
  const head = `Odd      ${count(odd.length, 'length')} beside many alike, in ${families.length} families of one role, section and length; a slip in drawing, or meant?`;
  const more = odd.length - shown;
  return [
    ...wrapped(head, width, '', '         '),
    ...odd.slice(0, shown).flatMap((family) => wrapped(words(family, marks), width, '         - ', '           ')),
    ...(more > 0 ? [`         - and ${more} more`] : []),
  ];
}

function words({ role, section, length, members, oddBeside }: Family, marks: ReadonlyMap<string, string>): string {
  const named = members.slice(0, 3).map((globalId) => harmless(marks.get(globalId) ?? globalId));
  const kind = `${section === null ? '' : `${harmless(section)} `}${role}`;
  const beside = oddBeside === null ? '' : `, beside ${oddBeside.count} of ${oddBeside.length.toFixed(3)} m`;
  return `${named.join(', ')}${members.length > 3 ? ', …' : ''}: ${kind} of ${length.toFixed(3)} m${beside}`;
}
