import { dot, norm, scale, subtract } from '../domain/vector.ts';
import { boxAround, distanceToAxis, facetAt } from './along-axes.ts';
import { type Axis, sineBetween } from './axes.ts';
import type { Overhang } from './overhangs.ts';
import { indexBoxes, searchBoxes } from './spatial-index.ts';

/** Sine of 3 degrees: purlins lapped over a rafter lie in one another. */
const ALONGSIDE = 0.05;

/** The other begins as far before the joint as this one ends past it, or not much farther. */
const LAP = 3;

/** The tails but for those that lie along the next member of the line, as lapped and sleeved purlins do: these are meant. */
export function withoutLaps(tails: readonly Overhang[], axes: readonly (Axis | null)[]): Overhang[] {
  if (tails.length === 0) return [];
  const present = axes.filter((axis) => axis !== null);
  const boxes = new Float64Array(present.flatMap((axis) => boxAround(axis, axis.depth)));
  const index = indexBoxes(boxes);
  return tails.filter((tail) => {
    const own = tail.members.map((member) => axes[member]).find((axis) => axis !== null);
    if (own === undefined || own === null) return true;
    let isLap = false;
    searchBoxes(index, [...tail.at, ...tail.at], (i) => {
      const other = present[i];
      isLap ||= !tail.members.includes(other.member) && liesAlong(tail, lineNear(own, tail), lineNear(other, tail));
    });
    return !isLap;
  });
}

const lineNear = (axis: Axis, { at }: Overhang): Axis => facetAt(axis, distanceToAxis(at, axis).s);

/** Whether the free end lies beside the other, near where that one begins. */
function liesAlong({ at, length }: Overhang, own: Axis, other: Axis): boolean {
  if (sineBetween(own, other) > ALONGSIDE) return false;
  const arm = subtract(at, other.start);
  const s = dot(arm, other.direction);
  const aside = norm(subtract(arm, scale(other.direction, s)));
  const alike = Math.min(own.depth, other.depth) > 0.5 * Math.max(own.depth, other.depth);
  return alike && aside <= other.depth && s > 0 && s < other.length && Math.min(s, other.length - s) <= LAP * length;
}
