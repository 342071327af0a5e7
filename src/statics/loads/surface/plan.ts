import type { Vec3 } from '../../../domain/vector.ts';

/** Two nodes joined in plan, by their indices. */
export type PlanEdge = readonly [from: number, to: number];

/** m: in plan, things nearer than this are in the same place. Nodes of a model are never drawn so near on purpose. */
export const SAME_PLACE = 0.01;

/** Twice the signed area of a triangle in plan; positive where a, b, c turn to the left. */
export const turn = (a: Vec3, b: Vec3, c: Vec3): number =>
  (b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1]);

export const planDistance = (a: Vec3, b: Vec3): number => Math.hypot(b[0] - a[0], b[1] - a[1]);

/** Signed area of a polygon in plan, m2; positive where its corners go round to the left. */
export function planArea(corners: readonly Vec3[]): number {
  const [origin] = corners;
  let twice = 0;
  for (let i = 2; i < corners.length; i++) twice += turn(origin!, corners[i - 1], corners[i]);
  return twice / 2;
}

export function isInsideInPlan(point: Vec3, corners: readonly Vec3[]): boolean {
  let inside = false;
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length];
    if (a[1] > point[1] === b[1] > point[1]) return;
    if (point[0] < a[0] + ((point[1] - a[1]) / (b[1] - a[1])) * (b[0] - a[0])) inside = !inside;
  });
  return inside;
}
