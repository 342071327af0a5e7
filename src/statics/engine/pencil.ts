import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Factor } from './factor.ts';
import { solveOne } from './solve.ts';
import type { EigenPair } from './spectrum.ts';
import { inner, scatter } from './vectors.ts';

export interface PencilOptions {
  /** Residual of a pair, as a share of the highest eigenvalue, at which it counts as found: the eigenvalue's error goes with its square. */
  readonly tolerance: number;
  readonly mostSteps: number;
}

export const PENCIL_DEFAULTS: PencilOptions = { tolerance: 1e-6, mostSteps: 200 };

/** Share of a vector that is left by orthogonalisation where once is enough. */
const KEPT = 0.1;
/** Steps between two looks at what has been found. */
const LOOK = 6;

/**
 * The `count` highest positive eigenvalues of G x = value A x, highest first, for a positive definite A given by its factor and any symmetric G given
 * by what it does to a vector: Lanczos in the inner product of A with full reorthogonalisation (Parlett, The Symmetric Eigenvalue Problem, 15.11).
 * Of equal eigenvalues one is found, as one start vector allows. Fewer come back where G has fewer.
 */
export function highestOfPencil(
  factor: Factor,
  applyG: (x: Float64Array) => Float64Array,
  count: number,
  options: Partial<PencilOptions> = {},
): EigenPair[] {
  const { tolerance, mostSteps } = { ...PENCIL_DEFAULTS, ...options };
  const basis: Float64Array[] = [];
  /** A times the basis: comes with the recurrence, without A. */
  const images: Float64Array[] = [];
  const diagonal: number[] = [];
  const beside: number[] = [];
  let image = applyG(scatter(factor.symbolic.freedoms.active, 7));
  let vector = solveOne(factor, image);
  let size = Math.sqrt(Math.max(inner(vector, image), 0));
  if (!(size > 0)) return [];
  for (let step = 1; ; step++) {
    basis.push(vector.map((v) => v / size));
    images.push(image.map((v) => v / size));
    image = applyG(basis[step - 1]);
    vector = solveOne(factor, image);
    diagonal.push(inner(basis[step - 1], image));
    let before = Math.sqrt(Math.max(inner(vector, image), 0));
    for (let pass = 0; pass < 2; pass++) {
      basis.forEach((b, i) => {
        const k = inner(vector, images[i]);
        for (let u = 0; u < vector.length; u++) {
          vector[u] = vector[u] - k * b[u];
          image[u] = image[u] - k * images[i][u];
        }
      });
      size = Math.sqrt(Math.max(inner(vector, image), 0));
      // Where little was taken away, little rounding came in (Daniel, Gragg, Kaufman & Stewart 1976).
      if (size > KEPT * before) break;
      before = size;
    }
    const scale = Math.max(...diagonal.map(Math.abs), ...beside);
    const exhausted = size <= 1e-13 * scale;
    if (step % LOOK === 0 || exhausted || step === mostSteps) {
      const ritz = ritzPairs(diagonal, beside);
      const wanted = ritz.filter((pair) => pair.value > 1e-13 * scale).slice(0, count);
      const settled =
        wanted.length === count && wanted.every((pair) => size * Math.abs(pair.last) <= tolerance * wanted[0].value);
      if (settled || exhausted || step === mostSteps)
        return wanted.map(({ value, weights }) => ({ value, vector: combineBasis(basis, weights) }));
    }
    beside.push(size);
  }
}

/** Eigenpairs of the tridiagonal matrix, highest first; `last` is the last weight, which measures the residual. */
function ritzPairs(diagonal: readonly number[], beside: readonly number[]) {
  const size = diagonal.length;
  const matrix = Matrix.zeros(size, size);
  diagonal.forEach((v, i) => {
    matrix.set(i, i, v);
  });
  beside.forEach((v, i) => {
    matrix.set(i, i + 1, v);
    matrix.set(i + 1, i, v);
  });
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
  return realEigenvalues
    .map((value, i) => ({ value, weights: eigenvectorMatrix.getColumn(i), last: eigenvectorMatrix.get(size - 1, i) }))
    .sort((a, b) => b.value - a.value);
}

function combineBasis(basis: readonly Float64Array[], weights: readonly number[]): Float64Array {
  const out = new Float64Array(basis[0].length);
  basis.forEach((b, i) => {
    for (let u = 0; u < out.length; u++) out[u] = out[u] + weights[i] * b[u];
  });
  return out;
}
