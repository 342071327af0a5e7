import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { BlockMatrix } from './assemble.ts';
import { type Factor, factorise } from './factor.ts';
import { solveMany } from './solve.ts';
import { applyStiffness, type SparseRows } from './system.ts';
import { inner, scatter } from './vectors.ts';

/** A stiffness matrix together with the rows it was made of. */
export interface Stiffness {
  readonly rows: SparseRows;
  readonly stiffness: Float64Array;
  readonly matrix: BlockMatrix;
}

/** Number of eigenvalues below `shift`, by Sylvester's law of inertia. */
export function countBelow(matrix: BlockMatrix, shift: number): number {
  return factorise(matrix, { shift }).negative;
}

/** The highest eigenvalue to about a percent, by power iteration from a fixed start. */
export function highestEigenvalue({ rows, stiffness, matrix }: Stiffness): number {
  const { active } = matrix.symbolic.freedoms;
  let x = scatter(active, 1);
  let value = 0;
  for (let step = 0; step < 30; step++) {
    const size = Math.sqrt(inner(x, x));
    if (size === 0) return 0;
    x = x.map((v) => v / size);
    const y = applyStiffness(rows, stiffness, x);
    value = inner(x, y);
    x = y;
  }
  return value;
}

export interface EigenPair {
  readonly value: number;
  readonly vector: Float64Array;
}

/**
 * The `count` lowest eigenpairs by inverse subspace iteration with Rayleigh-Ritz (Bathe 1971). `factor` must be of the matrix itself or of
 * one shifted down by little against the values sought.
 */
export function lowestEigenpairs(
  { rows, stiffness, matrix }: Stiffness,
  factor: Factor,
  count: number,
  steps = 12,
): EigenPair[] {
  const { active } = matrix.symbolic.freedoms;
  const available = active.reduce((sum, flag) => sum + flag, 0);
  const width = Math.min(count + 4, available);
  let basis = Array.from({ length: width }, (_, i) => scatter(active, i + 2));
  let values: number[] = [];
  for (let step = 0; step < steps; step++) {
    basis = orthonormal(solveMany(factor, basis));
    const images = basis.map((x) => applyStiffness(rows, stiffness, x));
    const projected = Matrix.zeros(basis.length, basis.length);
    for (let i = 0; i < basis.length; i++)
      for (let j = 0; j <= i; j++) {
        const entry = inner(basis[i], images[j]);
        projected.set(i, j, entry);
        projected.set(j, i, entry);
      }
    const ritz = new EigenvalueDecomposition(projected, { assumeSymmetric: true });
    const last = values;
    values = ritz.realEigenvalues;
    basis = recombine(basis, ritz.eigenvectorMatrix);
    const settled =
      last.length === values.length &&
      values.slice(0, count).every((v, i) => Math.abs(v - last[i]) <= 1e-3 * Math.abs(v));
    if (settled) break;
  }
  return values
    .map((value, i) => ({ value, vector: basis[i] }))
    .sort((a, b) => a.value - b.value)
    .slice(0, count);
}

function recombine(basis: readonly Float64Array[], weights: Matrix): Float64Array[] {
  return basis.map((_, c) => {
    const out = new Float64Array(basis[0].length);
    basis.forEach((x, r) => {
      const w = weights.get(r, c);
      for (let i = 0; i < out.length; i++) out[i] = out[i] + w * x[i];
    });
    return out;
  });
}

/** Gram-Schmidt, twice over; vectors that depend on the ones before are dropped. */
function orthonormal(vectors: readonly Float64Array[]): Float64Array[] {
  const kept: Float64Array[] = [];
  for (const vector of vectors) {
    const before = Math.sqrt(inner(vector, vector));
    const x = vector.map((v) => v / before);
    for (let pass = 0; pass < 2; pass++)
      for (const y of kept) {
        const k = inner(x, y);
        for (let i = 0; i < x.length; i++) x[i] = x[i] - k * y[i];
      }
    const size = Math.sqrt(inner(x, x));
    if (size > 1e-10) kept.push(x.map((v) => v / size));
  }
  return kept;
}
