import type { Truss } from '../../domain/truss.ts';
import { UnionFind } from '../model/union-find.ts';
import { type ReducedModes, reduceModes } from './reduce.ts';

/** Movements below this share of the largest count as standing still. */
export const STILL = 1e-7;

/** Nodes (carried ones left out) that move. */
export function movingNodes(truss: Truss, moves: Float64Array): number[] {
  let most = 0;
  for (const v of moves) most = Math.max(most, Math.abs(v));
  const out: number[] = [];
  truss.nodes.forEach((node, i) => {
    if (node.carriedBy !== null) return;
    const size = Math.max(Math.abs(moves[3 * i]), Math.abs(moves[3 * i + 1]), Math.abs(moves[3 * i + 2]));
    if (size > STILL * most) out.push(i);
  });
  return out;
}

/** Works modes that share nodes into ones of few nodes each, group by group. */
export function localise(truss: Truss, modes: readonly Float64Array[]): ReducedModes {
  const moving = modes.map((mode) => movingNodes(truss, mode));
  const groups = groupByNodes(moving);
  const out: ReducedModes = { modes: [], pivots: [] };
  for (const group of groups) {
    const nodes = [...new Set(group.flatMap((i) => moving[i]))].sort((a, b) => a - b);
    const reduced = reduceModes(
      truss,
      group.map((i) => modes[i]),
      nodes,
    );
    out.modes.push(...reduced.modes);
    out.pivots.push(...reduced.pivots);
  }
  return out;
}

/** Indices of the lists that hang together through common nodes. */
export function groupByNodes(lists: readonly (readonly number[])[]): number[][] {
  const sets = new UnionFind(lists.length);
  const owner = new Map<number, number>();
  lists.forEach((nodes, i) => {
    for (const node of nodes) {
      const before = owner.get(node);
      if (before === undefined) owner.set(node, i);
      else sets.join(before, i);
    }
  });
  const groups = new Map<number, number[]>();
  lists.forEach((_, i) => {
    const top = sets.find(i);
    groups.set(top, [...(groups.get(top) ?? []), i]);
  });
  return [...groups.values()];
}
