import { type Finding, finding } from '../domain/finding.ts';
import { pushTo } from '../domain/group.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import { millimetres } from '../domain/words.ts';
import type { Axis } from './axes.ts';
import { labelOf } from './labels.ts';
import type { Miss } from './loose-ends.ts';
import { endKind, type JoinedEnds, joinedEnds } from './regularity/end-kinds.ts';
import type { MemberRole } from './regularity/roles.ts';
import type { VertexGraph } from './vertices.ts';

export interface Pattern {
  readonly axes: readonly (Axis | null)[];
  readonly graph: VertexGraph;
  readonly roles: readonly (MemberRole | null)[];
}

/** So many ends that miss alike, and at least this share of those of their kind that are joined, are a detail and no slips. */
const FEWEST_ALIKE = 3;
const SHARE_ALIKE = 0.25;
/** Gaps of one detail differ by less than this, m, or by less than this share. */
const SAME_GAP = 0.005;
const SAME_SHARE = 0.03;

/** Misses of one kind of end over one gap, with the ends of that kind that are joined. */
interface Detail {
  readonly misses: readonly Miss[];
  readonly joined: JoinedEnds;
}

/**
 * Near misses, the likeliest slips first: an end astray among many of its kind that are joined comes before one of a
 * kind that has few others; a detail that is the same everywhere comes last and is told once.
 */
export function nearMissFindings(
  misses: readonly Miss[],
  members: readonly Member[],
  pattern: Pattern,
  placeOf: PlaceNamer,
): Finding[] {
  if (misses.length === 0) return [];
  return detailsOf(misses, pattern)
    .sort((p, q) => likelihood(q) - likelihood(p))
    .map((detail) =>
      detail.misses.length === 1
        ? oneMiss(detail.misses[0], detail.joined, members, pattern, placeOf)
        : sameEverywhere(detail, members, pattern, placeOf),
    );
}

/** How likely a modelling slip is: joined ends of the kind for each that misses; less than any single miss where it is a pattern. */
const likelihood = ({ misses, joined }: Detail): number =>
  misses.length === 1 ? joined.count : joined.count / misses.length - 1;

function detailsOf(misses: readonly Miss[], pattern: Pattern): Detail[] {
  const byKind = new Map<string, Miss[]>();
  for (const miss of misses) pushTo(byKind, kindOf(miss, pattern), miss);
  const joined = joinedEnds(new Set(byKind.keys()), pattern.axes, pattern.graph, pattern.roles);
  return [...byKind].flatMap(([kind, own]) => {
    const those = joined.get(kind) ?? { count: 0, farthest: 0 };
    return byGap(own).flatMap((alike): Detail[] =>
      alike.length >= FEWEST_ALIKE && alike.length >= SHARE_ALIKE * those.count
        ? [{ misses: alike, joined: those }]
        : alike.map((miss) => ({ misses: [miss], joined: those })),
    );
  });
}

const kindOf = ({ end, other }: Miss, { roles }: Pattern): string =>
  endKind(end.axis, roles[end.axis.member], roles[other.member]);

/** Groups of one gap, in the order of their first ends. */
function byGap(misses: readonly Miss[]): Miss[][] {
  const groups: Miss[][] = [];
  for (const miss of [...misses].sort((p, q) => p.gap - q.gap)) {
    const group = groups[groups.length - 1];
    const least = group?.[0].gap;
    if (least !== undefined && miss.gap - least <= Math.max(SAME_GAP, SAME_SHARE * least)) group.push(miss);
    else groups.push([miss]);
  }
  const order = new Map(misses.map((miss, i) => [miss, i]));
  const rank = (miss: Miss) => order.get(miss) as number;
  for (const group of groups) group.sort((p, q) => rank(p) - rank(q));
  return groups.sort((p, q) => rank(p[0]) - rank(q[0]));
}

