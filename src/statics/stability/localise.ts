import type { Truss } from '../../domain/truss.ts';
import { UnionFind } from '../model/union-find.ts';

/** Movements below this share of the largest are rounding. */
export const STILL = 1e-9;

/**
 * Movements below this share of the largest are none to the reader: coordinates are drawn to a tenth of a millimetre, so that a flat truss
 * is flat to 1e-4 and what moves out of its plane drags the rest along by as much.
 */
export const AT_REST = 1e-3;

/** Nodes (carried ones left out) that move by more than a share of the largest movement. */
export function movingNodes(truss: Truss, moves: Float64Array, share = STILL): number[] {
  let most = 0;
  for (const v of moves) most = Math.max(most, Math.abs(v));
  const out: number[] = [];
  truss.nodes.forEach((node, i) => {
    if (node.carriedBy !== null) return;
    const size = Math.max(Math.abs(moves[3 * i]), Math.abs(moves[3 * i + 1]), Math.abs(moves[3 * i + 2]));
    if (size > share * most) out.push(i);
  });
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
