import { roomForEigen, type SmallEigen, smallSymmetricEigen } from './small-eigen.ts';

/** A direction whose pivot was no more than nothing: it is held, as by a support. */
export interface HeldPivot {
  readonly block: number;
  /** Unit vector over the block's freedoms. */
  readonly direction: readonly number[];
}

/** Relative size below which a pivot is replaced: far below rounding, it only keeps the division finite. */
const TINY = 2 ** -66;

/**
 * The diagonal blocks D = V W V^T of the factor by their eigenvectors. W is kept apart from V: where W holds a pivot that is nearly nothing, V W^-1 V^T
 * written out would drown the others, and with them the inertia, in its rounding.
 */
export class PivotBlocks {
  readonly stride: number;
  /** vectors[(block * stride + r) * stride + c]. */
  readonly vectors: Float64Array;
  /** 1/W, 0 where a pivot is held. */
  readonly inverse: Float64Array;
  readonly held: HeldPivot[] = [];
  negative = 0;
  private readonly tiny: number;
  private readonly holdBelow: number | null;
  private readonly eigen: SmallEigen;

  constructor(blocks: number, stride: number, scale: number, holdBelow: number | null) {
    this.stride = stride;
    this.vectors = new Float64Array(blocks * stride * stride);
    this.inverse = new Float64Array(blocks * stride);
    this.tiny = scale * TINY;
    this.holdBelow = holdBelow;
    this.eigen = roomForEigen(stride);
  }

  /** Takes the k-th pivot, which belongs to `block`. */
  take(pivot: Float64Array, k: number, block: number): void {
    const { stride, tiny } = this;
    for (let a = 0; a < stride; a++)
      for (let b = 0; b < a; b++) {
        const mean = (pivot[a * stride + b] + pivot[b * stride + a]) / 2;
        pivot[a * stride + b] = mean;
        pivot[b * stride + a] = mean;
      }
    smallSymmetricEigen(pivot, stride, this.eigen);
    const { values, vectors } = this.eigen;
    this.vectors.set(vectors, k * stride * stride);
    for (let c = 0; c < stride; c++) {
      const value = values[c];
      if (this.holdBelow !== null && value <= this.holdBelow) {
        this.held.push({ block, direction: Array.from({ length: stride }, (_, r) => vectors[r * stride + c]) });
        continue;
      }
      if (value < 0) this.negative++;
      const safe = Math.abs(value) < tiny ? (value < 0 ? -tiny : tiny) : value;
      this.inverse[k * stride + c] = 1 / safe;
    }
  }
}
