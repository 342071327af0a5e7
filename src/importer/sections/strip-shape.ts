import { sectorialOfStrip, stripLength } from './folded-shapes.ts';
import { endOf, type Point2, pointOnArc, type Ring, startOf } from './outline.ts';
import { inMillimetres, type ProfileShape, requirePositive, requireShape } from './profile-shape.ts';
import { polygonRing } from './rounded-ring.ts';

/** Bends are drawn as chords; 5 degrees each leave the area of a bend 0.03 % short. */
const STEP = Math.PI / 36;

/** A line nearer than this to its own beginning is closed, metres. */
const CLOSED = 1e-6;

/** A strip of even thickness bent along a centre line; a tube where the line is closed. Metres. */
export function stripShape(name: string | null, line: Ring, thickness: number): ProfileShape {
  requirePositive({ thickness });
  const points = pointsOf(line);
  requireShape(points.length > 1, 'its centre line has no length');
  const isClosed = points.length > 3 && distance(points[0]!, points.at(-1)!) < CLOSED;
  if (isClosed) points.pop();
  const left = offset(points, thickness / 2, isClosed);
  const right = offset(points, -thickness / 2, isClosed);
  const called = name ?? `Strip ${inMillimetres(stripLength(points), thickness)}`;
  if (isClosed) {
    // The left of a line that turns anticlockwise is within.
    const [outer, inner] = turns(points) > 0 ? [right, left] : [left, right];
    const outline = { outer: polygonRing(outer), voids: [polygonRing(inner)] };
    return { name: called, shape: 'other', outline, torsion: null, warping: 0, thickness };
  }
  return {
    name: called,
    shape: 'other',
    outline: { outer: polygonRing([...left, ...right.reverse()]), voids: [] },
    torsion: (stripLength(points) * thickness ** 3) / 3,
    thickness,
    ...sectorialOfStrip(points, thickness),
  };
}

function pointsOf(line: Ring): Point2[] {
  const points: Point2[] = [];
  const put = (point: Point2) => {
    const last = points.at(-1);
    if (last === undefined || distance(last, point) > CLOSED) points.push(point);
  };
  for (const edge of line) {
    put(startOf(edge));
    if (edge.kind === 'arc') {
      const count = Math.max(1, Math.ceil(Math.abs(edge.end - edge.start) / STEP));
      for (let i = 1; i < count; i++) put(pointOnArc(edge, edge.start + ((edge.end - edge.start) * i) / count));
    }
    put(endOf(edge));
  }
  return points;
}

/** The points moved to the left by `by`, corners mitred, so that the strip between two such lines has its full area. */
function offset(points: readonly Point2[], by: number, isClosed: boolean): Point2[] {
  const n = points.length;
  return points.map((point, i) => {
    const before = i > 0 || isClosed ? leftOf(points[(i + n - 1) % n]!, point) : null;
    const after = i < n - 1 || isClosed ? leftOf(point, points[(i + 1) % n]!) : null;
    const [a, b] = [before ?? after!, after ?? before!];
    // Along the bisector; a line that runs back on itself has no mitre.
    const reach = 1 + a[0] * b[0] + a[1] * b[1];
    requireShape(reach > 1e-6, 'its centre line runs back upon itself');
    return [point[0] + (by * (a[0] + b[0])) / reach, point[1] + (by * (a[1] + b[1])) / reach];
  });
}

function leftOf(from: Point2, to: Point2): Point2 {
  const length = distance(from, to);
  return [-(to[1] - from[1]) / length, (to[0] - from[0]) / length];
}

/** Twice the area enclosed, positive anticlockwise. */
const turns = (points: readonly Point2[]): number =>
  points.reduce((sum, a, i) => {
    const b = points[(i + 1) % points.length]!;
    return sum + a[0] * b[1] - b[0] * a[1];
  }, 0);

const distance = (a: Point2, b: Point2): number => Math.hypot(b[0] - a[0], b[1] - a[1]);
