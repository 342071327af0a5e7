import { add, cross, dot, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { across, type Transform } from '../transform.ts';

/**
 * What a transform makes of the cube from -1 to 1: `x`, `y`, `z` are half edges, `origin` is the middle. A box, until a
 * copy stretches it askew.
 */
export type Block = Transform;

export type Axes = readonly [Vec3, Vec3, Vec3];

export const UPRIGHT: Axes = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** A surface without thickness keeps this half size, so that its directions are not lost. Metres. */
const THINNEST = 1e-6;

/** Unit and right-handed, as near the transform's own axes as may be, the first before the others; null where it is flat. */
export function squareAxes(t: Transform): Axes | null {
  const x = unit(t.x);
  const y = x === null ? null : unit(across(t.y, x));
  return x === null || y === null ? null : [x, y, cross(x, y)];
}

/** Directions in files are rounded to six digits; what is askew by less is a box. */
const ROUNDED = 1e-6;

/** Whether the block's edges stand at right angles, and it is a box as it stands. */
export function isSquare({ x, y, z }: Block): boolean {
  const [a, b, c] = [dot(x, x), dot(y, y), dot(z, z)];
  const limit = ROUNDED ** 2;
  return dot(x, y) ** 2 <= limit * a * b && dot(y, z) ** 2 <= limit * b * c && dot(z, x) ** 2 <= limit * c * a;
}

export function cornersOf({ x, y, z, origin }: Block): Vec3[] {
  const corners: Vec3[] = [];
  for (const i of [-1, 1]) {
    for (const j of [-1, 1]) {
      for (const k of [-1, 1]) corners.push(add(origin, add(scale(x, i), add(scale(y, j), scale(z, k)))));
    }
  }
  return corners;
}

/** The box along `axes` round at least one point, widened by `pad` metres on all sides. */
export function boxRound(points: readonly Vec3[], axes: Axes, pad = 0): Block {
  // Heights are taken from a point of the body: far from the world's origin they would lose digits.
  const base = points[0]!;
  let origin = base;
  const halves = axes.map((axis) => {
    let [low, high] = [0, 0];
    for (const point of points) {
      const height = dot(subtract(point, base), axis);
      low = Math.min(low, height);
      high = Math.max(high, height);
    }
    origin = add(origin, scale(axis, (low + high) / 2));
    return scale(axis, Math.max((high - low) / 2 + pad, THINNEST));
  });
  return { x: halves[0]!, y: halves[1]!, z: halves[2]!, origin };
}

/** Of the boxes along the axes given, at least one, the one with the least skin; the first of equals. */
export function tightestBox(points: readonly Vec3[], candidates: readonly Axes[]): Block {
  let best: Block | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const axes of candidates) {
    const box = boxRound(points, axes);
    const size = skinOf(box);
    if (best !== null && !(size < least * (1 - 1e-9))) continue;
    best = box;
    least = size;
  }
  return best!;
}

/** Skin and not volume, which is nothing for any box of a flat surface. */
function skinOf({ x, y, z }: Block): number {
  const [a, b, c] = [Math.hypot(...x), Math.hypot(...y), Math.hypot(...z)];
  return a * b + b * c + c * a;
}
