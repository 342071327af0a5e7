import type { Factor } from './factor.ts';

/** Right-hand sides taken through the factor together. */
const TOGETHER = 8;

/** Solves for many right-hand sides, each over all unknowns; entries of freedoms that are not active come back 0. */
export function solveMany(factor: Factor, loads: readonly Float64Array[]): Float64Array[] {
  const out: Float64Array[] = [];
  for (let from = 0; from < loads.length; from += TOGETHER)
    out.push(...solveTogether(factor, loads.slice(from, from + TOGETHER)));
  return out;
}

export function solveOne(factor: Factor, load: Float64Array): Float64Array {
  return solveTogether(factor, [load])[0];
}

function solveTogether(factor: Factor, loads: readonly Float64Array[]): Float64Array[] {
  const { order, freedoms } = factor.symbolic;
  const { blocks, stride, active } = freedoms;
  const width = loads.length;
  const span = stride * width;
  const x = new Float64Array(blocks * span);
  for (let k = 0; k < blocks; k++)
    for (let a = 0; a < stride; a++) {
      const unknown = order[k] * stride + a;
      if (active[unknown]) for (let t = 0; t < width; t++) x[k * span + a * width + t] = loads[t][unknown];
    }
  if (stride === 3) sweep3(factor, x, width);
  else sweep(factor, x, width);
  return loads.map((_, t) => {
    const solution = new Float64Array(blocks * stride);
    for (let k = 0; k < blocks; k++)
      for (let a = 0; a < stride; a++) {
        const unknown = order[k] * stride + a;
        if (active[unknown]) solution[unknown] = x[k * span + a * width + t];
      }
    return solution;
  });
}

/**
 * L y = b, D z = y, L^T x = z in place, each block on the way in the coordinates of its own pivot; x[(block * stride + freedom) * width + right-hand
 * side].
 */
function sweep(factor: Factor, x: Float64Array, width: number): void {
  const { row, lower, pivots } = factor;
  const { columnStart, freedoms } = factor.symbolic;
  const { blocks, stride } = freedoms;
  const area = stride * stride;
  const span = stride * width;
  const scratch = new Float64Array(span);
  const turn = (k: number, transposed: boolean) => {
    scratch.fill(0);
    for (let a = 0; a < stride; a++)
      for (let b = 0; b < stride; b++) {
        const v = pivots.vectors[k * area + (transposed ? b * stride + a : a * stride + b)];
        for (let t = 0; t < width; t++)
          scratch[a * width + t] = scratch[a * width + t] + v * x[k * span + b * width + t];
      }
    x.set(scratch, k * span);
  };
  for (let k = 0; k < blocks; k++) {
    turn(k, true);
    for (let p = columnStart[k]; p < columnStart[k + 1]; p++)
      for (let a = 0; a < stride; a++)
        for (let b = 0; b < stride; b++) {
          const l = lower[p * area + a * stride + b];
          const to = row[p] * span + a * width;
          const from = k * span + b * width;
          for (let t = 0; t < width; t++) x[to + t] = x[to + t] - l * x[from + t];
        }
  }
  for (let k = blocks - 1; k >= 0; k--) {
    for (let a = 0; a < stride; a++)
      for (let t = 0; t < width; t++) {
        const at = k * span + a * width + t;
        x[at] = x[at] * pivots.inverse[k * stride + a];
      }
    for (let p = columnStart[k]; p < columnStart[k + 1]; p++)
      for (let a = 0; a < stride; a++)
        for (let b = 0; b < stride; b++) {
          const l = lower[p * area + a * stride + b];
          const from = row[p] * span + a * width;
          const to = k * span + b * width;
          for (let t = 0; t < width; t++) x[to + t] = x[to + t] - l * x[from + t];
        }
    turn(k, false);
  }
}

/** `sweep` written out for three freedoms a block; x[(block * 3 + freedom) * width + right-hand side]. */
function sweep3(factor: Factor, x: Float64Array, width: number): void {
  const { row, lower } = factor;
  const { vectors, inverse } = factor.pivots;
  const { columnStart, freedoms } = factor.symbolic;
  const span = 3 * width;
  const twice = 2 * width;
  for (let k = 0; k < freedoms.blocks; k++) {
    const v = 9 * k;
    const own = k * span;
    for (let t = own; t < own + width; t++) {
      const b0 = x[t];
      const b1 = x[t + width];
      const b2 = x[t + twice];
      x[t] = vectors[v] * b0 + vectors[v + 3] * b1 + vectors[v + 6] * b2;
      x[t + width] = vectors[v + 1] * b0 + vectors[v + 4] * b1 + vectors[v + 7] * b2;
      x[t + twice] = vectors[v + 2] * b0 + vectors[v + 5] * b1 + vectors[v + 8] * b2;
    }
    for (let p = columnStart[k]; p < columnStart[k + 1]; p++) {
      const l = 9 * p;
      const l0 = lower[l];
      const l1 = lower[l + 1];
      const l2 = lower[l + 2];
      const l3 = lower[l + 3];
      const l4 = lower[l + 4];
      const l5 = lower[l + 5];
      const l6 = lower[l + 6];
      const l7 = lower[l + 7];
      const l8 = lower[l + 8];
      let to = row[p] * span;
      for (let t = own; t < own + width; t++, to++) {
        const x0 = x[t];
        const x1 = x[t + width];
        const x2 = x[t + twice];
        x[to] = x[to] - (l0 * x0 + l1 * x1 + l2 * x2);
        x[to + width] = x[to + width] - (l3 * x0 + l4 * x1 + l5 * x2);
        x[to + twice] = x[to + twice] - (l6 * x0 + l7 * x1 + l8 * x2);
      }
    }
  }
  for (let k = freedoms.blocks - 1; k >= 0; k--) {
    const own = k * span;
    for (let c = 0; c < 3; c++)
      for (let t = own + c * width; t < own + (c + 1) * width; t++) x[t] = x[t] * inverse[3 * k + c];
    for (let p = columnStart[k]; p < columnStart[k + 1]; p++) {
      const l = 9 * p;
      const l0 = lower[l];
      const l1 = lower[l + 1];
      const l2 = lower[l + 2];
      const l3 = lower[l + 3];
      const l4 = lower[l + 4];
      const l5 = lower[l + 5];
      const l6 = lower[l + 6];
      const l7 = lower[l + 7];
      const l8 = lower[l + 8];
      let from = row[p] * span;
      for (let t = own; t < own + width; t++, from++) {
        const z0 = x[from];
        const z1 = x[from + width];
        const z2 = x[from + twice];
        x[t] = x[t] - (l0 * z0 + l3 * z1 + l6 * z2);
        x[t + width] = x[t + width] - (l1 * z0 + l4 * z1 + l7 * z2);
        x[t + twice] = x[t + twice] - (l2 * z0 + l5 * z1 + l8 * z2);
      }
    }
    const v = 9 * k;
    for (let t = own; t < own + width; t++) {
      const s0 = x[t];
      const s1 = x[t + width];
      const s2 = x[t + twice];
      x[t] = vectors[v] * s0 + vectors[v + 1] * s1 + vectors[v + 2] * s2;
      x[t + width] = vectors[v + 3] * s0 + vectors[v + 4] * s1 + vectors[v + 5] * s2;
      x[t + twice] = vectors[v + 6] * s0 + vectors[v + 7] * s1 + vectors[v + 8] * s2;
    }
  }
}
