import { along, between, dot, scale, subtract, type Vec3 } from '../domain/vector.ts';
import { boxAround, facetsOf, mayMeet, rangeOf } from './along-axes.ts';
import { type Axis, approach, approachDirection, liesSquare, looksCrossed, sineBetween } from './axes.ts';
import { type PairEvidence, pairKey } from './evidence.ts';
import { type JoinOptions, TOLERANCE } from './options.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';

/** Two axes that come near each other, and where. */
export interface Contact {
  /** Members, a < b. */
  readonly a: number;
  readonly b: number;
  /** Distances along each axis from its start, m; below zero or beyond the length where an end is carried on. */
  readonly s: number;
  readonly t: number;
  readonly point: Vec3;
  /** `seat`: one sits on the other; `crossing`: both run through and only the brief or a third member joins them. */
  readonly kind: 'meets' | 'seat' | 'crossing';
  /** m by which the two axes have to be carried. */
  readonly cost: number;
  /** What was accepted, m: how far the ends that come here may be carried (null where none does), and how far the axes may pass. */
  readonly reach: number | null;
  readonly offset: number;
  /** Evidence that the two are joined ("plate GP-12", "assembly T1"). */
  readonly by: readonly string[];
  /** Whether the axes come near enough by themselves, without the evidence. */
  readonly isNear: boolean;
}

/** A contact with how near its limits it is: at most 1 is accepted. */
export interface JudgedContact {
  readonly contact: Contact;
  readonly ratio: number;
}

/** All pairs of axes that meet, sit or cross. */
export function findContacts(
  axes: readonly (Axis | null)[],
  options: JoinOptions,
  evidence: PairEvidence = new Map(),
): Contact[] {
  const present = axes.filter((axis) => axis !== null);
  const boxes = new Float64Array(6 * present.length);
  present.forEach((axis, i) => {
    boxes.set(boxAround(axis, largestReach(axis)), 6 * i);
  });
  const index = indexBoxes(boxes);
  const contacts: Contact[] = [];
  present.forEach((axis, i) => {
    searchBoxes(index, boxes.subarray(6 * i, 6 * i + 6), (j) => {
      if (j <= i) return;
      if (!evidence.has(pairKey(axis.member, present[j].member, axes.length))) accept(axis, present[j], NO_WORDS);
    });
  });
  for (const [key, words] of evidence) {
    const [a, b] = [axes[Math.floor(key / axes.length)], axes[key % axes.length]];
    if (a !== null && b !== null) accept(a, b, words);
  }
  return contacts.sort((p, q) => p.a - q.a || p.b - q.b || p.s - q.s);

  function accept(a: Axis, b: Axis, words: readonly string[]): void {
    const widening = words.length === 0 ? wideningFor(a, b) : TOLERANCE.withEvidence;
    for (const { contact, ratio, lines } of judgeMeetings(a, b, options, widening)) {
      if (ratio > 1) continue;
      const by = inOneAssembly(a, b) ? [...words, `assembly ${a.assembly?.name ?? a.assembly?.globalId}`] : words;
      if (by.length === 0) contacts.push(contact);
      else contacts.push({ ...contact, by, isNear: (judgePair(...lines, options, 1)?.ratio ?? 2) <= 1 });
    }
  }
}

const NO_WORDS: readonly string[] = [];

/**
 * No pair accepts a miss greater than the sum of its two axes' largest reaches: the one's notch and the other's half
 * extent (at most half the diagonal of a square section) over the least sine.
 */
export function largestReach(axis: Axis): number {
  const halfExtent = axis.depth * Math.SQRT1_2;
  const bySections = Math.max(halfExtent / TOLERANCE.leastSine, TOLERANCE.detailingGap, axis.depth);
  const bySection = TOLERANCE.sameAssembly * bySections + TOLERANCE.seatPacking;
  return Math.max(bySection, (axis.reach ?? 0) * TOLERANCE.sameAssembly, (axis.offset ?? 0) * TOLERANCE.sameAssembly);
}

/** A place where two members come together, with the lines that they follow there. */
export interface Meeting extends JudgedContact {
  readonly lines: readonly [Axis, Axis];
}

