import { pushTo } from '../../domain/group.ts';
import type { Truss } from '../../domain/truss.ts';
import { anyNormal, cross, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { analysePattern, type Symbolic } from '../engine/symbolic.ts';
import type { SparseRows } from '../engine/system.ts';
import { leverShares } from '../model/carriage.ts';
import { UnionFind } from '../model/union-find.ts';
import type { Motion } from '../stability/mode-space.ts';

/** Motions that turn common bars: the forces of those couple them, and nothing couples them with the others. */
export interface MotionGroup {
  readonly motions: readonly Motion[];
  /** The bars that they turn, ascending. */
  readonly bars: readonly number[];
  /** Two rows a bar, over the motions: how far its ends move against each other along two directions across it. */
  readonly rows: SparseRows;
  /** How the sparse engine goes about it; null for groups so small that all is done in full. */
  readonly symbolic: Symbolic | null;
}

/** Motions up to which a group is judged in full. */
const FULL = 200;
/** Products of turns in a sparse matrix that are worth their time; more are no longer sparse. */
const MOST_PRODUCTS = 5e6;

/** Relative movements below this share of a motion's largest are rounding. */
const NOTHING = 1e-9;
/** Turns of bars by motions that are written out at most. */
const MOST_TURNS = 6e6;

/** Null where the motions are so many and so entangled that the truss as a whole is the smaller matter. */
export function groupMotions(truss: Truss, motions: readonly Motion[]): MotionGroup[] | null {
  const turns = turnsOf(truss, motions);
  if (turns === null) return null;
  const sets = new UnionFind(motions.length);
  for (const own of turns.values()) for (const { motion } of own) sets.join(own[0].motion, motion);
  const members = new Map<number, number[]>();
  motions.forEach((_, m) => {
    pushTo(members, sets.find(m), m);
  });
  const barsOf = new Map<number, number[]>();
  for (const bar of [...turns.keys()].sort((a, b) => a - b)) pushTo(barsOf, sets.find(turns.get(bar)![0].motion), bar);
  const place = new Int32Array(motions.length);
  for (const own of members.values())
    own.forEach((m, i) => {
      place[m] = i;
    });
  const groups: MotionGroup[] = [];
  for (const [top, own] of members) {
    const bars = barsOf.get(top) ?? [];
    const rows = rowsOf(bars, turns, place);
    const isSmall = own.length <= FULL;
    if (!isSmall && productsOf(rows) > MOST_PRODUCTS) return null;
    const freedoms = { blocks: own.length, stride: 1, active: new Uint8Array(own.length).fill(1) };
    const symbolic = isSmall ? null : analysePattern(freedoms, rows);
    groups.push({ motions: own.map((m) => motions[m]), bars, rows, symbolic });
  }
  return groups;
}

function productsOf({ count, start }: SparseRows): number {
  let products = 0;
  for (let row = 0; row < count; row++) products += (start[row + 1] - start[row]) ** 2;
  return products;
}

/** How one motion moves the ends of a bar against each other, along two directions across it. */
interface Turn {
  readonly motion: number;
  readonly first: number;
  readonly second: number;
}

function rowsOf(bars: readonly number[], turns: ReadonlyMap<number, readonly Turn[]>, place: Int32Array): SparseRows {
  const start = new Int32Array(2 * bars.length + 1);
  bars.forEach((bar, r) => {
    const size = turns.get(bar)!.length;
    start[2 * r + 1] = start[2 * r] + size;
    start[2 * r + 2] = start[2 * r] + 2 * size;
  });
  const unknown = new Int32Array(start[2 * bars.length]);
  const value = new Float64Array(unknown.length);
  bars.forEach((bar, r) => {
    turns.get(bar)!.forEach(({ motion, first, second }, i) => {
      unknown[start[2 * r] + i] = place[motion];
      unknown[start[2 * r + 1] + i] = place[motion];
      value[start[2 * r] + i] = first;
      value[start[2 * r + 1] + i] = second;
    });
  });
  return { count: 2 * bars.length, start, unknown, value };
}

function turnsOf(truss: Truss, motions: readonly Motion[]): Map<number, Turn[]> | null {
  const shares = leverShares(truss);
  const barsAt = new Map<number, number[]>();
  truss.bars.forEach(({ from, to }, b) => {
    pushTo(barsAt, from, b);
    pushTo(barsAt, to, b);
  });
  const carriedOn = new Map<number, number[]>();
  shares.forEach((parents, i) => {
    if (truss.nodes[i].carriedBy !== null) for (const [parent] of parents) pushTo(carriedOn, parent, i);
  });
  const across = new Map<number, readonly [Vec3, Vec3]>();
  const all = new Float64Array(3 * truss.nodes.length);
  const out = new Map<number, Turn[]>();
  let count = 0;
  for (const [motion, { nodes, moves }] of motions.entries()) {
    nodes.forEach((node, i) => {
      all.set(moves.subarray(3 * i, 3 * i + 3), 3 * node);
    });
    const carried = [...new Set(nodes.flatMap((node) => carriedOn.get(node) ?? []))];
    for (const i of carried)
      for (const [parent, share] of shares[i])
        for (let axis = 0; axis < 3; axis++) all[3 * i + axis] += share * all[3 * parent + axis];
    const moving = [...nodes, ...carried];
    for (const bar of new Set(moving.flatMap((node) => barsAt.get(node) ?? []))) {
      const pair = across.get(bar) ?? directionsAcross(truss, bar);
      if (pair === null) continue;
      across.set(bar, pair);
      const [first, second] = pair.map((d) => apart(truss, bar, all, d));
      if (Math.hypot(first, second) <= NOTHING) continue;
      pushTo(out, bar, { motion, first, second });
      if (++count > MOST_TURNS) return null;
    }
    for (const node of moving) all.fill(0, 3 * node, 3 * node + 3);
  }
  return out;
}

function directionsAcross(truss: Truss, bar: number): readonly [Vec3, Vec3] | null {
  const { from, to } = truss.bars[bar];
  const direction = unit(subtract(truss.nodes[to].at, truss.nodes[from].at));
  if (direction === null) return null;
  const first = anyNormal(direction);
  return [first, cross(direction, first)];
}

function apart(truss: Truss, bar: number, moves: Float64Array, direction: Vec3): number {
  const { from, to } = truss.bars[bar];
  let sum = 0;
  for (let axis = 0; axis < 3; axis++) sum += direction[axis] * (moves[3 * to + axis] - moves[3 * from + axis]);
  return sum;
}
