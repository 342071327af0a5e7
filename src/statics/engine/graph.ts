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
  for (let row = 0; row < rows.count; row++) {
    const from = rows.start[row];
    const to = rows.start[row + 1];
    for (let p = from; p < to; p++) {
      const a = Math.floor(rows.unknown[p] / stride);
      if (p > from && a === Math.floor(rows.unknown[p - 1] / stride)) continue;
      for (let q = p + 1; q < to; q++) {
        const b = Math.floor(rows.unknown[q] / stride);
        if (b !== a && b !== Math.floor(rows.unknown[q - 1] / stride)) ends.push(a, b);
      }
    }
  }
  return graphOf(blocks, ends);
}

/** `ends` lists the two ends of every edge; repeats are merged. */
export function graphOf(count: number, ends: readonly number[]): Graph {
  const start = new Int32Array(count + 1);
  for (const end of ends) start[end + 1] = start[end + 1] + 1;
  for (let i = 0; i < count; i++) start[i + 1] = start[i + 1] + start[i];
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
