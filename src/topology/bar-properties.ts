import type { Member } from '../domain/member.ts';
import type { TrussBar } from '../domain/truss.ts';
import { distance } from '../domain/vector.ts';
import type { Axis } from './axes.ts';
import { stretchOf } from './bows.ts';
import { endsOf, type PieceRun } from './pieces.ts';
import type { VertexGraph } from './vertices.ts';

/** The members a piece stands for: its own, and the other one where a pair is one bar. */
export function membersOfPiece(axes: readonly (Axis | null)[], member: number): number[] {
  return [member, ...(axes[member]?.also ?? [])];
}

/** EA adds over a pair and acts in series along a run of members; mass and expansion are weighted by length. A bent member weighs
 * what it weighs along its bow. */
export function barProperties(
  run: PieceRun,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  graph: VertexGraph,
): Pick<TrussBar, 'stiffnessEA' | 'massPerLength' | 'expansion'> {
  const { vertices } = graph;
  const [first, last] = endsOf(run).map((vertex) => vertices[vertex].at);
  const isBent = run.some(({ member }) => axes[member]?.facets);
  let total = 0;
  let flexibility = 0;
  let mass = 0;
  let expansion = 0;
  for (const piece of run) {
    const length = distance(vertices[piece.from].at, vertices[piece.to].at);
    const developed = length * stretchOf(piece, axes, graph);
    const both = membersOfPiece(axes, piece.member).map((member) => members[member]);
    const stiffness = both.reduce(
      (sum, { section, material }) => sum + material.elasticModulus * (section?.area ?? 0),
      0,
    );
    const isKnown = both.every(({ section }) => section !== null);
    total += length;
    flexibility += isKnown ? length / stiffness : Number.NaN;
    mass += developed * both.reduce((sum, { section, material }) => sum + material.density * (section?.area ?? 0), 0);
    expansion += length * both[0].material.expansion;
  }
  return {
    stiffnessEA: flexibility > 0 ? total / flexibility : null,
    massPerLength: total > 0 ? mass / (isBent ? distance(first, last) : total) : 0,
    expansion: total > 0 ? expansion / total : 0,
  };
}
