import type { Graph } from './graph.ts';
import { Separator } from './separator.ts';

/** Pieces this small are left in the order they come in: their fill is a small dense triangle either way. */
const LEAF = 12;

/**
 * Nested dissection (George 1973): a few blocks whose removal parts the graph are eliminated last, the halves before them in the same
 * way. Returns the blocks in the order of elimination.
 */
export function nestedDissection(graph: Graph): Int32Array {
  const order = Int32Array.from({ length: graph.count }, (_, i) => i);
  const separator = new Separator(graph);
  // Pieces are stretches of `order`; what parts one comes to its end.
  const pending = [0, graph.count];
  while (pending.length > 0) {
    const to = pending.pop()!;
    let from = pending.pop()!;
    if (to - from <= LEAF) continue;
    for (const size of separator.part(order, from, to)) {
      pending.push(from, from + size);
      from += size;
    }
  }
  return order;
}
