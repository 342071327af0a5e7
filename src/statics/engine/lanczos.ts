import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Factor } from './factor.ts';
import { solveOne } from './solve.ts';
import { inner, scatter } from './vectors.ts';

const MOST_STEPS = 40;
const MOST_DIRECT_STEPS = 100;

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

/**
 * The eigenvector of the lowest eigenvalue of a symmetric matrix that is given by what it does to a vector, by Lanczos on the matrix itself: for
 * eigenvalues that stand at the end of the spectrum, as those below zero do.
 */
export function lowestOfStiffness(apply: (x: Float64Array) => Float64Array, active: Uint8Array): Float64Array {
  const basis: Float64Array[] = [];
  const diagonal: number[] = [];
  const beside: number[] = [];
  let next = scatter(active, 1);
  for (let step = 0; step < MOST_DIRECT_STEPS; step++) {
    const size = Math.sqrt(inner(next, next));
    const scale = Math.max(...diagonal.map(Math.abs), ...beside, 0);
    if (step > 0 && !(size > 1e-12 * scale)) break;
    if (step > 0) beside.push(size);
    const vector = next.map((v) => v / size);
    basis.push(vector);
    next = apply(vector);
    diagonal.push(inner(vector, next));
    for (let pass = 0; pass < 2; pass++)
      for (const b of basis) {
        const k = inner(next, b);
        for (let i = 0; i < next.length; i++) next[i] = next[i] - k * b[i];
      }
  }
  const { realEigenvalues, eigenvectorMatrix } = eigenOfTridiagonal(diagonal, beside);
  const weights = eigenvectorMatrix.getColumn(realEigenvalues.indexOf(Math.min(...realEigenvalues)));
  const out = new Float64Array(active.length);
  basis.forEach((b, i) => {
    for (let u = 0; u < out.length; u++) out[u] = out[u] + weights[i] * b[u];
  });
  return out;
}

const highestOfTridiagonal = (diagonal: readonly number[], beside: readonly number[]): number =>
  Math.max(...eigenOfTridiagonal(diagonal, beside).realEigenvalues);

function eigenOfTridiagonal(diagonal: readonly number[], beside: readonly number[]): EigenvalueDecomposition {
  const matrix = Matrix.zeros(diagonal.length, diagonal.length);
  diagonal.forEach((v, i) => {
    matrix.set(i, i, v);
  });
  beside.forEach((v, i) => {
    matrix.set(i, i + 1, v);
    matrix.set(i + 1, i, v);
  });
  return new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
}
