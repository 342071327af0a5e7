import type { Point2 } from './outline.ts';
import { inMillimetres, type ProfileShape, requirePositive, requireShape } from './profile-shape.ts';
import { corner, roundedRing } from './rounded-ring.ts';
import { MiddleLine, type Sectorial } from './thin-wall.ts';

/** Cold-formed channels with lips, and Z shapes; the origin is the middle of the bounding box. Metres. */

export interface CDimensions {
  readonly depth: number;
  readonly width: number;
  readonly wall: number;
  /** Length of the lips, measured from the outside. */
  readonly girth: number;
  readonly innerRadius: number;
}

/** Lipped channel with its web on the left. */
export function cShape(name: string | null, d: CDimensions): ProfileShape {
  const { depth, width, wall: t, girth } = d;
  requirePositive({ depth, width, 'wall thickness': t, girth });
  requireShape(2 * t < Math.min(depth, width), 'its walls are thicker than it is wide', { wall: t, depth, width });
  requireShape(girth > t && 2 * girth < depth, 'its lips do not fit its depth', { girth, wall: t, depth });
  const inner = d.innerRadius;
  const outer = inner > 0 ? inner + t : 0;
  const x = width / 2;
  const y = depth / 2;
  const upper = [
    corner(-x + t, y - t, inner),
    corner(x - t, y - t, inner),
    corner(x - t, y - girth),
    corner(x, y - girth),
    corner(x, y, outer),
    corner(-x, y, outer),
  ];
  const lower = upper.map(({ at, radius }) => corner(at[0], -at[1], radius)).reverse();
  const [far, near, head, tip] = [x - t / 2, t / 2 - x, y - t / 2, y - girth];
  const middle: Point2[] = [
    [far, -tip],
    [far, -head],
    [near, -head],
    [near, head],
    [far, head],
    [far, tip],
  ];
  return {
    name: name ?? `C ${inMillimetres(depth, width, girth, t)}`,
    shape: 'C',
    outline: { outer: roundedRing([...lower, ...upper]), voids: [] },
    torsion: (stripLength(middle) * t ** 3) / 3,
    thickness: t,
    ...sectorialOfStrip(middle, t),
  };
}

export interface ZDimensions {
  readonly depth: number;
  /** Of one flange, measured over the web. */
  readonly width: number;
  readonly web: number;
  readonly flange: number;
  readonly fillet: number;
  readonly edgeRadius: number;
}

/** Z with its lower flange to the right and its upper one to the left. */
export function zShape(name: string | null, d: ZDimensions): ProfileShape {
  const { depth, width, web, flange } = d;
  requirePositive({ depth, width, 'web thickness': web, 'flange thickness': flange });
  requireShape(2 * flange < depth, 'its flanges are thicker than it is deep', { flange, depth });
  requireShape(web < width, 'its web is thicker than its flange is wide', { web, flange: width });
  const x = width - web / 2;
  const y = depth / 2;
  const half = [
    corner(-web / 2, -y),
    corner(x, -y),
    corner(x, -y + flange, d.edgeRadius),
    corner(web / 2, -y + flange, d.fillet),
  ];
  const opposite = half.map(({ at, radius }) => corner(-at[0], -at[1], radius));
  const b = width - web / 2;
  const h = depth - flange;
  const line = new MiddleLine([0, -h / 2]);
  line.wall(0, [b, -h / 2], flange);
  line.wall(line.wall(0, [0, h / 2], web), [-b, h / 2], flange);
  return {
    name: name ?? `Z ${inMillimetres(depth, width, web, flange)}`,
    shape: 'Z',
    outline: { outer: roundedRing([...half, ...opposite]), voids: [] },
    torsion: ((depth - 2 * flange) * web ** 3 + 2 * width * flange ** 3) / 3,
    thickness: Math.max(web, flange),
    ...line.sectorial(),
  };
}

/** Of a strip of even thickness bent along `points`. */
export function sectorialOfStrip(points: readonly Point2[], thickness: number): Sectorial {
  const line = new MiddleLine(points[0]!);
  let node = 0;
  for (const point of points.slice(1)) node = line.wall(node, point, thickness);
  return line.sectorial();
}

export function stripLength(points: readonly Point2[]): number {
  let length = 0;
  for (let i = 1; i < points.length; i++) {
    length += Math.hypot(points[i]![0] - points[i - 1]![0], points[i]![1] - points[i - 1]![1]);
  }
  return length;
}
