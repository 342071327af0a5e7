import { add, along, cross, distance, dot, norm, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { mapDirection, mapPosition, type Transform } from '../transform.ts';

/** A curve in space as a chain of straight pieces and elliptical arcs, metres. */
export type CurvePiece = LinePiece | ArcPiece;

export interface LinePiece {
  readonly kind: 'line';
  readonly from: Vec3;
  readonly to: Vec3;
}

/** The points `centre + u cos t + v sin t` for t from `start` to `end`, radians. */
export interface ArcPiece {
  readonly kind: 'arc';
  readonly centre: Vec3;
  readonly u: Vec3;
  readonly v: Vec3;
  readonly start: number;
  readonly end: number;
}

export const linePiece = (from: Vec3, to: Vec3): LinePiece => ({ kind: 'line', from, to });

export const pointAt = (arc: ArcPiece, t: number): Vec3 =>
  along(along(arc.centre, arc.u, Math.cos(t)), arc.v, Math.sin(t));

export const pieceStart = (p: CurvePiece): Vec3 => (p.kind === 'line' ? p.from : pointAt(p, p.start));
export const pieceEnd = (p: CurvePiece): Vec3 => (p.kind === 'line' ? p.to : pointAt(p, p.end));

export function reversed(pieces: readonly CurvePiece[]): CurvePiece[] {
  return pieces
    .map((p): CurvePiece => (p.kind === 'line' ? linePiece(p.to, p.from) : { ...p, start: p.end, end: p.start }))
    .reverse();
}

export function mapPiece(t: Transform, p: CurvePiece): CurvePiece {
  if (p.kind === 'line') return linePiece(mapPosition(t, p.from), mapPosition(t, p.to));
  return { ...p, centre: mapPosition(t, p.centre), u: mapDirection(t, p.u), v: mapDirection(t, p.v) };
}

/** The arc from `a` through `b` to `c`; straight pieces where the three lie in line. */
export function arcThrough(a: Vec3, b: Vec3, c: Vec3): CurvePiece[] {
  const ab = subtract(b, a);
  const ac = subtract(c, a);
  const normal = cross(ab, ac);
  const size = dot(normal, normal);
  if (!(size > 1e-18 * dot(ab, ab) * dot(ac, ac))) return [linePiece(a, b), linePiece(b, c)];
  // Centre of the circle through three points, as seen from a.
  const toCentre = scale(
    add(scale(cross(normal, ab), dot(ac, ac)), scale(cross(ac, normal), dot(ab, ab))),
    1 / (2 * size),
  );
  const centre = add(a, toCentre);
  const u = subtract(a, centre);
  const v = cross(unit(normal) as Vec3, u);
  const radius = norm(u);
  const last = subtract(c, centre);
  const turn = Math.atan2(dot(last, v) / radius, dot(last, u) / radius);
  return [{ kind: 'arc', centre, u, v, start: 0, end: turn > 0 ? turn : turn + 2 * Math.PI }];
}

/** How a chain of pieces runs: its ends, and how far it leaves the straight line between them. */
export interface Chord {
  readonly from: Vec3;
  readonly to: Vec3;
  /** Greatest distance of the curve from the chord, metres. */
  readonly rise: number;
  /** One of several straight runs of a line that bends between them. */
  readonly isRun?: boolean;
  /** Of a curve that is not straight: points along it from `from` to `to`. */
  readonly bow?: readonly Vec3[];
}

export function chordOf(pieces: readonly CurvePiece[]): Chord | null {
  const first = pieces[0];
  const last = pieces.at(-1);
  if (first === undefined || last === undefined) return null;
  const from = pieceStart(first);
  const to = pieceEnd(last);
  const direction = unit(subtract(to, from));
  const away = (p: Vec3): number => {
    const d = subtract(p, from);
    return direction === null ? norm(d) : norm(along(d, direction, -dot(d, direction)));
  };
  let rise = 0;
  for (const piece of pieces) for (const p of samples(piece)) rise = Math.max(rise, away(p));
  return isStraight(rise, distance(from, to)) ? { from, to, rise } : { from, to, rise, bow: pointsAlong(pieces) };
}

/** Straight pieces between points along an arc leave it by no more, m. */
const FACET_RISE = 1e-3;

/** And turn by no more than 4 degrees, each against the last. */
const FACET_TURN = Math.PI / 45;

/** Nearer points are one, m. */
const SAME_POINT = 1e-4;

/** Points along a chain of pieces: all corners, and as many on its arcs that straight pieces between them stand for it. */
function pointsAlong(pieces: readonly CurvePiece[]): Vec3[] {
  const points: Vec3[] = [];
  for (const piece of pieces) {
    const own = piece.kind === 'line' ? [piece.from, piece.to] : pointsOnArc(piece);
    for (const point of own) {
      const last = points.at(-1);
      if (last === undefined || distance(last, point) > SAME_POINT) points.push(point);
    }
  }
  return points;
}

function pointsOnArc(arc: ArcPiece): Vec3[] {
  const radius = Math.max(norm(arc.u), norm(arc.v));
  const step = Math.min(FACET_TURN, Math.sqrt((8 * FACET_RISE) / radius));
  const sweep = arc.end - arc.start;
  const count = Math.max(2, Math.ceil(Math.abs(sweep) / step));
  return Array.from({ length: count + 1 }, (_, i) => pointAt(arc, arc.start + (i / count) * sweep));
}

function samples(piece: CurvePiece): Vec3[] {
  if (piece.kind === 'line') return [piece.from, piece.to];
  const steps = 16;
  return Array.from({ length: steps + 1 }, (_, i) =>
    pointAt(piece, piece.start + (i / steps) * (piece.end - piece.start)),
  );
}

/** A curve nearer to its chord than this is straight: a tenth of a millimetre, or what rounded coordinates leave. */
export const isStraight = (rise: number, length: number): boolean => rise <= Math.max(1e-4, 1e-5 * length);
