import { add, between, cross, distance, dot, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { asRef } from '../../step/values.ts';
import { type CurvePiece, pointAt } from '../geometry/curve-piece.ts';
import { readDirectrix } from '../geometry/directrix.ts';
import { readExtrusion } from '../geometry/extrusion.ts';
import { noAxis } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import { composeMaps, mapPoint, type PlaneMap } from '../sections/outline.ts';
import { outlineProperties } from '../sections/outline-properties.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, firstAcross, frame, IDENTITY } from '../transform.ts';
import { type Block, boxRound, squareAxes, tightestBox, UPRIGHT } from './block.ts';

/** Rectangles round the outlines of profiles, in the plane that is swept, each found once. */
export class OutlineBoxes {
  private readonly sections: SectionBook;
  private readonly known = new Map<number, PlaneMap>();

  constructor(sections: SectionBook) {
    this.sections = sections;
  }

  /**
   * What makes the rectangle of the square from -1 to 1, along the profile's own axes.
   * @throws NotRead (no-section) where the profile cannot be read.
   */
  of(profile: number): PlaneMap {
    let rectangle = this.known.get(profile);
    if (rectangle === undefined) {
      const { shape, map } = this.sections.profile(profile);
      const extent = outlineProperties(shape.outline);
      if (extent === null) throw noAxis('its profile encloses no area');
      const { min, max } = extent;
      rectangle = composeMaps(map, {
        x: [(max[0] - min[0]) / 2, 0],
        y: [0, (max[1] - min[1]) / 2],
        origin: [(max[0] + min[0]) / 2, (max[1] + min[1]) / 2],
      });
      this.known.set(profile, rectangle);
    }
    return rectangle;
  }
}

const cornersOfRectangle = (rectangle: PlaneMap): Vec3[] =>
  (
    [
      [-1, -1],
      [1, -1],
      [1, 1],
      [-1, 1],
    ] as const
  ).map((corner) => [...mapPoint(rectangle, corner), 0]);

/** IfcExtrudedAreaSolid: the outline's rectangle times the depth; in its tapered form a box round both ends. */
export function extrusionBlock(reading: Reading, outlines: OutlineBoxes, id: number): Block {
  const { profile, endProfile, plane, sweep } = readExtrusion(reading, id, IDENTITY);
  const rectangle = outlines.of(profile);
  if (endProfile !== null) {
    const far = cornersOfRectangle(outlines.of(endProfile)).map((corner) => add(corner, sweep));
    const inPlane = boxRound([...cornersOfRectangle(rectangle), ...far], UPRIGHT);
    return compose(plane, inPlane);
  }
  const half = scale(sweep, 0.5);
  return compose(plane, {
    x: [...rectangle.x, 0],
    y: [...rectangle.y, 0],
    z: half,
    origin: add([...rectangle.origin, 0], half),
  });
}

/** IfcRightCircularCylinder. */
export function cylinderBlock(reading: Reading, id: number): Block {
  const args = reading.args(id);
  const [height, radius] = [reading.length(args[1]), reading.length(args[2])];
  if (!(height > 0 && radius > 0)) throw noAxis('its cylinder has no size');
  const half: Vec3 = [0, 0, height / 2];
  return compose(readAxes(reading, args[0]), { x: [radius, 0, 0], y: [0, radius, 0], z: half, origin: half });
}

/** Steps of a quarter of a right angle: a circle's box is met exactly along its own first axis, to 2 % across it at most. */
const STEP = Math.PI / 8;

/** IfcSweptDiskSolid: a bolt, a bent rod, a run of weld. */
export function sweptDiskBlock(reading: Reading, id: number): Block {
  const args = reading.args(id);
  const radius = reading.length(args[1]);
  const pieces = readDirectrix(reading, args[0], args[3], args[4]);
  const [first] = pieces;
  if (first === undefined || !(radius > 0)) throw noAxis('its swept disk has no size');
  if (pieces.length === 1 && first.kind === 'line') {
    const direction = unit(subtract(first.to, first.from));
    if (direction === null) throw noAxis('its directrix has no length');
    const { x, y, z } = frame(first.from, direction, null);
    return {
      x: scale(x, radius),
      y: scale(y, radius),
      z: scale(z, distance(first.from, first.to) / 2),
      origin: between(first.from, first.to, 0.5),
    };
  }
  const points = pieces.flatMap(pointsOf);
  const chord = unit(subtract(points.at(-1)!, points[0]!));
  const alongChord = chord === null ? [] : [squareAxes(frame(points[0]!, null, chord)) ?? UPRIGHT];
  const axes = squareAxes(tightestBox(points, [UPRIGHT, ...alongChord])) ?? UPRIGHT;
  return boxRound(points, axes, radius);
}

function pointsOf(piece: CurvePiece): Vec3[] {
  if (piece.kind === 'line') return [piece.from, piece.to];
  const steps = Math.max(1, Math.ceil(Math.abs(piece.end - piece.start) / STEP));
  const at = (i: number) => pointAt(piece, piece.start + (i / steps) * (piece.end - piece.start));
  return Array.from({ length: steps + 1 }, (_, i) => at(i));
}

/** IfcRevolvedAreaSolid: a washer, a nut, a bent plate. */
export function revolutionBlock(reading: Reading, outlines: OutlineBoxes, id: number): Block {
  const args = reading.args(id);
  const [profile, axis] = [asRef(args[0]), asRef(args[2])];
  if (profile === null || axis === null) throw noAxis('its revolved body has no profile or no axis');
  const [location, direction] = reading.args(axis);
  const pivot = reading.point(location);
  const angle = reading.angle(args[3]);
  const turnAxis = unit(reading.direction(direction) ?? [0, 0, 1]);
  if (turnAxis === null || !(Math.abs(angle) > 0)) throw noAxis('its revolved body has no angle');
  const corners = cornersOfRectangle(outlines.of(profile));
  const steps = Math.max(1, Math.ceil(Math.abs(angle) / STEP));
  const points = Array.from({ length: steps + 1 }, (_, i) => (i / steps) * angle).flatMap((turn) =>
    corners.map((corner) => add(pivot, turned(subtract(corner, pivot), turnAxis, turn))),
  );
  const outward = subtract(
    corners.reduce((a, b) => (distance(b, pivot) > distance(a, pivot) ? b : a)),
    pivot,
  );
  const x = firstAcross(turnAxis, outward);
  const round = tightestBox(points, [[x, cross(turnAxis, x), turnAxis]]);
  return compose(readAxes(reading, args[1]), round);
}

/** Rodrigues' rotation formula. */
function turned(d: Vec3, axis: Vec3, angle: number): Vec3 {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return add(add(scale(d, c), scale(cross(axis, d), s)), scale(axis, dot(axis, d) * (1 - c)));
}
