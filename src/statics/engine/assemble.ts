import type { Symbolic } from './symbolic.ts';
import type { SparseRows } from './system.ts';

/** A symmetric matrix in square blocks, lower triangle, in elimination order. Blocks are stored by rows. */
export interface BlockMatrix {
  readonly symbolic: Symbolic;
  readonly diagonal: Float64Array;
  /** In the order of the pattern's columns. */
  readonly lower: Float64Array;
  /** Largest diagonal entry: the measure for what counts as nothing. */
  readonly scale: number;
}

/** K = sum over rows of stiffness * row * row^T. The pattern must have room for every pair of blocks that a row couples. */
export function assemble(symbolic: Symbolic, rows: SparseRows, stiffness: Float64Array): BlockMatrix {
  const { freedoms, position, pattern } = symbolic;
  const stride = freedoms.stride;
  const area = stride * stride;
  const diagonal = new Float64Array(freedoms.blocks * area);
  const lower = new Float64Array(pattern.column.length * area);
  for (let row = 0; row < rows.count; row++) {
    const k = stiffness[row];
    const from = rows.start[row];
    const to = rows.start[row + 1];
    for (let p = from; p < to; p++) {
      const u = rows.unknown[p];
      const block = Math.floor(u / stride);
      const i = position[block];
      const a = u - block * stride;
      const weighted = k * rows.value[p];
      for (let q = from; q < to; q++) {
        const v = rows.unknown[q];
        const other = Math.floor(v / stride);
        const j = position[other];
        if (j > i) continue;
        const entry = a * stride + (v - other * stride);
        const product = weighted * rows.value[q];
        if (j === i) diagonal[i * area + entry] = diagonal[i * area + entry] + product;
        else {
          const at = findColumn(pattern.column, pattern.start[i], pattern.start[i + 1], j) * area + entry;
          lower[at] = lower[at] + product;
        }
      }
    }
  }
  let scale = 0;
  for (let i = 0; i < freedoms.blocks; i++)
    for (let a = 0; a < stride; a++) scale = Math.max(scale, diagonal[i * area + a * (stride + 1)]);
  return { symbolic, diagonal, lower, scale: scale || 1 };
}

function findColumn(column: Int32Array, from: number, to: number, wanted: number): number {
  let low = from;
  let high = to - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (column[middle] < wanted) low = middle + 1;
    else high = middle;
  }
  if (low >= to || column[low] !== wanted) throw new Error('a row couples blocks that the pattern keeps apart');
  return low;
}
