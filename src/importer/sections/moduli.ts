import { endOf, type Outline, type Point2, piecesOf, pointOnArc, type Ring, startOf } from './outline.ts';
import { type ProfileShape, propertiesOf } from './profile-shape.ts';

/** What checks of bending and buckling ask of a section, SI; y is its horizontal and z its vertical centroidal axis. */
export interface SectionModuli {
  /** I / (greatest distance from the centroid), m3. */
  readonly elasticY: number;
  readonly elasticZ: number;
  /** About the axis that halves the area, m3. */
  readonly plasticY: number;
  readonly plasticZ: number;
  /** Radii of gyration about y, z and the principal axes, m. */
  readonly radiusY: number;
  readonly radiusZ: number;
  readonly radiusMajor: number;
  readonly radiusMinor: number;
  /** From the y axis to the major principal axis, anticlockwise, in (-pi/2, pi/2]. */
  readonly principalAngle: number;
}

/** @throws NotRead (no-section) where the outline encloses no area. */
export function sectionModuli(shape: ProfileShape): SectionModuli {
  const { area, secondX, secondY, productXY, centroid, min, max } = propertiesOf(shape);
  const mean = (secondX + secondY) / 2;
  const half = Math.hypot((secondX - secondY) / 2, productXY);
  const angle = Math.atan2(-2 * productXY, secondX - secondY) / 2;
  const polygons = straightened(shape.outline);
  return {
    elasticY: secondX / Math.max(max[1] - centroid[1], centroid[1] - min[1]),
    elasticZ: secondY / Math.max(max[0] - centroid[0], centroid[0] - min[0]),
    plasticY: plasticModulus(polygons, 1, min[1], max[1]),
    plasticZ: plasticModulus(polygons, 0, min[0], max[0]),
    radiusY: Math.sqrt(secondX / area),
    radiusZ: Math.sqrt(secondY / area),
    radiusMajor: Math.sqrt((mean + half) / area),
    radiusMinor: Math.sqrt(Math.max(0, mean - half) / area),
    principalAngle: angle === -Math.PI / 2 ? Math.PI / 2 : angle,
  };
}

interface Polygon {
  readonly points: readonly Point2[];
  /** 1 for the outline, -1 for what is cut out of it. */
  readonly sign: 1 | -1;
}

/** Chords for arcs: 64 to a full turn leave the plastic modulus of a round bar 0.2 % short. */
const STEP = Math.PI / 32;

function straightened(outline: Outline): Polygon[] {
  return piecesOf(outline).flatMap(({ outer, voids }): Polygon[] => [
    { points: pointsOf(outer), sign: 1 },
    ...voids.map((hole): Polygon => ({ points: pointsOf(hole), sign: -1 })),
  ]);
}

function pointsOf(ring: Ring): Point2[] {
  return ring.flatMap((edge) => {
    if (edge.kind === 'line') return [startOf(edge), endOf(edge)];
    const count = Math.max(1, Math.ceil(Math.abs(edge.end - edge.start) / STEP));
    return Array.from({ length: count + 1 }, (_, i) =>
      pointOnArc(edge, edge.start + ((edge.end - edge.start) * i) / count),
    );
  });
}

/** Sum of the first moments of both halves about the line across `axis` that halves the area. */
function plasticModulus(polygons: readonly Polygon[], axis: 0 | 1, low: number, high: number): number {
  const total = beyond(polygons, axis, low).area;
  let [from, to] = [low, high];
  for (let i = 0; i < 60; i++) {
    const middle = (from + to) / 2;
    if (beyond(polygons, axis, middle).area > total / 2) from = middle;
    else to = middle;
  }
  const level = (from + to) / 2;
  const above = beyond(polygons, axis, level).moment;
  const all = beyond(polygons, axis, low);
  return 2 * above - (all.moment - (level - low) * all.area);
}

/** Area of the part beyond `level` along `axis`, and its first moment about that level. */
function beyond(polygons: readonly Polygon[], axis: 0 | 1, level: number): { area: number; moment: number } {
  let [area, moment] = [0, 0];
  for (const { points, sign } of polygons) {
    let [own, first] = [0, 0];
    points.forEach((a, i) => {
      const b = points[(i + 1) % points.length]!;
      // Edges below the level are laid upon it: what they enclose there has no height.
      const [x1, x2] = [a[1 - axis]!, b[1 - axis]!];
      const [h1, h2] = [a[axis] - level, b[axis] - level];
      const [t1, t2] = insideRange(h1, h2);
      if (t1 >= t2) return;
      const dx = (x2 - x1) * (t2 - t1);
      const [p, q] = [h1 + (h2 - h1) * t1, h1 + (h2 - h1) * t2];
      own += (dx * (p + q)) / 2;
      first += (dx * (p * p + p * q + q * q)) / 6;
    });
    const direction = signedArea(points, axis) < 0 ? -1 : 1;
    area += sign * direction * own;
    moment += sign * direction * first;
  }
  return { area, moment };
}

/** The part of an edge, 0..1, that lies at heights above 0. */
function insideRange(h1: number, h2: number): readonly [number, number] {
  if (h1 >= 0 && h2 >= 0) return [0, 1];
  if (h1 <= 0 && h2 <= 0) return [0, 0];
  const crossing = h1 / (h1 - h2);
  return h1 > 0 ? [0, crossing] : [crossing, 1];
}

function signedArea(points: readonly Point2[], axis: 0 | 1): number {
  return points.reduce((sum, a, i) => {
    const b = points[(i + 1) % points.length]!;
    return sum + ((b[1 - axis]! - a[1 - axis]!) * (a[axis] + b[axis])) / 2;
  }, 0);
}
