import type { Making } from '../../../domain/member.ts';
import { chs, circle, rectangle, rhs } from '../closed-shapes.ts';
import { inMillimetres, type ProfileShape } from '../profile-shape.ts';
import { lShape } from '../rolled-shapes.ts';
import { METRIC_RADII } from './angle-radii.ts';
import type { Rows } from './rows.ts';

/** Sections whose designation states every dimension but the radii. Metres. */

/**
 * Corners of hollow rectangles for the calculation of properties: EN 10210-2:2006 Annex A (1.5 t and 1.0 t) and
 * EN 10219-2:2006 Annex B (2.0 t and 1.0 t up to 6 mm, 2.5 t and 1.5 t up to 10 mm, 3.0 t and 2.0 t above), from memory.
 */
function corners(wall: number, finish: Making['finish']): { outer: number; inner: number } {
  if (finish === 'hot') return { outer: 1.5 * wall, inner: wall };
  const outer = wall <= 0.006 + 1e-9 ? 2 : wall <= 0.01 + 1e-9 ? 2.5 : 3;
  return { outer: outer * wall, inner: (outer - 1) * wall };
}

/** Where nothing says how a hollow section was made: cold formed, which has the lesser area and the lower buckling curve. */
export const ASSUMED_MAKING: Making = { finish: 'cold', isAssumed: true };

export function hollowRectangle(depth: number, width: number, wall: number, making: Making): ProfileShape {
  const [long, short] = [Math.max(depth, width), Math.min(depth, width)];
  const size = long === short ? 'SHS' : 'RHS';
  const name = `${size} ${inMillimetres(long, short, wall)}${making.finish === 'hot' ? ' hot' : ''}`;
  return { ...rhs(name, { depth: long, width: short, wall, ...corners(wall, making.finish) }), making };
}

export function tube(diameter: number, wall: number, making: Making): ProfileShape {
  const name = `CHS ${inMillimetres(diameter, wall)}${making.finish === 'hot' ? ' hot' : ''}`;
  return { ...chs(name, diameter / 2, wall), making };
}

export const roundBar = (diameter: number): ProfileShape => circle(`Round ${inMillimetres(diameter)}`, diameter / 2);

export const flatBar = (a: number, b: number): ProfileShape =>
  rectangle(`Flat ${inMillimetres(Math.max(a, b), Math.min(a, b))}`, Math.min(a, b), Math.max(a, b));

/** EN 10056-1: the edges are rounded with half the radius between the legs. */
export function metricAngle(depth: number, width: number, thickness: number): ProfileShape {
  const fillet = nearestRadius(METRIC_RADII, Math.max(depth, width), Math.min(depth, width));
  const edgeRadius = Math.min(fillet / 2, thickness);
  return lShape(`L ${inMillimetres(depth, width, thickness)}`, {
    depth,
    width,
    thickness,
    fillet,
    edgeRadius,
    slope: 0,
  });
}

/** ASTM A6 leaves the radii to the mills; tabled areas and inertias are those of sharp corners. */
export const inchAngle = (name: string, depth: number, width: number, thickness: number): ProfileShape =>
  lShape(name, { depth, width, thickness, fillet: 0, edgeRadius: 0, slope: 0 });

/** Rows are long leg, short leg, radius. */
function nearestRadius(radii: Rows, long: number, short: number): number {
  const distance = ([a, b]: readonly number[]) => Math.hypot(a! - long, b! - short);
  let nearest: readonly number[] | null = null;
  for (const row of radii.values()) if (nearest === null || distance(row) < distance(nearest)) nearest = row;
  return nearest![2]!;
}

/**
 * The wall that ASTM A500 and A53 tubes are reckoned with: 0.93 of the nominal one, to a thousandth of an inch
 * (AISC 360 B4.2, from memory).
 */
export const reckonedWall = (nominal: number): number => Math.round((0.93 * nominal) / 0.0254e-3) * 0.0254e-3;

/** Hollow rectangles of ASTM A500: corners of twice the wall outside (AISC's own assumption for properties, from memory). */
export function americanRectangle(name: string, depth: number, width: number, nominal: number): ProfileShape {
  const wall = reckonedWall(nominal);
  return rhs(name, { depth, width, wall, outer: 2 * wall, inner: wall });
}

export const americanTube = (name: string, diameter: number, nominal: number): ProfileShape =>
  chs(name, diameter / 2, reckonedWall(nominal));
