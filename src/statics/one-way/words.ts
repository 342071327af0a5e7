import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { LoadCase } from '../types.ts';

const NAMED = 3;

export function namesOf(truss: Truss, bars: readonly number[]): string {
  const names = bars.slice(0, NAMED).map((bar) => truss.bars[bar].name);
  return bars.length > NAMED ? `${names.join(', ')} and ${bars.length - NAMED} more` : names.join(', ');
}

/** Without some slack bars nothing carries the load. */
export function notCarried(
  truss: Truss,
  { name }: LoadCase,
  bars: readonly number[],
): { readonly sentence: string; readonly finding: Finding } {
  const sentence =
    bars.length === 0
      ? 'which of the bars that only pull or only push are slack could not be settled'
      : `${namesOf(truss, bars)} would have to push where ${bars.length === 1 ? 'it' : 'they'} can only pull (or pull where only push), and no other bar does it instead`;
  return {
    sentence,
    finding: finding(
      'load-moves-it',
      `Load case ${name} moves the truss: ${sentence}.`,
      'Take these bars out of tensionOnly or compressionOnly, or add what holds the truss when they are slack.',
      placeOf(truss, bars),
    ),
  };
}

/** Slack bars behind which nothing holds the truss; the load happens to do no work there. */
export function looseBars(truss: Truss, name: string, bars: readonly number[]): Finding {
  return finding(
    'moves-freely',
    `In ${name}, ${namesOf(truss, bars)} ${bars.length === 1 ? 'is' : 'are'} slack, and what hangs on ${bars.length === 1 ? 'it' : 'them'} can move that way without any bar answering.`,
    'Brace it the other way too: a bar that only pulls holds one way only.',
    { severity: 'warning', ...placeOf(truss, bars) },
  );
}

function placeOf(truss: Truss, bars: readonly number[]): Partial<Finding> {
  if (bars.length === 0) return {};
  const { from, to } = truss.bars[bars[0]];
  return { nodes: [from, to], at: truss.nodes[from].at, place: truss.nodes[from].place };
}
