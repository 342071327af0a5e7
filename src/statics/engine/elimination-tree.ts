import type { Graph } from './graph.ts';

/** The graph's lower triangle in elimination order: row k lists its neighbours before k. */
export interface OrderedPattern {
  readonly count: number;
  readonly start: Int32Array;
  readonly column: Int32Array;
}

/** `position[block]` is the block's place in the order of elimination. */
export function orderPattern(graph: Graph, order: Int32Array, position: Int32Array): OrderedPattern {
  const start = new Int32Array(graph.count + 1);
  const column = new Int32Array(graph.neighbour.length / 2);
  let size = 0;
  for (let k = 0; k < graph.count; k++) {
    const block = order[k];
    const first = size;
    for (let p = graph.start[block]; p < graph.start[block + 1]; p++) {
      const i = position[graph.neighbour[p]];
      if (i < k) column[size++] = i;
    }
    column.subarray(first, size).sort();
    start[k + 1] = size;
  }
  return { count: graph.count, start, column };
}

/** Parent of each column in the elimination tree (Liu 1986), -1 at a root. */
export function eliminationTree(pattern: OrderedPattern): Int32Array {
  const parent = new Int32Array(pattern.count).fill(-1);
  const ancestor = new Int32Array(pattern.count).fill(-1);
  for (let k = 0; k < pattern.count; k++) {
    for (let p = pattern.start[k]; p < pattern.start[k + 1]; p++) {
      for (let i = pattern.column[p]; i !== -1 && i < k; ) {
        const next = ancestor[i];
        ancestor[i] = k;
        if (next === -1) parent[i] = k;
        i = next;
      }
    }
  }
  return parent;
}

/**
 * Columns of row k of L, in an order that respects the tree (children first), at `stack[result..count)`: the paths from the
 * row's entries up the tree, each as far as it is new.
 */
export function rowReach(
  pattern: OrderedPattern,
  parent: Int32Array,
  k: number,
  mark: Int32Array,
  stack: Int32Array,
): number {
  let top = pattern.count;
  mark[k] = k;
  for (let p = pattern.start[k]; p < pattern.start[k + 1]; p++) {
    let length = 0;
    for (let i = pattern.column[p]; mark[i] !== k; i = parent[i]) {
      stack[length++] = i;
      mark[i] = k;
    }
    while (length > 0) stack[--top] = stack[--length];
  }
  return top;
}

/** Entries below the diagonal in each column of L. */
export function columnCounts(pattern: OrderedPattern, parent: Int32Array): Int32Array {
  const counts = new Int32Array(pattern.count);
  const mark = new Int32Array(pattern.count).fill(-1);
  for (let k = 0; k < pattern.count; k++) {
    mark[k] = k;
    for (let p = pattern.start[k]; p < pattern.start[k + 1]; p++) {
      for (let i = pattern.column[p]; mark[i] !== k; i = parent[i]) {
        counts[i] = counts[i] + 1;
        mark[i] = k;
      }
    }
  }
  return counts;
}
