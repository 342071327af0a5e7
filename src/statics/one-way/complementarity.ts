import { solveDefinite } from './solve-definite.ts';

/**
 * Find z >= 0 and w = q + M z >= 0 with w . z = 0, for a symmetric positive semidefinite M: the least complementary energy of a truss whose bars
 * may go slack. w is unique; z is unique only where M is definite on it.
 */
export interface Complementarity {
  readonly size: number;
  readonly q: Float64Array;
  /** Makes sure that these columns are at hand; several at once cost less. */
  readonly prepare: (columns: readonly number[]) => void;
  readonly column: (j: number) => Float64Array;
  /** A measure of each row: what M's diagonal would be if nothing else gave way. */
  readonly measure: Float64Array;
  /** Entries of w above minus this count as not negative. */
  readonly tolerance: number;
}

export interface Settled {
  readonly kind: 'settled';
  readonly z: Float64Array;
  /** Rows with z > 0, ascending. */
  readonly active: readonly number[];
  /** Sets that were tried. */
  readonly steps: number;
}

/** There is none: along `direction` z may grow for ever, and nothing else gives way. */
export interface Unbounded {
  readonly kind: 'unbounded';
  readonly direction: Float64Array;
}

/** The search did not end: a fault of rounding, never seen. */
export interface Unsettled {
  readonly kind: 'unsettled';
}

/** Sets tried by exchanging all wrong rows at once, before one row at a time. */
const MOST_EXCHANGES = 60;

/**
 * From `start`, all wrong rows change sides at once (block principal pivoting, Kostreva 1978, Kim & Park 2011), which takes a few steps where it
 * converges; where a set comes back or is singular, one row enters at a time (an active-set method for convex programs), which always ends.
 */
export function settle(problem: Complementarity, start: readonly number[]): Settled | Unbounded | Unsettled {
  return exchange(problem, start) ?? enterOneByOne(problem);
}

function exchange(problem: Complementarity, start: readonly number[]): Settled | null {
  let active = [...start].sort((a, b) => a - b);
  const seen = new Set<string>();
  for (let steps = 1; steps <= MOST_EXCHANGES; steps++) {
    const key = active.join(' ');
    if (seen.has(key)) return null;
    seen.add(key);
    problem.prepare(active);
    const z = solveOn(problem, active);
    if (z === null) return null;
    const w = rowsAt(problem, active, z);
    const isActive = new Uint8Array(problem.size);
    for (const j of active) isActive[j] = 1;
    const stay = active.filter((j) => z[j] > 0);
    const enter: number[] = [];
    for (let i = 0; i < problem.size; i++) if (!isActive[i] && w[i] < -problem.tolerance) enter.push(i);
    if (stay.length === active.length && enter.length === 0) return { kind: 'settled', z, active, steps };
    active = [...stay, ...enter].sort((a, b) => a - b);
  }
  return null;
}

/** Entries a row; each row enters once or twice. */
const MOST_ENTRIES = 20;

/** Curvature below this share of a row's measure is none. */
const FLAT = 1e-9;

/**
 * From z = 0 the most wrong row enters until it is right; rows whose z falls to 0 on the way leave. What is minimised, q.z + z.M z / 2,
 * falls with every step, so that no set of rows comes back.
 */
function enterOneByOne(problem: Complementarity): Settled | Unbounded | Unsettled {
  const { size, measure, tolerance } = problem;
  const z = new Float64Array(size);
  let active: number[] = [];
  for (let steps = 1; steps <= MOST_ENTRIES * (size + 1); steps++) {
    problem.prepare(active);
    const w = rowsAt(problem, active, z);
    const inActive = new Set(active);
    let entering = -1;
    for (let i = 0; i < size; i++)
      if (!inActive.has(i) && w[i] < -tolerance && (entering < 0 || w[i] < w[entering])) entering = i;
    if (entering < 0) return { kind: 'settled', z, active: active.sort((a, b) => a - b), steps };
    problem.prepare([entering]);
    let rest = w[entering];
    for (;;) {
      const direction = directionOf(problem, active, entering);
      const slope = rowAt(problem, entering, [...active, entering], direction);
      const full = slope > FLAT * measure[entering] ? -rest / slope : Number.POSITIVE_INFINITY;
      let [step, leaving] = [full, -1];
      for (const j of active)
        if (direction[j] < 0 && z[j] / -direction[j] < step) [step, leaving] = [z[j] / -direction[j], j];
      if (step === Number.POSITIVE_INFINITY) return { kind: 'unbounded', direction };
      for (const j of [...active, entering]) z[j] = z[j] + step * direction[j];
      rest += step * slope;
      if (leaving < 0) break;
      z[leaving] = 0;
      active = active.filter((j) => j !== leaving);
    }
    active.push(entering);
  }
  return { kind: 'unsettled' };
}

/** z of the active rows that makes their w zero; null where M is singular on them. */
function solveOn(problem: Complementarity, active: readonly number[]): Float64Array | null {
  const values = solveActive(problem, active, (j) => -problem.q[j]);
  if (values === null) return null;
  return spreadOut(problem.size, active, values);
}

/** How z of the active rows follows when z of `entering` grows by 1 and their w stays. */
function directionOf(problem: Complementarity, active: readonly number[], entering: number): Float64Array {
  const column = problem.column(entering);
  const values = solveActive(problem, active, (j) => -column[j]) ?? new Float64Array(active.length);
  const direction = spreadOut(problem.size, active, values);
  direction[entering] = 1;
  return direction;
}

function solveActive(
  problem: Complementarity,
  active: readonly number[],
  right: (row: number) => number,
): Float64Array | null {
  const n = active.length;
  const matrix = new Float64Array(n * n);
  active.forEach((j, b) => {
    const column = problem.column(j);
    active.forEach((i, a) => {
      matrix[a * n + b] = column[i];
    });
  });
  const least = Float64Array.from(active, (j) => FLAT * problem.measure[j]);
  return solveDefinite(matrix, Float64Array.from(active, right), least);
}

function spreadOut(size: number, rows: readonly number[], values: Float64Array): Float64Array {
  const out = new Float64Array(size);
  rows.forEach((j, a) => {
    out[j] = values[a];
  });
  return out;
}

function rowsAt({ size, q, column }: Complementarity, active: readonly number[], z: Float64Array): Float64Array {
  const w = q.slice();
  for (const j of active) {
    const m = column(j);
    for (let i = 0; i < size; i++) w[i] = w[i] + m[i] * z[j];
  }
  return w;
}

function rowAt({ column }: Complementarity, row: number, active: readonly number[], z: Float64Array): number {
  const m = column(row);
  return active.reduce((sum, j) => sum + m[j] * z[j], 0);
}