/** Wherever two members come together: straight ones in one place at most, an arch and its tie in two. */
export function judgeMeetings(a: Axis, b: Axis, options: JoinOptions, widening = wideningFor(a, b)): Meeting[] {
  if (a.facets === null && b.facets === null) {
    const judged = judgePair(a, b, options, widening);
    return judged === null ? [] : [{ ...judged, lines: [a, b] }];
  }
  const margin = TOLERANCE.nearMiss * (largestReach(a) + largestReach(b));
  const found: { readonly meeting: Meeting; readonly aside: number }[] = [];
  for (const p of facetsOf(a)) {
    for (const q of facetsOf(b)) {
      if (!mayMeet(p, q, margin)) continue;
      const judged = judgePair(p, q, options, widening);
      if (judged === null) continue;
      const aside = Math.max(asideOf(judged.contact.s, p), asideOf(judged.contact.t, q));
      if (aside <= 1) found.push({ meeting: { ...judged, lines: [p, q] }, aside });
    }
  }
  found.sort((p, q) => p.aside - q.aside || p.meeting.ratio - q.meeting.ratio);
  // Where two facets of one member meet a line next to each other, the one that it crosses within its own length counts.
  const size = Math.max(a.depth, b.depth, TOLERANCE.leastJoint);
  const kept: Meeting[] = [];
  for (const { meeting } of found) {
    const { s, t } = meeting.contact;
    const isKnown = kept.some(({ contact }) => Math.abs(contact.s - s) < size && Math.abs(contact.t - t) < size);
    if (!isKnown) kept.push(meeting);
  }
  return kept;
}

/** How far a place lies outside of a facet, as a share of half its length: beyond 1 it is another facet's. */
function asideOf(s: number, facet: Axis): number {
  const outside = Math.max(facet.span[0] - s, s - facet.span[1], 0);
  if (outside === 0) return 0;
  const [from, to] = rangeOf(facet);
  return (2 * outside) / (to - from);
}

/**
 * How two straight axes come together, if they do at all. Reach and offset, from the brief or the sections, are multiplied by
 * `widening`.
 */
export function judgePair(a: Axis, b: Axis, options: JoinOptions, widening = wideningFor(a, b)): JudgedContact | null {
  const sine = sineBetween(a, b);
  return sine < TOLERANCE.parallelSine ? judgeParallel(a, b, widening) : judgeSkew(a, b, sine, options, widening);
}

function judgeSkew(a: Axis, b: Axis, sine: number, options: JoinOptions, widening: number): JudgedContact | null {
  const { s, t, distance, normal } = approach(a, b);
  const [acrossB, acrossA] = [approachDirection(a, b), approachDirection(b, a)];
  const cosine = Math.abs(dot(a.direction, b.direction));
  const slant = runOnEachOther(a, b, s, t) ? Math.max(sine, TOLERANCE.facingSine) : sine;
  const reachA = (a.reach ?? reachOf(a, b.halfExtent(acrossB) + a.halfExtent(acrossA) * cosine, slant)) * widening;
  const reachB = (b.reach ?? reachOf(b, a.halfExtent(acrossA) + b.halfExtent(acrossB) * cosine, slant)) * widening;
  const extensionA = beyondEnds(s, a);
  const extensionB = beyondEnds(t, b);
  const lengthwise = Math.max(extensionA / reachA, extensionB / reachB);
  const [runsThroughA, runsThroughB] = [isInside(s, a, reachA), isInside(t, b, reachB)];
  const bothRunThrough = runsThroughA && runsThroughB;
  const reach = bothRunThrough ? null : Math.max(runsThroughA ? 0 : reachA, runsThroughB ? 0 : reachB);

  // A cleat between the two widens the offset; it makes no crossing of a seat.
  const plainOffset = setOffset(a, b) ?? offsetOf(a, b);
  const offset = plainOffset * widening;
  const seatHeight = normal === null ? 0 : a.halfExtent(normal) + b.halfExtent(normal);
  const lean = normal === null ? 0 : a.lean * a.halfExtent(normal) + b.lean * b.halfExtent(normal);
  const low = seatHeight * TOLERANCE.flangeSeat;
  const seatGap = Math.max(0, low - distance - lean, distance - seatHeight - lean);
  const maySit = options.seated === 'node' && (!bothRunThrough || looksLikeSeat(a, b, s, t));
  const seatMiss = maySit ? seatGap / (TOLERANCE.seatPacking * widening) : Number.POSITIVE_INFINITY;
  const sits = distance > plainOffset && seatMiss < Math.max(1, distance / offset);
  const sideways = sits ? seatMiss : distance / offset;
  const kind = sits ? 'seat' : bothRunThrough ? 'crossing' : 'meets';
  const cost = extensionA + extensionB + (sits ? seatGap : distance);
  const point = between(along(a.start, a.direction, s), along(b.start, b.direction, t), 0.5);
  const contact = {
    a: a.member,
    b: b.member,
    s,
    t,
    point,
    kind,
    cost,
    reach,
    offset,
    by: NO_WORDS,
    isNear: true,
  } as const;
  return { contact, ratio: Math.max(lengthwise, sideways) };
}

