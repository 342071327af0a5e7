import { Matrix, solve } from 'ml-matrix';
import type { Vec3 } from '../../domain/vector.ts';
import { frameDirection, type Movement, STRIDE } from '../model/movement.ts';
import type { System } from '../model/system.ts';
import type { NodalForce, Restraint } from '../types.ts';

/** Joint balance of one case. */
export interface Balance {
  readonly reactions: readonly NodalForce[];
  /** Force each pivot has to give, N; none where the load does no work on the modes. */
  readonly pivotForces: Float64Array;
  /** Largest force of bars, loads and reactions, N. */
  readonly largestForce: number;
  /** What is left out of balance at the worst joint, the pivots' forces included, N. */
  readonly outOfBalance: number;
}

/**
 * Balances every joint with the bar forces alone: what supports have to give is their reaction, what nothing gives is left over. `axial` has
 * one entry a row (bars, then springs), `loads` three components a node.
 */
export function balanceJoints(
  base: System,
  held: System,
  pivots: readonly Restraint[],
  axial: Float64Array,
  loads: Float64Array,
): Balance {
  const { movement, elongations, problem } = base;
  const left = new Float64Array(loads.length);
  const put = (node: number, force: Vec3, factor: number) => {
    for (const [real, share] of movement.shares[node])
      for (let axis = 0; axis < 3; axis++) left[3 * real + axis] = left[3 * real + axis] + share * factor * force[axis];
  };
  const given = new Map<number, [number, number, number]>();
  const give = (node: number, force: Vec3, factor: number) => {
    put(node, force, factor);
    const sum = given.get(node) ?? [0, 0, 0];
    for (let axis = 0; axis < 3; axis++) sum[axis] = sum[axis] + factor * force[axis];
    given.set(node, sum);
  };
  let largestForce = 0;
  for (const v of loads) largestForce = Math.max(largestForce, Math.abs(v));
  for (let node = 0; 3 * node < loads.length; node++)
    put(node, [loads[3 * node], loads[3 * node + 1], loads[3 * node + 2]], 1);
  elongations.bars.forEach((b, row) => {
    const { from, to } = problem.truss.bars[b];
    put(from, elongations.directions[row], axial[row]);
    put(to, elongations.directions[row], -axial[row]);
    largestForce = Math.max(largestForce, Math.abs(axial[row]));
  });
  for (const { node } of [...problem.supports.restraints, ...(problem.supports.holds ?? [])])
    if (problem.parts.liveNode[node]) given.set(node, [0, 0, 0]);
  elongations.springs.forEach((spring, s) => {
    give(spring.node, spring.direction, -axial[elongations.bars.length + s]);
  });
  carriedReactions(held.movement, left).forEach((amount, i) => {
    const { node, direction } = held.movement.carriedRestraints[i];
    give(node, direction, amount);
  });
  for (let node = 0; 3 * node < left.length; node++)
    for (let c = movement.freeCount[node]; c < 3 && isHeld(movement, node); c++) {
      const direction = frameDirection(movement, node, c);
      give(node, direction, -along(left, node, direction));
    }
  const reactions = [...given].sort((a, b) => a[0] - b[0]).map(([node, force]): NodalForce => ({ node, force }));
  for (const { force } of reactions) for (const v of force) largestForce = Math.max(largestForce, Math.abs(v));
  let outOfBalance = 0;
  for (const v of left) outOfBalance = Math.max(outOfBalance, Math.abs(v));
  const pivotForces = Float64Array.from(pivots, ({ node, direction }) => -along(left, node, direction));
  return { reactions, pivotForces, largestForce, outOfBalance };
}

/** Reactions of restraints on carried nodes: what the freedoms that follow leave unbalanced. */
function carriedReactions(movement: Movement, left: Float64Array): number[] {
  const restraints = movement.carriedRestraints;
  if (restraints.length === 0) return [];
  const size = restraints.length;
  const coupling = Matrix.zeros(size, size);
  const wanted = Matrix.zeros(size, 1);
  const rowOf = new Map(restraints.map((r, i) => [r.follower, i]));
  restraints.forEach((restraint, column) => {
    for (const term of restraint.terms) {
      const row = rowOf.get(term.unknown);
      if (row !== undefined) coupling.set(row, column, coupling.get(row, column) + term.factor);
    }
    const node = Math.floor(restraint.follower / STRIDE);
    const direction = frameDirection(movement, node, restraint.follower - STRIDE * node);
    wanted.set(column, 0, -along(left, node, direction));
  });
  return solve(coupling, wanted).to1DArray();
}

function isHeld(movement: Movement, node: number): boolean {
  return movement.truss.nodes[node].carriedBy === null && movement.live[node] === 1;
}

function along(forces: Float64Array, node: number, direction: Vec3): number {
  return direction[0] * forces[3 * node] + direction[1] * forces[3 * node + 1] + direction[2] * forces[3 * node + 2];
}
