import { type Finding, finding } from '../domain/finding.ts';
import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Truss } from '../domain/truss.ts';
import { distance, meanOf } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { type Axis, looksCrossed } from './axes.ts';
import type { Contact } from './contacts.ts';
import type { Refusal } from './joints.ts';
import { labelOf } from './labels.ts';

/** Axes that run through each other and were left apart, but for bracing that is plainly crossed. */
export function crossingFindings(
  contacts: readonly Contact[],
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  truss: Truss,
  placeOf: PlaceNamer,
): Finding[] {
  if (!contacts.some(({ kind }) => kind === 'crossing')) return [];
  const together = nodesByMember(truss);
  return contacts.flatMap(({ a, b, s, t, kind, cost, point }) => {
    const [first, second] = [axes[a], axes[b]];
    if (kind !== 'crossing' || first === null || second === null || looksCrossed(first, second, s, t)) return [];
    if (together.get(a)?.some((node) => truss.nodes[node].members.includes(b))) return [];
    const [one, other] = [members[a], members[b]];
    return finding(
      'crossing-apart',
      `${labelOf(one)} and ${labelOf(other)} run through each other ${millimetres(cost)} apart and are not joined there.`,
      'Say `joints: {crossings: joined}` in the brief if they are connected, or end one of them there in the model.',
      { members: [one.globalId, other.globalId], at: point, place: placeOf(point), gap: cost },
    );
  });
}

function nodesByMember(truss: Truss): Map<number, number[]> {
  const nodes = new Map<number, number[]>();
  truss.nodes.forEach(({ members }, node) => {
    for (const member of members) pushTo(nodes, member, node);
  });
  return nodes;
}

/** Members that come near enough to be joined where that would have drawn two joints into one. */
export function crowdedFindings(
  refused: readonly Refusal[],
  members: readonly Member[],
  truss: Truss,
  placeOf: PlaceNamer,
): Finding[] {
  if (refused.length === 0) return [];
  const nodesOf = nodesByMember(truss);
  const said = new Set<string>();
  return refused.flatMap(({ contact: { a, b, point } }) => {
    const near = [a, b].map((member) => nearestNode(truss, nodesOf.get(member) ?? [], point));
    if (near[0] === near[1] || near.includes(-1)) return [];
    const key = [...near].sort((p, q) => p - q).join(' ');
    if (said.has(key)) return [];
    said.add(key);
    const [p, q] = near.map((node) => truss.nodes[node].at);
    const at = meanOf([p, q]);
    return finding(
      'crowded-joint',
      `Two joints lie ${millimetres(distance(p, q))} apart where ${labelOf(members[a])} and ${labelOf(members[b])} come together; they were kept apart, as the axes are moved least that way.`,
      'Look whether they are one joint: move the members to one work point in the model, or set `joints: reach` in the brief.',
      {
        members: [members[a].globalId, members[b].globalId],
        nodes: near,
        at,
        place: placeOf(at),
        gap: distance(p, q),
      },
    );
  });
}

/** Two joints of one member nearer than this many of its depths are likely meant as one. */
const CLOSE = 2;
/** And nearer than this share of the panels on either side of them. */
const SHORT_PANEL = 0.25;

/** Panels of a through member so short that their two ends, at each of which something frames in, are likely one joint. */
export function closeJointFindings(
  truss: Truss,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
): Finding[] {
  const barsOf = new Map<number, number[]>();
  truss.bars.forEach((bar, index) => {
    pushTo(barsOf, bar.members[0], index);
  });
  const sits = ({ joining }: Truss['nodes'][number], member: number) =>
    joining?.eccentricities.some((one) => one.of === 'seat' && one.member === member) ?? false;
  const framesIn = (node: number, runner: number): boolean =>
    truss.nodes[node].carriedBy === null &&
    truss.nodes[node].members.some((member) => member !== runner && !sits(truss.nodes[node], member));
  return truss.bars.flatMap(({ members: [runner], from, to, length }, index) => {
    const depth = axes[runner]?.depth ?? 0;
    const panels = (barsOf.get(runner) ?? []).filter((bar) => bar !== index).map((bar) => truss.bars[bar].length);
    if (length > CLOSE * depth || panels.length < 2 || length > SHORT_PANEL * Math.min(...panels)) return [];
    if (!framesIn(from, runner) || !framesIn(to, runner)) return [];
    const at = meanOf([truss.nodes[from].at, truss.nodes[to].at]);
    return finding(
      'crowded-joint',
      `Two joints lie ${millimetres(length)} apart on ${labelOf(members[runner])}: the axes that meet there were drawn past each other, and each joint was left where they meet it.`,
      'Look whether they are one joint: move the members to one work point in the model, or check the piece between them for bending.',
      { members: [members[runner].globalId], nodes: [from, to], at, place: placeOf(at), gap: length },
    );
  });
}

function nearestNode({ nodes }: Truss, own: readonly number[], point: Axis['start']): number {
  let best = -1;
  for (const node of own) {
    if (best < 0 || distance(nodes[node].at, point) < distance(nodes[best].at, point)) best = node;
  }
  return best;
}

/** Where a through member is not split because nothing there triangulates: told once for the whole model. */
export function carriedFindings(truss: Truss, members: readonly Member[]): Finding[] {
  const nodes = truss.nodes.flatMap(({ carriedBy }, node) => (carriedBy === null ? [] : [node]));
  if (nodes.length === 0) return [];
  const first = truss.nodes[nodes[0]];
  const carriers = new Set(nodes.flatMap((node) => truss.bars[truss.nodes[node].carriedBy?.bar as number].members));
  return [
    finding(
      'carried-node',
      `${nodes.length === 1 ? 'One node is' : `${nodes.length} nodes are`} carried between the ends of a bar: nothing that triangulates frames in there, so the member runs on without a hinge; it bends there, which is not checked.`,
      'Say `chords: strict` in the brief where every joint is a hinge.',
      { members: [...carriers].map((member) => members[member].globalId), nodes, at: first.at, place: first.place },
    ),
  ];
}
