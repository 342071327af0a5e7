import type { Truss } from '../../domain/truss.ts';

/** Nodes at which any of the members ends: those that one bar of it reaches and no other bar of it leaves. */
export function endNodes(truss: Truss, memberCount: number, chosen: readonly number[]): Set<number> {
  const isChosen = chosenFlags(memberCount, chosen);
  const bars = new Map<number, Map<number, number>>();
  truss.bars.forEach((bar) => {
    for (const member of bar.members) {
      if (isChosen[member] !== 1) continue;
      const counts = bars.get(member) ?? new Map<number, number>();
      bars.set(member, counts);
      for (const node of [bar.from, bar.to]) {
        // The far end of a spliced bar belongs to the other member: the node's own list tells.
        if (bar.members.length > 1 && !truss.nodes[node].members.includes(member)) continue;
        counts.set(node, (counts.get(node) ?? 0) + 1);
      }
    }
  });
  const ends = new Set<number>();
  for (const counts of bars.values()) for (const [node, count] of counts) if (count === 1) ends.add(node);
  return ends;
}

/** Nodes that any of the members meets, at its ends, in between, or carrying the node. */
export function joinedNodes(truss: Truss, memberCount: number, chosen: readonly number[]): Set<number> {
  const isChosen = chosenFlags(memberCount, chosen);
  const joined = new Set<number>();
  truss.nodes.forEach((node, i) => {
    if (node.members.some((member) => isChosen[member] === 1)) joined.add(i);
    const carrier = node.carriedBy === null ? undefined : truss.bars[node.carriedBy.bar];
    if (carrier?.members.length === 1 && isChosen[carrier.members[0]] === 1) joined.add(i);
  });
  for (const bar of truss.bars) {
    // Of a spliced bar each end belongs to one member only, and stands in the node's own list.
    if (bar.members.length === 1 && isChosen[bar.members[0]] === 1) joined.add(bar.from).add(bar.to);
  }
  return joined;
}

function chosenFlags(memberCount: number, chosen: readonly number[]): Uint8Array {
  const flags = new Uint8Array(memberCount);
  for (const member of chosen) flags[member] = 1;
  return flags;
}
