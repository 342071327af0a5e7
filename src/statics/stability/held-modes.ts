import { factorise } from '../engine/factor.ts';
import { solveMany } from '../engine/solve.ts';
import { combineRows, multiplyRows } from '../engine/system.ts';
import { largest } from '../engine/vectors.ts';
import { elongationsOf } from '../model/elongation.ts';
import { nodeMovements } from '../model/movement.ts';
import { pivotUnknowns } from '../model/pivot-unknowns.ts';
import { buildSystem, type System } from '../model/system.ts';
import type { Restraint } from '../types.ts';

/** Modes are worked out this many at a time, to bound memory. */
const TOGETHER = 8;

/** Rounding below this share of a mode's largest movement is cut away. */
const CUT = 1e-11;

/**
 * For each of `moved` the way the truss goes when that pivot is moved by 1 and all other `pivots` are held: a mode, where the pivots fit
 * the mechanisms. Three components a node, largest 1.
 */
export function modesOfPivots(base: System, pivots: readonly Restraint[], moved: readonly Restraint[]): Float64Array[] {
  const { truss } = base.problem;
  const held = buildSystem(base.problem, pivots, undefined, base);
  const factor = factorise(held.matrix);
  const unknowns = held.matrix.symbolic.freedoms.active.length;
  const loadOf = (elongation: Float64Array): Float64Array =>
    combineRows(
      held.rows,
      elongation.map((e, row) => -e * held.stiffness[row]),
      unknowns,
    );
  const out: Float64Array[] = [];
  for (let from = 0; from < moved.length; from += TOGETHER) {
    const start = moved.slice(from, from + TOGETHER).map((pivot) => pivotMovement(base, pivot));
    const stretch = start.map((moves) => elongationsOf(truss, base.elongations, moves));
    const answers = stretch.map(() => new Float64Array(unknowns));
    // The second pass is the refinement that takes the stretch down to rounding.
    for (let pass = 0; pass < 2; pass++) {
      const loads = stretch.map((e, t) => {
        const more = multiplyRows(held.rows, answers[t]);
        return loadOf(e.map((v, row) => v + more[row]));
      });
      solveMany(factor, loads).forEach((step, t) => {
        const answer = answers[t];
        for (let i = 0; i < unknowns; i++) answer[i] = answer[i] + step[i];
      });
    }
    answers.forEach((answer, t) => {
      const moves = nodeMovements(held.movement, answer);
      for (let i = 0; i < moves.length; i++) moves[i] = moves[i] + start[t][i];
      out.push(tidyMode(moves));
    });
  }
  return out;
}

function pivotMovement(base: System, pivot: Restraint): Float64Array {
  const q = new Float64Array(base.movement.freedoms.active.length);
  for (const [unknown, value] of pivotUnknowns(base.movement, pivot)) q[unknown] = value;
  return nodeMovements(base.movement, q);
}

export function tidyMode(moves: Float64Array): Float64Array {
  const most = largest(moves);
  return moves.map((v) => (Math.abs(v) < CUT * most ? 0 : v / most));
}

/** Largest elongation of any bar or spring, as a share of the largest movement. */
export function stretchOf(base: System, moves: Float64Array): number {
  const elongation = elongationsOf(base.problem.truss, base.elongations, moves);
  return largest(elongation) / (largest(moves) || 1);
}
