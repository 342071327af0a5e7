import { pushTo } from '../../domain/group.ts';
import { largest } from '../engine/vectors.ts';
import { carryMovements } from '../model/movement.ts';
import type { System } from '../model/system.ts';
import { UnionFind } from '../model/union-find.ts';
import type { Restraint } from '../types.ts';
import { follow, type HeldSystem, movePivots } from './held-modes.ts';
import { STILL } from './localise.ts';

/** Nodes that move in some mode and hang together; what moves elsewhere leaves them alone. */
export interface Component {
  /** Real nodes, ascending. */
  readonly nodes: readonly number[];
  /** Indices of the pivots that move them: as many as there are independent modes of these nodes. */
  readonly pivots: readonly number[];
}

/**
 * The mode space falls apart along what stands still in every mode. A movement of all pivots by different amounts shows what moves in
 * any of them: one solution for all.
 */
export function splitMotion(system: HeldSystem, pivots: readonly Restraint[]): Component[] {
  const { base } = system;
  const amounts = pivots.map((pivot, i) => ({ pivot, amount: uneven(i) }));
  const [all] = follow(system, [movePivots(base, amounts)]);
  const moving = movingBlocks(all, base.problem.truss.nodes.length, pivots);
  const sets = new UnionFind(moving.length);
  for (const blocks of coupledBlocks(base, unknownsOf(base, all))) {
    const together = blocks.filter((block) => moving[block]);
    for (const block of together.slice(1)) sets.join(together[0], block);
  }
  const nodesOf = new Map<number, number[]>();
  base.problem.truss.nodes.forEach((node, i) => {
    if (moving[i] && node.carriedBy === null) pushTo(nodesOf, sets.find(i), i);
  });
  const pivotsOf = new Map<number, number[]>();
  pivots.forEach((pivot, i) => {
    pushTo(pivotsOf, sets.find(pivot.node), i);
  });
  return [...nodesOf]
    .filter(([top]) => pivotsOf.has(top))
    .map(([top, nodes]) => ({ nodes, pivots: pivotsOf.get(top)! }))
    .sort((a, b) => a.nodes[0] - b.nodes[0]);
}

/** Amounts that no rule of a roof can make cancel: the golden ratio's multiples, between 0.5 and 1.5. */
const uneven = (i: number): number => 0.5 + (((i + 1) * 0.618033988749895) % 1);

function movingBlocks(moves: Float64Array, count: number, pivots: readonly Restraint[]): Uint8Array {
  let most = 0;
  for (const v of moves) most = Math.max(most, Math.abs(v));
  const moving = new Uint8Array(count);
  for (let i = 0; i < count; i++)
    for (let axis = 0; axis < 3; axis++) if (Math.abs(moves[3 * i + axis]) > STILL * most) moving[i] = 1;
  for (const { node } of pivots) moving[node] = 1;
  return moving;
}

/** A movement of the nodes in the unknowns of the system. */
function unknownsOf({ movement }: System, moves: Float64Array): Float64Array {
  const { frame, freedoms } = movement;
  return Float64Array.from(freedoms.active, (_, unknown) => {
    const node = Math.floor(unknown / 3);
    const at = 9 * node + 3 * (unknown % 3);
    return frame[at] * moves[3 * node] + frame[at + 1] * moves[3 * node + 1] + frame[at + 2] * moves[3 * node + 2];
  });
}

/**
 * The nodes that each bar, spring or restraint on a carried node ties together: those that move along it. A column ties the floors it
 * stands between when they rise, not when they slide.
 */
function* coupledBlocks({ rows, movement }: System, moves: Float64Array): Iterable<number[]> {
  const { stride } = movement.freedoms;
  const most = largest(moves);
  for (let row = 0; row < rows.count; row++) {
    const along = new Map<number, number>();
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++) {
      const block = Math.floor(rows.unknown[p] / stride);
      along.set(block, (along.get(block) ?? 0) + rows.value[p] * moves[rows.unknown[p]]);
    }
    yield [...along].flatMap(([block, amount]) => (Math.abs(amount) > STILL * most ? [block] : []));
  }
  for (const [follower, terms] of movement.followers)
    yield [follower, ...terms.map((term) => term.unknown)].map((unknown) => Math.floor(unknown / stride));
}

/** The real nodes of each bar and spring. */
function* joinedBlocks({ rows, movement }: System): Iterable<number[]> {
  const { stride } = movement.freedoms;
  for (let row = 0; row < rows.count; row++) {
    const blocks = new Set<number>();
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++) blocks.add(Math.floor(rows.unknown[p] / stride));
    yield [...blocks];
  }
}

/** Neighbours of the nodes of components through bars, over real nodes. */
export function neighboursOf(base: System, components: readonly Component[]): ReadonlyMap<number, readonly number[]> {
  const wanted = new Set(components.flatMap(({ nodes }) => nodes));
  const next = new Map<number, number[]>();
  for (const blocks of joinedBlocks(base))
    for (const a of blocks) if (wanted.has(a)) for (const b of blocks) if (a !== b) pushTo(next, a, b);
  return next;
}

/**
 * The modes of each component, one for each of its first `most` pivots. Components do not meet, so that one solution gives a mode of every
 * one of them.
 */
export function modesOfComponents(
  system: HeldSystem,
  components: readonly Component[],
  pivots: readonly Restraint[],
  most: readonly number[],
): Float64Array[][] {
  const out: Float64Array[][] = components.map(() => []);
  const rounds = Math.max(0, ...most);
  for (let t = 0; t < rounds; t++) {
    const taking = components.map((_, c) => c).filter((c) => t < most[c]);
    const moved = taking.map((c) => ({ pivot: pivots[components[c].pivots[t]], amount: 1 }));
    const [all] = follow(system, [movePivots(system.base, moved)]);
    for (const c of taking) out[c].push(onlyOn(system.base, components[c].nodes, all));
  }
  return out;
}

/** What of a movement belongs to these nodes and those carried between them. */
export function onlyOn(base: System, nodes: readonly number[], moves: Float64Array): Float64Array {
  const own = new Float64Array(moves.length);
  for (const i of nodes) for (let axis = 0; axis < 3; axis++) own[3 * i + axis] = moves[3 * i + axis];
  return carryMovements(base.problem.truss, base.movement.shares, own);
}
