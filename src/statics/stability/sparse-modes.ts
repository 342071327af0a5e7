import { AT_REST } from './localise.ts';

/** Movements below this share of the coefficients are as good as none: a tenth of what a reader is told of. */
const NOTHING = AT_REST / 10;

/** Nodes from which local modes are looked for in one component, at most. */
const MOST_CENTRES = 400;

/** After so many centres without a mode that moves less than this share of the nodes, the component moves as a whole and is left so. */
const TRIED = 6;
const LOCAL = 1 / 3;

/** The modes of a component over its nodes alone. */
export interface ComponentModes {
  /** For each mode three components a node, in the order of the component's nodes. */
  readonly modes: readonly Float64Array[];
  /** For each node its neighbours, as positions in the component. */
  readonly neighbours: readonly (readonly number[])[];
}

/**
 * A basis of the same space in which each mode moves few nodes: from a node, what can still move it once as many others as possible are
 * held, the farthest first. No node can be left out of such a mode; the sparsest basis of all is not feasible (Coleman & Pothen 1986, from
 * memory). Returns the coefficients of each new mode in the given ones.
 */
export function sparseBasis({ modes, neighbours }: ComponentModes): Float64Array[] {
  const width = modes.length;
  const units = modes.map((_, k) => unitVector(width, k));
  if (width <= 1) return units;
  const nodes = neighbours.length;
  const rows = Array.from({ length: 3 * nodes }, (_, r) => Float64Array.from(modes, (mode) => mode[r]));
  const step = Math.max(1, Math.ceil(nodes / MOST_CENTRES));
  const basis = new Basis(width);
  const covered: number[][][] = Array.from({ length: nodes }, () => []);
  // At first only for directions in which no mode found before moves the centre; then, where modes still lack, for all.
  let tried = 0;
  let smallest = nodes;
  const goesOn = () => !basis.isFull && (tried < TRIED || smallest < Math.max(TRIED, LOCAL * nodes));
  for (const isFirst of [true, false])
    for (let centre = 0; centre < nodes && goesOn(); centre += step, tried++) {
      const order = farthestFirst(centre, neighbours);
      for (const mode of modesAt(centre, rows, width, order, isFirst ? covered[centre] : []))
        if (basis.add(mode)) {
          let moving = 0;
          for (let i = 0; i < nodes; i++) if (cover(covered[i], movementAt(i, rows, mode), sizeOf(mode))) moving++;
          smallest = Math.min(smallest, moving);
        }
    }
  for (const vector of units) basis.add(vector);
  return basis.vectors;
}

/** One mode for each direction besides `known` in which the centre can move, each with as few other nodes as this order leaves. */
function modesAt(
  centre: number,
  rows: readonly Float64Array[],
  width: number,
  order: readonly number[],
  known: readonly number[][],
): Float64Array[] {
  const seen = [...known];
  const out: Float64Array[] = [];
  const amountAt = (column: Float64Array) =>
    Math.hypot(...withoutParts(movementAt(centre, rows, column), seen)) / sizeOf(column);
  while (seen.length < 3) {
    let space = Array.from({ length: width }, (_, k) => unitVector(width, k));
    if (!space.some((column) => amountAt(column) > NOTHING)) break;
    for (const node of order) {
      if (space.length === 1) break;
      const left = holdNode(node, rows, space);
      if (left.length < space.length && left.some((column) => amountAt(column) > NOTHING)) space = left;
    }
    let chosen = space[0];
    for (const column of space) if (amountAt(column) > amountAt(chosen) * (1 + 1e-9)) chosen = column;
    out.push(chosen);
    cover(seen, movementAt(centre, rows, chosen), sizeOf(chosen));
  }
  return out;
}

