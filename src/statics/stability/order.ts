import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { factorise } from '../engine/factor.ts';
import { solveOne } from '../engine/solve.ts';
import { combineRows, multiplyRows } from '../engine/system.ts';
import { largest } from '../engine/vectors.ts';
import { buildSystem, type System } from '../model/system.ts';
import type { Restraint } from '../types.ts';

/** Modes and states of self-stress looked at in one part; beyond, the order stays undecided. */
const MOST_MODES = 60;
const MOST_STATES = 24;
const MOST_PARTS = 50;

/**
 * For each group of modes (those of one part) whether some state of self-stress stiffens all of them: the product-force test of
 * Pellegrino & Calladine (Int. J. Solids Structures 22, 1986), sufficient and not necessary.
 */
export function stiffenedBySelfStress(
  base: System,
  pivots: readonly Restraint[],
  groups: readonly (readonly Float64Array[])[],
): boolean[] {
  const eligible = groups.map((modes, i) => i < MOST_PARTS && modes.length > 0 && modes.length <= MOST_MODES);
  if (!eligible.includes(true)) return groups.map(() => false);
  const held = buildSystem(base.problem, pivots, undefined, base);
  const factor = factorise(held.matrix);
  return groups.map((modes, i) => {
    if (!eligible[i]) return false;
    const states = nearbyStates(held, factor, modes);
    return canBeDefinite(states.map((tension) => productForces(held, tension, modes)));
  });
}

/** States of self-stress made from one stressed bar each among those that the modes turn. */
function nearbyStates(
  held: System,
  factor: ReturnType<typeof factorise>,
  modes: readonly Float64Array[],
): Float64Array[] {
  const { truss } = held.problem;
  const turned = held.elongations.bars
    .map((b, row) => ({ row, bar: truss.bars[b] }))
    .filter(({ bar }) =>
      modes.some((m) => [0, 1, 2].some((a) => Math.abs(m[3 * bar.to + a] - m[3 * bar.from + a]) > 1e-9)),
    )
    .map(({ row }) => row);
  const step = Math.max(1, turned.length / MOST_STATES);
  const states: Float64Array[] = [];
  for (let i = 0; i < turned.length; i += step) {
    const state = selfStress(held, factor, turned[Math.floor(i)]);
    if (state !== null) states.push(state);
  }
  return states;
}

/** What stays of a unit force in one bar when the joints are put back in balance; null where nothing stays. */
function selfStress(held: System, factor: ReturnType<typeof factorise>, row: number): Float64Array | null {
  const { rows, stiffness } = held;
  const tension = new Float64Array(rows.count);
  tension[row] = 1;
  for (let pass = 0; pass < 3; pass++) {
    const load = combineRows(rows, tension, held.matrix.symbolic.freedoms.active.length);
    const elongation = multiplyRows(rows, solveOne(factor, load));
    for (let r = 0; r < tension.length; r++) tension[r] = tension[r] - stiffness[r] * elongation[r];
  }
  const size = largest(tension);
  return size < 1e-7 ? null : tension.map((t) => (Math.abs(t) < 1e-9 * size ? 0 : t / size));
}

/** Q_ij: work of the product forces of mode i through mode j, sum over bars of tension / length times the relative movements. */
function productForces(held: System, tension: Float64Array, modes: readonly Float64Array[]): Matrix {
  const { truss } = held.problem;
  const { bars, lengths } = held.elongations;
  const q = Matrix.zeros(modes.length, modes.length);
  bars.forEach((b, row) => {
    const density = tension[row] / lengths[row];
    if (density === 0) return;
    const { from, to } = truss.bars[b];
    for (let axis = 0; axis < 3; axis++) {
      const relative = modes.map((m) => m[3 * to + axis] - m[3 * from + axis]);
      relative.forEach((ri, i) => {
        if (ri === 0) return;
        relative.forEach((rj, j) => {
          if (rj !== 0) q.set(i, j, q.get(i, j) + density * ri * rj);
        });
      });
    }
  });
  return q;
}

/** Looks for a combination of the matrices that is definite, by climbing its lowest eigenvalue. */
export function canBeDefinite(matrices: readonly Matrix[]): boolean {
  const useful = matrices.filter((q) => q.norm() > 1e-9);
  if (useful.length === 0) return false;
  const scaled = useful.map((q) => Matrix.mul(q, 1 / q.norm()));
  for (const sign of [1, -1]) {
    let weights = scaled.map((q) => sign * (q.trace() || 1e-3));
    for (let step = 0; step < 80; step++) {
      const sum = Matrix.zeros(scaled[0].rows, scaled[0].columns);
      scaled.forEach((q, s) => {
        sum.add(Matrix.mul(q, weights[s]));
      });
      const eigen = new EigenvalueDecomposition(sum, { assumeSymmetric: true });
      const lowest = eigen.realEigenvalues.indexOf(Math.min(...eigen.realEigenvalues));
      if (eigen.realEigenvalues[lowest] > 1e-6 * sum.norm()) return true;
      const direction = eigen.eigenvectorMatrix.getColumnVector(lowest);
      const slope = scaled.map((q) => direction.transpose().mmul(q).mmul(direction).get(0, 0));
      const size = Math.hypot(...slope);
      if (size < 1e-9) break;
      const reach = Math.hypot(...weights) / Math.sqrt(step + 1);
      weights = weights.map((w, s) => w + (reach * slope[s]) / size);
    }
  }
  return false;
}