function oneMiss(
  miss: Miss,
  joined: JoinedEnds,
  members: readonly Member[],
  pattern: Pattern,
  placeOf: PlaceNamer,
): Finding {
  const { end, other, gap } = miss;
  const [own, met] = [members[end.axis.member], members[other.member]];
  const others =
    joined.count === 0
      ? ''
      : `; ${joined.count === 1 ? 'one other end' : `${joined.count} other ends`} of this kind (${kindWords(miss, pattern)}) ${joined.count === 1 ? 'meets its' : 'meet their'} ${metWord(miss, pattern)} over at most ${millimetres(joined.farthest)}`;
  return finding(
    'near-miss',
    `An end of ${labelOf(own)} misses ${labelOf(met)} by ${millimetres(gap)} and joins nothing${others}.`,
    `${mend(miss, labelOf(own), labelOf(met))}, or widen the reach in the brief if the gap is meant.`,
    { members: [own.globalId, met.globalId], nodes: [end.node], at: end.at, place: placeOf(end.at), gap },
  );
}

/** The change to the model that closes the gap: carrying the end on where its line comes to the other, else straight there. */
function mend({ lengthwise, sideways, beyond, offset, gap }: Miss, own: string, met: string): string {
  if (sideways <= offset && beyond <= offset && lengthwise > 0)
    return `Carry the end of ${own} on by ${millimetres(lengthwise)} to the axis of ${met}`;
  return `Move the end of ${own} by ${millimetres(gap)} straight on to the axis of ${met}`;
}

/** Reach asked for is rounded up to this, m. */
const ROUND = 0.01;

function sameEverywhere(
  { misses, joined }: Detail,
  members: readonly Member[],
  pattern: Pattern,
  placeOf: PlaceNamer,
): Finding {
  const [first] = misses;
  const gaps = misses.map(({ gap }) => gap);
  const [least, most] = [Math.min(...gaps), Math.max(...gaps)].map(millimetres);
  const span = least === most ? most : `${least} to ${most}`;
  const own = misses.map(({ end }) => members[end.axis.member].globalId);
  const met = misses.map(({ other }) => members[other.member].globalId);
  return finding(
    'near-miss',
    `${misses.length} ends of one kind (${kindWords(first, pattern)}) miss their ${metWord(first, pattern)} by ${span} and join nothing: the same at all ${misses.length}, so it may be the detail that is meant${joined.count === 0 ? '' : `; ${joined.count} more of this kind are joined`}.`,
    `If a plate bridges the gap, ${widened(misses)}; if not, ${lowerFirst(mend(first, 'each', 'what it should meet'))}.`,
    {
      members: [...new Set([...own, ...met])],
      nodes: misses.map(({ end }) => end.node),
      at: first.end.at,
      place: placeOf(first.end.at),
      gap: first.gap,
    },
  );
}

/**
 * What joins these members all the same: reach or offset in the brief, only what is short for them, and for them alone. Where their
 * lines come together far from their ends no such number is sound, and the plate itself has to be in the model.
 */
function widened(misses: readonly Miss[]): string {
  const most = (of: (miss: Miss) => number) => Math.max(...misses.map(of));
  const section = misses[0].end.axis.sectionName;
  const on = section === null ? 'class: IfcMember' : `section: "${section}"`;
  const line = (limit: string, use: number) =>
    `\`joints: {${limit}: [{on: {${on}}, use: ${millimetres(Math.ceil((use + 1e-6) / ROUND) * ROUND)}}]}\``;
  const along = most(({ lengthwise, beyond }) => Math.max(lengthwise, beyond));
  const aside = most(({ sideways }) => sideways);
  const isShort = misses.some(({ lengthwise, beyond, reach }) => Math.max(lengthwise, beyond) > (reach ?? 0));
  const isAside = misses.some(({ sideways, offset }) => sideways > offset);
  const lines = [...(isShort ? [line('reach', along)] : []), ...(isAside ? [line('offset', aside)] : [])];
  if (lines.length === 0 || Math.max(along, aside) > MUCH * most(({ gap }) => gap))
    return 'model the plate: one that touches both joins them';
  return `say ${lines.join(' and ')} in the brief`;
}

/** Of the gap itself. */
const MUCH = 1.5;

const lowerFirst = (words: string): string => words.charAt(0).toLowerCase() + words.slice(1);

function kindWords({ end: { axis } }: Miss, { roles }: Pattern): string {
  return [axis.sectionName, roles[axis.member]].filter((word) => word).join(' ') || 'no section';
}

const metWord = ({ other }: Miss, { roles }: Pattern): string => roles[other.member] ?? 'member';
