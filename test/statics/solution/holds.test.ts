import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { holdForces } from '../../../src/statics/solution/hold-forces.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { Hold, Supports } from '../../../src/statics/types.ts';
import { caseOf, fix, trussOf } from '../support/trusses.ts';

const points: Vec3[] = [
  [0, 0, 0],
  [4, 0, 0],
  [2, 0, 2],
];
const truss = trussOf({
  points,
  bars: [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
});
const ends = fix({ 0: 'xyz', 1: 'yz' });
const hold = (node: number, direction: Vec3, because = 'roof sheeting'): Hold => ({ node, direction, because });

function solve(supports: Supports, force: Vec3) {
  const judged = assessStability(truss, supports);
  const solved = solveCases(truss, supports, judged, [caseOf([{ node: 2, force }])]);
  return { judged, solved, taken: holdForces(truss, supports, solved.cases, []) };
}

describe('a hold', () => {
  test('takes a mechanism away, is counted as a restraint and reports the force it takes as a reaction', () => {
    expect(assessStability(truss, ends).mechanisms).toBe(1);
    const { judged, solved, taken } = solve({ ...ends, holds: [hold(2, [0, 1, 0])] }, [0, 700, -1e4]);
    expect([judged.mechanisms, judged.restraints]).toEqual([0, 6]);
    expect(judged.mechanisms).toBe(3 * judged.nodes - judged.restraints - judged.rank);
    const { reactions } = solved.cases[0];
    expect(reactions.map(({ node }) => node)).toEqual([0, 1, 2]);
    expect(reactions[2].force[1]).toBeCloseTo(-700, 9);
    const sum = [0, 1, 2].map((axis) => reactions.reduce((total, { force }) => total + force[axis], 0));
    expect(sum[1]).toBeCloseTo(-700, 9);
    expect(sum[2]).toBeCloseTo(1e4, 7);
    expect(taken[0].force).toMatchObject({ from: 'dead' });
    expect(taken[0].force!.force).toBeCloseTo(-700, 9);
  });

  test('is compared with 1/100 of the compression it keeps straight', () => {
    const { taken } = solve({ ...ends, holds: [hold(2, [0, 1, 0])] }, [0, 0, -1e4]);
    expect(taken[0].force!.force).toBeCloseTo(0, 9);
    expect(taken[0].compression!.force).toBeCloseTo(-5e3 * Math.SQRT2, 6);
    expect(taken[0].usual).toBeCloseTo(50 * Math.SQRT2, 6);
  });

  test('shares what a node takes with another hold that is askew to it, and leaves to a support what that takes', () => {
    const askew: Vec3 = [0.6, 0.8, 0];
    const { taken } = solve({ ...ends, holds: [hold(2, [0, 1, 0]), hold(2, askew)] }, [300, 900, -1e4]);
    const [a, b] = taken.map(({ force }) => force!.force);
    expect(0.8 * b + a).toBeCloseTo(-900, 6);
    const supported = solve({ ...ends, holds: [hold(0, [0, 1, 0]), hold(2, [0, 1, 0])] }, [0, 700, -1e4]);
    expect(supported.taken[0].force!.force).toBe(0);
    expect(supported.judged.restraints).toBe(6);
  });

  test('is no support: a part that is only held is set aside, a truss that is only held is judged as a free body', () => {
    const free = assessStability(truss, { restraints: [], springs: [], holds: [hold(2, [0, 1, 0])] });
    expect(free).toMatchObject({ freeBody: true, mechanisms: 5 });
    const two = trussOf({
      points: [...points, ...points.map(([x, y, z]): Vec3 => [x, y + 5, z])],
      bars: [
        [0, 1],
        [1, 2],
        [2, 0],
        [3, 4],
        [4, 5],
        [5, 3],
      ],
    });
    const judged = assessStability(two, { ...ends, holds: [hold(2, [0, 1, 0]), hold(5, [0, 1, 0])] });
    expect(judged.setAside).toEqual([3, 4, 5]);
    expect([judged.mechanisms, judged.restraints]).toEqual([0, 6]);
  });
});
