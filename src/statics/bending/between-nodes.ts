import type { Truss } from '../../domain/truss.ts';
import { add, dot, norm, ORIGIN, scale, subtract, type Vec3 } from '../../domain/vector.ts';
import { decisive } from '../solution/decisive.ts';
import type { SolvedCase, SolvedCombination } from '../types.ts';
import { awayFrom, handedOver, incidenceOf } from './handed-over.ts';

/** The greatest moment that the nodes a bar carries cause in it. */
export interface BarBending {
  readonly bar: number;
  /** The carried node at which it is greatest. */
  readonly node: number;
  /** Nm. */
  readonly moment: number;
  /** Name of the combination or case. */
  readonly from: string;
}

/**
 * The bending of bars between their nodes: M = F a b / L of one carried node, and of several the sum of what each causes, as on a
 * beam that rests on its two ends. Bars that carry nothing are not in it.
 */
export function bendingBetweenNodes(
  truss: Truss,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
): BarBending[] {
  const incidence = incidenceOf(truss);
  if (incidence.carriedBy.size === 0) return [];
  const worst = new Map<number, BarBending>();
  for (const answer of decisive(cases, combinations)) {
    const forceAt = handedOver(incidence, answer, cases);
    for (const [bar, nodes] of incidence.carriedBy) {
      const found = greatestMoment(truss, bar, nodes, forceAt);
      if (found.moment > (worst.get(bar)?.moment ?? 0)) worst.set(bar, { bar, from: answer.name, ...found });
    }
  }
  return [...worst.values()].sort((p, q) => p.bar - q.bar);
}

function greatestMoment(truss: Truss, bar: number, nodes: readonly number[], forceAt: (node: number) => Vec3) {
  const { from, length } = truss.bars[bar];
  const direction = awayFrom(truss, bar, from);
  const across = (force: Vec3) => subtract(force, scale(direction, dot(force, direction)));
  const loads = nodes.map((node) => ({
    node,
    t: truss.nodes[node].carriedBy?.t ?? 0,
    force: across(forceAt(node)),
  }));
  let worst = { node: nodes[0], moment: 0 };
  for (const { node, t } of loads) {
    let moment = ORIGIN;
    for (const other of loads) {
      const lever = Math.min(t, other.t) * (1 - Math.max(t, other.t)) * length;
      moment = add(moment, scale(other.force, lever));
    }
    if (norm(moment) > worst.moment) worst = { node, moment: norm(moment) };
  }
  return worst;
}
