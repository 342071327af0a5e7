import { pushTo } from '../domain/group.ts';
import type { VertexGraph } from './vertices.ts';

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

/**
 * Rows of pieces that are one bar: a splice leaves no node. Where a load is put on a splice the bar runs on and carries it;
 * what a support holds there is a node of its own.
 */
export function joinSplices(
  pieces: readonly Piece[],
  splices: ReadonlySet<number>,
  named: ReadonlyMap<number, 'support' | 'load'>,
  chords: 'pinned' | 'strict',
): PieceRun[] {
  const at = new Map<number, number[]>();
  pieces.forEach((piece, index) => {
    for (const vertex of [piece.from, piece.to]) if (splices.has(vertex)) pushTo(at, vertex, index);
  });
  const splits = (splice: number) => named.get(splice) === 'support' || (chords === 'strict' && named.has(splice));
  const used = new Uint8Array(pieces.length);
  return pieces.flatMap((_, index) => (used[index] ? [] : [runThrough(index)]));

  function runThrough(index: number): PieceRun {
    used[index] = 1;
    const back = follow(index, pieces[index].from);
    const on = follow(index, pieces[index].to);
    return [...back.reverse(), pieces[index], ...on];
  }

  function follow(start: number, vertex: number): Piece[] {
    const found: Piece[] = [];
    let index = start;
    let end = vertex;
    while (splices.has(end) && !splits(end)) {
      const next = (at.get(end) as number[]).find((i) => i !== index) as number;
      if (used[next]) break;
      used[next] = 1;
      const piece = pieces[next];
      found.push(named.has(end) ? { ...piece, carries: [...piece.carries, end] } : piece);
      end = piece.from === end ? piece.to : piece.from;
      index = next;
    }
    return found;
  }
}

/** The two outer vertices of a run. */
export function endsOf(run: PieceRun): readonly [number, number] {
  if (run.length === 1) return [run[0].from, run[0].to];
  const outer = (piece: Piece, next: Piece) =>
    piece.from === next.from || piece.from === next.to ? piece.to : piece.from;
  return [outer(run[0], run[1]), outer(run[run.length - 1], run[run.length - 2])];
}
