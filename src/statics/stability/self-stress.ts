import { type Factor, factorise } from '../engine/factor.ts';
import { solveOne } from '../engine/solve.ts';
import { combineRows, multiplyRows } from '../engine/system.ts';
import { largest, scatter } from '../engine/vectors.ts';
import type { System } from '../model/system.ts';
import type { HeldSystem } from './held-modes.ts';

/** Random sets of forces put in: what a bar is left with in none of them, it is left with in no state of self-stress. */
const TRIALS = 2;
/** A share of the largest left that counts as nothing. */
const NOTHING = 1e-8;

/**
 * Bars that take part in no state of self-stress: the loss of any one of them makes a mechanism more. Bar forces projected on the states of
 * self-stress are zero in a row for every set of forces exactly where the bar has no redundancy (the diagonal of the redundancy matrix).
 * Indices into the truss's bars.
 *
 * @param known the factor of `base`, where nothing moves and it is at hand
 */
export function criticalBars(
  base: System,
  known: Factor | null,
  held: HeldSystem | null,
  selfStressStates: number,
): number[] {
  const { bars } = base.elongations;
  if (selfStressStates === 0) return [...bars];
  const system = held?.held ?? base;
  const factor = held?.factor ?? known ?? factorise(base.matrix);
  const left = new Float64Array(system.rows.count);
  const all = new Uint8Array(system.rows.count).fill(1);
  for (let trial = 0; trial < TRIALS; trial++) {
    const state = selfStressOf(system, factor, scatter(all, trial + 7));
    for (let r = 0; r < left.length; r++) left[r] = Math.max(left[r], Math.abs(state[r]));
  }
  const most = largest(left);
  return bars.filter((_, row) => left[row] <= NOTHING * most);
}

/** What stays of the forces when the joints are put back in balance by the truss itself; refined, so that nothing stays nothing. */
function selfStressOf({ rows, stiffness, matrix }: System, factor: Factor, forces: Float64Array): Float64Array {
  const tension = forces.slice();
  for (let pass = 0; pass < 3; pass++) {
    const load = combineRows(rows, tension, matrix.symbolic.freedoms.active.length);
    const elongation = multiplyRows(rows, solveOne(factor, load));
    for (let r = 0; r < tension.length; r++) tension[r] = tension[r] - stiffness[r] * elongation[r];
  }
  return tension;
}
