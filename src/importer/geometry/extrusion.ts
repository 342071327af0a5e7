import { add, scale, UP, unit, type Vec3 } from '../../domain/vector.ts';
import { noAxis } from '../not-read.ts';
import { axesOf } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import type { Point2 } from '../sections/outline.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, mapPlanePoint, mapPosition, movedBy, type Transform } from '../transform.ts';
import type { BodyAxis } from './body-axis.ts';

/** An extrusion's parts, before any profile is read. */
export interface Extrusion {
  readonly profile: number;
  readonly endProfile: number | null;
  /** From the swept plane's coordinates to the world. */
  readonly plane: Transform;
  /** From the swept plane to the far end, in its own coordinates, metres. */
  readonly sweep: Vec3;
}

/** IfcExtrudedAreaSolid and its tapered form. @throws NotRead (no-axis) where it has no profile, direction or depth. */
export function readExtrusion(reading: Reading, id: number, world: Transform): Extrusion {
  const { file } = reading;
  const profile = reading.refAt(id, 0);
  if (profile === null) throw noAxis('its extrusion has no profile');
  const position = file.refAt(id, 1);
  const depth = (file.numberAt(id, 3) ?? Number.NaN) * reading.units.length;
  const stated = reading.directionOf(file.refAt(id, 2)) ?? UP;
  const direction = stated === UP ? UP : unit(stated);
  if (direction === null || Number.isNaN(depth) || depth === 0) throw noAxis('its extrusion has no depth');
  return {
    profile,
    endProfile: file.typeOf(id) === 'IFCEXTRUDEDAREASOLIDTAPERED' ? file.refAt(id, 4) : null,
    plane: compose(world, axesOf(reading, position)),
    sweep: scale(direction, depth),
  };
}

/** The line of the centroids from the swept plane to the far end. */
export function extrusionAxis(book: SectionBook, extrusion: Extrusion): BodyAxis {
  const { plane, profile, endProfile, sweep } = extrusion;
  const centroid = book.centroidOrOrigin(profile);
  const start = mapPlanePoint(plane, centroid[0], centroid[1]);
  return {
    from: 'extrusion',
    start,
    end: endProfile === null ? movedBy(start, plane, sweep) : farEnd(plane, book.centroidOrOrigin(endProfile), sweep),
    x: plane.x,
    y: plane.y,
    profile,
    endProfile,
    rise: 0,
    bow: null,
    isRun: false,
    measured: null,
  };
}

const farEnd = (plane: Transform, [x, y]: Point2, sweep: Vec3): Vec3 => mapPosition(plane, add([x, y, 0], sweep));
