import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Truss } from '../domain/truss.ts';
import { distance, type Vec3 } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { boxAround, distanceToAxis } from './along-axes.ts';
import type { Axis } from './axes.ts';
import { type Contact, judgeMeetings, largestReach } from './contacts.ts';
import { labelOf } from './labels.ts';
import { type JoinOptions, TOLERANCE } from './options.ts';
import { isFreeEnd, type Overhang } from './overhangs.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';
import { stationOf } from './stations.ts';

const STEEP = Math.sin(Math.PI / 3);

/** An end that nothing else meets. */
export interface FreeEnd {
  readonly axis: Axis;
  readonly node: number;
  readonly at: Vec3;
  readonly atStart: boolean;
}

/** A free end with the axis it should probably meet. */
export interface Miss {
  readonly end: FreeEnd;
  readonly other: Axis;
  /** m, from the end straight to the nearest point of the other axis. */
  readonly gap: number;
  /** m by which the end would have to be carried along its own axis, and how far it may be; null where it is the other that ends. */
  readonly lengthwise: number;
  readonly reach: number | null;
  /** m by which the other member ends short of the place. */
  readonly beyond: number;
  /** m by which the two lines pass each other, and how far they may. */
  readonly sideways: number;
  readonly offset: number;
}

/** Every end that no joint took and nothing supports: a miss where another axis is close, else loose. */
export function findLooseEnds(
  truss: Truss,
  axes: readonly (Axis | null)[],
  supported: ReadonlySet<number>,
  options: JoinOptions,
): { misses: Miss[]; loose: FreeEnd[] } {
  const ends = freeEnds(truss, axes);
  const misses: Miss[] = [];
  const loose: FreeEnd[] = [];
  if (ends.length === 0) return { misses, loose };
  const search = nearMissSearch(axes, options);
  const endsOf = new Map<Axis, number>();
  for (const { axis } of ends) endsOf.set(axis, (endsOf.get(axis) ?? 0) + 1);
  for (const end of ends) {
    if (supported.has(end.node)) continue;
    const miss = search(end);
    const isFoot = end.axis.direction[2] * (end.atStart ? 1 : -1) > STEEP && supported.size === 0;
    // Both ends of a lone bar are free; that is one finding of its own.
    const isLone = endsOf.get(end.axis) === 2;
    if (miss !== null) misses.push(miss);
    else if (!isFoot && !isLone) loose.push(end);
  }
  return { misses, loose };
}

function freeEnds(truss: Truss, axes: readonly (Axis | null)[]): FreeEnd[] {
  const count = new Int32Array(truss.nodes.length);
  for (const { from, to } of truss.bars) {
    count[from]++;
    count[to]++;
  }
  return truss.bars.flatMap((bar) =>
    [bar.from, bar.to].flatMap((node) => {
      if (count[node] !== 1 || !isFreeEnd(truss, node, bar)) return [];
      const { at, members } = truss.nodes[node];
      const axis = members.map((member) => axes[member]).find((one) => one !== null);
      return axis ? [{ axis, node, at, atStart: distance(at, axis.start) < distance(at, axis.finish) }] : [];
    }),
  );
}

function nearMissSearch(axes: readonly (Axis | null)[], options: JoinOptions): (end: FreeEnd) => Miss | null {
  const present = axes.filter((axis) => axis !== null);
  const boxes = new Float64Array(6 * present.length);
  present.forEach((axis, i) => {
    boxes.set(boxAround(axis, TOLERANCE.nearMiss * largestReach(axis)), 6 * i);
  });
  const index = indexBoxes(boxes);
  return (end) => {
    const { axis, at, atStart } = end;
    const margin = TOLERANCE.nearMiss * largestReach(axis);
    const found: Candidate[] = [];
    const box = [...at.map((x) => x - margin), ...at.map((x) => x + margin)];
    searchBoxes(index, box, (i) => {
      const other = present[i];
      if (other === axis) return;
      const { distance: gap } = distanceToAxis(at, other);
      if (gap > TOLERANCE.nearMiss * largestGap(axis, other)) return;
      for (const { contact, ratio, lines } of judgeMeetings(axis, other, options)) {
        if (ratio > TOLERANCE.nearMiss || contact.kind === 'crossing') continue;
        const s = stationOf(contact, axis.member);
        if (s < axis.length / 2 !== atStart) continue;
        const miss = { end, other, gap, ...missOf(contact, s, lines) };
        found.push({ miss, ratio, s, runsOn: runsThrough(contact, other) });
      }
    });
    return likeliest(found)?.miss ?? null;
  };
}

