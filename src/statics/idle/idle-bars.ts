import type { Truss } from '../../domain/truss.ts';
import type { OneWay, SolvedCase, SolvedCombination, Supports } from '../types.ts';
import { idleByJoints, type JointRule } from './joint-rules.ts';

/** Why a bar carries nothing: a rule at a joint, `slack` where it only pulls or pushes and would have to do the other, `whole` where only all of the balance shows it. */
export interface IdleBar {
  readonly bar: number;
  readonly rule: JointRule | 'slack' | 'whole';
  /** The joint that shows it; null where none does. */
  readonly node: number | null;
}

export interface IdleBars {
  /** In the order a person would find them, then what is slack, then what only the whole shows. */
  readonly cases: readonly { readonly case: string; readonly bars: readonly IdleBar[] }[];
  /** Those that carry nothing in any case nor, where forces do not add up, in any combination. */
  readonly everywhere: readonly IdleBar[];
}

/** Share of the largest force of a case below which a bar carries nothing. */
const NO_FORCE = 1e-7;

/** Bars without force in each case that was carried, and in all of them, each with the joint that shows it. */
export function findIdleBars(
  truss: Truss,
  supports: Supports,
  {
    cases,
    combinations,
  }: { readonly cases: readonly SolvedCase[]; readonly combinations: readonly SolvedCombination[] },
  oneWay: OneWay,
  bending: ReadonlySet<number> = new Set(),
): IdleBars {
  const carried = cases.filter(({ refused }) => refused === null);
  const imposed = carried.filter(({ loads }) => loads.length > 0);
  const byCase = carried.map((one) => ({ one, without: withoutForce(one) }));
  const isOneWay = oneWay.tensionOnly.length + oneWay.compressionOnly.length > 0;
  const alsoSolved = isOneWay ? combinations.filter(({ refused }) => refused === null) : [];
  const everywhere = alsoSolved
    .map(withoutForce)
    .reduce((all, one) => all.filter((bar) => one.includes(bar)), commonTo(byCase.map(({ without }) => without)));
  return {
    cases: byCase.map(({ one, without }) => ({ case: one.name, bars: explain([one], without) })),
    everywhere: explain(imposed, everywhere),
  };

  function explain(under: readonly SolvedCase[], without: readonly number[]): IdleBar[] {
    if (without.length === 0) return [];
    const slack = isOneWay ? commonTo(under.map((one) => one.slack ?? [])).filter((bar) => without.includes(bar)) : [];
    const isWithout = new Set(without);
    const loads = under.map((one) => one.loads);
    const shown = idleByJoints(truss, supports, loads, { known: slack, bending }).filter(({ bar }) =>
      isWithout.has(bar),
    );
    const told = new Set([...slack, ...shown.map(({ bar }) => bar)]);
    return [
      ...shown,
      ...slack.map((bar): IdleBar => ({ bar, rule: 'slack', node: null })),
      ...without.flatMap((bar): IdleBar[] => (told.has(bar) ? [] : [{ bar, rule: 'whole', node: null }])),
    ];
  }
}

function withoutForce({ axialForce }: Pick<SolvedCase, 'axialForce'>): number[] {
  let largest = 0;
  for (const force of axialForce) largest = Math.max(largest, Math.abs(force ?? 0));
  return axialForce.flatMap((force, bar) => (force !== null && Math.abs(force) <= NO_FORCE * largest ? [bar] : []));
}

/** What stands in every list. */
function commonTo(lists: readonly (readonly number[])[]): number[] {
  if (lists.length === 0) return [];
  const [first, ...others] = lists.map((list) => new Set(list));
  return [...first].filter((one) => others.every((other) => other.has(one)));
}
