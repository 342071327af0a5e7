import { distance, dot, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { cornersOf, pointAt } from './along-axes.ts';
import type { Axis } from './axes.ts';
import { TOLERANCE } from './options.ts';
import { endsOf, type Piece, type PieceRun } from './pieces.ts';
import { stationOn, type VertexGraph } from './vertices.ts';

/** How much longer a piece's member is, along its bow, than the straight line between the piece's ends: 1 where it is straight. */
export function stretchOf(piece: Piece, axes: readonly (Axis | null)[], { vertices }: VertexGraph): number {
  const axis = axes[piece.member];
  if (!axis?.facets) return 1;
  const [from, to] = stationsOf(piece, vertices);
  const chord = distance(pointAt(axis, from), pointAt(axis, to));
  return chord > TOLERANCE.zeroLength ? Math.abs(to - from) / chord : 1;
}

/** How far the members of a run leave the straight line between its ends as drawn, m; null where none is bent. */
export function strayOf(run: PieceRun, axes: readonly (Axis | null)[], { vertices }: VertexGraph): number | null {
  if (!run.some(({ member }) => axes[member]?.facets)) return null;
  const drawn = (piece: Piece, vertex: number): Vec3 => {
    const axis = axes[piece.member];
    return axis === null ? vertices[vertex].at : pointAt(axis, stationOn(vertices[vertex], piece.member));
  };
  const [first, last] = endsOf(run);
  const [start, finish] = [drawn(run[0], first), drawn(run[run.length - 1], last)];
  const points = run.flatMap((piece) => {
    const axis = axes[piece.member];
    const inner = axis?.facets ? cornersWithin(axis, stationsOf(piece, vertices)) : [];
    return [drawn(piece, piece.from), ...inner, drawn(piece, piece.to)];
  });
  return Math.max(...points.map((point) => distanceToChord(point, start, finish)));
}

/**
 * Carried nodes that would be drawn off a bent member's curve by more than a joint may be: these split it, as no lever
 * rule holds for them. The farthest first, each dividing the rest.
 */
export function offCourse(
  graph: VertexGraph,
  axes: readonly (Axis | null)[],
  carriers: readonly (number | null)[],
): Set<number> {
  const splitting = new Set<number>();
  axes.forEach((axis, member) => {
    if (!axis?.facets) return;
    const limit = Math.max(TOLERANCE.leastOffset, axis.depth / 2);
    const chain = graph.chains[member];
    let from = 0;
    chain.forEach((vertex, i) => {
      if (i === 0 || carriers[vertex] === member) return;
      divide(chain.slice(from, i + 1), limit);
      from = i;
    });
  });
  return splitting;

  function divide(row: readonly number[], limit: number): void {
    if (row.length < 3) return;
    const points = row.map((vertex) => graph.vertices[vertex].at);
    const away = points.map((point) => distanceToChord(point, points[0], points[points.length - 1]));
    const farthest = away.indexOf(Math.max(...away));
    if (!(away[farthest] > limit)) return;
    splitting.add(row[farthest]);
    divide(row.slice(0, farthest + 1), limit);
    divide(row.slice(farthest), limit);
  }
}

function stationsOf({ member, from, to }: Piece, vertices: VertexGraph['vertices']): [number, number] {
  return [stationOn(vertices[from], member), stationOn(vertices[to], member)];
}

function cornersWithin(axis: Axis, [from, to]: readonly [number, number]): Vec3[] {
  const stations = (axis.facets ?? []).slice(1).map(({ span }) => span[0]);
  const corners = cornersOf(axis).slice(1, -1);
  return corners.filter((_, i) => stations[i] > Math.min(from, to) && stations[i] < Math.max(from, to));
}

function distanceToChord(point: Vec3, start: Vec3, finish: Vec3): number {
  const direction = unit(subtract(finish, start));
  const arm = subtract(point, start);
  if (direction === null) return norm(arm);
  const along = dot(arm, direction);
  return Math.sqrt(Math.max(0, dot(arm, arm) - along * along));
}
