import type { NamedPlace } from '../brief/named-places.ts';
import { pushTo } from '../domain/group.ts';
import { cross, distance, dot, norm, scale, subtract, unit, type Vec3 } from '../domain/vector.ts';
import { facetAt } from './along-axes.ts';
import type { Axis } from './axes.ts';
import type { Piece } from './pieces.ts';
import { stationOn, type Vertex } from './vertices.ts';

/** Sine of the kink (5 degrees) up to which two members end to end with nothing else at the node are one bar. */
const STRAIGHT = 0.087;

/** Vertices where two members go on in line and nothing else meets them: no nodes, as if one member ran through. */
export function findSplices(
  pieces: readonly Piece[],
  vertices: readonly Vertex[],
  axes: readonly (Axis | null)[],
): Set<number> {
  const at = new Map<number, Piece[]>();
  for (const piece of pieces) for (const vertex of [piece.from, piece.to]) pushTo(at, vertex, piece);
  const splices = new Set<number>();
  for (const [vertex, [first, second, ...rest]] of at) {
    if (second === undefined || rest.length > 0 || vertices[vertex].stations.length !== 2) continue;
    if (first.member === second.member) continue;
    if (isStraight(leaving(first, vertex), leaving(second, vertex))) splices.add(vertex);
  }
  return splices;

  function leaving(piece: Piece, vertex: number): Vec3 {
    const other = piece.from === vertex ? piece.to : piece.from;
    const axis = axes[piece.member];
    // A bent member leaves along its curve, not along the bar.
    if (axis?.facets) {
      const { direction } = facetAt(axis, stationOn(vertices[vertex], piece.member));
      return scale(direction, piece.from === vertex ? 1 : -1);
    }
    return subtract(vertices[other].at, vertices[vertex].at);
  }
}

function isStraight(a: Vec3, b: Vec3): boolean {
  const [u, v] = [unit(a), unit(b)];
  return u !== null && v !== null && dot(u, v) < 0 && norm(cross(u, v)) < STRAIGHT;
}

/**
 * The splices that stay, since a support or a load is put there by its place: of each place the nearest one, where nothing
 * else that becomes a node lies within it.
 */
export function namedSplices(
  splices: ReadonlySet<number>,
  vertices: readonly Vertex[],
  places: readonly NamedPlace[],
): Map<number, NamedPlace['for']> {
  const named = new Map<number, NamedPlace['for']>();
  for (const place of places) {
    const away = (vertex: number) => distance(vertices[vertex].at, place.at);
    const near = [...splices].filter((vertex) => away(vertex) <= place.within);
    if (near.length === 0) continue;
    if (vertices.some((_, vertex) => !splices.has(vertex) && away(vertex) <= place.within)) continue;
    const nearest = near.reduce((best, vertex) => (away(vertex) < away(best) ? vertex : best));
    if (named.get(nearest) !== 'support') named.set(nearest, place.for);
  }
  return named;
}
