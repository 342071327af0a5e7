import { pushTo } from '../domain/group.ts';
import { cross, dot, norm, subtract, unit, type Vec3 } from '../domain/vector.ts';
import type { Vertex, VertexGraph } from './vertices.ts';

/** The part of one member between two vertices that split it. */
export interface Piece {
  readonly member: number;
  readonly from: number;
  readonly to: number;
  /** Vertices in between that the member carries. */
  readonly carries: readonly number[];
}

/** Pieces in a row, of one member or of several spliced end to end: one bar. */
export type PieceRun = readonly Piece[];

/** Sine of the kink (5 degrees) up to which two members end to end with nothing else at the node are one bar. */
const STRAIGHT = 0.087;

/** Cuts members where vertices split them. */
export function cutPieces(graph: VertexGraph, carriers: readonly (number | null)[]): Piece[] {
  const pieces: Piece[] = [];
  graph.chains.forEach((chain, member) => {
    let from = -1;
    let carries: number[] = [];
    for (const vertex of chain) {
      if (carriers[vertex] === member) {
        carries.push(vertex);
        continue;
      }
      if (from >= 0) pieces.push({ member, from, to: vertex, carries });
      from = vertex;
      carries = [];
    }
  });
  return pieces;
}

/** Rows of pieces that are one bar: a splice (two members in line, nothing else there) leaves no node. */
export function joinSplices(pieces: readonly Piece[], vertices: readonly Vertex[]): PieceRun[] {
  const at = new Map<number, number[]>();
  pieces.forEach((piece, index) => {
    for (const vertex of [piece.from, piece.to]) pushTo(at, vertex, index);
  });
  const isSplice = (vertex: number): boolean => {
    const [first, second, ...rest] = at.get(vertex) ?? [];
    if (second === undefined || rest.length > 0 || vertices[vertex].stations.length !== 2) return false;
    const [a, b] = [pieces[first], pieces[second]];
    return a.member !== b.member && isStraight(leaving(a, vertex), leaving(b, vertex));
  };
  const leaving = (piece: Piece, vertex: number): Vec3 => {
    const other = piece.from === vertex ? piece.to : piece.from;
    return subtract(vertices[other].at, vertices[vertex].at);
  };
  const used = new Uint8Array(pieces.length);
  return pieces.flatMap((_, index) => (used[index] ? [] : [runThrough(index)]));

  function runThrough(index: number): PieceRun {
    used[index] = 1;
    const back = follow(index, pieces[index].from);
    const on = follow(index, pieces[index].to);
    return [...back.reverse(), index, ...on].map((i) => pieces[i]);
  }

  function follow(start: number, vertex: number): number[] {
    const found: number[] = [];
    let piece = start;
    let end = vertex;
    while (isSplice(end)) {
      const next = (at.get(end) as number[]).find((i) => i !== piece) as number;
      if (used[next]) break;
      used[next] = 1;
      found.push(next);
      end = pieces[next].from === end ? pieces[next].to : pieces[next].from;
      piece = next;
    }
    return found;
  }
}

function isStraight(a: Vec3, b: Vec3): boolean {
  const [u, v] = [unit(a), unit(b)];
  return u !== null && v !== null && dot(u, v) < 0 && norm(cross(u, v)) < STRAIGHT;
}

/** The two outer vertices of a run. */
export function endsOf(run: PieceRun): readonly [number, number] {
  if (run.length === 1) return [run[0].from, run[0].to];
  const outer = (piece: Piece, next: Piece) =>
    piece.from === next.from || piece.from === next.to ? piece.to : piece.from;
  return [outer(run[0], run[1]), outer(run[run.length - 1], run[run.length - 2])];
}
