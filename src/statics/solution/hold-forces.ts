import { Matrix, solve } from 'ml-matrix';
import type { Truss } from '../../domain/truss.ts';
import { along, dot, norm, type Vec3 } from '../../domain/vector.ts';
import type { ExtremeForce, HoldForce, SolvedCase, SolvedCombination, Supports } from '../types.ts';

/** What a brace is usually made for, as a share of the compression it keeps straight: EN 1993-1-1 5.3.3(4), alpha_m = 1, from memory. */
const USUAL_SHARE = 0.01;

const FACTORED: ReadonlySet<string> = new Set(['strength', 'accidental', 'equilibrium']);

/**
 * The force that each hold takes at most, over the strength, equilibrium and accidental combinations or, without any, over the cases, and
 * the greatest compression among the bars that it keeps straight.
 */
export function holdForces(
  truss: Truss,
  supports: Supports,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
): HoldForce[] {
  const holds = supports.holds ?? [];
  const factored = combinations.filter(({ limit }) => FACTORED.has(limit));
  const from = (combinations.length > 0 ? factored : cases).filter(({ refused }) => refused === null);
  const reactionsOf = from.map(({ reactions }) => new Map(reactions.map(({ node, force }) => [node, force])));
  const barsAt = new Map<number, number[]>();
  truss.bars.forEach((bar, b) => {
    for (const node of [bar.from, bar.to]) barsAt.set(node, [...(barsAt.get(node) ?? []), b]);
  });
  return holds.map((hold, h) => {
    const { node } = hold;
    const supported = supports.restraints.filter((r) => r.node === node).map((r) => r.direction);
    const here = holds.filter((other) => other.node === node);
    const place = here.indexOf(holds[h]);
    let force: ExtremeForce | null = null;
    let compression: ExtremeForce | null = null;
    for (const [i, one] of from.entries()) {
      const reaction = reactionsOf[i].get(node);
      if (reaction) {
        const taken = sharesOf(
          reaction,
          supported,
          here.map(({ direction }) => direction),
        )[place];
        if (force === null || Math.abs(taken) > Math.abs(force.force)) force = { force: taken, from: one.name };
      }
      for (const b of barsAt.get(node) ?? []) {
        const axial = one.axialForce[b];
        if (axial !== null && axial < (compression?.force ?? 0)) compression = { force: axial, from: one.name };
      }
    }
    return {
      ...hold,
      force,
      compression,
      usual: compression && USUAL_SHARE * Math.abs(compression.force),
    };
  });
}

/** How a node's reaction is shared among its holds: what the supports there do not take, least squares. */
function sharesOf(reaction: Vec3, supported: readonly Vec3[], holds: readonly Vec3[]): number[] {
  const outside = (v: Vec3): Vec3 => supported.reduce((rest, s) => along(rest, s, -dot(rest, s)), v);
  const rest = outside(reaction);
  const directions = holds.map(outside);
  const free = directions.flatMap((d, i) => (norm(d) > 1e-6 ? [i] : []));
  if (free.length === 0) return holds.map(() => 0);
  const gram = Matrix.zeros(free.length, free.length);
  free.forEach((i, r) => {
    free.forEach((j, c) => {
      gram.set(r, c, dot(directions[i], directions[j]));
    });
  });
  const shares = solve(gram, Matrix.columnVector(free.map((i) => dot(directions[i], rest))), true).to1DArray();
  return holds.map((_, i) => (free.includes(i) ? shares[free.indexOf(i)] : 0));
}
