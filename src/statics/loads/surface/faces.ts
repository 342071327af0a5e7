import type { Vec3 } from '../../../domain/vector.ts';
import { isInsideInPlan, type PlanEdge, planArea } from './plan.ts';

export interface Faces {
  /** Corners of every closed cell, going round to the left in plan. */
  readonly cells: readonly (readonly number[])[];
  /** Nodes of loops of bars that lie inside a cell without being joined to it. */
  readonly islands: readonly number[];
}

/** The cells that edges close in plan. The edges must not cross; those that close nothing are passed over. */
export function findFaces(points: readonly Vec3[], edges: readonly PlanEdge[]): Faces {
  let kept = withoutLooseEnds(edges);
  for (;;) {
    const { faces, bridges } = traceFaces(points, kept);
    if (bridges.size > 0) {
      // A bridge has the same face on both sides; without it what it leads to stands alone.
      kept = withoutLooseEnds(kept.filter((edge) => !bridges.has(edge)));
      continue;
    }
    const cells = faces.filter((face) => planArea(face.map((node) => points[node])) > 0);
    return { cells, islands: findIslands(points, kept, cells) };
  }
}

function neighboursOf(edges: readonly PlanEdge[]): Map<number, number[]> {
  const neighbours = new Map<number, number[]>();
  const join = (a: number, b: number) => {
    const list = neighbours.get(a);
    if (list === undefined) neighbours.set(a, [b]);
    else list.push(b);
  };
  for (const [a, b] of edges) {
    join(a, b);
    join(b, a);
  }
  return neighbours;
}

/** Drops edges that end in nothing, again and again. */
function withoutLooseEnds(edges: readonly PlanEdge[]): readonly PlanEdge[] {
  const neighbours = neighboursOf(edges);
  const degree = new Map([...neighbours].map(([node, list]) => [node, list.length]));
  const loose = [...degree].filter(([, count]) => count === 1).map(([node]) => node);
  const gone = new Set<number>();
  for (let node = loose.pop(); node !== undefined; node = loose.pop()) {
    gone.add(node);
    for (const other of neighbours.get(node)!) {
      if (gone.has(other)) continue;
      const left = degree.get(other)! - 1;
      degree.set(other, left);
      if (left === 1) loose.push(other);
    }
  }
  return edges.filter(([a, b]) => !gone.has(a) && !gone.has(b));
}

/** Walks round every face with the face on the left. */
function traceFaces(
  points: readonly Vec3[],
  edges: readonly PlanEdge[],
): { faces: number[][]; bridges: Set<PlanEdge> } {
  const next = nextAround(points, edges);
  const faceOf = new Map<string, number>();
  const faces: number[][] = [];
  for (const edge of edges) {
    for (const start of [edge, [edge[1], edge[0]] as const]) {
      let [from, to] = start;
      if (faceOf.has(`${from},${to}`)) continue;
      const corners: number[] = [];
      while (!faceOf.has(`${from},${to}`)) {
        faceOf.set(`${from},${to}`, faces.length);
        corners.push(from);
        [from, to] = [to, next(from, to)];
      }
      faces.push(corners);
    }
  }
  const bridges = new Set(edges.filter(([a, b]) => faceOf.get(`${a},${b}`) === faceOf.get(`${b},${a}`)));
  return { faces, bridges };
}

/** Where a walk along from-to goes on: the neighbour of `to` that follows `from` to the right, by angle. */
function nextAround(points: readonly Vec3[], edges: readonly PlanEdge[]): (from: number, to: number) => number {
  const following = new Map<string, number>();
  for (const [node, neighbours] of neighboursOf(edges)) {
    const [x, y] = points[node];
    const angle = (other: number): number => Math.atan2(points[other][1] - y, points[other][0] - x);
    const round = neighbours.toSorted((a, b) => angle(b) - angle(a));
    for (const [i, neighbour] of round.entries()) following.set(`${neighbour},${node}`, round[(i + 1) % round.length]);
  }
  return (from, to) => following.get(`${from},${to}`)!;
}

function findIslands(
  points: readonly Vec3[],
  edges: readonly PlanEdge[],
  cells: readonly (readonly number[])[],
): number[] {
  const part = connectedParts(edges);
  const parts = new Map<number, number[]>();
  for (const [node, root] of part) {
    const nodes = parts.get(root);
    if (nodes === undefined) parts.set(root, [node]);
    else nodes.push(node);
  }
  if (parts.size < 2) return [];
  return [...parts].flatMap(([root, nodes]) => {
    const inside = cells.some(
      (cell) =>
        part.get(cell[0]) !== root &&
        isInsideInPlan(
          points[nodes[0]],
          cell.map((corner) => points[corner]),
        ),
    );
    return inside ? nodes : [];
  });
}

/** A number for each node, the same for nodes that edges connect. */
function connectedParts(edges: readonly PlanEdge[]): Map<number, number> {
  const neighbours = neighboursOf(edges);
  const part = new Map<number, number>();
  for (const root of neighbours.keys()) {
    if (part.has(root)) continue;
    const open = [root];
    part.set(root, root);
    for (let node = open.pop(); node !== undefined; node = open.pop()) {
      for (const other of neighbours.get(node)!) {
        if (part.has(other)) continue;
        part.set(other, root);
        open.push(other);
      }
    }
  }
  return part;
}
