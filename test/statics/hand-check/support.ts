import type { Truss } from '../../../src/domain/truss.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import type { Solved } from '../../../src/statics/hand-check/joints.ts';
import type { NodalForce, SolvedCase } from '../../../src/statics/types.ts';

const point = (v: Vec3): [number, number, number] => [v[0], v[1], v[2]];
const named = (forces: readonly NodalForce[]) =>
  forces.map(({ node, force }) => ({ node: `n${node + 1}`, force: point(force) }));

/** A solved truss as a result tells it. */
export function told({ nodes, bars }: Truss, cases: readonly SolvedCase[]): Solved {
  return {
    nodes: nodes.map(({ at, carriedBy }, i) => ({
      id: `n${i + 1}`,
      at: point(at),
      members: [],
      fixed: '',
      place: null,
      carriedBy: carriedBy && { bar: `b${carriedBy.bar + 1}`, t: carriedBy.t },
    })),
    bars: bars.map(({ name, from, to, length }, i) => ({
      id: `b${i + 1}`,
      name,
      member: '',
      from: `n${from + 1}`,
      to: `n${to + 1}`,
      length,
    })),
    cases: cases.map((one) => ({
      name: one.name,
      nature: one.nature,
      ...(one.refused === null ? {} : { refused: one.refused }),
      loads: named(one.loads),
      loadSum: point(one.loadSum),
      axialForce: [...one.axialForce],
      displacement: [],
      reactions: named(one.reactions),
      residual: one.residual,
    })),
    combinations: [],
  };
}
