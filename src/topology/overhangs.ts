import type { Truss, TrussBar, TrussNode } from '../domain/truss.ts';
import type { Vec3 } from '../domain/vector.ts';

/** Beyond this share of its member a tail is no overhang: most of the member would be gone. */
const MOST_CUT = 0.25;

/** A tail that was cut off. */
export interface Overhang {
  readonly members: readonly number[];
  /** m past the last joint. */
  readonly length: number;
  /** The free end. */
  readonly at: Vec3;
}

/**
 * Cuts off tails: a bar of a through member that ends free beyond the member's last joint, unless its end is supported.
 * A tail carries no axial force, but its weight stays, on the joint it hangs from.
 */
export function cutOverhangs(truss: Truss, supported: ReadonlySet<number>): { truss: Truss; cut: Overhang[] } {
  const barsAt = truss.nodes.map(() => [] as number[]);
  truss.bars.forEach((bar, index) => {
    barsAt[bar.from].push(index);
    barsAt[bar.to].push(index);
  });
  const carrying = new Set(truss.nodes.flatMap((node) => (node.carriedBy ? [node.carriedBy.bar] : [])));
  const lengthOf = new Map<number, number>();
  for (const { members, length } of truss.bars) {
    for (const member of members) lengthOf.set(member, (lengthOf.get(member) ?? 0) + length);
  }
  const isTail = (bar: TrussBar, free: number): boolean =>
    barsAt[free].length === 1 &&
    isFreeEnd(truss, free, bar) &&
    !supported.has(free) &&
    bar.length <= MOST_CUT * (lengthOf.get(bar.members[0]) as number) &&
    barsAt[free === bar.from ? bar.to : bar.from].some(
      (other) => truss.bars[other] !== bar && truss.bars[other].members.includes(bar.members[0]),
    );
  const tails = new Map<number, number>();
  truss.bars.forEach((bar, index) => {
    if (carrying.has(index)) return;
    if (isTail(bar, bar.from)) tails.set(index, bar.from);
    else if (isTail(bar, bar.to)) tails.set(index, bar.to);
  });
  const cut = [...tails].map(([bar, free]): Overhang => {
    const { members, length } = truss.bars[bar];
    return { members, length, at: truss.nodes[free].at };
  });
  return { truss: tails.size === 0 ? truss : without(truss, tails), cut };
}

/** Whether nothing but the bar itself is at the node. Members spliced into the bar count as the bar. */
export function isFreeEnd(truss: Truss, node: number, bar: TrussBar): boolean {
  const { members, carriedBy } = truss.nodes[node];
  return carriedBy === null && members.every((member) => bar.members.includes(member));
}

function without(truss: Truss, tails: ReadonlyMap<number, number>): Truss {
  const gone = new Set(tails.values());
  const extraMass = new Map<number, number>();
  for (const [index, free] of tails) {
    const bar = truss.bars[index];
    const root = bar.from === free ? bar.to : bar.from;
    extraMass.set(root, (extraMass.get(root) ?? 0) + bar.massPerLength * bar.length);
  }
  const keptNodes = truss.nodes.map((_, i) => i).filter((i) => !gone.has(i));
  const keptBars = truss.bars.map((_, i) => i).filter((i) => !tails.has(i));
  const nodeAt = new Map(keptNodes.map((old, now) => [old, now]));
  const barAt = new Map(keptBars.map((old, now) => [old, now]));
  const nodes = keptNodes.map((old): TrussNode => {
    const node = truss.nodes[old];
    const carriedBy = node.carriedBy && { ...node.carriedBy, bar: barAt.get(node.carriedBy.bar) as number };
    return { ...node, carriedBy, overhangMass: node.overhangMass + (extraMass.get(old) ?? 0) };
  });
  const bars = keptBars.map((old): TrussBar => {
    const bar = truss.bars[old];
    return { ...bar, from: nodeAt.get(bar.from) as number, to: nodeAt.get(bar.to) as number };
  });
  return { nodes, bars, faith: truss.faith };
}
