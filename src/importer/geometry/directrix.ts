import { along, between, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { asNumber, asRef, StepTyped, type StepValue } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { readCurve } from './curve.ts';
import { type CurvePiece, linePiece, pieceEnd, pieceStart, pointAt } from './curve-piece.ts';
import { pieceLength } from './straight-runs.ts';

/**
 * The directrix of a swept solid between its start and end values, in its own coordinates, metres.
 * @throws NotRead (no-axis) where it cannot be read.
 */
export function readDirectrix(
  reading: Reading,
  value: StepValue | undefined,
  start: StepValue | undefined,
  end: StepValue | undefined,
): CurvePiece[] {
  const id = asRef(value);
  if (id === null) throw noAxis('its swept body has no directrix');
  const pieces = readCurve(reading, id);
  if (isLength(start) || isLength(end)) {
    const high = isLength(end) ? reading.length(end) : Number.POSITIVE_INFINITY;
    return cutToLengths(pieces, reading.lengthOrZero(start), high);
  }
  return cutToParameters(reading.typeOf(id), pieces, asNumber(start), asNumber(end));
}

const isLength = (value: StepValue | undefined): boolean =>
  value instanceof StepTyped && value.type.toUpperCase().endsWith('LENGTHMEASURE');

/** A polyline's parameter counts its pieces from 0; a line's counts its own unit vectors. Others are swept whole. */
function cutToParameters(
  type: string,
  pieces: readonly CurvePiece[],
  start: number | null,
  end: number | null,
): CurvePiece[] {
  if (type !== 'IFCPOLYLINE' && type !== 'IFCLINE') return [...pieces];
  if (start === null && end === null) return [...pieces];
  const whole = pieces.length;
  const [low, high] = [start ?? 0, end ?? whole];
  const isWithin = low < high && (type === 'IFCLINE' || (low >= 0 && high <= whole + 1e-6));
  // Some exporters write lengths for parameters: what does not fit the curve is no parameter.
  if (!isWithin || !Number.isFinite(low) || !Number.isFinite(high)) return [...pieces];
  return pieces.flatMap((piece, i) => {
    const from = type === 'IFCLINE' ? low : Math.max(0, low - i);
    const to = type === 'IFCLINE' ? high : Math.min(1, high - i);
    if (!(from < to)) return [];
    const ends = [pieceStart(piece), pieceEnd(piece)] as const;
    return [linePiece(between(...ends, from), between(...ends, to))];
  });
}

function cutToLengths(pieces: readonly CurvePiece[], low: number, high: number): CurvePiece[] {
  let passed = 0;
  const kept = pieces.flatMap((piece): CurvePiece[] => {
    const length = pieceLength(piece);
    const from = Math.max(0, (low - passed) / length);
    const to = Math.min(1, (high - passed) / length);
    passed += length;
    if (!(from < to)) return [];
    return [partOf(piece, from, to)];
  });
  return kept.length > 0 ? kept : [...pieces];
}

function partOf(piece: CurvePiece, from: number, to: number): CurvePiece {
  if (piece.kind === 'line') return linePiece(between(piece.from, piece.to, from), between(piece.from, piece.to, to));
  const sweep = piece.end - piece.start;
  return { ...piece, start: piece.start + from * sweep, end: piece.start + to * sweep };
}

/** A point of a curve with the unit tangent there. */
export interface CurvePoint {
  readonly point: Vec3;
  readonly tangent: Vec3;
}

/** The point so far along a curve, metres; beyond its ends the curve goes on straight. Null where it has no length. */
export function pointAlong(pieces: readonly CurvePiece[], length: number): CurvePoint | null {
  let left = length;
  for (const [i, piece] of pieces.entries()) {
    const own = pieceLength(piece);
    if (!(own > 0)) continue;
    if (left > own && i + 1 < pieces.length) {
      left -= own;
      continue;
    }
    if (piece.kind === 'line') {
      const tangent = unit(subtract(piece.to, piece.from));
      return tangent === null ? null : { point: along(piece.from, tangent, left), tangent };
    }
    const t = piece.start + (left / own) * (piece.end - piece.start);
    const slope = along(scale(piece.u, -Math.sin(t)), piece.v, Math.cos(t));
    const tangent = unit(scale(slope, Math.sign(piece.end - piece.start)));
    return tangent === null ? null : { point: pointAt(piece, t), tangent };
  }
  return null;
}
