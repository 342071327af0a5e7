import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import { along, between, dot, norm, scale, subtract } from '../domain/vector.ts';
import { type Axis, sineBetween } from './axes.ts';
import { boxAround } from './contacts.ts';
import { labelOf } from './labels.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';

const PARALLEL = 0.02;
/** Bodies that share more than this of their length are one member drawn twice. */
const MOST_OF_LENGTH = 0.5;
/** Axes nearer than this, m, have no direction between them worth asking for. */
const COINCIDENT = 1e-4;
/** Bodies whose axes are nearer than this share of their touching distance interpenetrate. */
const INTERPENETRATION = 0.5;

/** Members drawn twice: the one with less data is left out of the truss. Returns the ones left out. */
export function findTwins(
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  placeOf: PlaceNamer,
): { leftOut: ReadonlySet<number>; findings: Finding[] } {
  const present = axes.filter((axis) => axis !== null);
  const boxes = new Float64Array(6 * present.length);
  present.forEach((axis, i) => {
    boxes.set(boxAround(axis, axis.depth / 2), 6 * i);
  });
  const index = indexBoxes(boxes);
  const pairs: [Axis, Axis][] = [];
  present.forEach((axis, i) => {
    searchBoxes(index, boxes.subarray(6 * i, 6 * i + 6), (j) => {
      if (j > i && areTwins(axis, present[j])) pairs.push([axis, present[j]]);
    });
  });
  pairs.sort(([a, b], [c, d]) => a.member - c.member || b.member - d.member);
  const leftOut = new Set<number>();
  const findings: Finding[] = [];
  for (const [a, b] of pairs) {
    if (leftOut.has(a.member) || leftOut.has(b.member)) continue;
    const [kept, out] = dataOf(members[b.member]) > dataOf(members[a.member]) ? [b, a] : [a, b];
    leftOut.add(out.member);
    findings.push(twinFinding(members[kept.member], members[out.member], out, placeOf));
  }
  return { leftOut, findings };
}

function areTwins(a: Axis, b: Axis): boolean {
  if (sineBetween(a, b) > PARALLEL) return false;
  const stations = [b.start, b.finish].map((p) => dot(subtract(p, a.start), a.direction));
  const overlap = Math.min(Math.max(...stations), a.length) - Math.max(Math.min(...stations), 0);
  if (overlap < MOST_OF_LENGTH * Math.max(a.length, b.length)) return false;
  const middle = between(b.start, b.finish, 0.5);
  const arm = subtract(middle, a.start);
  const aside = subtract(arm, scale(a.direction, dot(arm, a.direction)));
  const distance = norm(aside);
  if (distance < COINCIDENT) return true;
  const normal = scale(aside, 1 / distance);
  return distance < INTERPENETRATION * (a.halfExtent(normal) + b.halfExtent(normal));
}

const dataOf = (member: Member): number =>
  Object.values(member).filter((value) => value !== null).length + (member.material.from === 'default' ? 0 : 1);

function twinFinding(kept: Member, out: Member, axis: Axis, placeOf: PlaceNamer): Finding {
  const at = along(axis.start, axis.direction, axis.length / 2);
  return finding(
    'twin-members',
    `${labelOf(out)} is drawn over ${labelOf(kept)}: one member twice. Only ${labelOf(kept)} is in the truss.`,
    `Delete ${labelOf(out)}, or move it to where it belongs.`,
    { members: [kept.globalId, out.globalId], at, place: placeOf(at) },
  );
}
