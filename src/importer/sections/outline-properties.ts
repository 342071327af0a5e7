import {
  type ArcEdge,
  type Edge,
  endOf,
  type Outline,
  type Point2,
  piecesOf,
  pointOnArc,
  type Ring,
  startOf,
} from './outline.ts';

/** Area, first and second moments of a plane figure about its own centroid; x to the right, y up. */
export interface PlaneProperties {
  readonly area: number;
  readonly centroid: Point2;
  /** Integral of y^2. */
  readonly secondX: number;
  /** Integral of x^2. */
  readonly secondY: number;
  /** Integral of x y. */
  readonly productXY: number;
  readonly min: Point2;
  readonly max: Point2;
}

interface Integrals {
  area: number;
  x: number;
  y: number;
  xx: number;
  yy: number;
  xy: number;
}

/**
 * Exact for straight edges, to rounding for arcs: Green's theorem turns each area integral into one round the outline,
 * which Gauss-Legendre points integrate edge by edge. Null where the outline encloses no area.
 */
export function outlineProperties(outline: Outline): PlaneProperties | null {
  const first = outline.outer[0];
  if (first === undefined) return null;
  // Moments are taken about a point of the outline itself, so that a profile drawn far from its origin loses no digits.
  const base = startOf(first);
  const sum: Integrals = { area: 0, x: 0, y: 0, xx: 0, yy: 0, xy: 0 };
  const pieces = piecesOf(outline);
  for (const { outer, voids } of pieces) {
    addTo(sum, ringIntegrals(outer, base), 1);
    for (const hole of voids) addTo(sum, ringIntegrals(hole, base), -1);
  }
  const { area } = sum;
  const { min, max } = extent(pieces.flatMap(({ outer }) => outer));
  const span = (max[0] - min[0]) * (max[1] - min[1]);
  if (!(area > 1e-9 * span) || !(area > 0) || !Number.isFinite(area)) return null;
  const cx = sum.x / area;
  const cy = sum.y / area;
  const secondX = sum.yy - area * cy * cy;
  const secondY = sum.xx - area * cx * cx;
  const product = sum.xy - area * cx * cy;
  return {
    area,
    centroid: [base[0] + cx, base[1] + cy],
    secondX,
    secondY,
    // Rounding noise of a symmetric outline is not an inclined principal axis.
    productXY: Math.abs(product) < 1e-9 * (secondX + secondY) ? 0 : product,
    min,
    max,
  };
}

function addTo(sum: Integrals, part: Integrals, sign: 1 | -1): void {
  for (const key of Object.keys(sum) as (keyof Integrals)[]) sum[key] += sign * part[key];
}

function ringIntegrals(ring: Ring, base: Point2): Integrals {
  const sum: Integrals = { area: 0, x: 0, y: 0, xx: 0, yy: 0, xy: 0 };
  eachGaussPoint(ring, (px, py, dx, dy) => {
    const x = px - base[0];
    const y = py - base[1];
    sum.area += x * dy;
    sum.x += (x * x * dy) / 2;
    sum.y -= (y * y * dx) / 2;
    sum.xx += (x * x * x * dy) / 3;
    sum.yy -= (y * y * y * dx) / 3;
    sum.xy += (x * x * y * dy) / 2;
  });
  if (sum.area < 0) for (const key of Object.keys(sum) as (keyof Integrals)[]) sum[key] = -sum[key];
  return sum;
}

/** Area enclosed and length of one ring. */
export function ringSize(ring: Ring): { area: number; length: number } {
  let area = 0;
  let length = 0;
  const first = ring[0];
  const base = first === undefined ? ([0, 0] as const) : startOf(first);
  eachGaussPoint(ring, (x, _y, dx, dy) => {
    area += (x - base[0]) * dy;
    length += Math.hypot(dx, dy);
  });
  return { area: Math.abs(area), length };
}

// Abscissae and weights of the 6-point Gauss-Legendre rule on (-1, 1), Abramowitz & Stegun table 25.4.
const GAUSS: readonly (readonly [number, number])[] = [
  [0.2386191860831969, 0.467913934572691],
  [0.6612093864662645, 0.3607615730481386],
  [0.9324695142031521, 0.1713244923791704],
];

type Visit = (x: number, y: number, dx: number, dy: number) => void;

function eachGaussPoint(ring: Ring, visit: Visit): void {
  for (let i = 0; i < ring.length; i++) {
    const edge = ring[i]!;
    visitEdge(edge, visit);
    // Polylines need not repeat their first point: the way back is closed by a straight edge.
    const from = endOf(edge);
    const to = startOf(ring[(i + 1) % ring.length]!);
    if (from[0] !== to[0] || from[1] !== to[1]) visitEdge({ kind: 'line', from, to }, visit);
  }
}

function visitEdge(edge: Edge, visit: Visit): void {
  if (edge.kind === 'arc') {
    visitArc(edge, visit);
    return;
  }
  const dx = edge.to[0] - edge.from[0];
  const dy = edge.to[1] - edge.from[1];
  for (const [at, weight] of GAUSS) {
    for (const t of [(1 - at) / 2, (1 + at) / 2]) {
      visit(edge.from[0] + t * dx, edge.from[1] + t * dy, (weight / 2) * dx, (weight / 2) * dy);
    }
  }
}

function visitArc(arc: ArcEdge, visit: Visit): void {
  const pieces = Math.max(1, Math.ceil(Math.abs(arc.end - arc.start) / (Math.PI / 8)));
  const half = (arc.end - arc.start) / pieces / 2;
  for (let i = 0; i < pieces; i++) {
    const middle = arc.start + (2 * i + 1) * half;
    for (const [at, weight] of GAUSS) {
      for (const t of [middle - at * half, middle + at * half]) {
        const [x, y] = pointOnArc(arc, t);
        const c = Math.cos(t) * weight * half;
        const s = Math.sin(t) * weight * half;
        visit(x, y, arc.v[0] * c - arc.u[0] * s, arc.v[1] * c - arc.u[1] * s);
      }
    }
  }
}

function extent(ring: Ring): { min: Point2; max: Point2 } {
  const min: [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const max: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  const take = (p: Point2) => {
    for (const i of [0, 1] as const) {
      min[i] = Math.min(min[i], p[i]);
      max[i] = Math.max(max[i], p[i]);
    }
  };
  for (const edge of ring) {
    take(startOf(edge));
    take(endOf(edge));
    if (edge.kind === 'arc') for (const t of turningPoints(edge)) take(pointOnArc(edge, t));
  }
  return { min, max };
}

/** Where on the arc x or y is at its greatest or least. */
function turningPoints(arc: ArcEdge): number[] {
  const low = Math.min(arc.start, arc.end);
  const high = Math.max(arc.start, arc.end);
  const found: number[] = [];
  for (const i of [0, 1] as const) {
    const t0 = Math.atan2(arc.v[i], arc.u[i]);
    for (let t = t0 + Math.ceil((low - t0) / Math.PI) * Math.PI; t <= high; t += Math.PI) found.push(t);
  }
  return found;
}
