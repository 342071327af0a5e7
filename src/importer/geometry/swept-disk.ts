import { between, cross, scale, subtract, unit } from '../../domain/vector.ts';
import { asNumber, asRef, type StepValue } from '../../step/values.ts';
import { noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { firstAcross, type Transform } from '../transform.ts';
import type { BodyAxis } from './body-axis.ts';
import { readCurve } from './curve.ts';
import { type CurvePiece, chordOf, linePiece, mapPiece, pieceEnd, pieceStart } from './curve-piece.ts';

/** IfcSweptDiskSolid: a round bar or tube along its directrix. */
export function sweptDiskAxis(reading: Reading, book: SectionBook, id: number, world: Transform): BodyAxis {
  const args = reading.args(id);
  const directrix = asRef(args[0]);
  if (directrix === null) throw noAxis('its swept disk has no directrix');
  const type = reading.typeOf(directrix);
  const drawn = cutToParameters(type, readCurve(reading, directrix), args[3], args[4]);
  const chord = chordOf(drawn.map((piece) => mapPiece(world, piece)));
  const along = chord === null ? null : unit(subtract(chord.to, chord.from));
  if (chord === null || along === null) throw noAxis('its directrix has no length');
  // A round section looks the same from all sides: its z axis is the one nearest to upright, at the size of the copy.
  const upright = firstAcross(along, Math.abs(along[2]) > 1 - 1e-9 ? [1, 0, 0] : [0, 0, 1]);
  const size = Math.cbrt(Math.abs(volume(world)));
  const z = scale(upright, size);
  const inner = asNumber(args[2]) === null ? null : reading.length(args[2]);
  return {
    from: 'swept',
    start: chord.from,
    end: chord.to,
    x: cross(z, along),
    y: z,
    profile: book.disk(reading.length(args[1]), inner),
    endProfile: null,
    rise: chord.rise,
  };
}

const volume = (t: Transform): number =>
  t.x[0] * (t.y[1] * t.z[2] - t.y[2] * t.z[1]) -
  t.y[0] * (t.x[1] * t.z[2] - t.x[2] * t.z[1]) +
  t.z[0] * (t.x[1] * t.y[2] - t.x[2] * t.y[1]);

/** A polyline's parameter counts its pieces from 0; a line's counts its own unit vectors. Others are swept whole. */
function cutToParameters(
  type: string,
  pieces: readonly CurvePiece[],
  startValue: StepValue | undefined,
  endValue: StepValue | undefined,
): CurvePiece[] {
  const start = asNumber(startValue);
  const end = asNumber(endValue);
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
