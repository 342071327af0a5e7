import { ellipseRing } from './outline.ts';
import { inMillimetres, type ProfileShape, requirePositive, requireShape } from './profile-shape.ts';
import { corner, polygonRing, roundedRing } from './rounded-ring.ts';
import { torsionOfEllipse, torsionOfRectangle, torsionOfRhs } from './torsion.ts';

/** Hollow and solid shapes; the origin is the middle of the bounding box. Metres. `width` lies along x, `depth` along y. */

export interface RhsDimensions {
  readonly width: number;
  readonly depth: number;
  readonly wall: number;
  readonly inner: number;
  readonly outer: number;
}

export function rhs(name: string | null, d: RhsDimensions): ProfileShape {
  const { width, depth, wall, inner, outer } = d;
  requirePositive({ width, depth, 'wall thickness': wall });
  requireShape(2 * wall < Math.min(width, depth), 'its walls are thicker than it is wide', { wall, depth, width });
  return {
    name: name ?? `RHS ${inMillimetres(Math.max(width, depth), Math.min(width, depth), wall)}`,
    shape: 'RHS',
    outline: {
      outer: rectangleRing(width, depth, outer),
      voids: [rectangleRing(width - 2 * wall, depth - 2 * wall, inner)],
    },
    torsion: torsionOfRhs(depth, width, wall, outer, inner),
    warping: 0,
    thickness: wall,
  };
}

export function chs(name: string | null, radius: number, wall: number): ProfileShape {
  requirePositive({ radius, 'wall thickness': wall });
  requireShape(wall < radius, 'its wall is thicker than its radius', { wall, radius });
  const inside = radius - wall;
  return {
    name: name ?? `CHS ${inMillimetres(2 * radius, wall)}`,
    shape: 'CHS',
    outline: { outer: ellipseRing(radius, radius), voids: [ellipseRing(inside, inside)] },
    torsion: (Math.PI / 2) * (radius ** 4 - inside ** 4),
    warping: 0,
    thickness: wall,
  };
}

export function circle(name: string | null, radius: number): ProfileShape {
  requirePositive({ radius });
  return {
    name: name ?? `Round ${inMillimetres(2 * radius)}`,
    shape: 'circle',
    outline: { outer: ellipseRing(radius, radius), voids: [] },
    torsion: (Math.PI / 2) * radius ** 4,
    warping: 0,
    thickness: 2 * radius,
  };
}

export function ellipse(name: string | null, halfWidth: number, halfDepth: number): ProfileShape {
  requirePositive({ 'half width': halfWidth, 'half depth': halfDepth });
  return {
    name: name ?? `Ellipse ${inMillimetres(2 * halfWidth, 2 * halfDepth)}`,
    shape: 'other',
    outline: { outer: ellipseRing(halfWidth, halfDepth), voids: [] },
    torsion: torsionOfEllipse(halfWidth, halfDepth),
    warping: 0,
  };
}

export function rectangle(name: string | null, width: number, depth: number, radius = 0): ProfileShape {
  requirePositive({ width, depth });
  return {
    name: name ?? `Flat ${inMillimetres(Math.max(width, depth), Math.min(width, depth))}`,
    shape: 'rectangle',
    outline: { outer: rectangleRing(width, depth, radius), voids: [] },
    torsion: radius > 0 ? null : torsionOfRectangle(width, depth),
    warping: 0,
    thickness: Math.min(width, depth),
  };
}

export interface TrapeziumDimensions {
  readonly bottom: number;
  readonly top: number;
  readonly depth: number;
  /** From the left end of the bottom to the left end of the top. */
  readonly topOffset: number;
}

export function trapezium(name: string | null, d: TrapeziumDimensions): ProfileShape {
  requirePositive({ 'bottom width': d.bottom, 'top width': d.top, depth: d.depth });
  const left = -d.bottom / 2;
  const y = d.depth / 2;
  return {
    name: name ?? `Trapezium ${inMillimetres(d.bottom, d.top, d.depth)}`,
    shape: 'other',
    outline: {
      outer: polygonRing([
        [left, -y],
        [-left, -y],
        [left + d.topOffset + d.top, y],
        [left + d.topOffset, y],
      ]),
      voids: [],
    },
    torsion: null,
    warping: 0,
  };
}

function rectangleRing(width: number, depth: number, radius: number) {
  const x = width / 2;
  const y = depth / 2;
  return roundedRing([corner(-x, -y, radius), corner(x, -y, radius), corner(x, y, radius), corner(-x, y, radius)]);
}
