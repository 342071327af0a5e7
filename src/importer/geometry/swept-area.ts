import { add, cross, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { asRef, asRefs, StepRef, type StepValue } from '../../step/values.ts';
import { readLinearAxes } from '../linear-placement.ts';
import { noAxis } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, firstAcross, mapDirection, mapPosition, type Transform } from '../transform.ts';
import type { BodyAxis } from './body-axis.ts';
import { type Chord, chordOf, linePiece } from './curve-piece.ts';
import { readDirectrix } from './directrix.ts';
import { straightRuns } from './straight-runs.ts';

/**
 * IfcFixedReferenceSweptAreaSolid and IfcSurfaceCurveSweptAreaSolid: a profile along a directrix, its x axis held towards
 * the reference direction or along the reference surface's normal.
 */
export function sweptAreaAxes(reading: Reading, book: SectionBook, id: number, world: Transform): BodyAxis[] {
  const args = reading.args(id);
  const profile = asRef(args[0]);
  if (profile === null) throw noAxis('its swept body has no profile');
  const frame = compose(world, readAxes(reading, args[1]));
  const pieces = readDirectrix(reading, args[2], args[3], args[4]);
  const isFixed = reading.file.typeOf(id) !== 'IFCSURFACECURVESWEPTAREASOLID';
  return straightRuns(pieces).map((run) => {
    const tangent = unit(subtract(run.to, run.from));
    if (tangent === null) throw noAxis('its directrix has no length');
    const reference = isFixed ? reading.direction(args[5]) : surfaceNormal(reading, asRef(args[5]), tangent);
    const x = firstAcross(tangent, reference);
    return profileAlong(book, profile, run, { x, y: cross(tangent, x), z: tangent, origin: run.from }, frame);
  });
}

/** The profile's centroid carried along a straight line; `plane` is where the profile lies at the line's start. */
function profileAlong(book: SectionBook, profile: number, run: Chord, plane: Transform, frame: Transform): BodyAxis {
  const [cx, cy] = book.centroidOrOrigin(profile);
  const offset = add(scale(plane.x, cx), scale(plane.y, cy));
  return {
    from: 'swept',
    start: mapPosition(frame, add(run.from, offset)),
    end: mapPosition(frame, add(run.to, offset)),
    x: mapDirection(frame, plane.x),
    y: mapDirection(frame, plane.y),
    profile,
    endProfile: null,
    rise: run.rise,
    bow: run.bow?.map((point) => mapPosition(frame, add(point, offset))) ?? null,
    isRun: run.isRun ?? false,
    measured: null,
  };
}

/** Of a plane its own, of an extruded surface the one across its direction and the directrix. */
function surfaceNormal(reading: Reading, id: number | null, tangent: Vec3): Vec3 | null {
  if (id === null) return null;
  const args = reading.args(id);
  const type = reading.typeOf(id);
  if (type === 'IFCPLANE') return readAxes(reading, args[0]).z;
  if (type === 'IFCSURFACEOFLINEAREXTRUSION') return cross(tangent, reading.direction(args[2]) ?? [0, 0, 1]);
  throw noAxis(`it is swept along a curve on an ${type}, which is not read`);
}

/**
 * IfcSectionedSolidHorizontal and IfcSectionedSpine: from the first cross section to the last; how far the directrix bows
 * between two of them is its own rise.
 */
export function sectionedAxis(reading: Reading, book: SectionBook, id: number, world: Transform): BodyAxis {
  const args = reading.args(id);
  const profiles = asRefs(args[1]);
  const places = asRefs(args[2]);
  const [first, last] = [profiles[0], profiles.at(-1)];
  if (first === undefined || last === undefined || places.length !== profiles.length) {
    throw noAxis('its cross sections do not fit their positions');
  }
  const isSpine = reading.file.typeOf(id) === 'IFCSECTIONEDSPINE';
  const planeAt = isSpine ? spinePlane : levelPlane;
  const planes = places.map((place) => compose(world, planeAt(reading, place)));
  const centroids = planes.map((plane, i) => {
    const [x, y] = book.centroidOrOrigin(profiles[i]!);
    return mapPosition(plane, [x, y, 0]);
  });
  const [start, end] = [centroids[0]!, centroids.at(-1)!];
  const chord = chordOf(centroids.slice(1).map((point, i) => linePiece(centroids[i]!, point)));
  if (chord === null || unit(subtract(end, start)) === null) throw noAxis('its sectioned body has no length');
  const rise = Math.max(chord.rise, directrixRise(reading, args[0]));
  return {
    from: 'swept',
    start,
    end,
    x: planes[0]!.x,
    y: planes[0]!.y,
    profile: first,
    endProfile: last === first ? null : last,
    rise,
    // Between cross sections that lie far apart the directrix may bow by itself.
    bow: rise > chord.rise + BETWEEN_SECTIONS ? null : (chord.bow ?? null),
    isRun: false,
    measured: null,
  };
}

/** m by which a directrix may rise more than the straight lines between cross sections that are read for it. */
const BETWEEN_SECTIONS = 0.01;

function spinePlane(reading: Reading, id: number): Transform {
  return readAxes(reading, new StepRef(id));
}

/** Seen along the directrix, y upright and x to the left make a profile's plane right-handed. */
function levelPlane(reading: Reading, id: number): Transform {
  const { x, y, z, origin } = readLinearAxes(reading, id);
  return { x: y, y: z, z: x, origin };
}

function directrixRise(reading: Reading, value: StepValue | undefined): number {
  return chordOf(readDirectrix(reading, value, null, null))?.rise ?? 0;
}
