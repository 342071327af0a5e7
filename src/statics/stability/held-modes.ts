import { type Factor, factorise } from '../engine/factor.ts';
import { solveMany } from '../engine/solve.ts';
import { combineRows, multiplyRows } from '../engine/system.ts';
import { largest } from '../engine/vectors.ts';
import { elongationsOf } from '../model/elongation.ts';
import { nodeMovements } from '../model/movement.ts';
import { pivotUnknowns } from '../model/pivot-unknowns.ts';
import { buildSystem, type System } from '../model/system.ts';
import type { Restraint } from '../types.ts';

/** Movements are worked out this many at a time, to bound memory. */
const TOGETHER = 8;

/** Rounding below this share of a mode's largest movement is cut away. */
const CUT = 1e-11;

/** The system with a pivot held for each mechanism: nothing moves freely in it. */
export interface HeldSystem {
  readonly base: System;
  readonly held: System;
  readonly factor: Factor;
}

export function holdPivots(base: System, pivots: readonly Restraint[]): HeldSystem {
  const held = buildSystem(base.problem, pivots, undefined, base);
  return { base, held, factor: factorise(held.matrix) };
}

/**
 * Lets the truss follow each of `starts` (three components a node), which it keeps at the pivots, without straining a bar. What moves the
 * pivots alone becomes the mode that goes with them; what is nearly a mode is taken down to rounding.
 */
export function follow({ base, held, factor }: HeldSystem, starts: readonly Float64Array[]): Float64Array[] {
  const { truss } = base.problem;
  const unknowns = held.matrix.symbolic.freedoms.active.length;
  const loadOf = (elongation: Float64Array): Float64Array =>
    combineRows(
      held.rows,
      elongation.map((e, row) => -e * held.stiffness[row]),
      unknowns,
    );
  const out: Float64Array[] = [];
  for (let from = 0; from < starts.length; from += TOGETHER) {
    const together = starts.slice(from, from + TOGETHER);
    const stretch = together.map((moves) => elongationsOf(truss, base.elongations, moves));
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
      for (let i = 0; i < moves.length; i++) moves[i] = moves[i] + together[t][i];
      out.push(moves);
    });
  }
  return out;
}

/** Moves the pivots by the given amounts and nothing else: three components a node. */
export function movePivots(
  base: System,
  pivots: readonly { readonly pivot: Restraint; readonly amount: number }[],
): Float64Array {
  const q = new Float64Array(base.movement.freedoms.active.length);
  for (const { pivot, amount } of pivots)
    for (const [unknown, value] of pivotUnknowns(base.movement, pivot)) q[unknown] = q[unknown] + amount * value;
  return nodeMovements(base.movement, q);
}

/** For each of `moved` the mode in which that pivot moves and all others are at rest. Three components a node, largest 1. */
export function modesOfPivots(system: HeldSystem, moved: readonly Restraint[]): Float64Array[] {
  const starts = moved.map((pivot) => movePivots(system.base, [{ pivot, amount: 1 }]));
  return follow(system, starts).map(tidyMode);
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
