import type { Factor } from '../engine/factor.ts';
import { solveOne } from '../engine/solve.ts';
import { combineRows, multiplyRows } from '../engine/system.ts';
import { inner } from '../engine/vectors.ts';
import { gatherForces, nodeMovements } from '../model/movement.ts';
import { pivotUnknowns } from '../model/pivot-unknowns.ts';
import type { System } from '../model/system.ts';
import type { Restraint } from '../types.ts';

const MOST_STEPS = 200;

/**
 * Takes out of movements (three components a node) what lies along the mechanisms, least squares over the real nodes, by conjugate
 * gradients. The modes are never formed: one solution of the held system turns pivots' movements into the truss's, another one back.
 */
export function cleanOfModes(
  base: System,
  held: System,
  factor: Factor,
  pivots: readonly Restraint[],
  moves: Float64Array,
): Float64Array {
  if (pivots.length === 0) return moves;
  const { truss } = base.problem;
  const starts = pivots.map((pivot) => pivotUnknowns(base.movement, pivot));
  const unknowns = base.movement.freedoms.active.length;
  const { stiffness } = held;

  const movesOf = (amounts: Float64Array): Float64Array => {
    const q = new Float64Array(unknowns);
    starts.forEach((start, p) => {
      for (const [unknown, value] of start) q[unknown] = q[unknown] + amounts[p] * value;
    });
    const force = multiplyRows(base.rows, q).map((e, row) => -e * stiffness[row]);
    const answer = nodeMovements(held.movement, solveOne(factor, combineRows(held.rows, force, unknowns)));
    const given = nodeMovements(base.movement, q);
    return answer.map((v, i) => v + given[i]);
  };
  const alongModes = (vector: Float64Array): Float64Array => {
    const real = vector.map((v, i) => (truss.nodes[Math.floor(i / 3)].carriedBy === null ? v : 0));
    const direct = gatherForces(base.movement, real);
    const answer = solveOne(factor, gatherForces(held.movement, real));
    const force = multiplyRows(held.rows, answer).map((e, row) => -e * stiffness[row]);
    const through = combineRows(base.rows, force, unknowns);
    return Float64Array.from(starts, (start) =>
      start.reduce((sum, [unknown, value]) => sum + value * (direct[unknown] + through[unknown]), 0),
    );
  };

  let rest = alongModes(moves);
  let direction = rest.slice();
  const amounts = new Float64Array(pivots.length);
  let size = inner(rest, rest);
  const enough = 1e-26 * size;
  for (let step = 0; step < MOST_STEPS && size > enough; step++) {
    const image = alongModes(movesOf(direction));
    const reach = size / inner(direction, image);
    if (!Number.isFinite(reach)) break;
    rest = rest.map((v, i) => v - reach * image[i]);
    direction.forEach((v, i) => {
      amounts[i] = amounts[i] + reach * v;
    });
    const before = size;
    size = inner(rest, rest);
    direction = direction.map((v, i) => rest[i] + (size / before) * v);
  }
  const along = movesOf(amounts);
  return moves.map((v, i) => v - along[i]);
}
