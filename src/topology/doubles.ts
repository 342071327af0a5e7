import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import { add, along, dot, meanOf, norm, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { boxAround, chordOf, middleOf } from './along-axes.ts';
import { type Axis, sineBetween } from './axes.ts';
import { labelOf } from './labels.ts';
import type { JoinOptions } from './options.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';

const PARALLEL = 0.02;
/** Bodies that share more than this of their length are one member drawn twice, or a pair side by side. */
const MOST_OF_LENGTH = 0.5;
/** Bodies whose axes are nearer than this share of their touching distance interpenetrate. */
const INTERPENETRATION = 0.5;
/** Axes nearer than this, m, have no direction between them worth asking for. */
const COINCIDENT = 1e-4;
/** Two of a pair are cut alike: their ends differ by less than this share of their depth. */
const SAME_LENGTH = 0.5;
/** Depths of one section, named or rounded in two ways. */
const SAME_DEPTH = 0.9;
/** Two that bow alike do so to this share of their depth. */
const SAME_BOW = 0.25;
/** Members in line may run into each other by this share of their depth, as mitred and notched ends do. */
const NOTCH = 1.5;

type Relation = 'twins' | 'pair' | 'overlap';

export interface Doubles {
  /** The axes to join: twins left out, pairs as one axis that stands for both. */
  readonly axes: (Axis | null)[];
  readonly findings: Finding[];
}

/** Members side by side or in one another: drawn twice, meant as a pair, or overlapping by mistake. */
export function resolveDoubles(
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  options: JoinOptions,
  placeOf: PlaceNamer,
): Doubles {
  const joined = [...axes];
  const findings: Finding[] = [];
  for (const { a, b, relation } of relatedPairs(axes)) {
    const [first, second] = [joined[a.member], joined[b.member]];
    if (first === null || second === null || first.also.length > 0) continue;
    if (relation === 'twins') {
      const [kept, out] = dataOf(members[b.member]) > dataOf(members[a.member]) ? [b, a] : [a, b];
      joined[out.member] = null;
      findings.push(twinFinding(members[kept.member], members[out.member], middleOf(out), placeOf));
    } else if (relation === 'overlap') {
      findings.push(overlapFinding(members[a.member], members[b.member], sharedMiddle(a, b), overlapOf(a, b), placeOf));
    } else if (options.pairs === 'one' && alike(members[a.member], members[b.member])) {
      joined[a.member] = asOne(a, b);
      joined[b.member] = null;
      findings.push(pairFinding(members[a.member], members[b.member], middleOf(a), norm(asideOf(a, b)), placeOf));
    }
  }
  return { axes: joined, findings };
}

/** Pairs of parallel axes with bodies that touch or nearly do: twins first, in the order of the members. */
function relatedPairs(axes: readonly (Axis | null)[]) {
  const present = axes.filter((axis) => axis !== null);
  const boxes = new Float64Array(6 * present.length);
  present.forEach((axis, i) => {
    boxes.set(boxAround(axis, axis.depth), 6 * i);
  });
  const index = indexBoxes(boxes);
  const found: { a: Axis; b: Axis; relation: Relation }[] = [];
  present.forEach((a, i) => {
    searchBoxes(index, boxes.subarray(6 * i, 6 * i + 6), (j) => {
      const b = present[j];
      const relation = j > i ? relationOf(a, b) : null;
      if (relation !== null) found.push({ a, b, relation });
    });
  });
  const rank = { twins: 0, pair: 1, overlap: 2 };
  return found.sort(
    (p, q) => rank[p.relation] - rank[q.relation] || p.a.member - q.a.member || p.b.member - q.b.member,
  );
}

/** Bent members are doubles where their chords are and they bow alike. */
function relationOf(a: Axis, b: Axis): Relation | null {
  if (a.facets === null && b.facets === null) return relationOfStraight(a, b);
  if (a.facets === null || b.facets === null) return null;
  const [p, q] = [chordOf(a), chordOf(b)];
  const relation = relationOfStraight(p, q);
  if (relation === null || relation === 'overlap') return null;
  const bows = [
    [a, p],
    [b, q],
  ].map(([whole, chord]) => subtract(middleOf(whole), middleOf(chord)));
  return norm(subtract(bows[0], bows[1])) < SAME_BOW * Math.max(a.depth, b.depth) ? relation : null;
}

function relationOfStraight(a: Axis, b: Axis): Relation | null {
  if (sineBetween(a, b) > PARALLEL) return null;
  const overlap = overlapOf(a, b);
  const depth = Math.max(a.depth, b.depth);
  if (overlap < NOTCH * depth) return null;
  const aside = asideOf(a, b);
  const distance = norm(aside);
  const touching =
    distance < COINCIDENT ? Number.POSITIVE_INFINITY : touchingDistance(a, b, scale(aside, 1 / distance));
  const mostly = overlap > MOST_OF_LENGTH * Math.max(a.length, b.length);
  if (distance < INTERPENETRATION * touching) return mostly && depthsAgree(a, b) ? 'twins' : 'overlap';
  const cutAlike = Math.max(Math.abs(a.length - b.length), a.length - overlap) < SAME_LENGTH * depth;
  return cutAlike && distance < touching + depth ? 'pair' : null;
}

/** One member drawn twice has one section: anything else in the same place is another part. */
const depthsAgree = (a: Axis, b: Axis): boolean =>
  a.sectionName === b.sectionName || Math.min(a.depth, b.depth) > SAME_DEPTH * Math.max(a.depth, b.depth);

const touchingDistance = (a: Axis, b: Axis, normal: Vec3): number => a.halfExtent(normal) + b.halfExtent(normal);

/** Length over which two parallel axes run side by side, m. */
function overlapOf(a: Axis, b: Axis): number {
  const stations = [b.start, b.finish].map((p) => dot(subtract(p, a.start), a.direction));
  return Math.min(Math.max(...stations), a.length) - Math.max(Math.min(...stations), 0);
}

/** From the line of `a`, square to it, to the middle of `b`; of bent ones, from chord to chord. */
function asideOf(a: Axis, b: Axis): Vec3 {
  const arm = subtract(middleOf(chordOf(b)), a.start);
  return subtract(arm, scale(a.direction, dot(arm, a.direction)));
}

function sharedMiddle(a: Axis, b: Axis): Vec3 {
  const stations = [b.start, b.finish].map((p) => dot(subtract(p, a.start), a.direction));
  const from = Math.max(Math.min(...stations), 0);
  const to = Math.min(Math.max(...stations), a.length);
  return along(a.start, a.direction, (from + to) / 2);
}

const alike = (a: Member, b: Member): boolean =>
  a.section !== null && b.section !== null && Math.abs(a.section.area - b.section.area) < 0.01 * a.section.area;

/** The axis halfway between two of a pair. */
function asOne(a: Axis, b: Axis): Axis {
  const sameWay = dot(a.direction, b.direction) > 0;
  const start = meanOf([a.start, sameWay ? b.start : b.finish]);
  const finish = meanOf([a.finish, sameWay ? b.finish : b.start]);
  const half = scale(asideOf(a, b), 0.5);
  const line = subtract(finish, start);
  const halfExtentWith = (own: Axis) => (direction: Vec3) =>
    Math.abs(dot(half, direction)) + Math.max(own.halfExtent(direction), b.halfExtent(direction));
  const common = { also: [b.member], direction: unit(line) ?? a.direction, halfExtent: halfExtentWith(a) };
  if (a.facets === null) return { ...a, ...common, start, finish, length: norm(line) };
  const beside = (own: Axis): Axis => ({
    ...own,
    also: [b.member],
    start: add(own.start, half),
    finish: add(own.finish, half),
    halfExtent: halfExtentWith(own),
  });
  return { ...beside(a), facets: a.facets.map(beside) };
}

const dataOf = (member: Member): number =>
  Object.values(member).filter((value) => value !== null).length + (member.material.from === 'default' ? 0 : 1);

function twinFinding(kept: Member, out: Member, at: Vec3, placeOf: PlaceNamer): Finding {
  return finding(
    'twin-members',
    `${labelOf(out)} is drawn over ${labelOf(kept)}: one member twice. Only ${labelOf(kept)} is in the truss.`,
    `Delete ${labelOf(out)}, or move it to where it belongs.`,
    { members: [kept.globalId, out.globalId], at, place: placeOf(at) },
  );
}

function overlapFinding(a: Member, b: Member, at: Vec3, overlap: number, placeOf: PlaceNamer): Finding {
  return finding(
    'overlap',
    `${labelOf(a)} and ${labelOf(b)} run in one another for ${millimetres(overlap)}.`,
    'Cut them back to meet end to end, or delete the one that is too much.',
    { members: [a.globalId, b.globalId], at, place: placeOf(at), gap: overlap },
  );
}

function pairFinding(a: Member, b: Member, at: Vec3, apart: number, placeOf: PlaceNamer): Finding {
  return finding(
    'pair-joined',
    `${labelOf(a)} and ${labelOf(b)} run side by side, axes ${millimetres(apart)} apart, and are one bar: their areas add.`,
    'Say `joints: {pairs: apart}` in the brief where they are two bars.',
    { members: [a.globalId, b.globalId], at, place: placeOf(at), gap: apart },
  );
}
