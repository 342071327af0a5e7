import type { Member } from '../domain/member.ts';
import type { TrussBar } from '../domain/truss.ts';
import { distance } from '../domain/vector.ts';
import type { Axis } from './axes.ts';
import type { PieceRun } from './pieces.ts';
import type { VertexGraph } from './vertices.ts';

/** The members a piece stands for: its own, and the other one where a pair is one bar. */
export function membersOfPiece(axes: readonly (Axis | null)[], member: number): number[] {
  return [member, ...(axes[member]?.also ?? [])];
}

/** EA adds over a pair and acts in series along a run of members; mass and expansion are weighted by length. */
export function barProperties(
  run: PieceRun,
  members: readonly Member[],
  axes: readonly (Axis | null)[],
  { vertices }: VertexGraph,
): Pick<TrussBar, 'stiffnessEA' | 'massPerLength' | 'expansion'> {
  let total = 0;
  let flexibility = 0;
  let mass = 0;
  let expansion = 0;
  for (const piece of run) {
    const length = distance(vertices[piece.from].at, vertices[piece.to].at);
    const both = membersOfPiece(axes, piece.member).map((member) => members[member]);
    const stiffness = both.reduce(
      (sum, { section, material }) => sum + material.elasticModulus * (section?.area ?? 0),
      0,
    );
    const isKnown = both.every(({ section }) => section !== null);
    total += length;
    flexibility += isKnown ? length / stiffness : Number.NaN;
    mass += length * both.reduce((sum, { section, material }) => sum + material.density * (section?.area ?? 0), 0);
    expansion += length * both[0].material.expansion;
  }
  return {
    stiffnessEA: flexibility > 0 ? total / flexibility : null,
    massPerLength: total > 0 ? mass / total : 0,
    expansion: total > 0 ? expansion / total : 0,
  };
}
