/**
 * A static index of boxes in three dimensions: a balanced tree over boxes sorted by middle, built once and asked often.
 * Boxes are six numbers each: least x, y, z, greatest x, y, z.
 */
export interface BoxIndex {
  readonly boxes: Float64Array;
  readonly order: Int32Array;
  /** Bounds of each tree node, in heap order. */
  readonly bounds: Float64Array;
  readonly leaves: number;
}

const LEAF = 8;

/** Builds the index. O(n log n). */
export function indexBoxes(boxes: Float64Array): BoxIndex {
  const count = boxes.length / 6;
  const order = Int32Array.from({ length: count }, (_, i) => i);
  let leaves = 1;
  while (leaves * LEAF < count) leaves *= 2;
  const bounds = new Float64Array(12 * leaves);
  build(1, 0, count);
  return { boxes, order, bounds, leaves };

  function build(node: number, from: number, to: number): void {
    enclose(node, from, to);
    if (node >= leaves) return;
    const axis = widestAxis(node);
    const slice = order.subarray(from, to);
    slice.sort((a, b) => middle(a, axis) - middle(b, axis) || a - b);
    const half = (from + to) >> 1;
    build(2 * node, from, half);
    build(2 * node + 1, half, to);
  }

  function middle(box: number, axis: number): number {
    return boxes[6 * box + axis] + boxes[6 * box + axis + 3];
  }

  function enclose(node: number, from: number, to: number): void {
    for (let k = 0; k < 3; k++) {
      let least = Number.POSITIVE_INFINITY;
      let greatest = Number.NEGATIVE_INFINITY;
      for (let i = from; i < to; i++) {
        least = Math.min(least, boxes[6 * order[i] + k]);
        greatest = Math.max(greatest, boxes[6 * order[i] + k + 3]);
      }
      bounds[6 * node + k] = least;
      bounds[6 * node + k + 3] = greatest;
    }
  }

  function widestAxis(node: number): number {
    const size = [0, 1, 2].map((k) => bounds[6 * node + k + 3] - bounds[6 * node + k]);
    return size.indexOf(Math.max(...size));
  }
}

/** Calls `visit` with each box that touches the box given, in no particular order. */
export function searchBoxes(index: BoxIndex, box: ArrayLike<number>, visit: (box: number) => void): void {
  const { boxes, order, bounds, leaves } = index;
  descend(1, 0, order.length);

  function descend(node: number, from: number, to: number): void {
    if (from === to || !touches(bounds, 6 * node)) return;
    if (node >= leaves) {
      for (let i = from; i < to; i++) if (touches(boxes, 6 * order[i])) visit(order[i]);
      return;
    }
    const half = (from + to) >> 1;
    descend(2 * node, from, half);
    descend(2 * node + 1, half, to);
  }

  function touches(other: Float64Array, at: number): boolean {
    for (let k = 0; k < 3; k++) if (other[at + k] > box[k + 3] || other[at + k + 3] < box[k]) return false;
    return true;
  }
}
