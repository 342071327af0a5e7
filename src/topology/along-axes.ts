import { along, between, distance, dot, norm, scale, subtract, type Vec3 } from '../domain/vector.ts';
import type { Axis } from './axes.ts';

/** The straight lines that an axis is read as: itself, or a bent member's facets in a row. */
export const facetsOf = (axis: Axis): readonly Axis[] => axis.facets ?? [axis];

/** The straight line that the member follows at `s`. */
export function facetAt(axis: Axis, s: number): Axis {
  return axis.facets?.find(({ span }) => s <= span[1]) ?? axis;
}

/** The point at `s` along the member, carried on straight beyond its ends. */
export function pointAt(axis: Axis, s: number): Vec3 {
  const { start, direction } = facetAt(axis, s);
  return along(start, direction, s);
}

/** Where a facet begins and ends on its member: the member's own ends at the outer ones. */
export const rangeOf = ({ span, length }: Axis): readonly [number, number] => [
  Math.max(span[0], 0),
  Math.min(span[1], length),
];

/** The member's own ends, and the corners between its facets where it is bent. */
export function cornersOf(axis: Axis): Vec3[] {
  if (axis.facets === null) return [axis.start, axis.finish];
  const inner = axis.facets.slice(1).map((facet) => along(facet.start, facet.direction, facet.span[0]));
  return [axis.start, ...inner, axis.finish];
}

/** Distance from a point to the axis between its ends, and where the nearest point lies along it. */
export function distanceToAxis(point: Vec3, axis: Axis): { readonly distance: number; readonly s: number } {
  return nearest(point, axis, rangeOf);
}

/** The same, of the axis carried on straight beyond its ends. */
export function distanceToLine(point: Vec3, axis: Axis): { readonly distance: number; readonly s: number } {
  return nearest(point, axis, ({ span }) => span);
}

function nearest(point: Vec3, axis: Axis, rangeOfFacet: (facet: Axis) => readonly [number, number]) {
  let best = { distance: Number.POSITIVE_INFINITY, s: 0 };
  for (const facet of facetsOf(axis)) {
    const [low, high] = rangeOfFacet(facet);
    const w = subtract(point, facet.start);
    const s = Math.min(Math.max(dot(w, facet.direction), low), high);
    const away = norm(subtract(w, scale(facet.direction, s)));
    if (away < best.distance) best = { distance: away, s };
  }
  return best;
}

/** Whether two facets could come within `margin` of each other; says yes too often rather than too seldom. */
export function mayMeet(a: Axis, b: Axis, margin: number): boolean {
  const [from, to] = rangeOf(a);
  const middle = along(a.start, a.direction, (from + to) / 2);
  return distanceToAxis(middle, b).distance <= (to - from) / 2 + margin;
}

/** The least box around the member's line, widened on all sides. */
export function boxAround(axis: Axis, margin: number): number[] {
  const corners = cornersOf(axis);
  const least = [0, 1, 2].map((k) => corners.reduce((x, p) => Math.min(x, p[k]), Number.POSITIVE_INFINITY) - margin);
  const most = [0, 1, 2].map((k) => corners.reduce((x, p) => Math.max(x, p[k]), Number.NEGATIVE_INFINITY) + margin);
  return [...least, ...most];
}

/** The straight line between the ends, which is the axis itself where it is not bent. */
export function chordOf(axis: Axis): Axis {
  if (axis.facets === null) return axis;
  return { ...axis, facets: null, length: distance(axis.start, axis.finish) };
}

/** The member's line as straight pieces from end to end, for what touches its body. */
export function drawnPieces(axis: Axis): Pick<Axis, 'start' | 'finish' | 'halfExtent'>[] {
  return facetsOf(axis).map((facet) => {
    const [start, finish] = rangeOf(facet).map((s) => along(facet.start, facet.direction, s));
    return { start, finish, halfExtent: facet.halfExtent };
  });
}

/** Half way along the member. */
export const middleOf = (axis: Axis): Vec3 =>
  axis.facets === null ? between(axis.start, axis.finish, 0.5) : pointAt(axis, axis.length / 2);
