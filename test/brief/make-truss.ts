import type { Member } from '../../src/domain/member.ts';
import type { Truss, TrussNode } from '../../src/domain/truss.ts';
import { distance, type Vec3 } from '../../src/domain/vector.ts';

export function makeMember(changes: Partial<Member> = {}): Member {
  return {
    globalId: '0000000000000000000001',
    part: 0,
    name: null,
    tag: null,
    class: 'IfcMember',
    predefinedType: null,
    type: null,
    assembly: null,
    partOf: null,
    storey: null,
    layer: null,
    axisFrom: 'axis',
    axis: [
      [0, 0, 0],
      [1, 0, 0],
    ],
    zAxis: [0, 0, 1],
    section: null,
    material: {
      name: 'S355',
      elasticModulus: 2.1e11,
      density: 7850,
      expansion: 1.2e-5,
      yieldStrength: 3.55e8,
      ultimateStrength: 4.9e8,
      from: 'name',
    },
    ...changes,
  };
}

/** A run of nodes that one member goes through; `carried` nodes lie on its only bar without splitting it. */
export interface Run {
  readonly nodes: readonly number[];
  readonly carried?: readonly { readonly node: number; readonly t: number }[];
  readonly member?: Partial<Member>;
}

/** A truss of members that run through nodes; massPerLength is 10 kg/m. A pair of numbers is a member of one bar. */
export function makeTruss(
  at: readonly Vec3[],
  runs: readonly (Run | readonly [number, number])[],
): { truss: Truss; members: Member[] } {
  const onNode: number[][] = at.map(() => []);
  const carriedBy: TrussNode['carriedBy'][] = at.map(() => null);
  const bars: Truss['bars'][number][] = [];
  const members = runs.map((given, member) => {
    const run: Run = 'nodes' in given ? given : { nodes: given };
    for (const node of run.nodes) onNode[node]!.push(member);
    for (const { node, t } of run.carried ?? []) {
      onNode[node]!.push(member);
      carriedBy[node] = { bar: bars.length, t };
    }
    for (let i = 1; i < run.nodes.length; i++) {
      const [from, to] = [run.nodes[i - 1]!, run.nodes[i]!];
      const length = distance(at[from]!, at[to]!);
      bars.push({
        name: `B${bars.length}`,
        members: [member],
        from,
        to,
        length,
        stiffnessEA: 1e8,
        massPerLength: 10,
        expansion: 1.2e-5,
      });
    }
    const axis = [at[run.nodes[0]!]!, at[run.nodes.at(-1)!]!] as const;
    return makeMember({ globalId: `member-${member}`, axis, ...run.member });
  });
  const nodes = at.map((point, i) => ({
    at: point,
    members: onNode[i]!,
    carriedBy: carriedBy[i] ?? null,
    place: null,
    overhangMass: 0,
  }));
  return { truss: { nodes, bars, faith: members.map(() => ({ shift: 0, turn: 0 })) }, members };
}

/** Nodes of a grid, x fastest, with their heights, and the bars along both directions. */
export function makeGrid(
  xs: readonly number[],
  ys: readonly number[],
  height: (x: number, y: number) => number = () => 0,
) {
  const at: Vec3[] = ys.flatMap((y) => xs.map((x): Vec3 => [x, y, height(x, y)]));
  const index = (i: number, j: number): number => j * xs.length + i;
  const runs: (readonly [number, number])[] = [];
  for (let j = 0; j < ys.length; j++) {
    for (let i = 0; i < xs.length; i++) {
      if (i + 1 < xs.length) runs.push([index(i, j), index(i + 1, j)]);
      if (j + 1 < ys.length) runs.push([index(i, j), index(i, j + 1)]);
    }
  }
  return { at, runs, index };
}
