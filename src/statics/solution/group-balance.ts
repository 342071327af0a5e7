import { CholeskyDecomposition, EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Truss } from '../../domain/truss.ts';
import { assemble } from '../engine/assemble.ts';
import { factorise } from '../engine/factor.ts';
import { lowestOfStiffness } from '../engine/lanczos.ts';
import { solveOne } from '../engine/solve.ts';
import type { Symbolic } from '../engine/symbolic.ts';
import { applyStiffness } from '../engine/system.ts';
import { inner, scatter } from '../engine/vectors.ts';
import type { MotionGroup } from './mode-groups.ts';

export type Kind = 'stable' | 'indifferent' | 'unstable';

/** How the bar forces of one case act on motions that no bar resists. */
export interface GroupBalance {
  readonly kind: Kind;
  /** The motion that the forces resist least, over the real nodes, three components a node of the truss; null where they bring all back. */
  readonly moves: Float64Array | null;
}

/** Eigenvalues below this share of what the forces do, taken without their signs, are nothing. */
const NOTHING = 1e-8;
/** N / L of each bar of the group, on both of its rows. */
function densitiesOf(truss: Truss, { bars }: MotionGroup, forces: readonly (number | null)[]): Float64Array {
  const out = new Float64Array(2 * bars.length);
  bars.forEach((bar, r) => {
    out.fill((forces[bar] ?? 0) / truss.bars[bar].length, 2 * r, 2 * r + 2);
  });
  return out;
}

/** The largest part that one bar has in the stiffness of a motion, without its sign. */
function largestPart({ rows }: MotionGroup, densities: Float64Array): number {
  let most = 0;
  for (let row = 0; row < rows.count; row++)
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++)
      most = Math.max(most, Math.abs(densities[row]) * rows.value[p] ** 2);
  return most;
}

/** The geometric stiffness of the bar forces on the motions, N/m: sum over bars of N / L times the movements across the bar. */
export function geometricOf(truss: Truss, group: MotionGroup, forces: readonly (number | null)[]): Matrix {
  return inFull(group, densitiesOf(truss, group, forces));
}

function inFull({ motions, rows }: MotionGroup, densities: Float64Array): Matrix {
  const q = Matrix.zeros(motions.length, motions.length);
  for (let row = 0; row < rows.count; row++) {
    if (densities[row] === 0) continue;
    for (let a = rows.start[row]; a < rows.start[row + 1]; a++)
      for (let b = rows.start[row]; b < rows.start[row + 1]; b++) {
        const [i, j] = [rows.unknown[a], rows.unknown[b]];
        if (j > i) continue;
        q.set(i, j, q.get(i, j) + densities[row] * rows.value[a] * rows.value[b]);
      }
  }
  for (let i = 0; i < q.rows; i++) for (let j = 0; j < i; j++) q.set(j, i, q.get(i, j));
  return q;
}

/**
 * Bars do not stretch in a mode, so that to second order the geometric stiffness alone decides: with its smallest eigenvalue positive the
 * balance is stable (Pellegrino & Calladine 1986; Bazant & Cedolin, Stability of Structures, ch. 4, from memory).
 */
export function balanceOf(truss: Truss, group: MotionGroup, forces: readonly (number | null)[]): GroupBalance {
  const densities = densitiesOf(truss, group, forces);
  const most = largestPart(group, densities);
  if (most === 0) return { kind: 'indifferent', moves: mixed(truss, group, [1]) };
  const little = NOTHING * most;
  const { kind, shares } =
    group.symbolic === null
      ? judgeInFull(group, densities, little)
      : judgeSparse(group.symbolic, group, densities, little);
  return { kind, moves: shares === null ? null : mixed(truss, group, shares) };
}

/** Shares of the motions in the one that is resisted least; null where all are resisted. */
interface Weakest {
  readonly kind: Kind;
  readonly shares: ArrayLike<number> | null;
}

function judgeInFull(group: MotionGroup, densities: Float64Array, little: number): Weakest {
  const q = inFull(group, densities);
  const lowered = Matrix.sub(q, Matrix.eye(q.rows, q.rows).mul(little));
  if (new CholeskyDecomposition(lowered).isPositiveDefinite()) return { kind: 'stable', shares: null };
  const eigen = new EigenvalueDecomposition(q, { assumeSymmetric: true });
  const lowest = eigen.realEigenvalues.indexOf(Math.min(...eigen.realEigenvalues));
  const kind = eigen.realEigenvalues[lowest] < -little ? 'unstable' : 'indifferent';
  return { kind, shares: eigen.eigenvectorMatrix.getColumn(lowest) };
}

/** By the inertia of the matrix less a shift (Sylvester), however many motions there are. */
function judgeSparse(symbolic: Symbolic, { rows }: MotionGroup, densities: Float64Array, little: number): Weakest {
  const { active } = symbolic.freedoms;
  const matrix = assemble(symbolic, rows, densities);
  if (factorise(matrix, { shift: little }).negative === 0) return { kind: 'stable', shares: null };
  if (factorise(matrix, { shift: -little }).negative > 0)
    return {
      kind: 'unstable',
      shares: lowestOfStiffness((x) => applyStiffness(rows, densities, x), active),
    };
  // Inverse iteration from just below the eigenvalues that are nothing.
  const factor = factorise(matrix, { shift: -2 * little });
  let x = scatter(active, 5);
  for (let step = 0; step < 6; step++) {
    x = solveOne(factor, x);
    const size = Math.sqrt(inner(x, x));
    x = x.map((v) => v / size);
  }
  return { kind: 'indifferent', shares: x };
}

function mixed(truss: Truss, { motions }: MotionGroup, shares: ArrayLike<number>): Float64Array {
  const out = new Float64Array(3 * truss.nodes.length);
  for (let m = 0; m < shares.length; m++) {
    const { nodes, moves } = motions[m];
    nodes.forEach((node, i) => {
      for (let axis = 0; axis < 3; axis++) out[3 * node + axis] += shares[m] * moves[3 * i + axis];
    });
  }
  return out;
}
