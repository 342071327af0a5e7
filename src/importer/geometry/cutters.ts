import { along, dot, norm, subtract, type Vec3 } from '../../domain/vector.ts';
import { asEnum, asRef } from '../../step/values.ts';
import { NotRead } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Reading } from '../reading.ts';
import { endOf, mapOutline, type Point2, pointOnArc, type Ring, startOf } from '../sections/outline.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, inverse, mapDirection, mapPosition, type Transform } from '../transform.ts';
import { readCurve } from './curve.ts';
import { readExtrusion } from './extrusion.ts';
import { readFaces } from './face-sets.ts';
import { type Face, type Mesh, meshOf, type Polygon } from './mesh.ts';

/** Part of a straight axis, as fractions of the way from its start (0) to its end (1). */
export type Span = readonly [from: number, to: number];

export interface AxisLine {
  readonly start: Vec3;
  readonly end: Vec3;
}

const EVERYWHERE: Span = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/** Flatter than 15 degrees to the member a cut is a taper or a notch along it, not its end (common practice in detailing). */
const FLATTEST_END_CUT = Math.sin((15 * Math.PI) / 180);

const DEEPEST = 32;

/**
 * Which parts of the axis lie within a cutting operand: plane half-spaces, bounded ones, extrusions, and unions of
 * these. Null where the operand is of another kind, or does not cut across the axis.
 */
export function spansWithin(
  reading: Reading,
  book: SectionBook,
  id: number,
  world: Transform,
  line: AxisLine,
  depth = 0,
): Span[] | null {
  if (depth > DEEPEST) return null;
  const type = reading.typeOf(id);
  const args = reading.args(id);
  switch (type) {
    case 'IFCHALFSPACESOLID':
    case 'IFCBOXEDHALFSPACE': {
      const span = halfSpaceSpan(reading, id, world, line);
      return span === null ? null : [span];
    }
    case 'IFCPOLYGONALBOUNDEDHALFSPACE': {
      const span = halfSpaceSpan(reading, id, world, line);
      const boundary = asRef(args[3]);
      if (span === null || boundary === null) return null;
      const frame = compose(world, readAxes(reading, args[2]));
      const corners = boundaryCorners(reading, boundary);
      return corners === null ? null : both([span], spansInPrism(frame, corners, EVERYWHERE, line));
    }
    case 'IFCEXTRUDEDAREASOLID':
      return extrusionSpans(reading, book, id, world, line);
    case 'IFCCSGSOLID': {
      const root = asRef(args[0]);
      return root === null ? null : spansWithin(reading, book, root, world, line, depth + 1);
    }
    case 'IFCBOOLEANRESULT':
    case 'IFCBOOLEANCLIPPINGRESULT': {
      const [first, second] = [asRef(args[1]), asRef(args[2])].map((part) =>
        part === null ? null : spansWithin(reading, book, part, world, line, depth + 1),
      );
      return combined(asEnum(args[0]), first ?? null, second ?? null);
    }
    default:
      return meshSpans(reading, id, world, line);
  }
}

/** What a boolean of two cutters covers; a part that cuts nothing across the axis takes nothing away and adds nothing. */
function combined(operator: string | null, first: Span[] | null, second: Span[] | null): Span[] | null {
  if (first === null) return operator === 'UNION' ? second : null;
  if (second === null) return first;
  if (operator === 'UNION') return [...first, ...second];
  return both(first, operator === 'INTERSECTION' ? second : outside(second));
}

function outside(spans: readonly Span[]): Span[] {
  const gaps: Span[] = [];
  let from = Number.NEGATIVE_INFINITY;
  for (const [a, b] of [...spans].sort((s, t) => s[0] - t[0])) {
    if (a > from) gaps.push([from, a]);
    from = Math.max(from, b);
  }
  gaps.push([from, Number.POSITIVE_INFINITY]);
  return gaps;
}

/** Where the line is within a cutter drawn by its faces: it enters and leaves by turns. */
function meshSpans(reading: Reading, id: number, world: Transform, line: AxisLine): Span[] | null {
  const faces = facesOrNone(reading, id, world);
  if (faces === null) return null;
  const mesh = meshOf(faces);
  const [start, d] = [subtract(line.start, mesh.base), subtract(line.end, line.start)];
  const crossings = mesh.faces
    .flatMap((face) => {
      const slope = dot(face.area, d);
      if (Math.abs(slope) < 1e-9 * norm(face.area) * norm(d)) return [];
      const t = dot(subtract(mesh.points[face.rings[0]![0]!]!, start), face.area) / slope;
      return isOnFace(mesh, face, along(start, d, t)) ? [t] : [];
    })
    .sort((a, b) => a - b);
  const spans: Span[] = [];
  for (let i = 0; i + 1 < crossings.length; i += 2) spans.push([crossings[i]!, crossings[i + 1]!]);
  return spans;
}

