import type { BlockMatrix } from './assemble.ts';
import { rowReach } from './elimination-tree.ts';
import { type HeldPivot, PivotBlocks } from './pivot-blocks.ts';
import type { Symbolic } from './symbolic.ts';
import { updateRow, updateRow3 } from './update-row.ts';

/** K - shift I = L D L^T in blocks, L with identity on its diagonal and D = V W V^T; `lower` holds M = L V. */
export interface Factor {
  readonly symbolic: Symbolic;
  readonly row: Int32Array;
  readonly lower: Float64Array;
  readonly pivots: PivotBlocks;
  /** Eigenvalues of K below the shift: negative ones of D (Sylvester's law of inertia). */
  readonly negative: number;
  readonly held: readonly HeldPivot[];
}

export interface FactorOptions {
  /** The matrix factored is K - shift I; freedoms that are not active keep a positive diagonal. */
  readonly shift: number;
  /** Pivots at or below this are held; null: none is. */
  readonly holdBelow: number | null;
}

export const FACTOR_DEFAULTS: FactorOptions = { shift: 0, holdBelow: null };

/**
 * Up-looking L D L^T (Davis, Direct Methods for Sparse Linear Systems, 4.7), row by row of blocks. The diagonal blocks are
 * inverted through their eigenvectors, which is pivoting within the block and gives the signs for the inertia.
 */
export function factorise(matrix: BlockMatrix, options: Partial<FactorOptions> = {}): Factor {
  const { shift, holdBelow } = { ...FACTOR_DEFAULTS, ...options };
  const { symbolic } = matrix;
  const { freedoms, pattern, parent, columnStart, order } = symbolic;
  const count = freedoms.blocks;
  const stride = freedoms.stride;
  const area = stride * stride;
  const row = new Int32Array(columnStart[count]);
  const lower = new Float64Array(row.length * area);
  const filled = columnStart.slice(0, count);
  const accumulator = new Float64Array(count * area);
  const mark = new Int32Array(count).fill(-1);
  const stack = new Int32Array(count);
  const pivot = new Float64Array(area);
  const update = stride === 3 ? updateRow3 : updateRow;
  const pivots = new PivotBlocks(count, stride, matrix.scale, holdBelow);

  for (let k = 0; k < count; k++) {
    const top = rowReach(pattern, parent, k, mark, stack);
    for (let p = pattern.start[k]; p < pattern.start[k + 1]; p++) {
      const at = pattern.column[p] * area;
      for (let e = 0; e < area; e++) accumulator[at + e] = matrix.lower[p * area + e];
    }
    const block = order[k];
    for (let e = 0; e < area; e++) pivot[e] = matrix.diagonal[k * area + e];
    for (let a = 0; a < stride; a++) {
      const at = a * (stride + 1);
      pivot[at] = freedoms.active[block * stride + a] ? pivot[at] - shift : matrix.scale;
    }
    for (let s = top; s < count; s++) {
      const i = stack[s];
      const end = filled[i];
      update(accumulator, i, lower, row, columnStart[i], end, pivots, pivot);
      row[end] = k;
      filled[i] = end + 1;
    }
    pivots.take(pivot, k, block);
  }
  return { symbolic, row, lower, pivots, negative: pivots.negative, held: pivots.held };
}
