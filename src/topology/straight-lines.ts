import { facetAt } from './along-axes.ts';
import { type Axis, sineBetween } from './axes.ts';
import type { VertexGraph } from './vertices.ts';

/** Sine of 5 degrees: members that meet end to end straighter than this are one line. */
const IN_LINE = 0.087;

/** For each member the vertices of the line it is part of: members in a row, spliced end to end, are one line. */
export function straightLines(graph: VertexGraph, axes: readonly (Axis | null)[]): readonly (readonly number[])[] {
  const next = continuations(graph, axes);
  const lines: (readonly number[])[] = [];
  graph.chains.forEach((_, member) => {
    if (lines[member]) return;
    const row = new Set([member]);
    for (const one of row) for (const other of next[one]) row.add(other);
    const vertices = [...new Set([...row].flatMap((one) => graph.chains[one]))];
    for (const one of row) lines[one] = vertices;
  });
  return lines;
}

const lineOf = (axis: Axis | null, s: number): Axis | null => (axis === null ? null : facetAt(axis, s));

/** The members that carry each member's line on at its ends. */
function continuations({ vertices, chains }: VertexGraph, axes: readonly (Axis | null)[]): number[][] {
  const next: number[][] = chains.map(() => []);
  for (const { stations } of vertices) {
    const ends = stations.filter(({ role }) => role !== 'through');
    ends.forEach((a, i) => {
      for (const b of ends.slice(i + 1)) {
        const [first, second] = [a, b].map(({ member, s }) => lineOf(axes[member], s));
        if (first === null || second === null || sineBetween(first, second) > IN_LINE) continue;
        next[a.member].push(b.member);
        next[b.member].push(a.member);
      }
    });
  }
  return next;
}
