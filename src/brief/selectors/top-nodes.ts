import type { Truss } from '../../domain/truss.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { barRuns } from './bar-runs.ts';
import { type PlanBox, PlanGrid } from './plan-grid.ts';

/**
 * m: how far in plan a bar may pass from the vertical line through a node, and how far above the node it must lie, to lie
 * above it. A joint is taken to be at least this large (METHODS 2), so that modelled offsets within one do not count.
 */
const JOINT_SIZE = 0.05;

/**
 * 1 for every node above which nothing lies: no bar, and no triangle or quadrilateral closed by bars, on the vertical line
 * through it. Faces are looked up in a plan grid of the nodes, one after another, so the work grows with their number.
 */
export function topNodes(truss: Truss): Uint8Array {
  const points = truss.nodes.map((node) => node.at);
  const isTop = new Uint8Array(points.length).fill(1);
  const edges = barRuns(truss).flatMap(edgesOfRun);
  const grid = new PlanGrid(points, meanPlanLength(points, edges));
  const upwards = points.map((_, node) => node).toSorted((a, b) => points[a][2] - points[b][2]);
  let lowestTop = 0;
  /** Marks the nodes in the box of the corners, widened by `margin`, that are lower than a corner and pass the test. */
  const cover = (corners: readonly number[], margin: number, liesAbove: Test) => {
    const box = boxOf(points, corners);
    // Once the lower layer is marked, most faces have nothing left to lie above.
    while (lowestTop < upwards.length && isTop[upwards[lowestTop]] === 0) lowestTop++;
    if (lowestTop === upwards.length || points[upwards[lowestTop]][2] + JOINT_SIZE >= box.highest) return;
    grid.visitBelow(box, margin, box.highest - JOINT_SIZE, (node) => {
      if (corners.length > 2 && corners.includes(node)) return;
      const at = corners.map((corner) => points[corner]);
      if (!liesAbove(points[node], at)) return;
      isTop[node] = 0;
      grid.remove(node);
    });
  };
  for (const edge of edges) cover(edge, JOINT_SIZE, isBarAbove);
  visitFaces(edges, points.length, (corners) => cover(corners, 0, isFaceAbove));
  return isTop;
}

type Test = (node: Vec3, corners: readonly Vec3[]) => boolean;

function boxOf(points: readonly Vec3[], corners: readonly number[]): PlanBox & { highest: number } {
  const box = { left: Infinity, low: Infinity, right: -Infinity, high: -Infinity, highest: -Infinity };
  for (const corner of corners) {
    const point = points[corner];
    box.left = Math.min(box.left, point[0]);
    box.low = Math.min(box.low, point[1]);
    box.right = Math.max(box.right, point[0]);
    box.high = Math.max(box.high, point[1]);
    box.highest = Math.max(box.highest, point[2]);
  }
  return box;
}

type Edge = readonly [from: number, to: number];

/** A bar that carries nodes closes faces as a whole and by the pieces between them. */
function edgesOfRun(run: readonly number[]): Edge[] {
  const whole: Edge = [run[0], run.at(-1)!];
  const pieces = run.slice(1).map((node, i): Edge => [run[i], node]);
  return (pieces.length > 1 ? [whole, ...pieces] : [whole]).filter(([from, to]) => from !== to);
}

function meanPlanLength(points: readonly Vec3[], edges: readonly Edge[]): number {
  if (edges.length === 0) return 1;
  const total = edges.reduce((sum, [from, to]) => {
    const [a, b] = [points[from], points[to]];
    return sum + Math.hypot(b[0] - a[0], b[1] - a[1]);
  }, 0);
  return total / edges.length;
}

function isBarAbove(node: Vec3, ends: readonly Vec3[]): boolean {
  const [a, b] = ends as [Vec3, Vec3];
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const planLength = Math.hypot(dx, dy);
  const t = ((node[0] - a[0]) * dx + (node[1] - a[1]) * dy) / planLength ** 2;
  const nearest = planLength === 0 ? 0 : Math.min(1, Math.max(0, t));
  if (Math.hypot(a[0] + nearest * dx - node[0], a[1] + nearest * dy - node[1]) > JOINT_SIZE) return false;
  const height = planLength < JOINT_SIZE ? Math.max(a[2], b[2]) : a[2] + nearest * (b[2] - a[2]);
  return height > node[2] + JOINT_SIZE;
}

