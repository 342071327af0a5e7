import { along, cross, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { asNumber, asRef, asRefs, asString, type StepValue } from '../step/values.ts';
import { readCurve } from './geometry/curve.ts';
import { chordOf, isStraight } from './geometry/curve-piece.ts';
import { NotRead } from './not-read.ts';
import type { Reading } from './reading.ts';
import { frame, type Transform } from './transform.ts';

/** A straight grid axis in its grid's own coordinates, metres, in its sense. */
export interface GridAxis {
  readonly id: number;
  readonly tag: string;
  readonly from: Vec3;
  readonly to: Vec3;
}

export interface Grid {
  readonly id: number;
  /** Its IfcObjectPlacement; null where it has none. */
  readonly placement: number | null;
  /** The U, V and W axes; curved ones are left out. */
  readonly families: readonly (readonly GridAxis[])[];
}

export function readGrids(reading: Reading): Grid[] {
  return reading.file.idsOf('IFCGRID').map((id) => {
    const args = reading.args(id);
    return { id, placement: asRef(args[5]), families: [7, 8, 9].map((i) => readFamily(reading, args[i])) };
  });
}

function readFamily(reading: Reading, value: StepValue | undefined): GridAxis[] {
  const axes: GridAxis[] = [];
  for (const id of asRefs(value)) {
    const args = reading.args(id);
    const curve = asRef(args[1]);
    const ends = curve === null ? null : straightCurve(reading, curve);
    if (ends === null) continue;
    const [from, to] = args[2] === false ? [ends[1], ends[0]] : ends;
    axes.push({ id, tag: (asString(args[0]) ?? '').trim(), from, to });
  }
  return axes;
}

function straightCurve(reading: Reading, id: number): readonly [Vec3, Vec3] | null {
  try {
    const chord = chordOf(readCurve(reading, id));
    if (chord === null) return null;
    const length = norm(subtract(chord.to, chord.from));
    return length > 0 && isStraight(chord, length) ? [chord.from, chord.to] : null;
  } catch (problem) {
    // A grid axis that cannot be read names no place; nothing else depends on it.
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

/** The grid axes by id, each with the grid it belongs to. */
export function axesById(grids: readonly Grid[]): Map<number, { grid: Grid; axis: GridAxis }> {
  const found = new Map<number, { grid: Grid; axis: GridAxis }>();
  for (const grid of grids) {
    for (const axis of grid.families.flat()) found.set(axis.id, { grid, axis });
  }
  return found;
}

export interface GridLocation {
  readonly grid: Grid;
  /** Within the grid's own coordinates. */
  readonly relative: Transform;
}

/**
 * Where an IfcGridPlacement puts things: at the intersection of two straight axes moved sideways by their offsets
 * (positive to the left of an axis) and up by the third, x along the first axis unless a direction is given.
 * @throws NotRead (unreadable-element) where the intersection cannot be found.
 */
export function readGridPlacement(
  reading: Reading,
  args: readonly StepValue[],
  axes: ReadonlyMap<number, { grid: Grid; axis: GridAxis }>,
): GridLocation {
  // IFC4X3 puts PlacementRelTo before the location.
  const references = args.map(asRef).filter((id) => id !== null);
  const isIntersection = (id: number) => reading.file.typeOf(id) === 'IFCVIRTUALGRIDINTERSECTION';
  const [at, towards] = references.filter(isIntersection);
  if (at === undefined) throw cannotFind('its grid placement names no intersection');
  const here = readIntersection(reading, at, axes);
  const direction = references.find((id) => reading.file.typeOf(id) === 'IFCDIRECTION');
  let x = subtract(here.first.to, here.first.from);
  if (direction !== undefined) x = reading.coordinates(reading.args(direction)[0], 1);
  else if (towards !== undefined) x = subtract(readIntersection(reading, towards, axes).point, here.point);
  return { grid: here.grid, relative: frame(here.point, null, x) };
}

function readIntersection(
  reading: Reading,
  id: number,
  axes: ReadonlyMap<number, { grid: Grid; axis: GridAxis }>,
): { grid: Grid; first: GridAxis; point: Vec3 } {
  const [pair, offsets] = reading.args(id);
  const [first, second] = asRefs(pair).map((axis) => axes.get(axis));
  if (first === undefined || second === undefined) {
    throw cannotFind('its grid placement names grid axes that are curved or missing');
  }
  const list = Array.isArray(offsets) ? offsets : [];
  const offset = (i: number) => (asNumber(list[i]) ?? 0) * reading.units.length;
  const a = movedLeft(first.axis, offset(0));
  const b = movedLeft(second.axis, offset(1));
  const point = a === null || b === null ? null : meeting(a, b);
  if (point === null) throw cannotFind('the grid axes it is placed by are parallel');
  return { grid: first.grid, first: first.axis, point: [point[0], point[1], first.axis.from[2] + offset(2)] };
}

interface FlatLine {
  readonly at: Vec3;
  readonly d: Vec3;
}

function movedLeft(axis: GridAxis, offset: number): FlatLine | null {
  const d = unit([axis.to[0] - axis.from[0], axis.to[1] - axis.from[1], 0]);
  return d === null ? null : { at: along(axis.from, [-d[1], d[0], 0], offset), d };
}

/** Where two lines in plan meet; null where they are parallel. */
export function meeting(a: FlatLine, b: FlatLine): Vec3 | null {
  const turn = cross(a.d, b.d)[2];
  if (Math.abs(turn) < 1e-6) return null;
  const between = subtract(b.at, a.at);
  return along(a.at, a.d, (between[0] * b.d[1] - between[1] * b.d[0]) / turn);
}

const cannotFind = (reason: string) =>
  new NotRead('unreadable-element', reason, 'Export the model with local placements instead of grid placements.');
