import type { Graph } from './graph.ts';

/** Pieces this small are left in the order they come in: their fill is a small dense triangle either way. */
const LEAF = 24;

/**
 * Nested dissection (George 1973) with separators from breadth-first level sets: the two halves first, the level that parts
 * them last. Returns the blocks in the order of elimination.
 */
export function nestedDissection(graph: Graph): Int32Array {
  const order = new Int32Array(graph.count);
  const region = new Int32Array(graph.count);
  const level = new Int32Array(graph.count).fill(-1);
  let regions = 0;
  let end = graph.count;
  const pending: Int32Array[] = [Int32Array.from({ length: graph.count }, (_, i) => i)];
  // Filled from the back: the separator met first is eliminated last.
  while (pending.length > 0) {
    const piece = pending.pop()!;
    if (piece.length <= LEAF) {
      end -= piece.length;
      order.set(piece, end);
      continue;
    }
    regions++;
    for (const i of piece) region[i] = regions;
    const far = breadthFirst(graph, piece[0], region, level);
    const reached = breadthFirst(graph, far[far.length - 1], region, level);
    if (reached.length < piece.length) {
      for (const i of reached) region[i] = 0;
      pending.push(
        reached,
        piece.filter((i) => region[i] === regions),
      );
      continue;
    }
    const last = level[reached[reached.length - 1]];
    // Never the last level: there must be something beyond the cut.
    const cut = Math.min(level[reached[reached.length >> 1]], last - 1);
    const isSeparator = (i: number) => level[i] === cut && touchesLevel(graph, i, cut + 1, region, level);
    const separator = reached.filter(isSeparator);
    const near = reached.filter((i) => level[i] <= cut && !isSeparator(i));
    const beyond = reached.filter((i) => level[i] > cut);
    if (near.length === 0 || beyond.length === 0) {
      end -= piece.length;
      order.set(reached, end);
      continue;
    }
    end -= separator.length;
    order.set(separator, end);
    pending.push(near, beyond);
  }
  return order;
}

/** Blocks of the start's region in the order of their distance from it, distances left in `level`. */
function breadthFirst(graph: Graph, from: number, region: Int32Array, level: Int32Array): Int32Array {
  const queue = [from];
  const here = region[from];
  const visited = new Set(queue);
  level[from] = 0;
  for (let head = 0; head < queue.length; head++) {
    const i = queue[head];
    for (let p = graph.start[i]; p < graph.start[i + 1]; p++) {
      const j = graph.neighbour[p];
      if (region[j] !== here || visited.has(j)) continue;
      visited.add(j);
      level[j] = level[i] + 1;
      queue.push(j);
    }
  }
  return Int32Array.from(queue);
}

function touchesLevel(graph: Graph, i: number, wanted: number, region: Int32Array, level: Int32Array): boolean {
  for (let p = graph.start[i]; p < graph.start[i + 1]; p++) {
    const j = graph.neighbour[p];
    if (region[j] === region[i] && level[j] === wanted) return true;
  }
  return false;
}
