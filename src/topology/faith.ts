import type { Faith } from '../domain/truss.ts';
import { cross, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { distanceToLine, pointAt } from './along-axes.ts';
import type { Axis } from './axes.ts';

/** Of a bent member, between the points of its curve that are nearest. */
function drawnDirection(axis: Axis, first: Vec3, last: Vec3): Vec3 {
  if (axis.facets === null) return axis.direction;
  const [from, to] = [first, last].map((point) => pointAt(axis, distanceToLine(point, axis).s));
  return unit(subtract(to, from)) ?? axis.direction;
}

/** How far the points a member passes lie off its axis as drawn, and how far the line through its ends is turned. */
export function faithOf(
  axes: readonly (Axis | null)[],
  chains: readonly (readonly number[])[],
  positionOf: (vertex: number) => Vec3,
): Faith[] {
  return axes.map((axis, member) => {
    if (axis === null) return { shift: 0, turn: 0 };
    const points = chains[member].map(positionOf);
    const [first, last] = [points[0], points[points.length - 1]];
    const line = unit(subtract(last, first));
    const sine = line === null ? 0 : norm(cross(line, drawnDirection(axis, first, last)));
    return {
      shift: Math.max(...points.map((point) => distanceToLine(point, axis).distance)),
      turn: Math.asin(Math.min(sine, 1)),
    };
  });
}
