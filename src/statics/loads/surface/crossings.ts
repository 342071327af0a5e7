import type { Vec3 } from '../../../domain/vector.ts';
import { type PlanEdge, planDistance, SAME_PLACE, turn } from './plan.ts';

/** Two edges that meet in plan without a node, or overlap. */
interface Crossing {
  readonly first: number;
  readonly second: number;
  /** m: how far one passes above the other. */
  readonly rise: number;
}

/**
 * Crossed bracing lies in one surface; two layers of a space truss do not. A bar that passes another at more than this share
 * of the shorter one's length is in another layer (crossed rods of a warped bay stay well below, two layers well above).
 */
const LAYER_SHARE = 0.25;

export interface Uncrossed {
  /** What is left when the crossing edges are taken away. */
  readonly edges: readonly PlanEdge[];
  /** Edges that pass one above the other: the surface is none, it has two layers. */
  readonly layered: readonly PlanEdge[];
}

/**
 * Takes away edges until none cross in plan. Of a crossing goes the edge with the more crossings (a rod under many purlins, not
 * the purlins), then the longer; of two alike both go, so that a symmetric roof stays symmetric.
 */
export function removeCrossings(points: readonly Vec3[], edges: readonly PlanEdge[]): Uncrossed {
  let crossings = findCrossings(points, edges);
  const lengths = edges.map(([from, to]) => planDistance(points[from], points[to]));
  const layered = new Set<PlanEdge>();
  for (const { first, second, rise } of crossings) {
    if (rise > LAYER_SHARE * Math.min(lengths[first], lengths[second])) layered.add(edges[first]).add(edges[second]);
  }
  const removed = new Set<number>();
  while (crossings.length > 0) {
    const counts = new Map<number, number>();
    for (const { first, second } of crossings) {
      counts.set(first, (counts.get(first) ?? 0) + 1);
      counts.set(second, (counts.get(second) ?? 0) + 1);
    }
    const isBeaten = new Set<number>();
    for (const { first, second } of crossings) {
      const worse = counts.get(first)! - counts.get(second)! || compareLengths(lengths[first], lengths[second]);
      if (worse > 0) isBeaten.add(second);
      if (worse < 0) isBeaten.add(first);
    }
    for (const edge of counts.keys()) if (!isBeaten.has(edge)) removed.add(edge);
    crossings = crossings.filter(({ first, second }) => !removed.has(first) && !removed.has(second));
  }
  return { edges: edges.filter((_, i) => !removed.has(i)), layered: [...layered] };
}

/** Lengths of a mirrored pair differ by drawing accuracy only. */
const compareLengths = (a: number, b: number): number => (Math.abs(a - b) <= 0.01 * Math.max(a, b) ? 0 : a - b);

/** Sweeps the edges in the order of their left ends. */
function findCrossings(points: readonly Vec3[], edges: readonly PlanEdge[]): Crossing[] {
  const boxes = edges
    .map(([from, to], index) => {
      const [a, b] = [points[from], points[to]];
      return {
        index,
        left: Math.min(a[0], b[0]) - SAME_PLACE,
        right: Math.max(a[0], b[0]) + SAME_PLACE,
        low: Math.min(a[1], b[1]) - SAME_PLACE,
        high: Math.max(a[1], b[1]) + SAME_PLACE,
      };
    })
    .toSorted((a, b) => a.left - b.left);
  const crossings: Crossing[] = [];
  for (let i = 0; i < boxes.length; i++) {
    const box = boxes[i];
    for (let j = i + 1; j < boxes.length && boxes[j].left <= box.right; j++) {
      const other = boxes[j];
      if (other.low > box.high || other.high < box.low) continue;
      const rise = riseAtCrossing(points, edges[box.index], edges[other.index]);
      if (rise !== null) crossings.push({ first: box.index, second: other.index, rise });
    }
  }
  return crossings;
}

/** The difference in height where two edges meet in plan other than at a common node; null where they do not. */
function riseAtCrossing(points: readonly Vec3[], e: PlanEdge, f: PlanEdge): number | null {
  const shared = e.find((node) => f.includes(node));
  const [a, b] = [points[e[0]], points[e[1]]];
  const [c, d] = [points[f[0]], points[f[1]]];
  for (const end of f) {
    const rise = end === shared ? null : riseOver(a, b, points[end]);
    if (rise !== null) return rise;
  }
  for (const end of e) {
    const rise = end === shared ? null : riseOver(c, d, points[end]);
    if (rise !== null) return rise;
  }
  if (shared !== undefined) return null;
  const [tc, td] = [turn(a, b, c), turn(a, b, d)];
  const [ta, tb] = [turn(c, d, a), turn(c, d, b)];
  if (tc > 0 === td > 0 || ta > 0 === tb > 0) return null;
  const t = ta / (ta - tb);
  const s = tc / (tc - td);
  return Math.abs(a[2] + t * (b[2] - a[2]) - (c[2] + s * (d[2] - c[2])));
}

/** How far a point lies above or below the inside of a segment that it is on in plan; null where it is not on it. */
function riseOver(a: Vec3, b: Vec3, point: Vec3): number | null {
  const length = planDistance(a, b);
  if (length === 0 || Math.abs(turn(a, b, point)) / length > SAME_PLACE) return null;
  const t = ((point[0] - a[0]) * (b[0] - a[0]) + (point[1] - a[1]) * (b[1] - a[1])) / length ** 2;
  if (t * length <= SAME_PLACE || (1 - t) * length <= SAME_PLACE) return null;
  return Math.abs(a[2] + t * (b[2] - a[2]) - point[2]);
}
