import type { Faith } from '../domain/truss.ts';
import { cross, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import type { Axis } from './axes.ts';

/** How far the points a member passes lie off its axis as drawn, and how far the line through its ends is turned. */
export function faithOf(
  axes: readonly (Axis | null)[],
  chains: readonly (readonly number[])[],
  positionOf: (vertex: number) => Vec3,
): Faith[] {
  return axes.map((axis, member) => {
    if (axis === null) return { shift: 0, turn: 0 };
    const points = chains[member].map(positionOf);
    const square = points.map((point) => norm(cross(subtract(point, axis.start), axis.direction)));
    const line = unit(subtract(points[points.length - 1], points[0]));
    const sine = line === null ? 0 : norm(cross(line, axis.direction));
    return { shift: Math.max(...square), turn: Math.asin(Math.min(sine, 1)) };
  });
}
