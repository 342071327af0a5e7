import { distance, type Vec3 } from '../../domain/vector.ts';
import { asRef, asRefs, type StepValue } from '../../step/values.ts';
import { readAxisLines } from '../geometry/axis-representation.ts';
import { readCurve } from '../geometry/curve.ts';
import { chordOf, isStraight } from '../geometry/curve-piece.ts';
import { noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { mapPosition, type Transform } from '../transform.ts';

/** A line of the analysis model in its own sense, world metres. */
export interface EdgeLine {
  readonly from: Vec3;
  readonly to: Vec3;
  readonly isBent: boolean;
}

const DEEPEST = 16;

/**
 * The line that an item's topology representation draws: an edge, or several in a row. A geometric curve in its place is
 * taken too, since exporters write one.
 * @returns null where there is no representation
 * @throws NotRead (no-axis) where there is one that cannot be read
 */
export function readEdgeLine(reading: Reading, shape: number | null, frame: Transform): EdgeLine | null {
  for (const item of itemsOf(reading, shape)) {
    const type = reading.typeOf(item);
    if (type === 'IFCVERTEXPOINT' || type === 'IFCCARTESIANPOINT') continue;
    return isTopology(type) ? edgeAt(reading, item, frame, 0) : curveAt(reading, item, frame);
  }
  return null;
}

/** The point that an item's representation draws; null where it draws none. */
export function readVertex(reading: Reading, shape: number | null, frame: Transform): Vec3 | null {
  for (const item of itemsOf(reading, shape)) {
    const point = readPoint(reading, item, frame);
    if (point !== null) return point;
  }
  return null;
}

/** A vertex or a point by itself; null where the instance is neither. */
export function readPoint(reading: Reading, id: number, frame: Transform): Vec3 | null {
  const point = pointAt(reading, id);
  return point === null ? null : mapPosition(frame, point);
}

function itemsOf(reading: Reading, shape: number | null): number[] {
  if (shape === null) return [];
  return asRefs(reading.args(shape)[2]).flatMap((representation) => asRefs(reading.args(representation)[3]));
}

const isTopology = (type: string): boolean => /^IFC(SUB|ORIENTED)?EDGE(CURVE|LOOP)?$|^IFCPATH$/.test(type);

function edgeAt(reading: Reading, id: number, frame: Transform, depth: number): EdgeLine {
  if (depth > DEEPEST) throw noAxis('its edge refers to itself');
  const args = reading.args(id);
  const type = reading.typeOf(id);
  if (type === 'IFCORIENTEDEDGE') {
    const element = asRef(args[2]);
    if (element === null) throw noAxis('its edge has no element');
    const edge = edgeAt(reading, element, frame, depth + 1);
    return args[3] === false ? { from: edge.to, to: edge.from, isBent: edge.isBent } : edge;
  }
  if (type === 'IFCPATH' || type === 'IFCEDGELOOP') {
    return inARow(asRefs(args[0]).map((edge) => edgeAt(reading, edge, frame, depth + 1)));
  }
  const [from, to] = [vertexAt(reading, args[0], frame), vertexAt(reading, args[1], frame)];
  return { from, to, isBent: type === 'IFCEDGECURVE' && isCurved(reading, asRef(args[2])) };
}

function vertexAt(reading: Reading, value: StepValue | undefined, frame: Transform): Vec3 {
  const id = asRef(value);
  const point = id === null ? null : readPoint(reading, id, frame);
  if (point === null) throw noAxis('its edge has a vertex without a point');
  return point;
}

function pointAt(reading: Reading, id: number): Vec3 | null {
  const type = reading.typeOf(id);
  if (type === 'IFCCARTESIANPOINT') return reading.coordinates(reading.args(id)[0], reading.units.length);
  return type === 'IFCVERTEXPOINT' && asRef(reading.args(id)[0]) !== null ? reading.point(reading.args(id)[0]) : null;
}

/** An edge's curve is measured where it lies, since only its straightness is asked. */
function isCurved(reading: Reading, curve: number | null): boolean {
  if (curve === null || reading.typeOf(curve) === 'IFCLINE') return false;
  const chord = chordOf(readCurve(reading, curve));
  return chord !== null && !isStraight(chord.rise, distance(chord.from, chord.to));
}

function inARow(edges: readonly EdgeLine[]): EdgeLine {
  const [first] = edges;
  const last = edges.at(-1);
  if (first === undefined || last === undefined) throw noAxis('its path has no edge');
  const length = edges.reduce((sum, edge) => sum + distance(edge.from, edge.to), 0);
  const isStretched = distance(first.from, last.to) > length * (1 - 1e-6);
  return { from: first.from, to: last.to, isBent: !isStretched || edges.some((edge) => edge.isBent) };
}

function curveAt(reading: Reading, item: number, frame: Transform): EdgeLine {
  const [chord] = readAxisLines(reading, [item], frame);
  if (chord === undefined) throw noAxis('it has no edge');
  return { from: chord.from, to: chord.to, isBent: !isStraight(chord.rise, distance(chord.from, chord.to)) };
}
