import { pushTo } from '../domain/group.ts';
import type { ResultMember } from '../domain/result.ts';
import { distance, type Vec3 } from '../domain/vector.ts';
import { indexBoxes, searchBoxes } from '../topology/spatial-index.ts';

/** A member of the old result and the one it became: indices into `members`. */
export interface Pair {
  readonly old: number;
  readonly now: number;
  readonly by: 'globalId' | 'geometry';
}

export interface Matching {
  /** In the order of the old members. */
  readonly pairs: readonly Pair[];
  readonly added: readonly number[];
  readonly removed: readonly number[];
}

/** m by which an end may have moved, where section and length fit. */
const MOST_MOVED = 0.5;
/** m within which an end is in the same place, whatever else changed. */
const SAME_PLACE = 0.02;
/** Lengths fit within this share, or within this, m: ends are cut back anew. */
const LENGTH_SHARE = 0.02;
const LENGTH_ROOM = 0.02;
/** m that another section or another name weighs against: of two that lie alike the more alike is taken. */
const OTHER_SECTION = 0.05;
const OTHER_NAME = 0.02;

/**
 * Finds each old member again: by its GlobalId, else by where it lies with section and length, since an exporter may give
 * every element a new GlobalId. Nearest pairs are taken first, each member once.
 */
export function matchMembers(old: readonly ResultMember[], now: readonly ResultMember[]): Matching {
  const pairs: Pair[] = [];
  const [left, free] = [new Set(old.keys()), new Set(now.keys())];
  const take = (pair: Pair) => {
    pairs.push(pair);
    left.delete(pair.old);
    free.delete(pair.now);
  };
  const nowById = indicesById(now);
  for (const [id, own] of indicesById(old)) {
    const others = nowById.get(id);
    if (others)
      for (const [i, j] of nearestFirst(partsOf(own, others, old, now))) take({ old: i, now: j, by: 'globalId' });
  }
  for (const [i, j] of nearestFirst(lookAlikes([...left], [...free], old, now)))
    take({ old: i, now: j, by: 'geometry' });
  return { pairs: pairs.sort((p, q) => p.old - q.old), added: [...free], removed: [...left] };
}

interface Candidate {
  readonly old: number;
  readonly now: number;
  readonly cost: number;
}

function indicesById(members: readonly ResultMember[]): Map<string, number[]> {
  const byId = new Map<string, number[]>();
  members.forEach(({ globalId }, index) => {
    pushTo(byId, globalId, index);
  });
  return byId;
}

/** The parts of one element, or elements that share a GlobalId, are told apart by where they lie. */
function partsOf(
  own: readonly number[],
  others: readonly number[],
  old: readonly ResultMember[],
  now: readonly ResultMember[],
): Candidate[] {
  return own.flatMap((i) => others.map((j) => ({ old: i, now: j, cost: likeness(old[i], now[j]).cost })));
}

function lookAlikes(
  left: readonly number[],
  free: readonly number[],
  old: readonly ResultMember[],
  now: readonly ResultMember[],
): Candidate[] {
  if (left.length === 0 || free.length === 0) return [];
  const boxes = new Float64Array(6 * free.length);
  free.forEach((j, k) => {
    boxes.set(boxOf(middle(now[j]), 0), 6 * k);
  });
  const index = indexBoxes(boxes);
  return left.flatMap((i) => {
    const found: Candidate[] = [];
    searchBoxes(index, boxOf(middle(old[i]), MOST_MOVED), (k) => {
      const { cost, isAlike } = likeness(old[i], now[free[k]]);
      if (isAlike) found.push({ old: i, now: free[k], cost });
    });
    return found;
  });
}

function* nearestFirst(candidates: Candidate[]): Generator<[number, number]> {
  const [taken, used] = [new Set<number>(), new Set<number>()];
  for (const { old, now } of candidates.sort((p, q) => p.cost - q.cost || p.old - q.old || p.now - q.now)) {
    if (taken.has(old) || used.has(now)) continue;
    taken.add(old);
    used.add(now);
    yield [old, now];
  }
}

/** How far two members are from being one, m, and whether they may be. */
function likeness(a: ResultMember, b: ResultMember): { cost: number; isAlike: boolean } {
  const [near, far] = endShifts(a.axis, b.axis);
  const sameSection = (a.section?.name ?? null) === (b.section?.name ?? null);
  const sameName = a.name !== null && a.name === b.name;
  const [length, other] = [a, b].map(({ axis }) => distance(axis[0], axis[1]));
  const lengthFits = Math.abs(length - other) <= Math.max(LENGTH_ROOM, LENGTH_SHARE * length);
  const cost = far + (sameSection ? 0 : OTHER_SECTION) + (sameName ? 0 : OTHER_NAME);
  const isInPlace = far <= SAME_PLACE;
  const isHeldAtOneEnd = near <= SAME_PLACE && (sameSection || sameName);
  const isAlike = isInPlace || (far <= MOST_MOVED && (isHeldAtOneEnd || (sameSection && (lengthFits || sameName))));
  return { cost, isAlike };
}

type Ends = readonly [Vec3, Vec3];

/** m by which the nearer and the farther end moved; an axis may have been drawn the other way round. */
export function endShifts(a: Ends, b: Ends): readonly [near: number, far: number] {
  const [same, turned] = [b, [b[1], b[0]] as const].map((ends) => [distance(a[0], ends[0]), distance(a[1], ends[1])]);
  const [p, q] = Math.max(...same) <= Math.max(...turned) ? same : turned;
  return p < q ? [p, q] : [q, p];
}

const middle = ({ axis: [p, q] }: ResultMember): Vec3 => [(p[0] + q[0]) / 2, (p[1] + q[1]) / 2, (p[2] + q[2]) / 2];

const boxOf = (at: Vec3, margin: number): number[] => [...at.map((x) => x - margin), ...at.map((x) => x + margin)];
