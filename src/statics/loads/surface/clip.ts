import type { Vec3 } from '../../../domain/vector.ts';
import { planArea, turn } from './plan.ts';
import type { CornerShare } from './share-patch.ts';
import { Triangulation } from './triangulation.ts';

type Plan = readonly (readonly [x: number, y: number])[];

/** Where a surface load acts, in plan: convex pieces that count, and convex pieces that are taken off. */
export interface Clip {
  readonly pieces: readonly { readonly corners: readonly Vec3[]; readonly sign: 1 | -1 }[];
  /** m2 in plan of the outline less the openings. */
  readonly area: number;
}

/** An outline less openings within it; null where one of them is no simple polygon. `outline` null: everywhere but the openings. */
export function makeClip(outline: Plan | null, openings: readonly Plan[]): Clip | null {
  const pieces: { corners: readonly Vec3[]; sign: 1 | -1 }[] = [];
  let area = 0;
  const polygons = [
    ...(outline === null ? [] : [{ plan: outline, sign: 1 as const }]),
    ...openings.map((plan) => ({ plan, sign: -1 as const })),
  ];
  for (const { plan, sign } of polygons) {
    const divided = divide(plan);
    if (divided === null) return null;
    area += sign * divided.area;
    for (const corners of divided.convex) pieces.push({ corners, sign });
  }
  return { pieces, area };
}

function divide(plan: Plan): { convex: Vec3[][]; area: number } | null {
  const given = plan.map(([x, y]): Vec3 => [x, y, 0]);
  const points = planArea(given) < 0 ? given.toReversed() : given;
  const triangulation = Triangulation.of(
    points,
    points.map((_, i) => i),
  );
  if (triangulation === null) return null;
  return { convex: triangulation.patches().map((patch) => patch.map((i) => points[i])), area: planArea(points) };
}

/**
 * Shares of a convex patch's corners in the part of it that the clip leaves, as `sharePatch` for the whole: force and moment of an even load on the part are
 * kept, and no diagonal is preferred.
 * @param everywhere whether the clip has no outline: the whole patch counts, less the openings
 */
export function shareClipped(
  points: readonly Vec3[],
  patch: readonly number[],
  { pieces }: Clip,
  everywhere: boolean,
): CornerShare[] {
  const count = patch.length;
  const shares = patch.map((node) => ({ node, normalArea: [0, 0, 0] as [number, number, number], area: 0 }));
  const fans = count === 3 ? 1 : count;
  for (let apex = 0; apex < fans; apex++)
    for (let k = 1; k < count - 1; k++) {
      const corners = [apex, (apex + k) % count, (apex + k + 1) % count] as const;
      const triangle = corners.map((corner) => points[patch[corner]]) as [Vec3, Vec3, Vec3];
      const whole = turn(...triangle) / 2;
      if (!(whole > 0)) continue;
      const slope = slopeOf(triangle);
      const parts = pieces.map(({ corners: piece, sign }) => ({ part: intersect(triangle, piece), sign }));
      if (everywhere) parts.push({ part: triangle, sign: 1 });
      for (const { part, sign } of parts) {
        const covered = part.length < 3 ? 0 : (sign * planArea(part)) / fans;
        if (covered === 0) continue;
        const weights = weightsAt(triangle, centroid(part), whole);
        corners.forEach((corner, i) => {
          const share = shares[corner];
          const plan = covered * weights[i];
          for (let axis = 0; axis < 3; axis++)
            share.normalArea[axis] = share.normalArea[axis] + plan * slope.normal[axis];
          share.area += plan * slope.factor;
        });
      }
    }
  return shares;
}

/** Per m2 in plan: the vector at right angles to the slope with z = 1, and the true area. */
function slopeOf([a, b, c]: readonly [Vec3, Vec3, Vec3]): { normal: Vec3; factor: number } {
  const [u, v] = [b, c].map((p): Vec3 => [p[0] - a[0], p[1] - a[1], p[2] - a[2]]);
  const z = u[0] * v[1] - u[1] * v[0];
  const normal: Vec3 = [(u[1] * v[2] - u[2] * v[1]) / z, (u[2] * v[0] - u[0] * v[2]) / z, 1];
  return { normal, factor: Math.hypot(...normal) };
}

/** The part of a convex polygon inside another, both going round to the left (Sutherland & Hodgman 1974). */
function intersect(subject: readonly Vec3[], clip: readonly Vec3[]): readonly Vec3[] {
  let out: readonly Vec3[] = subject;
  clip.forEach((a, i) => {
    const b = clip[(i + 1) % clip.length];
    const kept: Vec3[] = [];
    out.forEach((p, k) => {
      const q = out[(k + 1) % out.length];
      const [tp, tq] = [turn(a, b, p), turn(a, b, q)];
      if (tp >= 0) kept.push(p);
      if (tp >= 0 !== tq >= 0) {
        const t = tp / (tp - tq);
        kept.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1]), 0]);
      }
    });
    out = kept;
  });
  return out;
}

/** Of a convex polygon in plan. */
function centroid(polygon: readonly Vec3[]): Vec3 {
  const [o] = polygon;
  let [x, y, twice] = [0, 0, 0];
  for (let i = 2; i < polygon.length; i++) {
    const [p, q] = [polygon[i - 1], polygon[i]];
    const area = turn(o, p, q);
    x += (area * (o[0] + p[0] + q[0])) / 3;
    y += (area * (o[1] + p[1] + q[1])) / 3;
    twice += area;
  }
  return [x / twice, y / twice, 0];
}

function weightsAt([a, b, c]: readonly [Vec3, Vec3, Vec3], p: Vec3, whole: number): [number, number, number] {
  return [turn(p, b, c) / (2 * whole), turn(a, p, c) / (2 * whole), turn(a, b, p) / (2 * whole)];
}
