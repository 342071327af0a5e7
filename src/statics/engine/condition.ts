import type { Factor } from './factor.ts';
import { solveOne } from './solve.ts';
import type { Stiffness } from './spectrum.ts';

const MOST_STEPS = 8;

/**
 * Condition number of K in the 1-norm from its factor, a lower bound that is seldom off by more than a factor of three: the norm of K by its columns, that of the
 * inverse by Hager's method (Higham 1988), a few solutions. Solutions lose about its decimal exponent in digits.
 */
export function estimateCondition(system: Stiffness, factor: Factor): number {
  return normOf(system) * inverseNorm(factor);
}

/** Largest sum of absolute values in a column, from the blocks. */
function normOf({ matrix }: Stiffness): number {
  const { symbolic, diagonal, lower } = matrix;
  const { freedoms, order, pattern } = symbolic;
  const { blocks, stride, active } = freedoms;
  const sums = new Float64Array(blocks * stride);
  const take = (i: number, j: number, values: Float64Array, at: number) => {
    for (let a = 0; a < stride; a++)
      for (let b = 0; b < stride; b++) {
        const value = Math.abs(values[at + a * stride + b]);
        sums[i * stride + a] += value;
        if (i !== j) sums[j * stride + b] += value;
      }
  };
  for (let i = 0; i < blocks; i++) {
    take(i, i, diagonal, i * stride * stride);
    for (let p = pattern.start[i]; p < pattern.start[i + 1]; p++)
      take(i, pattern.column[p], lower, p * stride * stride);
  }
  let most = 0;
  for (let k = 0; k < blocks; k++)
    for (let a = 0; a < stride; a++) if (active[order[k] * stride + a]) most = Math.max(most, sums[k * stride + a]);
  return most;
}

/** The matrix is symmetric, so that one solution serves for both the inverse and its transpose. */
function inverseNorm(factor: Factor): number {
  const { active } = factor.symbolic.freedoms;
  const count = active.reduce((sum, flag) => sum + flag, 0);
  if (count === 0) return 0;
  let x = Float64Array.from(active, (flag) => (flag ? 1 / count : 0));
  let estimate = 0;
  for (let step = 0; step < MOST_STEPS; step++) {
    const y = solveOne(factor, x);
    const size = y.reduce((sum, v) => sum + Math.abs(v), 0);
    if (size <= estimate) break;
    estimate = size;
    const slope = solveOne(
      factor,
      y.map((v, u) => (active[u] ? (v >= 0 ? 1 : -1) : 0)),
    );
    let steepest = 0;
    slope.forEach((v, u) => {
      if (Math.abs(v) > Math.abs(slope[steepest])) steepest = u;
    });
    const along = slope.reduce((sum, v, u) => sum + v * x[u], 0);
    if (Math.abs(slope[steepest]) <= along) break;
    x = new Float64Array(active.length);
    x[steepest] = 1;
  }
  return Math.max(estimate, alternating(factor, active, count));
}

/** Higham's second guess, for the matrices that the first one misses. */
function alternating(factor: Factor, active: Uint8Array, count: number): number {
  let k = 0;
  const x = Float64Array.from(active, (flag) => {
    if (!flag) return 0;
    const value = (1 + k / Math.max(count - 1, 1)) * (k % 2 === 0 ? 1 : -1);
    k++;
    return value;
  });
  const size = solveOne(factor, x).reduce((sum, v) => sum + Math.abs(v), 0);
  return (2 * size) / (3 * count);
}
