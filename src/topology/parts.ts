import { type Finding, finding } from '../domain/finding.ts';
import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Truss } from '../domain/truss.ts';
import { millimetres } from '../domain/words.ts';
import type { Axis } from './axes.ts';
import { distanceToAxis } from './axes.ts';
import { labelOf } from './labels.ts';

/** A piece of the truss that no bar connects with the others. */
export interface Part {
  readonly nodes: readonly number[];
  readonly bars: readonly number[];
}

/** The connected parts, largest (by bars) first. */
export function findParts(truss: Truss): Part[] {
  const parent = Int32Array.from(truss.nodes, (_, i) => i);
  const find = (i: number): number => {
    while (parent[i] !== i) {
      parent[i] = parent[parent[i]];
      i = parent[i];
    }
    return i;
  };
  for (const bar of truss.bars) parent[find(bar.from)] = find(bar.to);
  truss.nodes.forEach((node, index) => {
    if (node.carriedBy) parent[find(index)] = find(truss.bars[node.carriedBy.bar].from);
  });
  const nodesOf = new Map<number, number[]>();
  const barsOf = new Map<number, number[]>();
  truss.nodes.forEach((_, i) => {
    pushTo(nodesOf, find(i), i);
  });
  truss.bars.forEach((bar, i) => {
    pushTo(barsOf, find(bar.from), i);
  });
  return [...nodesOf.keys()]
    .map((root) => ({ nodes: nodesOf.get(root) as number[], bars: barsOf.get(root) ?? [] }))
    .sort((p, q) => q.bars.length - p.bars.length || p.nodes[0] - q.nodes[0]);
}

/** A finding for each part but the largest that stands on no support of its own. */
export function partFindings(
  truss: Truss,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  supported: ReadonlySet<number>,
  placeOf: PlaceNamer,
): Finding[] {
  const parts = findParts(truss);
  const main = parts.findIndex((part) => part.nodes.some((node) => supported.has(node)));
  const rest = parts.filter((_, i) => i !== Math.max(main, 0));
  return rest
    .filter((part) => !part.nodes.some((node) => supported.has(node)))
    .map((part) => partFinding(part, truss, members, axes, placeOf));
}

function partFinding(
  part: Part,
  truss: Truss,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
): Finding {
  const own = [...new Set(part.bars.flatMap((bar) => truss.bars[bar].members))].sort((a, b) => a - b);
  const nearest = nearestToRest(part, own, truss, axes);
  const at = truss.nodes[nearest.node].at;
  const common = {
    members: own.map((member) => members[member].globalId),
    nodes: [nearest.node],
    at,
    place: placeOf(at),
    gap: nearest.gap,
  };
  const away =
    nearest.other === null || nearest.gap === null
      ? ''
      : `, ${millimetres(nearest.gap)} from ${labelOf(members[nearest.other])}`;
  if (own.length === 1) {
    const label = labelOf(members[own[0]]);
    return finding(
      'lone-member',
      `${label} joins nothing${away}.`,
      `Join ${label}, or leave it out of the scope.`,
      common,
    );
  }
  return finding(
    'separate-part',
    `${own.length} members (${own
      .slice(0, 3)
      .map((member) => labelOf(members[member]))
      .join(', ')}${own.length > 3 ? ', …' : ''}) are joined to each other but not to the rest${away}.`,
    'Join the part to the rest, support it in the brief, or leave it out of the scope.',
    common,
  );
}

/** The node of the part that lies nearest to an axis outside it. */
function nearestToRest(part: Part, own: readonly number[], truss: Truss, axes: readonly (Axis | null)[]) {
  const inside = new Set(own);
  let best: { node: number; gap: number | null; other: number | null } = {
    node: part.nodes[0],
    gap: null,
    other: null,
  };
  for (const axis of axes) {
    if (axis === null || inside.has(axis.member)) continue;
    for (const node of part.nodes) {
      const { distance } = distanceToAxis(truss.nodes[node].at, axis);
      if (best.gap === null || distance < best.gap) best = { node, gap: distance, other: axis.member };
    }
  }
  return best;
}
