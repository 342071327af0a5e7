import type { Result, ResultBar, ResultMember } from '../../domain/result.ts';
import { along, distance, dot, subtract, type Vec3 } from '../../domain/vector.ts';
import { type Bearing, type BearingKind, bearings, type GoverningReaction } from '../schedules/bearings.ts';

export interface Extreme {
  readonly force: number;
  readonly from: string;
}

/** One bar of an element. Forces in N, tension positive; null where the bar never is in tension (compression). */
export interface BarForces {
  readonly name: string;
  readonly tension: Extreme | null;
  readonly compression: Extreme | null;
  /** No force of it could be found in any case. */
  readonly unknown: boolean;
  /** GlobalIds of the other elements that the same bar stands for: of a pair or a splice. */
  readonly others: readonly string[];
}

export interface ElementForces {
  /** In order along the element. */
  readonly bars: readonly BarForces[];
  /** The force of largest size among the bars, by case or combination; refused ones are left out. */
  readonly byRun: readonly (readonly [run: string, force: number])[];
  /** Cases or combinations without a force for some bar of the element. */
  readonly missingRuns: number;
  /** Of the supports at its ends, the greatest of each kind; null where it stands on none. */
  readonly support: Omit<Bearing, 'node'> | null;
}

/** Forces by GlobalId of every element that bars stand for. */
export function elementForces(result: Result): (globalId: string) => ElementForces | null {
  const barsOf = listedByKey(result.bars, elementsOf);
  const membersOf = listedByKey(result.members, (member) => [member.globalId]);
  const at = new Map(result.nodes.map((node) => [node.id, node.at]));
  const envelope = new Map(result.envelope.map((entry) => [entry.bar, entry]));
  const bearingOf = new Map(bearings(result).map((bearing) => [bearing.node, bearing]));
  const runs = tabled(result);

  return (globalId) => {
    const indices = barsOf.get(globalId);
    if (indices === undefined) return null;
    const place = (index: number) =>
      placeAlong(
        result.bars[index],
        (membersOf.get(globalId) ?? []).map((k) => result.members[k]),
        at,
      );
    const places = new Map(indices.map((index) => [index, place(index)]));
    const ordered = [...indices].sort((a, b) => places.get(a)! - places.get(b)!);
    return {
      bars: ordered.map((index) => {
        const bar = result.bars[index];
        return {
          name: bar.name,
          tension: envelope.get(bar.id)?.tension ?? null,
          compression: envelope.get(bar.id)?.compression ?? null,
          unknown: runs.every((run) => (run.axialForce[index] ?? null) === null),
          others: elementsOf(bar).filter((other) => other !== globalId),
        };
      }),
      byRun: runs.flatMap((run) => {
        const force = largest(ordered.map((index) => run.axialForce[index] ?? null));
        return force === null ? [] : [[run.name, force] as const];
      }),
      support: greatest(
        ordered.flatMap((index) => endsOf(result.bars[index]).flatMap((node) => bearingOf.get(node) ?? [])),
      ),
      missingRuns: runs.filter((run) => ordered.some((index) => (run.axialForce[index] ?? null) === null)).length,
    };
  };
}

/** Of the many combinations a code makes only those that design bars are worth a row on every element. */
function tabled({ combinations, combining, cases }: Result): Result['cases'] | Result['combinations'] {
  if (combinations.length === 0) return cases;
  if (combining === undefined) return combinations;
  return combinations.filter(({ limit }) => limit === 'strength' || limit === 'accidental');
}

const elementsOf = (bar: ResultBar): readonly string[] => [...new Set(bar.members ?? [bar.member])];

const endsOf = ({ from, to }: ResultBar): readonly string[] => [from, to];

function greatest(supports: readonly Bearing[]): Omit<Bearing, 'node'> | null {
  if (supports.length === 0) return null;
  const of = (kind: BearingKind) =>
    supports.reduce<GoverningReaction | null>((most, bearing) => {
      const here = bearing[kind];
      return here !== null && here.force > (most?.force ?? 0) ? here : most;
    }, null);
  return { down: of('down'), uplift: of('uplift'), horizontal: of('horizontal') };
}

/** Under each key the indices of the items that have it. */
export function listedByKey<T>(items: readonly T[], keysOf: (item: T) => readonly string[]): Map<string, number[]> {
  const listed = new Map<string, number[]>();
  for (const [index, item] of items.entries()) {
    for (const key of keysOf(item)) {
      const list = listed.get(key);
      if (list === undefined) listed.set(key, [index]);
      else list.push(index);
    }
  }
  return listed;
}

function largest(forces: readonly (number | null)[]): number | null {
  return forces.reduce(
    (most, force) => (force !== null && (most === null || Math.abs(force) > Math.abs(most)) ? force : most),
    null,
  );
}

/**
 * Where a bar's middle lies along the element, as a number to sort by: the part of the element whose axis is nearest
 * counts whole, the fraction along that axis the rest.
 */
function placeAlong(bar: ResultBar, parts: readonly ResultMember[], at: ReadonlyMap<string, Vec3>): number {
  const from = at.get(bar.from);
  const to = at.get(bar.to);
  if (from === undefined || to === undefined) return 0;
  const middle = along(from, subtract(to, from), 0.5);
  let best = { distance: Number.POSITIVE_INFINITY, place: 0 };
  for (const [part, { axis }] of parts.entries()) {
    const direction = subtract(axis[1], axis[0]);
    const length2 = dot(direction, direction);
    const fraction = length2 > 0 ? dot(subtract(middle, axis[0]), direction) / length2 : 0;
    const inside = Math.min(Math.max(fraction, 0), 0.999);
    const away = distance(middle, along(axis[0], direction, inside));
    if (away < best.distance) best = { distance: away, place: part + inside };
  }
  return best.place;
}
