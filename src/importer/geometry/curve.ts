import { along, dot, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import {
  asEnum,
  asList,
  asNumber,
  asNumbers,
  asRef,
  asRefs,
  StepRef,
  StepTyped,
  type StepValue,
} from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import { type ArcPiece, arcThrough, type CurvePiece, linePiece, reversed } from './curve-piece.ts';

const DEEPEST = 32;

/**
 * A curve of the file as pieces, in its own coordinate system, metres.
 * @throws NotRead (no-axis) where its class or its contents cannot be read.
 */
export function readCurve(reading: Reading, id: number, depth = 0): CurvePiece[] {
  if (depth > DEEPEST) throw noAxis('its curve refers to itself');
  const type = reading.typeOf(id);
  const points = type === 'IFCPOLYLINE' ? reading.file.onlyRefsAt(id, 0) : null;
  if (points !== null) return throughPoints(points.map((point) => reading.pointOf(point)));
  const args = reading.args(id);
  switch (type) {
    case 'IFCPOLYLINE':
      return throughPoints(asList(args[0]).map((point) => reading.point(point)));
    case 'IFCINDEXEDPOLYCURVE':
      return indexedPolyCurve(reading, args);
    case 'IFCCOMPOSITECURVE':
    case 'IFC2DCOMPOSITECURVE':
    case 'IFCCOMPOSITECURVEONSURFACE':
      return asRefs(args[0]).flatMap((segment) => compositeSegment(reading, segment, depth));
    case 'IFCTRIMMEDCURVE':
      return trimmedCurve(reading, args);
    case 'IFCLINE': {
      const line = readLine(reading, args);
      return [linePiece(line.at, along(line.at, line.step, 1))];
    }
    case 'IFCCIRCLE':
    case 'IFCELLIPSE':
      return [{ ...readConic(reading, type, args), start: 0, end: 2 * Math.PI }];
    case '':
      throw noAxis('the curve it refers to is missing');
    default:
      throw noAxis(`its curve is an ${type}, which is not read`);
  }
}

function throughPoints(points: readonly Vec3[]): CurvePiece[] {
  if (points.length < 2) throw noAxis('its polyline has fewer than two points');
  if (points.length === 2) return [linePiece(points[0]!, points[1]!)];
  return points.slice(1).map((point, i) => linePiece(points[i]!, point));
}

function indexedPolyCurve(reading: Reading, args: readonly StepValue[]): CurvePiece[] {
  const list = asRef(args[0]);
  const rows = list === null ? [] : asList(reading.args(list)[0]);
  const points = rows.map((row) => reading.coordinates(row, reading.units.length));
  const segments = asList(args[1]);
  if (segments.length === 0) return throughPoints(points);
  return segments.flatMap((segment) => {
    const corners = asNumbers(segment).map((index) => {
      const point = points[index - 1];
      if (point === undefined) throw noAxis(`its curve names point ${index} of ${points.length}`);
      return point;
    });
    const isArc = segment instanceof StepTyped && segment.type.toUpperCase() === 'IFCARCINDEX';
    if (isArc && corners.length === 3) return arcThrough(corners[0]!, corners[1]!, corners[2]!);
    return throughPoints(corners);
  });
}

function compositeSegment(reading: Reading, id: number, depth: number): CurvePiece[] {
  const args = reading.args(id);
  const type = reading.typeOf(id);
  const parent = asRef(args[2]);
  if (!type.endsWith('COMPOSITECURVESEGMENT') || parent === null) {
    throw noAxis(`a segment of its curve is ${type === '' ? 'missing' : `an ${type}, which is not read`}`);
  }
  const pieces = readCurve(reading, parent, depth + 1);
  return args[1] === false ? reversed(pieces) : pieces;
}

interface Line {
  readonly at: Vec3;
  /** What one unit of the line's parameter goes. */
  readonly step: Vec3;
}

function readLine(reading: Reading, args: readonly StepValue[]): Line {
  const vector = asRef(args[1]);
  const [orientation, magnitude] = vector === null ? [] : reading.args(vector);
  const direction = unit(reading.direction(orientation) ?? [0, 0, 0]);
  const length = reading.length(magnitude);
  if (direction === null || !(length > 0)) throw noAxis('its line has no direction');
  return { at: reading.point(args[0]), step: scale(direction, length) };
}

function readConic(reading: Reading, type: string, args: readonly StepValue[]): ArcPiece {
  const axes = readAxes(reading, args[0]);
  const first = reading.length(args[1]);
  const second = type === 'IFCELLIPSE' ? reading.length(args[2]) : first;
  if (!(first > 0 && second > 0)) throw noAxis('its arc has no radius');
  return { kind: 'arc', centre: axes.origin, u: scale(axes.x, first), v: scale(axes.y, second), start: 0, end: 0 };
}

function trimmedCurve(reading: Reading, args: readonly StepValue[]): CurvePiece[] {
  const basis = asRef(args[0]);
  const type = basis === null ? '' : reading.typeOf(basis);
  const basisArgs = basis === null ? [] : reading.args(basis);
  const prefersPoints = asEnum(args[4]) === 'CARTESIAN';
  const trims = [readTrim(reading, args[1], prefersPoints), readTrim(reading, args[2], prefersPoints)] as const;
  const isForward = args[3] !== false;
  if (type === 'IFCLINE') {
    const line = readLine(reading, basisArgs);
    const end = (trim: Trim) => ('point' in trim ? trim.point : along(line.at, line.step, trim.parameter));
    return [linePiece(end(trims[0]), end(trims[1]))];
  }
  if (type === 'IFCCIRCLE' || type === 'IFCELLIPSE') {
    const conic = readConic(reading, type, basisArgs);
    const angle = (trim: Trim) => ('point' in trim ? angleOn(conic, trim.point) : reading.angle(trim.parameter));
    const start = angle(trims[0]);
    const sweep = sweepBetween(start, angle(trims[1]), isForward);
    return [{ ...conic, start, end: start + sweep }];
  }
  throw noAxis(
    type === '' ? 'the curve it refers to is missing' : `its trimmed curve lies on an ${type}, which is not read`,
  );
}

/** The turn from `start` to `end` in the sense asked for; a whole one where they are the same. */
function sweepBetween(start: number, end: number, isForward: boolean): number {
  const round = 2 * Math.PI;
  const turn = (((end - start) % round) + round) % round;
  if (isForward) return turn === 0 ? round : turn;
  return turn - round;
}

type Trim = { readonly point: Vec3 } | { readonly parameter: number };

function readTrim(reading: Reading, value: StepValue | undefined, prefersPoint: boolean): Trim {
  const items = asList(value);
  const pointRef = items.find((item) => item instanceof StepRef);
  const parameter = items.map((item) => asNumber(item)).find((number) => number !== null);
  if (pointRef !== undefined && (prefersPoint || parameter === undefined)) return { point: reading.point(pointRef) };
  if (parameter === undefined || parameter === null || !Number.isFinite(parameter))
    throw noAxis('its curve has no ends');
  return { parameter };
}

function angleOn(conic: ArcPiece, point: Vec3): number {
  const d = subtract(point, conic.centre);
  return Math.atan2(dot(d, conic.v) / dot(conic.v, conic.v), dot(d, conic.u) / dot(conic.u, conic.u));
}
