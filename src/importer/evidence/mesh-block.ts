import { cross, dot, norm, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { areaVector, type Polygon } from '../geometry/mesh.ts';
import { across } from '../transform.ts';
import { type Axes, type Block, tightestBox, UPRIGHT } from './block.ts';

/** Of a face with many corners only the longest edges are tried as a direction of the box. */
const EDGES_TRIED = 8;

/** The box round a mesh: along the edges of its greatest face, which is a plate's own, or along the coordinate axes. Null where it has no faces. */
export function meshBlock(polygons: readonly Polygon[]): Block | null {
  const points: Vec3[] = [];
  let greatest: readonly Vec3[] = [];
  let area = 0;
  for (const [outer] of polygons) {
    if (outer === undefined || !outer.every((p) => p.every(Number.isFinite))) continue;
    for (const point of outer) points.push(point);
    const own = norm(areaVector(outer));
    if (own > area * (1 + 1e-9)) {
      area = own;
      greatest = outer;
    }
  }
  return points.length === 0 ? null : tightestBox(points, [UPRIGHT, ...axesOfFace(greatest)]);
}

function axesOfFace(ring: readonly Vec3[]): Axes[] {
  const normal = unit(areaVector(ring));
  if (normal === null) return [];
  return ring
    .map((corner, i) => across(subtract(ring[(i + 1) % ring.length]!, corner), normal))
    .sort((a, b) => dot(b, b) - dot(a, a))
    .slice(0, EDGES_TRIED)
    .flatMap((edge): Axes[] => {
      const x = unit(edge);
      return x === null ? [] : [[x, cross(normal, x), normal]];
    });
}