interface Candidate {
  readonly miss: Miss;
  readonly ratio: number;
  readonly s: number;
  /** Whether the other member runs on past the place. */
  readonly runsOn: boolean;
}

/**
 * The nearest by its own limits; of several at one joint the member that runs through it, which the others end on too,
 * and where none does the deepest: webs are slighter than the chord they end on.
 */
function likeliest(found: readonly Candidate[]): Candidate | null {
  if (found.length === 0) return null;
  const least = (some: readonly Candidate[]) => some.reduce((best, one) => (isNearer(one, best) ? one : best));
  const nearest = least(found);
  if (nearest.runsOn) return nearest;
  const size = nearest.miss.end.axis.depth + TOLERANCE.detailingGap;
  const there = found.filter(({ s }) => Math.abs(s - nearest.s) <= size);
  const through = there.filter(({ runsOn }) => runsOn);
  if (through.length > 0) return least(through);
  const deepest = Math.max(...there.map(({ miss }) => miss.other.depth));
  return least(there.filter(({ miss }) => miss.other.depth === deepest));
}

const isNearer = (a: Candidate, b: Candidate): boolean =>
  a.ratio < b.ratio || (a.ratio === b.ratio && a.miss.other.member < b.miss.other.member);

function runsThrough(contact: Contact, other: Axis): boolean {
  const t = stationOf(contact, other.member);
  const margin = other.depth + TOLERANCE.detailingGap;
  return t > margin && t < other.length - margin;
}

/** What a joint of the two could bridge straight across, however slanting they meet. */
function largestGap(own: Axis, other: Axis): number {
  return Math.max(own.reach ?? 0, own.depth, other.depth) + TOLERANCE.detailingGap;
}

function missOf(
  contact: Contact,
  s: number,
  [own, other]: readonly [Axis, Axis],
): Pick<Miss, 'lengthwise' | 'reach' | 'beyond' | 'sideways' | 'offset'> {
  const { cost, reach, offset } = contact;
  const t = stationOf(contact, other.member);
  const lengthwise = Math.max(0, -s, s - own.length);
  const beyond = Math.max(0, -t, t - other.length);
  return { lengthwise, reach, beyond, sideways: Math.max(0, cost - lengthwise - beyond), offset };
}

export function looseEndFinding(end: FreeEnd, members: readonly Member[], placeOf: PlaceNamer): Finding {
  const own = members[end.axis.member];
  return finding(
    'loose-end',
    `An end of ${labelOf(own)} joins nothing, and no other member is near.`,
    `Join it to what it should meet, or name a support there in the brief.`,
    { members: [own.globalId], nodes: [end.node], at: end.at, place: placeOf(end.at) },
  );
}

/** A tail past the last joint carries nothing: it may be meant (an eaves overhang), or an end drawn too long. */
export function overhangFindings(
  tails: readonly Overhang[],
  members: readonly Member[],
  placeOf: PlaceNamer,
): Finding[] {
  return tails.map(({ members: own, length, at }) =>
    finding(
      'loose-end',
      `${labelOf(members[own[0]])} runs ${millimetres(length)} past its last joint and ends there; the tail is cut off, its weight stays.`,
      'Shorten it to its joint, or join its end to what it should meet; an overhang that is meant needs nothing.',
      { members: own.map((member) => members[member].globalId), at, place: placeOf(at), gap: length },
    ),
  );
}
