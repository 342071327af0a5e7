import { type Finding, finding } from '../domain/finding.ts';
import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Truss } from '../domain/truss.ts';
import { distance, type Vec3 } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { type Axis, distanceToAxis } from './axes.ts';
import { boxAround, judgePair, largestReach } from './contacts.ts';
import { labelOf } from './labels.ts';
import { type JoinOptions, TOLERANCE } from './options.ts';
import { isFreeEnd, type Overhang } from './overhangs.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';

const STEEP = Math.sin(Math.PI / 3);

/** Every end that no joint took and nothing supports: a near miss where another axis is close, else a loose end. */
export function looseEndFindings(
  truss: Truss,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  supported: ReadonlySet<number>,
  options: JoinOptions,
  placeOf: PlaceNamer,
): Finding[] {
  const search = nearMissSearch(axes, options);
  const ends = freeEnds(truss, axes);
  const endsOf = new Map<Axis, FreeEnd[]>();
  for (const end of ends) pushTo(endsOf, end.axis, end);
  const findings: Finding[] = [];
  for (const end of ends) {
    if (supported.has(end.node)) continue;
    const miss = search(end);
    const isFoot = end.axis.direction[2] * (end.atStart ? 1 : -1) > STEEP && supported.size === 0;
    if (miss !== null) findings.push(nearMiss(end, miss, members, placeOf));
    else if (!isFoot && !isLone(end)) findings.push(looseEnd(end, members, placeOf));
  }
  return findings;

  /** Both ends of a lone bar are free; that is one finding of its own. */
  function isLone({ axis }: FreeEnd): boolean {
    return endsOf.get(axis)?.length === 2;
  }
}

interface FreeEnd {
  readonly axis: Axis;
  readonly node: number;
  readonly at: Vec3;
  readonly atStart: boolean;
}

interface Miss {
  readonly other: Axis;
  readonly gap: number;
  readonly ratio: number;
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
  return ({ axis, at, atStart }) => {
    const margin = TOLERANCE.nearMiss * largestReach(axis);
    let best: Miss | null = null;
    const box = [...at.map((x) => x - margin), ...at.map((x) => x + margin)];
    searchBoxes(index, box, (i) => {
      const other = present[i];
      if (other === axis) return;
      const judged = judgePair(axis, other, options);
      if (judged === null || judged.ratio > TOLERANCE.nearMiss || judged.contact.kind === 'crossing') return;
      const { s } = judged.contact;
      if (s < axis.length / 2 !== atStart) return;
      const { distance: gap } = distanceToAxis(at, other);
      if (gap > TOLERANCE.nearMiss * largestGap(axis, other)) return;
      if (
        best === null ||
        judged.ratio < best.ratio ||
        (judged.ratio === best.ratio && other.member < best.other.member)
      )
        best = { other, gap, ratio: judged.ratio };
    });
    return best;
  };
}

/** What a joint of the two could bridge straight across, however slanting they meet. */
function largestGap(own: Axis, other: Axis): number {
  return Math.max(own.reach ?? 0, own.depth, other.depth) + TOLERANCE.detailingGap;
}

function nearMiss(end: FreeEnd, miss: Miss, members: readonly Member[], placeOf: PlaceNamer): Finding {
  const own = members[end.axis.member];
  const other = members[miss.other.member];
  return finding(
    'near-miss',
    `An end of ${labelOf(own)} misses ${labelOf(other)} by ${millimetres(miss.gap)} and joins nothing.`,
    `Carry the end of ${labelOf(own)} on to the axis of ${labelOf(other)}, or widen the reach in the brief if the gap is meant.`,
    {
      members: [own.globalId, other.globalId],
      nodes: [end.node],
      at: end.at,
      place: placeOf(end.at),
      gap: miss.gap,
    },
  );
}

function looseEnd(end: FreeEnd, members: readonly Member[], placeOf: PlaceNamer): Finding {
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
