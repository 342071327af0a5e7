import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Factor } from './factor.ts';
import { solveOne } from './solve.ts';
import { inner, scatter } from './vectors.ts';

const MOST_STEPS = 40;

/**
 * The lowest eigenvalue of a positive definite matrix from its factor, by Lanczos on the inverse with full reorthogonalisation (Parlett,
 * The Symmetric Eigenvalue Problem, 13), to about four digits.
 */
export function lowestEigenvalue(factor: Factor): number {
  const { active } = factor.symbolic.freedoms;
  const basis: Float64Array[] = [];
  const diagonal: number[] = [];
  const beside: number[] = [];
  let next = scatter(active, 1);
  let highest = 0;
  for (let step = 0; step < MOST_STEPS; step++) {
    const size = Math.sqrt(inner(next, next));
    if (step > 0 && size < 1e-10 * highest) break;
    if (step > 0) beside.push(size);
    const vector = next.map((v) => v / size);
    basis.push(vector);
    next = solveOne(factor, vector);
    diagonal.push(inner(vector, next));
    for (let pass = 0; pass < 2; pass++)
      for (const b of basis) {
        const k = inner(next, b);
        for (let i = 0; i < next.length; i++) next[i] = next[i] - k * b[i];
      }
    const before = highest;
    highest = highestOfTridiagonal(diagonal, beside);
    if (step > 5 && Math.abs(highest - before) < 1e-5 * highest) break;
  }
  return 1 / highest;
}

function highestOfTridiagonal(diagonal: readonly number[], beside: readonly number[]): number {
  const matrix = Matrix.zeros(diagonal.length, diagonal.length);
  diagonal.forEach((v, i) => {
    matrix.set(i, i, v);
  });
  beside.forEach((v, i) => {
    matrix.set(i, i + 1, v);
    matrix.set(i + 1, i, v);
  });
  return Math.max(...new EigenvalueDecomposition(matrix, { assumeSymmetric: true }).realEigenvalues);
}
