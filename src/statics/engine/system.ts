/**
 * The unknowns: every block (node) has room for `stride` freedoms, 1..6, of which those marked in `active` exist. Unknown
 * `stride * block + c` is freedom c of the block. A block without any active freedom is ground.
 */
export interface Freedoms {
  readonly blocks: number;
  readonly stride: number;
  readonly active: Uint8Array;
}

export function countFreedoms(freedoms: Freedoms): number {
  let count = 0;
  for (const flag of freedoms.active) count += flag;
  return count;
}

/** Linear forms of the unknowns, one a row: K = sum over rows of stiffness * row * row^T. */
export interface SparseRows {
  readonly count: number;
  /** count + 1 entries. */
  readonly start: Int32Array;
  readonly unknown: Int32Array;
  readonly value: Float64Array;
}

/** Makes rows one by one; `fill` puts (unknown, value) pairs, those of one unknown are added up. */
export function buildRows(
  count: number,
  fill: (row: number, put: (unknown: number, value: number) => void) => void,
): SparseRows {
  const start = new Int32Array(count + 1);
  const unknown: number[] = [];
  const value: number[] = [];
  let from = 0;
  const put = (u: number, v: number) => {
    // Rows are short: looking through one is quicker than any map.
    for (let at = from; at < unknown.length; at++) {
      if (unknown[at] !== u) continue;
      value[at] = value[at] + v;
      return;
    }
    unknown.push(u);
    value.push(v);
  };
  for (let row = 0; row < count; row++) {
    from = unknown.length;
    fill(row, put);
    start[row + 1] = unknown.length;
  }
  return { count, start, unknown: Int32Array.from(unknown), value: Float64Array.from(value) };
}

/** The rows of `first`, then those of `second`. */
export function joinRows(first: SparseRows, second: SparseRows): SparseRows {
  const shift = first.unknown.length;
  const start = new Int32Array(first.count + second.count + 1);
  start.set(first.start);
  for (let row = 0; row < second.count; row++) start[first.count + row + 1] = shift + second.start[row + 1];
  return {
    count: first.count + second.count,
    start,
    unknown: joinNumbers(first.unknown, second.unknown),
    value: joinNumbers(first.value, second.value),
  };
}

/** One typed array after the other. */
export function joinNumbers<T extends Int32Array | Float64Array>(first: T, second: T): T {
  const out =
    first instanceof Int32Array
      ? new Int32Array(first.length + second.length)
      : new Float64Array(first.length + second.length);
  out.set(first);
  out.set(second, first.length);
  return out as T;
}

/** The value of every row at `q`: elongations, where rows are bars. */
export function multiplyRows(rows: SparseRows, q: Float64Array): Float64Array {
  const out = new Float64Array(rows.count);
  for (let row = 0; row < rows.count; row++) {
    let sum = 0;
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++) sum += rows.value[p] * q[rows.unknown[p]];
    out[row] = sum;
  }
  return out;
}

/** sum of weight * row: the forces on the unknowns that hold the weights (bar forces) in balance. */
export function combineRows(rows: SparseRows, weight: Float64Array, unknowns: number): Float64Array {
  const out = new Float64Array(unknowns);
  for (let row = 0; row < rows.count; row++) {
    const w = weight[row];
    if (w === 0) continue;
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++) {
      const u = rows.unknown[p];
      out[u] = out[u] + w * rows.value[p];
    }
  }
  return out;
}

/** K q without K: the rows weighted by stiffness times their values at q. */
export function applyStiffness(rows: SparseRows, stiffness: Float64Array, q: Float64Array): Float64Array {
  const elongation = multiplyRows(rows, q);
  for (let row = 0; row < rows.count; row++) elongation[row] = elongation[row] * stiffness[row];
  return combineRows(rows, elongation, q.length);
}
