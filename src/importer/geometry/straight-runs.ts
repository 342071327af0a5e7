import { add, along, cross, distance, dot, scale, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { type Chord, type CurvePiece, chordOf } from './curve-piece.ts';

/** Straight pieces that turn less than a degree are one straight run. */
const SAME_RUN = Math.cos(Math.PI / 180);

/** Runs shorter than this part of the longest are hooks, fillets and facets. */
const LONG = 1 / 4;

/** The part of the whole length that the long runs make up where a line is straight runs with bends, and not a bow. */
const MOSTLY_STRAIGHT = 0.75;

/** A line of more runs than this is a polygon only where it bends sharply (a zigzag of web bars); else it is a bow in facets. */
const FEW_RUNS = 6;
const SHARP = Math.cos((20 * Math.PI) / 180);

interface Run {
  readonly from: Vec3;
  readonly to: Vec3;
  readonly direction: Vec3;
}

/**
 * The straight lines that a drawn curve is to a truss: itself where it is straight; each long straight run where it is a
 * polygon of some (a cranked chord, a bent web bar), carried on to where the runs meet; the chord of a bow.
 */
export function straightRuns(pieces: readonly CurvePiece[]): Chord[] {
  const [only] = pieces;
  if (pieces.length === 1 && only!.kind === 'line' && unit(subtract(only!.to, only!.from)) !== null) {
    return [{ from: only!.from, to: only!.to, rise: 0 }];
  }
  const whole = chordOf(pieces);
  if (whole === null) return [];
  const runs = mergedRuns(pieces);
  const longest = Math.max(0, ...runs.map(lengthOf));
  const long = runs.filter((run) => lengthOf(run) >= LONG * longest);
  const straight = long.reduce((sum, run) => sum + lengthOf(run), 0);
  const isPolygon = straight >= MOSTLY_STRAIGHT * developedLength(pieces);
  if (!isPolygon || (runs.length === 1 && pieces.length === 1)) return [whole];
  if (long.length === 1) {
    const [only] = long;
    return [{ from: only!.from, to: only!.to, rise: whole.rise }];
  }
  const isSharp = long.slice(1).every((run, i) => dot(run.direction, long[i]!.direction) < SHARP);
  if (long.length > FEW_RUNS && !isSharp) return [whole];
  return carriedOn(long).map(({ from, to }) => ({ from, to, rise: 0, isRun: true }));
}

const lengthOf = (run: Run): number => distance(run.from, run.to);

function mergedRuns(pieces: readonly CurvePiece[]): Run[] {
  const runs: Run[] = [];
  let isOpen = false;
  for (const piece of pieces) {
    if (piece.kind === 'arc') {
      isOpen = false;
      continue;
    }
    const direction = unit(subtract(piece.to, piece.from));
    if (direction === null) continue;
    const last = runs.at(-1);
    if (isOpen && last !== undefined && dot(last.direction, direction) > SAME_RUN) {
      const joined = unit(subtract(piece.to, last.from)) ?? direction;
      runs[runs.length - 1] = { from: last.from, to: piece.to, direction: joined };
    } else runs.push({ from: piece.from, to: piece.to, direction });
    isOpen = true;
  }
  return runs;
}

const ARC_STEPS = 16;

export function developedLength(pieces: readonly CurvePiece[]): number {
  return pieces.reduce((sum, piece) => sum + pieceLength(piece), 0);
}

export function pieceLength(piece: CurvePiece): number {
  if (piece.kind === 'line') return distance(piece.from, piece.to);
  let length = 0;
  const step = (piece.end - piece.start) / ARC_STEPS;
  for (let i = 0; i < ARC_STEPS; i++) {
    const t = piece.start + (i + 0.5) * step;
    const tangent = add(scale(piece.u, -Math.sin(t)), scale(piece.v, Math.cos(t)));
    length += Math.hypot(...tangent) * Math.abs(step);
  }
  return length;
}

/** Neighbouring runs that a fillet or a short piece lies between are carried on to where their lines meet. */
function carriedOn(runs: readonly Run[]): { from: Vec3; to: Vec3 }[] {
  const ends = runs.map(({ from, to }) => ({ from, to }));
  for (let i = 0; i + 1 < runs.length; i++) {
    const [a, b] = [runs[i]!, runs[i + 1]!];
    const meeting = meetingOf(a, b);
    if (meeting === null) continue;
    ends[i]!.to = meeting;
    ends[i + 1]!.from = meeting;
  }
  return ends;
}

/** Where two runs' lines meet beyond the gap between them; null where they pass or run alongside one another. */
function meetingOf(a: Run, b: Run): Vec3 | null {
  const gap = subtract(b.from, a.to);
  const normal = cross(a.direction, b.direction);
  const square = dot(normal, normal);
  if (square < 1e-6) return null;
  const onA = along(a.to, a.direction, dot(cross(gap, b.direction), normal) / square);
  const onB = along(b.from, b.direction, dot(cross(gap, a.direction), normal) / square);
  const reach = Math.hypot(...gap) * 2 + 1e-6;
  const isNear = distance(onA, a.to) <= reach && distance(onB, b.from) <= reach && distance(onA, onB) < 1e-3;
  return isNear ? scale(add(onA, onB), 0.5) : null;
}
