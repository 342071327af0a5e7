import { pushTo } from '../domain/group.ts';
import { add, along, cross, distance, dot, norm, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import type { Plate, Related } from '../importer/evidence/types.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';

/** A member's line, for what touches its body. */
export interface EvidenceAxis {
  readonly start: Vec3;
  readonly finish: Vec3;
  /** Half the section's extent in a unit direction, m. */
  readonly halfExtent: (direction: Vec3) => number;
  /** The straight pieces of a bent member. */
  readonly pieces?: readonly EvidenceAxis[];
}

/** Why two members are taken to be fastened to one another, by `pairKey`: "plate GP-12", "IfcRelConnectsElements"; sorted, none twice. */
export type PairEvidence = ReadonlyMap<number, readonly string[]>;

/** The same for either order of the two; `count` is the number of all members. */
export const pairKey = (a: number, b: number, count: number): number => Math.min(a, b) * count + Math.max(a, b);

/** Welds, packings and rounded coordinates stand between steel that touches: m. */
const MARGIN = 0.005;

/** Two members that a plate touches farther apart than this are both on it, not at one joint (sheeting, a floor plate): m. */
const ONE_JOINT = 1;

/** A plate that a member lies along for more than half its length and this many half extents is sheeting, glass or a part of that member. */
const LAIN_ALONG = 8;

/** More members than this do not meet at one joint: an element that so many are related to is a slab or a wall. */
const MOST_AT_JOINT = 12;

/**
 * The plates that the bodies of both members touch, for every pair of members they do; near-linear in the number of
 * members. Axes that are null are passed over. Plates that touch face to face (a brace's tongue on a gusset, two end
 * plates) join the members that either touches, where no single plate does.
 */
export function touchingPlates(
  plates: readonly Plate[],
  axes: readonly (EvidenceAxis | null)[],
  margin = MARGIN,
): PairEvidence {
  const evidence = new Map<number, string[]>();
  const touched = touchesOf(plates, axes, margin).map((touches, plate) =>
    isSheeting(plates[plate]!, touches, axes) ? [] : touches,
  );
  touched.forEach((touches, plate) => {
    for (const [a, b] of closePairs(touches)) pushTo(evidence, pairKey(a, b, axes.length), labelOf(plates[plate]!));
  });
  const chained = new Map<number, string[]>();
  for (const [p, q] of facingPlates(plates, touched, margin)) {
    const words = [labelOf(plates[p]!), labelOf(plates[q]!)].sort().join(' on ');
    for (const [a, b] of closePairs([...touched[p]!, ...touched[q]!])) {
      const key = pairKey(a, b, axes.length);
      if (!evidence.has(key)) pushTo(chained, key, words);
    }
  }
  for (const [key, words] of chained) evidence.set(key, words);
  return tidied(evidence);
}

/**
 * The pairs of members that the model's own relationships connect: one to the other, both to one element between them
 * (a plate), or both by realising one connection. `globalIds` are the members' own, in their order.
 */
export function relatedMembers(related: readonly Related[], globalIds: readonly string[]): PairEvidence {
  const evidence = new Map<number, string[]>();
  const members = new Map<string, number[]>();
  globalIds.forEach((globalId, member) => {
    pushTo(members, globalId, member);
  });
  const around = new Map<string, { readonly member: number; readonly by: string }[]>();
  for (const { a, b, by, realising } of related) {
    const parties = [a, b, ...realising];
    const present = parties.flatMap((party) => members.get(party) ?? []);
    for (const [i, first] of present.entries()) {
      for (const second of present.slice(i + 1)) note(first, second, by);
    }
    for (const party of parties) {
      if (members.has(party)) continue;
      for (const member of present) pushTo(around, party, { member, by });
    }
  }
  for (const party of around.values()) {
    if (party.length > MOST_AT_JOINT) continue;
    for (const [i, first] of party.entries()) {
      for (const second of party.slice(i + 1)) note(first.member, second.member, first.by);
    }
  }
  return tidied(evidence);

  function note(first: number, second: number, by: string): void {
    if (first !== second && globalIds[first] !== globalIds[second]) {
      pushTo(evidence, pairKey(first, second, globalIds.length), by);
    }
  }
}

/** What either says of each pair. */
export function united(first: PairEvidence, second: PairEvidence): PairEvidence {
  const both = new Map(first);
  for (const [key, words] of second) both.set(key, [...(first.get(key) ?? []), ...words].sort());
  return both;
}

function tidied(evidence: Map<number, string[]>): PairEvidence {
  for (const [key, words] of evidence) if (words.length > 1) evidence.set(key, [...new Set(words)].sort());
  return evidence;
}

const KINDS: Readonly<Record<string, string>> = {
  IfcPlate: 'plate',
  IfcPlateStandardCase: 'plate',
  IfcDiscreteAccessory: 'accessory',
  IfcMechanicalFastener: 'fastener',
  IfcFastener: 'fastener',
};

function labelOf({ class: written, name, globalId }: Plate): string {
  const stated = name?.trim() ?? '';
  return `${KINDS[written] ?? 'part'} ${stated === '' ? globalId : stated}`;
}

/** The part of a member's axis that lies beside a plate. */
interface Touch {
  readonly member: number;
  readonly from: Vec3;
  readonly to: Vec3;
}

/** For each plate, the members whose bodies touch it. */
function touchesOf(plates: readonly Plate[], axes: readonly (EvidenceAxis | null)[], margin: number): Touch[][] {
  const touched: Touch[][] = plates.map(() => []);
  const boxes = new Float64Array(6 * plates.length);
  plates.forEach((plate, i) => {
    boxes.set(boundsOf(plate, margin), 6 * i);
  });
  const index = indexBoxes(boxes);
  axes.forEach((axis, member) => {
    for (const piece of axis === null ? [] : (axis.pieces ?? [axis])) {
      const halves = UPRIGHT.map((direction) => piece.halfExtent(direction));
      searchBoxes(index, boundsOfLine(piece.start, piece.finish, halves), (plate) => {
        const touch = touchOf(plates[plate]!, piece, member, margin);
        if (touch !== null) touched[plate]!.push(touch);
      });
    }
  });
  return touched;
}

const UPRIGHT: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

function touchOf(plate: Plate, axis: EvidenceAxis, member: number, margin: number): Touch | null {
  const line = subtract(axis.finish, axis.start);
  const away = subtract(axis.start, plate.centre);
  let [low, high] = [0, 1];
  for (const k of [0, 1, 2] as const) {
    const direction = plate.axes[k];
    const limit = plate.halfSizes[k] + axis.halfExtent(direction) + margin;
    const [at, step] = [dot(away, direction), dot(line, direction)];
    if (Math.abs(step) < 1e-12) {
      if (Math.abs(at) > limit) return null;
      continue;
    }
    const [first, second] = [(-limit - at) / step, (limit - at) / step];
    low = Math.max(low, Math.min(first, second));
    high = Math.min(high, Math.max(first, second));
    if (low > high) return null;
  }
  // Widened by its sides, a box reaches too far at its corners: seen along the member, body and plate must still touch.
  const length2 = dot(line, line);
  const gap = length2 > 0 ? subtract(away, scale(line, dot(away, line) / length2)) : away;
  const sideways = unit(gap);
  if (sideways !== null && norm(gap) > reachOf(plate, sideways) + axis.halfExtent(sideways) + margin) return null;
  return { member, from: along(axis.start, line, low), to: along(axis.start, line, high) };
}

/** How far a plate reaches from its centre in a unit direction. */
const reachOf = ({ axes, halfSizes }: Plate, direction: Vec3): number =>
  axes.reduce((sum, axis, k) => sum + halfSizes[k]! * Math.abs(dot(axis, direction)), 0);

function boundsOf(plate: Plate, margin: number): number[] {
  const reach = UPRIGHT.map((direction) => reachOf(plate, direction) + margin);
  return [...plate.centre.map((c, k) => c - reach[k]!), ...plate.centre.map((c, k) => c + reach[k]!)];
}

function boundsOfLine(from: Vec3, to: Vec3, halves: readonly number[]): number[] {
  return [
    ...from.map((c, k) => Math.min(c, to[k]!) - halves[k]!),
    ...from.map((c, k) => Math.max(c, to[k]!) + halves[k]!),
  ];
}

function isSheeting(plate: Plate, touches: readonly Touch[], axes: readonly (EvidenceAxis | null)[]): boolean {
  return touches.some(({ member, from, to }) => {
    const axis = axes[member]!;
    const beside = distance(from, to);
    const direction = unit(subtract(to, from));
    if (direction === null || !(beside > distance(axis.start, axis.finish) / 2)) return false;
    const extents = plate.axes.map((edge) => axis.halfExtent(unit(cross(direction, edge)) ?? edge));
    return beside > LAIN_ALONG * Math.max(...extents);
  });
}

/** The pairs among members that one plate touches which come near one another there. */
function closePairs(touches: readonly Touch[]): [number, number][] {
  const pairs: [number, number][] = [];
  const judge = (i: number, j: number): void => {
    const [a, b] = [touches[i]!, touches[j]!];
    if (a.member !== b.member && apart(a, b) <= ONE_JOINT) pairs.push([a.member, b.member]);
  };
  if (touches.length <= MOST_AT_JOINT) {
    for (let i = 0; i < touches.length; i++) for (let j = i + 1; j < touches.length; j++) judge(i, j);
    return pairs;
  }
  const half = ONE_JOINT / 2;
  const boxes = new Float64Array(touches.flatMap(({ from, to }) => boundsOfLine(from, to, [half, half, half])));
  const index = indexBoxes(boxes);
  touches.forEach((_, i) => {
    searchBoxes(index, boxes.subarray(6 * i, 6 * i + 6), (j) => {
      if (j > i) judge(i, j);
    });
  });
  return pairs;
}

/** Distance between two straight pieces: the nearest points of their lines, each held within its piece in turn. */
function apart(p: Touch, q: Touch): number {
  const [u, v, w] = [subtract(p.to, p.from), subtract(q.to, q.from), subtract(p.from, q.from)];
  const [uu, uv, vv] = [dot(u, u), dot(u, v), dot(v, v)];
  const clamp = (x: number) => Math.min(1, Math.max(0, Number.isFinite(x) ? x : 0));
  const square = uu * vv - uv * uv;
  let s = square > 1e-12 * uu * vv ? clamp((uv * dot(v, w) - vv * dot(u, w)) / square) : 0;
  const t = clamp((uv * s + dot(v, w)) / vv);
  s = clamp((uv * t - dot(u, w)) / uu);
  return norm(add(w, subtract(scale(u, s), scale(v, t))));
}

/** Pairs of plates, both touched by members, whose boxes touch one another. */
function facingPlates(
  plates: readonly Plate[],
  touched: readonly (readonly Touch[])[],
  margin: number,
): [number, number][] {
  const used = plates.flatMap((_, i) => (touched[i]!.length > 0 ? [i] : []));
  const boxes = new Float64Array(used.flatMap((plate) => boundsOf(plates[plate]!, margin / 2)));
  const index = indexBoxes(boxes);
  const pairs: [number, number][] = [];
  used.forEach((plate, i) => {
    searchBoxes(index, boxes.subarray(6 * i, 6 * i + 6), (j) => {
      if (j > i && boxesTouch(plates[plate]!, plates[used[j]!]!, margin)) pairs.push([plate, used[j]!]);
    });
  });
  return pairs;
}

/** By separating axes: the faces' normals of both boxes and the cross products of their edges. */
function boxesTouch(p: Plate, q: Plate, margin: number): boolean {
  const gap = subtract(q.centre, p.centre);
  const edges = p.axes.flatMap((a) => q.axes.map((b) => unit(cross(a, b))));
  return [...p.axes, ...q.axes, ...edges].every(
    (axis) => axis === null || Math.abs(dot(gap, axis)) <= reachOf(p, axis) + reachOf(q, axis) + margin,
  );
}
