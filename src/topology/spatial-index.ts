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
    const half = (from + to) >> 1;
    split(axis, from, to - 1, half);
    build(2 * node, from, half);
    build(2 * node + 1, half, to);
  }

  /** Brings the smaller middles before `half` and the greater behind it, by Hoare's selection: O(n) in the mean. */
  function split(axis: number, from: number, to: number, half: number): void {
    let [low, high] = [from, to];
    while (low < high) {
      const pivot = order[(low + high) >> 1];
      const at = middle(pivot, axis);
      let [i, j] = [low, high];
      while (i <= j) {
        while (isBefore(order[i], axis, at, pivot)) i++;
        while (isAfter(order[j], axis, at, pivot)) j--;
        if (i > j) break;
        const kept = order[i];
        order[i++] = order[j];
        order[j--] = kept;
      }
      if (half <= j) high = j;
      else if (half >= i) low = i;
      else return;
    }
  }

  function isBefore(box: number, axis: number, at: number, pivot: number): boolean {
    const own = middle(box, axis);
    return own < at || (own === at && box < pivot);
  }

  function isAfter(box: number, axis: number, at: number, pivot: number): boolean {
    const own = middle(box, axis);
    return own > at || (own === at && box > pivot);
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

/**
 * The box that lies least far by `distanceTo`, which must not be less than the distance to the box itself, among those
 * nearer than `limit`; -1 for none. `mayHold` says of a tree node whether a box wanted can be under it.
 */
export function nearestBox(
  index: BoxIndex,
  point: ArrayLike<number>,
  distanceTo: (box: number) => number,
  mayHold: (node: number) => boolean,
  limit = Number.POSITIVE_INFINITY,
): { readonly box: number; readonly distance: number } {
  const { order, bounds, leaves } = index;
  let best = { box: -1, distance: limit };
  if (order.length > 0) descend(1, 0, order.length);
  return best;

  function descend(node: number, from: number, to: number): void {
    if (from === to || !mayHold(node) || away(node) >= best.distance) return;
    if (node >= leaves) {
      for (let i = from; i < to; i++) {
        const distance = distanceTo(order[i]);
        if (distance < best.distance) best = { box: order[i], distance };
      }
      return;
    }
    const half = (from + to) >> 1;
    const isLeftNearer = away(2 * node) <= away(2 * node + 1);
    if (isLeftNearer) descend(2 * node, from, half);
    descend(2 * node + 1, half, to);
    if (!isLeftNearer) descend(2 * node, from, half);
  }

  function away(node: number): number {
    let square = 0;
    for (let k = 0; k < 3; k++) {
      const outside = Math.max(bounds[6 * node + k] - point[k], point[k] - bounds[6 * node + k + 3], 0);
      square += outside * outside;
    }
    return Math.sqrt(square);
  }
}

/** For each tree node the label that all boxes under it share; -1 where they differ. */
export function sharedLabels({ order, leaves }: BoxIndex, labels: Int32Array): Int32Array {
  const shared = new Int32Array(2 * leaves).fill(-1);
  label(1, 0, order.length);
  return shared;

  function label(node: number, from: number, to: number): void {
    if (node >= leaves) {
      let own = from < to ? labels[order[from]] : -1;
      for (let i = from + 1; i < to; i++) if (labels[order[i]] !== own) own = -1;
      shared[node] = own;
      return;
    }
    const half = (from + to) >> 1;
    label(2 * node, from, half);
    label(2 * node + 1, half, to);
    shared[node] = shared[2 * node] === shared[2 * node + 1] ? shared[2 * node] : -1;
  }
}