/** What of the space leaves the node at rest, by elimination; the vectors given stay as they are. */
function holdNode(node: number, rows: readonly Float64Array[], space: Float64Array[]): Float64Array[] {
  let left = space;
  for (let axis = 0; axis < 3; axis++) {
    const row = rows[3 * node + axis];
    const amounts = left.map((column) => inner(row, column));
    let pivot = -1;
    let best = NOTHING;
    for (let c = 0; c < left.length; c++) {
      if (amounts[c] === 0) continue;
      const share = Math.abs(amounts[c]) / sizeOf(left[c]);
      if (share > best * (1 + 1e-9)) {
        best = share;
        pivot = c;
      }
    }
    if (pivot < 0) continue;
    const taken = left[pivot];
    const next: Float64Array[] = [];
    for (let c = 0; c < left.length; c++) {
      if (c === pivot) continue;
      next.push(amounts[c] === 0 ? left[c] : without(left[c], amounts[c] / amounts[pivot], taken));
    }
    left = next;
  }
  return left;
}

/** Vectors that do not depend on each other, up to the width of the space. */
class Basis {
  readonly vectors: Float64Array[] = [];
  private readonly width: number;
  private readonly reduced: { readonly vector: Float64Array; readonly lead: number }[] = [];

  constructor(width: number) {
    this.width = width;
  }

  get isFull(): boolean {
    return this.vectors.length === this.width;
  }

  add(vector: Float64Array): boolean {
    if (this.isFull) return false;
    let rest = vector.map((v) => v / sizeOf(vector));
    for (const b of this.reduced) {
      const k = rest[b.lead] / b.vector[b.lead];
      if (k !== 0) rest = without(rest, k, b.vector);
    }
    let lead = 0;
    for (let i = 0; i < rest.length; i++) if (Math.abs(rest[i]) > Math.abs(rest[lead])) lead = i;
    if (Math.abs(rest[lead]) < 1e-6) return false;
    this.reduced.push({ vector: rest, lead });
    this.vectors.push(vector);
    return true;
  }
}

function farthestFirst(centre: number, neighbours: readonly (readonly number[])[]): number[] {
  const seen = new Uint8Array(neighbours.length);
  seen[centre] = 1;
  const queue = [centre];
  for (const node of queue)
    for (const next of neighbours[node])
      if (!seen[next]) {
        seen[next] = 1;
        queue.push(next);
      }
  const apart = neighbours.flatMap((_, i) => (seen[i] ? [] : [i]));
  return [...apart, ...queue.slice(1).reverse()];
}

/** Adds a direction of movement to those known, where it is another; false where there is no movement. */
function cover(known: number[][], movement: readonly number[], size: number): boolean {
  if (Math.hypot(...movement) <= NOTHING * size) return false;
  const rest = withoutParts(movement, known);
  const length = Math.hypot(...rest);
  if (length > NOTHING * size && known.length < 3) known.push(rest.map((v) => v / length));
  return true;
}

const movementAt = (node: number, rows: readonly Float64Array[], column: Float64Array): number[] => [
  inner(rows[3 * node], column),
  inner(rows[3 * node + 1], column),
  inner(rows[3 * node + 2], column),
];

function withoutParts(vector: readonly number[], directions: readonly (readonly number[])[]): number[] {
  let rest = [...vector];
  for (const d of directions) {
    const k = rest[0] * d[0] + rest[1] * d[1] + rest[2] * d[2];
    rest = rest.map((v, i) => v - k * d[i]);
  }
  return rest;
}

function unitVector(width: number, k: number): Float64Array {
  const out = new Float64Array(width);
  out[k] = 1;
  return out;
}

function without(vector: Float64Array, k: number, other: Float64Array): Float64Array<ArrayBuffer> {
  const out = new Float64Array(vector.length);
  for (let i = 0; i < out.length; i++) out[i] = vector[i] - k * other[i];
  return out;
}

function inner(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

function sizeOf(vector: Float64Array): number {
  let most = 0;
  for (let i = 0; i < vector.length; i++) {
    const v = Math.abs(vector[i]);
    if (v > most) most = v;
  }
  return most;
}
