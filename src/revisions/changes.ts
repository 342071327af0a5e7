import type { Result, ResultMember } from '../domain/result.ts';
import { cross, norm, subtract, UP, unit } from '../domain/vector.ts';
import type { Comparison } from './comparison.ts';
import { endShifts, type Matching, type Pair } from './match-members.ts';
import { partners } from './partners.ts';
import { workPoints } from './work-points.ts';

type Change = Comparison['changed'][number];

/** m: what exporters round by. */
export const STILL = 0.001;

/** The members found again that are not what they were, the farthest moved first. */
export function changedMembers(old: Result, now: Result, { pairs, added, removed }: Matching): Change[] {
  const [pointsBefore, pointsNow] = [workPoints(old), workPoints(now)];
  const own = pairs.map((pair): Change => {
    const [before, after] = [old.members[pair.old], now.members[pair.now]];
    // What moves with its neighbours' joints alone was not touched itself.
    const isRedrawn = endShifts(before.axis, after.axis)[1] > STILL;
    return {
      old: before.globalId,
      new: after.globalId,
      moved: isRedrawn ? endShifts(pointsBefore(before), pointsNow(after))[1] : 0,
      aside: isRedrawn ? sidewaysShift(before.axis, after.axis) : 0,
      section: fromTo(before, after, sectionName),
      material: fromTo(before, after, materialName),
      rejoined: false,
    };
  });
  const touched = {
    old: new Set(removed.map((index) => old.members[index].globalId)),
    new: new Set(added.map((index) => now.members[index].globalId)),
  };
  for (const change of own.filter(isChanged)) {
    touched.old.add(change.old);
    touched.new.add(change.new);
  }
  const rejoined = rejoinedPairs(old, now, pairs, touched);
  return own
    .map((change, k) => (rejoined.has(k) ? { ...change, rejoined: true } : change))
    .filter((change) => isChanged(change) || change.rejoined)
    .sort((p, q) => q.moved - p.moved || q.aside - p.aside);
}

/** An end that is only cut back anew changes nothing: the section that it meets has grown, and its joint is where it was. */
const isChanged = ({ moved, aside, section, material }: Change): boolean =>
  moved > STILL || aside > STILL || section !== null || material !== null;

/** m, of the ends of `after` from the line of `before`. */
function sidewaysShift([from, to]: ResultMember['axis'], after: ResultMember['axis']): number {
  const direction = unit(subtract(to, from)) ?? UP;
  return Math.max(...after.map((end) => norm(cross(subtract(end, from), direction))));
}

function fromTo(
  before: ResultMember,
  after: ResultMember,
  nameOf: (member: ResultMember) => string | null,
): [string | null, string | null] | null {
  const [from, to] = [nameOf(before), nameOf(after)];
  return from === to ? null : [from, to];
}

const sectionName = ({ section }: ResultMember): string | null => section?.name ?? null;

const materialName = ({ material }: ResultMember): string | null => material?.name ?? null;

interface Touched {
  readonly old: ReadonlySet<string>;
  readonly new: ReadonlySet<string>;
}

/**
 * Pairs that meet other members than they did. Where one of two members that meet anew was itself changed, the other is
 * as it was; and what a member that is gone, new or changed at the same node explains needs no saying.
 */
function rejoinedPairs(old: Result, now: Result, pairs: readonly Pair[], touched: Touched): Set<number> {
  const newOf = new Map(pairs.map((pair) => [old.members[pair.old].globalId, now.members[pair.now].globalId]));
  const oldOf = new Map([...newOf].map(([before, after]) => [after, before]));
  const [met, meets] = [partners(old), partners(now)];
  const found = new Set<number>();
  pairs.forEach((pair, k) => {
    const [before, after] = [old.members[pair.old].globalId, now.members[pair.now].globalId];
    const [lost, gained] = [
      [...(met.get(before) ?? [])].filter((one) => newOf.has(one) && !meets.get(after)?.has(newOf.get(one) ?? '')),
      [...(meets.get(after) ?? [])].filter((one) => oldOf.has(one) && !met.get(before)?.has(oldOf.get(one) ?? '')),
    ];
    if (lost.length + gained.length === 0) return;
    const isOwnDoing = touched.old.has(before);
    const unexplained = isOwnDoing
      ? lost.length + gained.length
      : [
          ...lost.filter((one) => !touched.old.has(one) && !isBridged(met, before, one, touched.old)),
          ...gained.filter((one) => !touched.new.has(one) && !isBridged(meets, after, one, touched.new)),
        ].length;
    if (unexplained > 0) found.add(k);
  });
  return found;
}

/** Whether two members meet, or met, a third one that was touched. */
function isBridged(
  meetings: ReadonlyMap<string, ReadonlySet<string>>,
  a: string,
  b: string,
  touched: ReadonlySet<string>,
): boolean {
  const others = meetings.get(b);
  return [...(meetings.get(a) ?? [])].some((one) => touched.has(one) && others?.has(one) === true);
}
