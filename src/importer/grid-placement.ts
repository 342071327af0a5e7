import { along, cross, dot, norm, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { asNumber, asRef, asRefs, type StepValue } from '../step/values.ts';
import { readCurve } from './geometry/curve.ts';
import { type ArcPiece, type CurvePiece, pieceEnd, pieceStart, reversed } from './geometry/curve-piece.ts';
import type { Grid } from './grids.ts';
import { NotRead } from './not-read.ts';
import type { Reading } from './reading.ts';
import { frame, type Transform } from './transform.ts';

export interface GridLocation {
  readonly grid: Grid;
  /** Within the grid's own coordinates. */
  readonly relative: Transform;
}

/** The grid that each grid axis belongs to, by the axis's id. */
export const gridsByAxis = (grids: readonly Grid[]): Map<number, Grid> =>
  new Map(grids.flatMap((grid) => grid.axisIds.map((axis) => [axis, grid] as const)));

/**
 * Where an IfcGridPlacement puts things: at the intersection of two axes moved sideways by their offsets (positive to the
 * left of an axis) and up by the third, x along the first axis unless a direction is given. Axes may be straight, polygons
 * or circular arcs.
 * @throws NotRead (unreadable-element) where the intersection cannot be found.
 */
export function readGridPlacement(
  reading: Reading,
  args: readonly StepValue[],
  grids: ReadonlyMap<number, Grid>,
): GridLocation {
  // IFC4X3 puts PlacementRelTo before the location.
  const references = args.map(asRef).filter((id) => id !== null);
  const isIntersection = (id: number) => reading.file.typeOf(id) === 'IFCVIRTUALGRIDINTERSECTION';
  const [at, towards] = references.filter(isIntersection);
  if (at === undefined) throw cannotFind('its grid placement names no intersection');
  const here = readIntersection(reading, at, grids);
  const direction = references.find((id) => reading.file.typeOf(id) === 'IFCDIRECTION');
  let x: Vec3 = here.tangent;
  if (direction !== undefined) x = reading.coordinates(reading.args(direction)[0], 1);
  else if (towards !== undefined) x = subtract(readIntersection(reading, towards, grids).point, here.point);
  return { grid: here.grid, relative: frame(here.point, null, x) };
}

interface Meeting {
  readonly grid: Grid;
  readonly point: Vec3;
  /** Of the first axis. */
  readonly tangent: Vec3;
}

function readIntersection(reading: Reading, id: number, grids: ReadonlyMap<number, Grid>): Meeting {
  const [pair, offsets] = reading.args(id);
  const [first, second] = asRefs(pair);
  const grid = first === undefined ? undefined : grids.get(first);
  if (first === undefined || second === undefined || grid === undefined || !grids.has(second)) {
    throw cannotFind('its grid placement names grid axes that are missing');
  }
  const list = Array.isArray(offsets) ? offsets : [];
  const offset = (i: number) => (asNumber(list[i]) ?? 0) * reading.units.length;
  const a = readAxis(reading, first).map((piece) => movedLeft(piece, offset(0)));
  const b = readAxis(reading, second).map((piece) => movedLeft(piece, offset(1)));
  const meeting = nearestMeeting(a, b);
  if (meeting === null) throw cannotFind('the grid axes it is placed by are parallel or do not meet');
  const { point, tangent, level } = meeting;
  return { grid, point: [point[0], point[1], level + offset(2)], tangent };
}

function readAxis(reading: Reading, id: number): CurvePiece[] {
  const args = reading.args(id);
  const curve = asRef(args[1]);
  if (curve === null) throw cannotFind('its grid placement names a grid axis without a curve');
  try {
    const pieces = readCurve(reading, curve);
    return args[2] === false ? reversed(pieces) : pieces;
  } catch (problem) {
    if (!(problem instanceof NotRead)) throw problem;
    throw cannotFind(`its grid placement cannot be read: ${problem.message}`);
  }
}

/** In plan: a straight piece, or an arc of a circle. */
function movedLeft(piece: CurvePiece, offset: number): CurvePiece {
  if (offset === 0) return piece;
  if (piece.kind === 'line') {
    const d = unit(flat(subtract(piece.to, piece.from)));
    if (d === null) return piece;
    const left: Vec3 = [-d[1], d[0], 0];
    return { kind: 'line', from: along(piece.from, left, offset), to: along(piece.to, left, offset) };
  }
  // To the left of an arc that turns left is towards its centre.
  const radius = norm(piece.u);
  const turn = Math.sign(cross(piece.u, piece.v)[2] * (piece.end - piece.start));
  const size = (radius - turn * offset) / radius;
  return { ...piece, u: scale(piece.u, size), v: scale(piece.v, size) };
}

interface PlanMeeting {
  readonly point: Vec3;
  readonly tangent: Vec3;
  readonly level: number;
  /** How far the point lies beyond the pieces' own ends, metres. */
  readonly beyond: number;
}

/** Grid axes are taken to go on beyond their drawn ends; of several intersections the one that is drawn counts. */
function nearestMeeting(a: readonly CurvePiece[], b: readonly CurvePiece[]): PlanMeeting | null {
  let best: PlanMeeting | null = null;
  for (const p of a) {
    for (const q of b) {
      for (const point of planMeetings(p, q)) {
        const beyond = beyondEnds(p, point) + beyondEnds(q, point);
        if (best === null || beyond < best.beyond - 1e-9) {
          best = { point, tangent: tangentAt(p, point), level: pieceStart(p)[2], beyond };
        }
      }
    }
  }
  return best;
}

function planMeetings(p: CurvePiece, q: CurvePiece): Vec3[] {
  if (p.kind === 'line' && q.kind === 'line') return lineMeetings(p.from, p.to, q.from, q.to);
  if (p.kind === 'arc' && q.kind === 'arc') return circleMeetings(p, q);
  const [line, arc] = p.kind === 'line' ? [p, q as ArcPiece] : [q as typeof p & { kind: 'line' }, p];
  return lineCircleMeetings(line.from, line.to, arc);
}

function lineMeetings(a: Vec3, b: Vec3, c: Vec3, d: Vec3): Vec3[] {
  const [u, v] = [unit(flat(subtract(b, a))), unit(flat(subtract(d, c)))];
  if (u === null || v === null) return [];
  const turn = cross(u, v)[2];
  if (Math.abs(turn) < 1e-6) return [];
  return [along(flat(a), u, cross(flat(subtract(c, a)), v)[2] / turn)];
}

function lineCircleMeetings(a: Vec3, b: Vec3, arc: ArcPiece): Vec3[] {
  const u = unit(flat(subtract(b, a)));
  if (u === null) return [];
  const away = flat(subtract(arc.centre, a));
  const foot = along(flat(a), u, dot(away, u));
  const square = norm(arc.u) ** 2 - norm(subtract(foot, flat(arc.centre))) ** 2;
  if (square < 0) return [];
  return [-1, 1].map((side) => along(foot, u, side * Math.sqrt(square)));
}

function circleMeetings(p: ArcPiece, q: ArcPiece): Vec3[] {
  const [r, s] = [norm(p.u), norm(q.u)];
  const between = flat(subtract(q.centre, p.centre));
  const d = norm(between);
  const u = unit(between);
  if (u === null || d > r + s || d < Math.abs(r - s)) return [];
  const towards = (d * d + r * r - s * s) / (2 * d);
  const aside = Math.sqrt(Math.max(0, r * r - towards * towards));
  const foot = along(flat(p.centre), u, towards);
  return [-1, 1].map((side) => along(foot, [-u[1], u[0], 0], side * aside));
}

function beyondEnds(piece: CurvePiece, point: Vec3): number {
  const [start, end] = [flat(pieceStart(piece)), flat(pieceEnd(piece))];
  if (piece.kind === 'line') {
    const span = subtract(end, start);
    const t = dot(subtract(point, start), span) / dot(span, span);
    return Math.max(0, -t, t - 1) * norm(span);
  }
  const sweep = piece.end - piece.start;
  const round = 2 * Math.PI;
  const turned = (angleOn(piece, point) - piece.start) * Math.sign(sweep);
  const t = ((turned % round) + round) % round;
  if (t <= Math.abs(sweep) + 1e-9) return 0;
  return Math.min(norm(subtract(point, start)), norm(subtract(point, end)));
}

function tangentAt(piece: CurvePiece, point: Vec3): Vec3 {
  if (piece.kind === 'line') return flat(subtract(piece.to, piece.from));
  const t = angleOn(piece, point);
  return scale(along(scale(piece.u, -Math.sin(t)), piece.v, Math.cos(t)), Math.sign(piece.end - piece.start));
}

function angleOn({ centre, u, v }: ArcPiece, point: Vec3): number {
  const away = subtract(point, flat(centre));
  return Math.atan2(dot(away, v), dot(away, u));
}

const flat = (v: Vec3): Vec3 => [v[0], v[1], 0];

const cannotFind = (reason: string) =>
  new NotRead('unreadable-element', reason, 'Export the model with local placements instead of grid placements.');
