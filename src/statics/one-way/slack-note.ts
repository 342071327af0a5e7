import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import { between } from '../../domain/vector.ts';
import { decisive } from '../solution/decisive.ts';
import type { OneWay, SolvedCase, SolvedCombination } from '../types.ts';
import { namesOf } from './words.ts';

/**
 * How many of the bars that only pull or only push are slack, and which of them carry nothing at all: over the decisive combinations, or the cases
 * where there is none. Empty where none is slack.
 */
export function slackNote(
  truss: Truss,
  { tensionOnly, compressionOnly }: OneWay,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
): Finding[] {
  const over = decisive(cases, combinations);
  const times = new Map<number, number>();
  for (const { slack = [] } of over) for (const bar of slack) times.set(bar, (times.get(bar) ?? 0) + 1);
  if (times.size === 0) return [];
  const all = combinations.length > 0 ? 'combination' : 'load case';
  return [...sayOf(truss, tensionOnly, 'pull', 'push'), ...sayOf(truss, compressionOnly, 'push', 'pull')];

  function sayOf(of: Truss, bars: readonly number[], can: string, cannot: string): Finding[] {
    const slack = bars.filter((bar) => times.has(bar));
    if (slack.length === 0) return [];
    const always = slack.filter((bar) => times.get(bar) === over.length);
    const { from, to } = of.bars[always[0] ?? slack[0]];
    const at = between(of.nodes[from].at, of.nodes[to].at, 0.5);
    const some = `${slack.length} of the ${bars.length} bars that only ${can} would have to ${cannot} in some ${all} and are slack there`;
    const ever =
      always.length === 0
        ? '; each of them carries something in another'
        : `, ${always.length === 1 ? 'one' : always.length} of them in every one (${namesOf(of, always)})`;
    return [
      finding(
        'slack-bar',
        `${some}${ever}.`,
        'Nothing, where the bars beside them take over. A bar that is slack throughout may still brace against loads that the brief does not have: leave it in.',
        { nodes: [from, to], at, place: of.nodes[from].place },
      ),
    ];
  }
}
