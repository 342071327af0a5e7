import type { Truss } from '../../domain/truss.ts';

/**
 * Shares of each real node in a node's movement, by the lever rule through however many carriages: a real node is its own,
 * a carried one the weighted mean of the ends of its bar. Loads on it go to the same nodes in the same shares.
 */
export function leverShares(truss: Truss): readonly (readonly (readonly [node: number, share: number])[])[] {
  const { nodes, bars } = truss;
  const shares: (readonly (readonly [number, number])[] | null)[] = new Array(nodes.length).fill(null);
  const open = new Uint8Array(nodes.length);
  const resolve = (node: number): readonly (readonly [number, number])[] => {
    const known = shares[node];
    if (known) return known;
    const carriage = nodes[node].carriedBy;
    let own: [number, number][] = [[node, 1]];
    if (carriage !== null) {
      if (open[node]) throw new Error(`node ${node} is carried by itself`);
      open[node] = 1;
      const bar = bars[carriage.bar];
      const sum = new Map<number, number>();
      for (const [end, weight] of [
        [bar.from, 1 - carriage.t],
        [bar.to, carriage.t],
      ] as const)
        for (const [parent, share] of resolve(end)) sum.set(parent, (sum.get(parent) ?? 0) + weight * share);
      own = [...sum].filter(([, share]) => share !== 0);
    }
    shares[node] = own;
    return own;
  };
  return nodes.map((_, i) => resolve(i));
}
