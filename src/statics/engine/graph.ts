import type { Freedoms, SparseRows } from './system.ts';

/** Which blocks are coupled: neighbours of block i are `neighbour[start[i]..start[i + 1])`, each once, i itself left out. */
export interface Graph {
  readonly count: number;
  readonly start: Int32Array;
  readonly neighbour: Int32Array;
}

/** Two blocks are coupled where a row depends on both. */
export function coupleBlocks(freedoms: Freedoms, rows: SparseRows): Graph {
  const { blocks, stride } = freedoms;
  const ends: number[] = [];
  const touched: number[] = [];
  for (let row = 0; row < rows.count; row++) {
    touched.length = 0;
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++) {
      const block = Math.floor(rows.unknown[p] / stride);
      if (!touched.includes(block)) touched.push(block);
    }
    for (let i = 0; i < touched.length; i++)
      for (let j = i + 1; j < touched.length; j++) ends.push(touched[i], touched[j]);
  }
  return graphOf(blocks, ends);
}

/** `ends` lists the two ends of every edge; repeats are merged. */
export function graphOf(count: number, ends: readonly number[]): Graph {
  const start = new Int32Array(count + 1);
  for (let e = 0; e < ends.length; e++) start[ends[e] + 1]++;
  for (let i = 0; i < count; i++) start[i + 1] += start[i];
  const next = start.slice();
  const filled = new Int32Array(ends.length);
  for (let e = 0; e < ends.length; e += 2) {
    const a = ends[e];
    const b = ends[e + 1];
    filled[next[a]++] = b;
    filled[next[b]++] = a;
  }
  return mergeRepeats(count, start, filled);
}

function mergeRepeats(count: number, start: Int32Array, filled: Int32Array): Graph {
  const seen = new Int32Array(count).fill(-1);
  const merged = new Int32Array(filled.length);
  const mergedStart = new Int32Array(count + 1);
  let size = 0;
  for (let i = 0; i < count; i++) {
    for (let p = start[i]; p < start[i + 1]; p++) {
      const j = filled[p];
      if (j === i || seen[j] === i) continue;
      seen[j] = i;
      merged[size++] = j;
    }
    mergedStart[i + 1] = size;
  }
  return { count, start: mergedStart, neighbour: merged.slice(0, size) };
}
