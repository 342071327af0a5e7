import type { ArcEdge, Edge, Point2, Ring } from './outline.ts';

/** A corner of a polygon, rounded off with `radius` where that is more than zero. */
export interface Corner {
  readonly at: Point2;
  readonly radius: number;
}

export const corner = (x: number, y: number, radius = 0): Corner => ({ at: [x, y], radius });

export const polygonRing = (points: readonly Point2[]): Ring => roundedRing(points.map((at) => ({ at, radius: 0 })));

/**
 * The polygon through `corners` with its corners rounded. Where two rounds do not fit on the side between them both are
 * made smaller, since exporters write fillets that are a hair too large for thin flanges.
 */
export function roundedRing(corners: readonly Corner[]): Ring {
  const n = corners.length;
  const wanted = corners.map((_, i) => tangentLength(corners, i));
  const fitting = wanted.map((reach, i) => {
    const ahead = shared(reach, wanted[(i + 1) % n]!, sideLength(corners, i));
    const behind = shared(reach, wanted[(i + n - 1) % n]!, sideLength(corners, (i + n - 1) % n));
    return Math.min(ahead, behind);
  });
  const rounds = corners.map((_, i) => roundOff(corners, i, fitting[i]!));
  const edges: Edge[] = [];
  rounds.forEach((here, i) => {
    const next = rounds[(i + 1) % n]!;
    if (here.arc !== null) edges.push(here.arc);
    if (Math.hypot(next.from[0] - here.to[0], next.from[1] - here.to[1]) > 0) {
      edges.push({ kind: 'line', from: here.to, to: next.from });
    }
  });
  return edges;
}

const shared = (own: number, other: number, side: number): number =>
  own + other <= side ? own : (side * own) / (own + other);

function sideLength(corners: readonly Corner[], i: number): number {
  const a = corners[i]!.at;
  const b = corners[(i + 1) % corners.length]!.at;
  return Math.hypot(b[0] - a[0], b[1] - a[1]);
}

interface Angle {
  readonly back: Point2;
  readonly on: Point2;
  /** Half the angle between the two sides, radians. */
  readonly half: number;
}

function angleAt(corners: readonly Corner[], i: number): Angle | null {
  const n = corners.length;
  const { at } = corners[i]!;
  const back = direction(at, corners[(i + n - 1) % n]!.at);
  const on = direction(at, corners[(i + 1) % n]!.at);
  if (back === null || on === null) return null;
  const half = Math.acos(Math.min(1, Math.max(-1, back[0] * on[0] + back[1] * on[1]))) / 2;
  return half < 1e-6 || half > Math.PI / 2 - 1e-6 ? null : { back, on, half };
}

function direction(from: Point2, to: Point2): Point2 | null {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
  return length > 0 ? [(to[0] - from[0]) / length, (to[1] - from[1]) / length] : null;
}

/** How far from the corner its round touches the sides; 0 for a sharp corner. */
function tangentLength(corners: readonly Corner[], i: number): number {
  const { radius } = corners[i]!;
  const angle = radius > 0 ? angleAt(corners, i) : null;
  return angle === null ? 0 : radius / Math.tan(angle.half);
}

interface Round {
  readonly from: Point2;
  readonly to: Point2;
  readonly arc: ArcEdge | null;
}

function roundOff(corners: readonly Corner[], i: number, reach: number): Round {
  const { at } = corners[i]!;
  const angle = reach > 0 ? angleAt(corners, i) : null;
  if (angle === null) return { from: at, to: at, arc: null };
  const { back, on, half } = angle;
  const radius = reach * Math.tan(half);
  const from: Point2 = [at[0] + back[0] * reach, at[1] + back[1] * reach];
  const to: Point2 = [at[0] + on[0] * reach, at[1] + on[1] * reach];
  const toCentre = reach / Math.cos(half) / (2 * Math.cos(half));
  const centre: Point2 = [at[0] + (back[0] + on[0]) * toCentre, at[1] + (back[1] + on[1]) * toCentre];
  const start = Math.atan2(from[1] - centre[1], from[0] - centre[0]);
  const turn = back[0] * on[1] - back[1] * on[0] < 0 ? 1 : -1;
  const end = start + turn * (Math.PI - 2 * half);
  return { from, to, arc: { kind: 'arc', centre, u: [radius, 0], v: [0, radius], start, end } };
}
