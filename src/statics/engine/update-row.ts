import type { PivotBlocks } from './pivot-blocks.ts';

/**
 * Eliminates column i from the row in hand. With D_i = V W V^T its block Y_i is turned into Z_i = Y_i V; then Z_i M_ri^T is taken from every Y_r,
 * M_ki = Z_i W^-1 stored at `end`, M_ki Z_i^T taken from the pivot and Y_i cleared.
 */
export type UpdateRow = (
  y: Float64Array,
  i: number,
  lower: Float64Array,
  row: Int32Array,
  from: number,
  end: number,
  pivots: PivotBlocks,
  pivot: Float64Array,
) => void;

export const updateRow: UpdateRow = (y, i, lower, row, from, end, { stride, vectors, inverse }, pivot) => {
  const area = stride * stride;
  const own = i * area;
  const z = new Float64Array(area);
  for (let a = 0; a < stride; a++)
    for (let b = 0; b < stride; b++) {
      let sum = 0;
      for (let c = 0; c < stride; c++) sum += y[own + a * stride + c] * vectors[own + c * stride + b];
      z[a * stride + b] = sum;
    }
  for (let p = from; p < end; p++) {
    const target = row[p] * area;
    for (let a = 0; a < stride; a++)
      for (let b = 0; b < stride; b++) {
        let sum = 0;
        for (let c = 0; c < stride; c++) sum += z[a * stride + c] * lower[p * area + b * stride + c];
        y[target + a * stride + b] = y[target + a * stride + b] - sum;
      }
  }
  const stored = end * area;
  for (let e = 0; e < area; e++) lower[stored + e] = z[e] * inverse[i * stride + (e % stride)];
  for (let a = 0; a < stride; a++)
    for (let b = 0; b < stride; b++) {
      let sum = 0;
      for (let c = 0; c < stride; c++) sum += lower[stored + a * stride + c] * z[b * stride + c];
      pivot[a * stride + b] = pivot[a * stride + b] - sum;
    }
  y.fill(0, own, own + area);
};

/** `updateRow` written out for three freedoms: the same sums, several times faster. */
export const updateRow3: UpdateRow = (y, i, lower, row, from, end, { vectors, inverse }, pivot) => {
  const o = i * 9;
  const y0 = y[o] * vectors[o] + y[o + 1] * vectors[o + 3] + y[o + 2] * vectors[o + 6];
  const y1 = y[o] * vectors[o + 1] + y[o + 1] * vectors[o + 4] + y[o + 2] * vectors[o + 7];
  const y2 = y[o] * vectors[o + 2] + y[o + 1] * vectors[o + 5] + y[o + 2] * vectors[o + 8];
  const y3 = y[o + 3] * vectors[o] + y[o + 4] * vectors[o + 3] + y[o + 5] * vectors[o + 6];
  const y4 = y[o + 3] * vectors[o + 1] + y[o + 4] * vectors[o + 4] + y[o + 5] * vectors[o + 7];
  const y5 = y[o + 3] * vectors[o + 2] + y[o + 4] * vectors[o + 5] + y[o + 5] * vectors[o + 8];
  const y6 = y[o + 6] * vectors[o] + y[o + 7] * vectors[o + 3] + y[o + 8] * vectors[o + 6];
  const y7 = y[o + 6] * vectors[o + 1] + y[o + 7] * vectors[o + 4] + y[o + 8] * vectors[o + 7];
  const y8 = y[o + 6] * vectors[o + 2] + y[o + 7] * vectors[o + 5] + y[o + 8] * vectors[o + 8];
  for (let p = from; p < end; p++) {
    const t = row[p] * 9;
    const l = p * 9;
    const l0 = lower[l];
    const l1 = lower[l + 1];
    const l2 = lower[l + 2];
    const l3 = lower[l + 3];
    const l4 = lower[l + 4];
    const l5 = lower[l + 5];
    const l6 = lower[l + 6];
    const l7 = lower[l + 7];
    const l8 = lower[l + 8];
    y[t] = y[t] - (y0 * l0 + y1 * l1 + y2 * l2);
    y[t + 1] = y[t + 1] - (y0 * l3 + y1 * l4 + y2 * l5);
    y[t + 2] = y[t + 2] - (y0 * l6 + y1 * l7 + y2 * l8);
    y[t + 3] = y[t + 3] - (y3 * l0 + y4 * l1 + y5 * l2);
    y[t + 4] = y[t + 4] - (y3 * l3 + y4 * l4 + y5 * l5);
    y[t + 5] = y[t + 5] - (y3 * l6 + y4 * l7 + y5 * l8);
    y[t + 6] = y[t + 6] - (y6 * l0 + y7 * l1 + y8 * l2);
    y[t + 7] = y[t + 7] - (y6 * l3 + y7 * l4 + y8 * l5);
    y[t + 8] = y[t + 8] - (y6 * l6 + y7 * l7 + y8 * l8);
  }
  const l = end * 9;
  const w0 = inverse[3 * i];
  const w1 = inverse[3 * i + 1];
  const w2 = inverse[3 * i + 2];
  lower[l] = y0 * w0;
  lower[l + 1] = y1 * w1;
  lower[l + 2] = y2 * w2;
  lower[l + 3] = y3 * w0;
  lower[l + 4] = y4 * w1;
  lower[l + 5] = y5 * w2;
  lower[l + 6] = y6 * w0;
  lower[l + 7] = y7 * w1;
  lower[l + 8] = y8 * w2;
  for (let a = 0; a < 3; a++) {
    const l0 = lower[l + 3 * a];
    const l1 = lower[l + 3 * a + 1];
    const l2 = lower[l + 3 * a + 2];
    pivot[3 * a] = pivot[3 * a] - (l0 * y0 + l1 * y1 + l2 * y2);
    pivot[3 * a + 1] = pivot[3 * a + 1] - (l0 * y3 + l1 * y4 + l2 * y5);
    pivot[3 * a + 2] = pivot[3 * a + 2] - (l0 * y6 + l1 * y7 + l2 * y8);
  }
  y.fill(0, o, o + 9);
};