/** Over the plan of a warped quadrilateral its height is the mean of the two ways to fold it. */
function isFaceAbove(node: Vec3, corners: readonly Vec3[]): boolean {
  const [a, b, c, d] = corners as [Vec3, Vec3, Vec3, Vec3?];
  const triangles =
    d === undefined
      ? [[a, b, c]]
      : [
          [a, b, c],
          [a, c, d],
          [a, b, d],
          [b, c, d],
        ];
  let sum = 0;
  let count = 0;
  for (const [p, q, r] of triangles as [Vec3, Vec3, Vec3][]) {
    const height = heightOver(node, p, q, r);
    if (height === null) continue;
    sum += height;
    count++;
  }
  return count > 0 && (d === undefined || isInPlan(node, corners)) && sum / count > node[2] + JOINT_SIZE;
}

/** Height of a triangle on the vertical line through a point; null where the line misses it or it stands upright. */
function heightOver(point: Vec3, a: Vec3, b: Vec3, c: Vec3): number | null {
  const twice = turn(a, b, c);
  if (Math.abs(twice) < 1e-9) return null;
  const wa = turn(point, b, c) / twice;
  const wb = turn(a, point, c) / twice;
  const wc = 1 - wa - wb;
  const slack = -1e-9;
  return wa < slack || wb < slack || wc < slack ? null : wa * a[2] + wb * b[2] + wc * c[2];
}

/** Twice the signed area of a triangle in plan. */
const turn = (a: Vec3, b: Vec3, c: Vec3): number => (b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1]);

function isInPlan(point: Vec3, corners: readonly Vec3[]): boolean {
  let inside = false;
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length];
    if (a[1] > point[1] === b[1] > point[1]) return;
    if (point[0] < a[0] + ((point[1] - a[1]) / (b[1] - a[1])) * (b[0] - a[0])) inside = !inside;
  });
  return inside;
}

/**
 * Calls `visit` once with every triangle and quadrilateral of bars, by its corners in order. The array is the visitor's only
 * until it returns.
 */
function visitFaces(edges: readonly Edge[], nodeCount: number, visit: (corners: readonly number[]) => void): void {
  const neighbours = neighboursOf(edges, nodeCount);
  const triangle = [0, 0, 0];
  const quadrilateral = [0, 0, 0, 0];
  // Each face is met from its lowest corner, `least`. The ways of two bars from there to each opposite corner form a chain.
  const latestWay = new Int32Array(nodeCount).fill(-1);
  const isNext = new Uint8Array(nodeCount);
  for (let least = 0; least < nodeCount; least++) {
    const sides = neighbours[least];
    const waySide: number[] = [];
    const wayBefore: number[] = [];
    const opposites: number[] = [];
    for (const side of sides) isNext[side] = 1;
    for (const side of sides) {
      if (side <= least) continue;
      for (const opposite of neighbours[side]) {
        if (opposite <= least) continue;
        if (opposite > side && isNext[opposite] === 1) {
          [triangle[0], triangle[1], triangle[2]] = [least, side, opposite];
          visit(triangle);
        }
        for (let way = latestWay[opposite]; way >= 0; way = wayBefore[way]) {
          [quadrilateral[0], quadrilateral[1], quadrilateral[2], quadrilateral[3]] = [
            least,
            side,
            opposite,
            waySide[way],
          ];
          visit(quadrilateral);
        }
        if (latestWay[opposite] === -1) opposites.push(opposite);
        wayBefore.push(latestWay[opposite]);
        latestWay[opposite] = waySide.push(side) - 1;
      }
    }
    for (const opposite of opposites) latestWay[opposite] = -1;
    for (const side of sides) isNext[side] = 0;
  }
}

function neighboursOf(edges: readonly Edge[], nodeCount: number): number[][] {
  const sets = Array.from({ length: nodeCount }, () => new Set<number>());
  for (const [from, to] of edges) {
    sets[from].add(to);
    sets[to].add(from);
  }
  return sets.map((set) => [...set]);
}
