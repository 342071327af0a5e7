import { pushTo } from '../../domain/group.ts';
import type { Truss } from '../../domain/truss.ts';
import { add, ORIGIN, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import type { NodalForce, SolvedCase, SolvedCombination } from '../types.ts';

/** The truss by node, made once for all answers. */
export interface Incidence {
  readonly truss: Truss;
  /** Of each node the bars that end there. */
  readonly barsAt: ReadonlyMap<number, readonly number[]>;
  /** Of each bar the nodes it carries. */
  readonly carriedBy: ReadonlyMap<number, readonly number[]>;
}

export function incidenceOf(truss: Truss): Incidence {
  const barsAt = new Map<number, number[]>();
  truss.bars.forEach(({ from, to }, bar) => {
    pushTo(barsAt, from, bar);
    pushTo(barsAt, to, bar);
  });
  const carriedBy = new Map<number, number[]>();
  truss.nodes.forEach((node, index) => {
    if (node.carriedBy !== null) pushTo(carriedBy, node.carriedBy.bar, index);
  });
  return { truss, barsAt, carriedBy };
}

/** Unit direction of a bar away from one of its nodes. */
export function awayFrom({ nodes, bars }: Truss, bar: number, node: number): Vec3 {
  const { from, to } = bars[bar];
  const line = subtract(nodes[to].at, nodes[from].at);
  return unit(node === from ? line : scale(line, -1)) ?? ORIGIN;
}

/**
 * The force, N, that what meets at a carried node hands over to the bar that carries it: loads and reactions there, the axial forces of the
 * bars that end there, and what these bars in turn are handed by the nodes that they carry.
 */
export function handedOver(
  { truss, barsAt, carriedBy }: Incidence,
  answer: SolvedCase | SolvedCombination,
  cases: readonly SolvedCase[],
): (node: number) => Vec3 {
  const given = forcesAt([...loadsOf(answer, cases), ...answer.reactions]);
  const known = new Map<number, Vec3>();
  return forceOf;

  function forceOf(node: number): Vec3 {
    const before = known.get(node);
    if (before !== undefined) return before;
    let sum = given.get(node) ?? ORIGIN;
    for (const bar of barsAt.get(node) ?? []) {
      sum = add(sum, scale(awayFrom(truss, bar, node), answer.axialForce[bar] ?? 0));
      for (const carried of carriedBy.get(bar) ?? []) {
        const t = truss.nodes[carried].carriedBy?.t ?? 0;
        sum = add(sum, scale(forceOf(carried), node === truss.bars[bar].from ? 1 - t : t));
      }
    }
    known.set(node, sum);
    return sum;
  }
}

function loadsOf(answer: SolvedCase | SolvedCombination, cases: readonly SolvedCase[]): readonly NodalForce[] {
  if ('loads' in answer) return answer.loads;
  return cases.flatMap(({ name, loads }) => {
    const factor = answer.factors[name] ?? 0;
    return factor === 0 ? [] : loads.map(({ node, force }) => ({ node, force: scale(force, factor) }));
  });
}

function forcesAt(forces: readonly NodalForce[]): Map<number, Vec3> {
  const at = new Map<number, Vec3>();
  for (const { node, force } of forces) at.set(node, add(at.get(node) ?? ORIGIN, force));
  return at;
}
