import { type Finding, finding } from '../domain/finding.ts';
import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Truss } from '../domain/truss.ts';
import { millimetres } from '../domain/words.ts';
import { boxAround, distanceToAxis } from './along-axes.ts';
import type { Axis } from './axes.ts';
import { labelOf } from './labels.ts';
import type { Miss } from './loose-ends.ts';
import { indexBoxes, nearestBox, sharedLabels } from './spatial-index.ts';

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

/** A part that stands on no support of its own, with the ends by which it misses the rest. */
export interface PartAside extends Part {
  readonly members: readonly number[];
  readonly misses: readonly Miss[];
}

/**
 * The parts but the main one (supported, or the largest) that stand on no support of their own. An end by which such a
 * part misses another is told with the part and not once more by itself.
 */
export function partsAside(
  truss: Truss,
  supported: ReadonlySet<number>,
  misses: readonly Miss[],
): { parts: PartAside[]; otherMisses: Miss[] } {
  const parts = findParts(truss);
  const main = Math.max(
    parts.findIndex((part) => part.nodes.some((node) => supported.has(node))),
    0,
  );
  const membersOf = parts.map(({ bars }) =>
    [...new Set(bars.flatMap((bar) => truss.bars[bar].members))].sort((a, b) => a - b),
  );
  const partOf = new Map(membersOf.flatMap((own, part) => own.map((member) => [member, part] as const)));
  const isAside = parts.map((part, i) => i !== main && !part.nodes.some((node) => supported.has(node)));
  const missesOf = new Map<number, Miss[]>();
  const otherMisses = misses.filter((miss) => {
    const own = partOf.get(miss.end.axis.member);
    const met = partOf.get(miss.other.member);
    const told = own === met ? undefined : [own, met].find((part) => part !== undefined && isAside[part]);
    if (told !== undefined) pushTo(missesOf, told, miss);
    return told === undefined;
  });
  const aside = parts.flatMap((part, i) =>
    isAside[i] ? [{ ...part, members: membersOf[i], misses: missesOf.get(i) ?? [] }] : [],
  );
  return { parts: aside, otherMisses };
}

/** A finding for each part aside. */
export function partFindings(
  parts: readonly PartAside[],
  truss: Truss,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
): Finding[] {
  if (parts.length === 0) return [];
  const nearestTo = nearestToRest(parts, truss, axes);
  return parts.map((part, i) => partFinding(part, nearestTo(part, i), truss, members, placeOf));
}

interface Nearest {
  readonly node: number;
  readonly gap: number | null;
  readonly other: number | null;
}

function partFinding(
  part: PartAside,
  nearest: Nearest,
  truss: Truss,
  members: readonly Member[],
  placeOf: PlaceNamer,
): Finding {
  const own = part.members;
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
    const ends = missWords(part.misses, members);
    const mend = part.misses.length > 0 ? `Carry the ends of ${label} on to what they should meet` : `Join ${label}`;
    return finding(
      'lone-member',
      `${label} joins nothing${ends === '' ? away : `: ${ends}`}.`,
      `${mend}, or leave it out of the scope.`,
      common,
    );
  }
  const ends = missWords(part.misses, members);
  return finding(
    'separate-part',
    `${own.length} members (${own
      .slice(0, 3)
      .map((member) => labelOf(members[member]))
      .join(
        ', ',
      )}${own.length > 3 ? ', …' : ''}) are joined to each other but not to the rest${away}${ends === '' ? '' : `: ${ends}`}.`,
    'Join the part to the rest, support it in the brief, or leave it out of the scope.',
    common,
  );
}

/** Ends told one by one; more of them are counted. */
const TOLD = 2;

function missWords(misses: readonly Miss[], members: readonly Member[]): string {
  if (misses.length > TOLD) {
    const gaps = misses.map(({ gap }) => gap);
    return `${misses.length} ends miss by ${millimetres(Math.min(...gaps))} to ${millimetres(Math.max(...gaps))}`;
  }
  return misses
    .map(
      ({ end, other, gap }) =>
        `an end of ${labelOf(members[end.axis.member])} misses ${labelOf(members[other.member])} by ${millimetres(gap)}`,
    )
    .join(', ');
}

/** For a part the node that lies nearest to an axis outside it. */
function nearestToRest(parts: readonly PartAside[], truss: Truss, axes: readonly (Axis | null)[]) {
  const present = axes.filter((axis) => axis !== null);
  const boxes = new Float64Array(6 * present.length);
  present.forEach((axis, i) => {
    boxes.set(boxAround(axis, 0), 6 * i);
  });
  const index = indexBoxes(boxes);
  const partOf = new Map(parts.flatMap(({ members }, part) => members.map((member) => [member, part] as const)));
  const labels = Int32Array.from(present, ({ member }) => partOf.get(member) ?? parts.length);
  const shared = sharedLabels(index, labels);
  return (part: PartAside, label: number): Nearest => {
    let best: Nearest = { node: part.nodes[0], gap: null, other: null };
    for (const node of part.nodes) {
      const { at } = truss.nodes[node];
      const found = nearestBox(
        index,
        at,
        (box) => (labels[box] === label ? Number.POSITIVE_INFINITY : distanceToAxis(at, present[box]).distance),
        (treeNode) => shared[treeNode] !== label,
        best.gap ?? undefined,
      );
      if (found.box >= 0) best = { node, gap: found.distance, other: present[found.box].member };
    }
    return best;
  };
}
