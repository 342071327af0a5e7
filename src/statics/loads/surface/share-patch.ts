import { add, cross, norm, ORIGIN, scale, subtract, type Vec3 } from '../../../domain/vector.ts';

/** What one corner of a patch takes: a vector at right angles to the surface, upwards, as long as its area, and the true area. */
export interface CornerShare {
  readonly node: number;
  /** m2; its z is the area in plan. */
  readonly normalArea: Vec3;
  /** m2. */
  readonly area: number;
}

/**
 * Shares the area of a convex patch among its corners. A triangle gives each a third, which keeps force and moment of an even
 * load. A polygon is shared as the mean over its fans of triangles, one fan from each corner, so that no diagonal is preferred
 * and force and moment are kept all the same.
 */
export function sharePatch(points: readonly Vec3[], patch: readonly number[]): CornerShare[] {
  const count = patch.length;
  const shares = patch.map((node) => ({ node, normalArea: ORIGIN, area: 0 }));
  const fans = count === 3 ? 1 : count;
  for (let apex = 0; apex < fans; apex++) {
    for (let k = 1; k < count - 1; k++) {
      const corners = [apex, (apex + k) % count, (apex + k + 1) % count] as const;
      const [a, b, c] = corners.map((corner) => points[patch[corner]]) as [Vec3, Vec3, Vec3];
      const normalArea = scale(cross(subtract(b, a), subtract(c, a)), 1 / 2);
      for (const corner of corners) {
        const share = shares[corner];
        share.normalArea = add(share.normalArea, scale(normalArea, 1 / (3 * fans)));
        share.area += norm(normalArea) / (3 * fans);
      }
    }
  }
  return shares;
}
