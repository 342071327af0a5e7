import { add, scale, type Vec3 } from '../../../domain/vector.ts';
import { planArea, planDistance, turn } from './plan.ts';
import type { CornerShare } from './share-patch.ts';

/** An edge of the surface's outer boundary, the surface on its left, and the patch it belongs to. */
interface Side {
  readonly from: number;
  readonly to: number;
  readonly patch: number;
}

/**
 * Shares of the roof beyond the outer nodes: a strip of one width in plan along the outer boundary, each side's to its ends, mitred corners to their node.
 * The strip lies in the planes of the patches beside it. What it turns about the boundary is not seen: nodes take forces.
 * @param normals of the patches, upward, of any length
 */
export function edgeShares(
  points: readonly Vec3[],
  patches: readonly (readonly number[])[],
  normals: readonly Vec3[],
  width: number,
): { readonly share: CornerShare; readonly patch: number }[] {
  const strips: { share: CornerShare; patch: number }[] = [];
  const put = (node: number, patch: number, plan: number) => {
    const perPlan = scale(normals[patch], 1 / normals[patch][2]);
    strips.push({ share: { node, normalArea: scale(perPlan, plan), area: plan * Math.hypot(...perPlan) }, patch });
  };
  for (const loop of outerLoops(points, patches)) {
    loop.forEach((side, i) => {
      const half = (width * planDistance(points[side.from], points[side.to])) / 2;
      put(side.from, side.patch, half);
      put(side.to, side.patch, half);
      const next = loop[(i + 1) % loop.length];
      const corner = width ** 2 * Math.tan(turnAngle(points[side.from], points[side.to], points[next.to]) / 2);
      put(side.to, side.patch, corner / 2);
      put(side.to, next.patch, corner / 2);
    });
  }
  return strips;
}

/** rad, positive to the left; sharper than a right angle and a half counts as that, for a mitre has no end. */
function turnAngle(a: Vec3, b: Vec3, c: Vec3): number {
  const along = (b[0] - a[0]) * (c[0] - b[0]) + (b[1] - a[1]) * (c[1] - b[1]);
  const angle = Math.atan2(turn(a, b, c), along);
  return Math.max(-SHARPEST, Math.min(SHARPEST, angle));
}

const SHARPEST = (3 * Math.PI) / 4;

function outerLoops(points: readonly Vec3[], patches: readonly (readonly number[])[]): Side[][] {
  const sides = new Map<string, Side>();
  patches.forEach((corners, patch) => {
    corners.forEach((from, k) => {
      const to = corners[(k + 1) % corners.length];
      if (!sides.delete(`${to},${from}`)) sides.set(`${from},${to}`, { from, to, patch });
    });
  });
  const next = new Map<number, Side[]>();
  for (const side of sides.values()) next.set(side.from, [...(next.get(side.from) ?? []), side]);
  const loops: Side[][] = [];
  for (const start of sides.values()) {
    const loop: Side[] = [];
    let side: Side | undefined = next.get(start.from)?.includes(start) ? start : undefined;
    while (side !== undefined) {
      loop.push(side);
      const leaving: Side[] = next.get(side.from) ?? [];
      leaving.splice(leaving.indexOf(side), 1);
      [side] = next.get(side.to) ?? [];
    }
    if (loop.length > 2 && planArea(loop.map(({ from }) => points[from])) > 0) loops.push(loop);
  }
  return loops;
}

/** The vector at right angles to a patch, upward, as long as its area (Newell). */
export function vectorArea(corners: readonly Vec3[]): Vec3 {
  let sum: Vec3 = [0, 0, 0];
  corners.forEach((p, i) => {
    const q = corners[(i + 1) % corners.length];
    sum = add(sum, [(p[1] - q[1]) * (p[2] + q[2]), (p[2] - q[2]) * (p[0] + q[0]), (p[0] - q[0]) * (p[1] + q[1])]);
  });
  return scale(sum, 1 / 2);
}
