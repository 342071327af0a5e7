import type { Truss } from '../../domain/truss.ts';

/** For each bar its nodes in order: the one it comes from, those it carries, the one it goes to. */
export function barRuns(truss: Truss): readonly (readonly number[])[] {
  const carried = new Map<number, number[]>();
  truss.nodes.forEach(({ carriedBy }, node) => {
    if (carriedBy === null) return;
    const nodes = carried.get(carriedBy.bar);
    if (nodes === undefined) carried.set(carriedBy.bar, [node]);
    else nodes.push(node);
  });
  const fraction = (node: number): number => truss.nodes[node].carriedBy?.t ?? 0;
  return truss.bars.map(({ from, to }, bar) => {
    const between = (carried.get(bar) ?? []).toSorted((a, b) => fraction(a) - fraction(b));
    return [from, ...between, to];
  });
}
