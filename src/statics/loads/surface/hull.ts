import type { Vec3 } from '../../../domain/vector.ts';
import { planArea, planDistance, turn } from './plan.ts';

/** m: a node this near to a side of the outline lies on it. */
const ON_SIDE = 1e-3;

/** m2: less is the rounding of nodes in line. */
const LEAST_AREA = 1e-2;

/**
 * The convex outline of nodes in plan, going round to the left, with the nodes that lie on its sides (monotone chain, Andrew
 * 1979). None where the nodes are in line.
 */
export function convexHull(points: readonly Vec3[], nodes: readonly number[]): number[] {
  const ordered = nodes.toSorted((a, b) => points[a][0] - points[b][0] || points[a][1] - points[b][1]);
  const corners = [...halfHull(points, ordered), ...halfHull(points, ordered.toReversed())];
  if (corners.length < 3 || planArea(corners.map((node) => points[node])) < LEAST_AREA) return [];
  const taken = new Set(corners);
  return corners.flatMap((a, i) => {
    const b = corners[(i + 1) % corners.length];
    const onSide = ordered.filter((node) => !taken.has(node) && isOnSide(points[a], points[b], points[node]));
    for (const node of onSide) taken.add(node);
    return [a, ...onSide.toSorted((p, q) => planDistance(points[a], points[p]) - planDistance(points[a], points[q]))];
  });
}

/** One side of the hull, without its last node. */
function halfHull(points: readonly Vec3[], ordered: readonly number[]): number[] {
  const chain: number[] = [];
  for (const node of ordered) {
    while (chain.length > 1 && turn(points[chain.at(-2)!], points[chain.at(-1)!], points[node]) <= 0) chain.pop();
    chain.push(node);
  }
  return chain.slice(0, -1);
}

/** For points of the hull: whether one lies on the side from a to b, between its ends. */
function isOnSide(a: Vec3, b: Vec3, point: Vec3): boolean {
  const length = planDistance(a, b);
  if (turn(a, b, point) > ON_SIDE * length) return false;
  return planDistance(a, point) < length && planDistance(point, b) < length;
}