/**
 * Whether two members end here and leave the place on opposite sides, as a web over a column does: such ends face each
 * other and do not run into each other's sides, however slanting their axes cross.
 */
function runOnEachOther(a: Axis, b: Axis, s: number, t: number): boolean {
  const end = (station: number, { length, depth }: Axis) => (station < depth ? 1 : station > length - depth ? -1 : 0);
  return dot(a.direction, b.direction) * end(s, a) * end(t, b) < 0;
}

/** Parallel axes meet where two ends face each other: splices, a chord's ridge, a bar run on by the next. */
function judgeParallel(a: Axis, b: Axis, widening: number): JudgedContact | null {
  const reach = (setReach(a, b) ?? reachOf(a, 0, 1) + reachOf(b, 0, 1)) * widening;
  const offset = (setOffset(a, b) ?? offsetOf(a, b)) * widening;
  const sameWay = dot(a.direction, b.direction) > 0;
  let best: JudgedContact | null = null;
  for (const endA of [0, 1]) {
    const endB = sameWay ? 1 - endA : endA;
    if (!endsHere(a, endA) || !endsHere(b, endB)) continue;
    const p = endA === 0 ? a.start : a.finish;
    const q = endB === 0 ? b.start : b.finish;
    const outward = scale(a.direction, endA === 0 ? -1 : 1);
    const gap = subtract(q, p);
    const lengthwise = dot(gap, outward);
    const sideways = subtract(gap, scale(outward, lengthwise));
    const aside = Math.hypot(...sideways);
    const ratio = Math.max(Math.abs(lengthwise) / reach, aside / offset);
    if (best !== null && best.ratio <= ratio) continue;
    const half = lengthwise / 2;
    const s = endA === 0 ? -half : a.length + half;
    const t = endB === 0 ? -half : b.length + half;
    const cost = Math.abs(lengthwise) + aside;
    const point = between(p, q, 0.5);
    const limits = { reach, offset, by: NO_WORDS, isNear: true };
    best = { contact: { a: a.member, b: b.member, s, t, point, kind: 'meets', cost, ...limits }, ratio };
  }
  return best;
}

/** Whether a bent member's start (0) or finish (1) lies on this facet; a straight one's always does. */
const endsHere = ({ span }: Axis, end: number): boolean => !Number.isFinite(span[end]);

/** How far an end of `own` may be carried to a member that has this half extent on its way (METHODS 2.2). */
function reachOf(own: Axis, halfExtentMet: number, sine: number): number {
  const notch = Math.max(TOLERANCE.detailingGap, TOLERANCE.ownDepthShare * own.depth);
  const reach = halfExtentMet / Math.max(sine, TOLERANCE.leastSine) + notch;
  return Math.min(reach, TOLERANCE.mostOfLength * own.length);
}

const offsetOf = (a: Axis, b: Axis): number =>
  Math.min(Math.max(TOLERANCE.leastOffset, Math.max(a.depth, b.depth) / 2), TOLERANCE.mostOffset);

/** What the brief sets for two members that meet: the greater where it sets both. */
const greater = (p: number | null, q: number | null): number | null =>
  p === null || q === null ? (p ?? q) : Math.max(p, q);

const setReach = (a: Axis, b: Axis): number | null => greater(a.reach, b.reach);

const setOffset = (a: Axis, b: Axis): number | null => greater(a.offset, b.offset);

const inOneAssembly = (a: Axis, b: Axis): boolean =>
  a.assembly !== null && a.assembly.globalId === b.assembly?.globalId;

const wideningFor = (a: Axis, b: Axis): number => (inOneAssembly(a, b) ? TOLERANCE.sameAssembly : 1);

const beyondEnds = (s: number, axis: Axis): number => Math.max(0, -s, s - axis.length);

const isInside = (s: number, axis: Axis, reach: number): boolean => s > reach && s < axis.length - reach;

/**
 * A continuous purlin over a continuous chord lies square to it and sits; bracing that slants by under a purlin, or a thin
 * rod by a deep member, only passes.
 */
function looksLikeSeat(a: Axis, b: Axis, s: number, t: number): boolean {
  const slender = Math.min(a.depth, b.depth) < 0.4 * Math.max(a.depth, b.depth);
  return liesSquare(a, b) && !slender && !looksCrossed(a, b, s, t);
}