function facesOrNone(reading: Reading, id: number, world: Transform): readonly Polygon[] | null {
  try {
    return readFaces(reading, id, world);
  } catch (problem) {
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

/** Seen along the normal's greatest part, so that no face is seen on edge. */
function isOnFace(mesh: Mesh, { rings, area }: Face, p: Vec3): boolean {
  const sizes = area.map(Math.abs);
  const [i, j] = sizes[2]! >= Math.max(sizes[0]!, sizes[1]!) ? [0, 1] : sizes[1]! >= sizes[0]! ? [0, 2] : [1, 2];
  const flat = (q: Vec3): Point2 => [q[i]!, q[j]!];
  return (
    rings.filter((ring) =>
      isInside(
        ring.map((corner) => flat(mesh.points[corner]!)),
        flat(p),
      ),
    ).length %
      2 ===
    1
  );
}

function halfSpaceSpan(reading: Reading, id: number, world: Transform, line: AxisLine): Span | null {
  const [surface, agreement] = reading.args(id);
  const plane = asRef(surface);
  if (plane === null || reading.typeOf(plane) !== 'IFCPLANE') return null;
  const axes = compose(world, readAxes(reading, reading.args(plane)[0]));
  // The normal of a mirrored or stretched copy is not the copy of the normal.
  const back = inverse(axes);
  if (back === null) return null;
  const height = (p: Vec3) => mapPosition(back, p)[2];
  const [start, end] = [height(line.start), height(line.end)];
  const steepness = Math.abs(end - start) / norm(mapDirection(back, subtract(line.end, line.start)));
  if (!(steepness > FLATTEST_END_CUT)) return null;
  const at = start / (start - end);
  // Agreement true: the solid lies on the side that the normal points away from.
  const isBelow = agreement !== false;
  return end > start === isBelow ? [Number.NEGATIVE_INFINITY, at] : [at, Number.POSITIVE_INFINITY];
}

function extrusionSpans(
  reading: Reading,
  book: SectionBook,
  id: number,
  world: Transform,
  line: AxisLine,
): Span[] | null {
  try {
    const { profile, plane, sweep } = readExtrusion(reading, id, world);
    const { shape, map } = book.profile(profile);
    const outline = mapOutline(map, shape.outline);
    // Coordinates along the sweep, so that the prism stands on its base whichever way it leans.
    const prism = { ...plane, z: mapDirection(plane, sweep) };
    return spansInPrism(prism, ringCorners(outline.outer), [0, 1], line);
  } catch (problem) {
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

function boundaryCorners(reading: Reading, id: number): Point2[] | null {
  try {
    return readCurve(reading, id).map((piece) => {
      const [x, y] = piece.kind === 'line' ? piece.from : piece.centre;
      return [x, y];
    });
  } catch (problem) {
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

function ringCorners(ring: Ring): Point2[] {
  return ring.flatMap((edge): Point2[] => {
    if (edge.kind === 'line') return [startOf(edge)];
    const steps = 16;
    const arc = Array.from({ length: steps }, (_, i) =>
      pointOnArc(edge, edge.start + (i / steps) * (edge.end - edge.start)),
    );
    return [...arc, endOf(edge)];
  });
}

/** Where the line is within a prism: over the polygon in the frame's x and y, and between `heights` of its z. */
function spansInPrism(frame: Transform, corners: readonly Point2[], heights: Span, line: AxisLine): Span[] {
  const back = inverse(frame);
  if (back === null) return [];
  const a = mapPosition(back, line.start);
  const d = subtract(mapPosition(back, line.end), a);
  return both(spansInPolygon(corners, a, d), [spanBetween(a[2], d[2], heights)]);
}

function spanBetween(at: number, step: number, [low, high]: Span): Span {
  if (Math.abs(step) < 1e-12) return at >= low && at <= high ? EVERYWHERE : [0, 0];
  const [t0, t1] = [(low - at) / step, (high - at) / step];
  return t0 < t1 ? [t0, t1] : [t1, t0];
}

function spansInPolygon(corners: readonly Point2[], a: Vec3, d: Vec3): Span[] {
  const isPoint = Math.hypot(d[0], d[1]) < 1e-9 * Math.max(1e-9, Math.abs(d[2]));
  if (isPoint) return isInside(corners, [a[0], a[1]]) ? [EVERYWHERE] : [];
  const crossings: number[] = [];
  corners.forEach((p, i) => {
    const q = corners[(i + 1) % corners.length]!;
    // Which side of the line each corner lies on; a corner on the line counts as left of it.
    const side = (c: Point2) => (c[0] - a[0]) * d[1] - (c[1] - a[1]) * d[0];
    const [s, t] = [side(p), side(q)];
    if (s >= 0 === t >= 0) return;
    const k = s / (s - t);
    const x = p[0] + k * (q[0] - p[0]) - a[0];
    const y = p[1] + k * (q[1] - p[1]) - a[1];
    crossings.push((x * d[0] + y * d[1]) / (d[0] * d[0] + d[1] * d[1]));
  });
  crossings.sort((s, t) => s - t);
  const spans: Span[] = [];
  for (let i = 0; i + 1 < crossings.length; i += 2) spans.push([crossings[i]!, crossings[i + 1]!]);
  return spans;
}

function isInside(corners: readonly Point2[], p: Point2): boolean {
  let inside = false;
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length]!;
    if (a[1] > p[1] !== b[1] > p[1] && p[0] < a[0] + ((p[1] - a[1]) * (b[0] - a[0])) / (b[1] - a[1])) inside = !inside;
  });
  return inside;
}

/** What lies in one of `a` and in one of `b`. */
function both(a: readonly Span[], b: readonly Span[]): Span[] {
  return a.flatMap((s) =>
    b.map((t): Span => [Math.max(s[0], t[0]), Math.min(s[1], t[1])]).filter(([from, to]) => from < to),
  );
}

/** What is left of the axis when its ends are cut off; cuts that leave both ends standing are holes and notches. */
export function cutEnds(spans: readonly Span[]): Span {
  let [from, to] = [0, 1];
  const near = 1e-6;
  for (const [a, b] of [...spans].sort((s, t) => s[0] - t[0])) {
    if (a <= from + near && b < to - near) from = Math.max(from, b);
  }
  for (const [a, b] of [...spans].sort((s, t) => t[1] - s[1])) {
    if (b >= to - near && a > from + near) to = Math.min(to, a);
  }
  return [from, to];
}
