import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { forcesBeyondReason } from '../../../src/statics/solution/beyond-reason.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { LoadCase, Supports } from '../../../src/statics/types.ts';
import { trussOf } from '../support/trusses.ts';

/** Two bars of 10 m that rise by `rise` to the middle, where 1 kN hangs; closed form: N = P / (2 sin a), about 5 P / rise. */
function shallow(rise: number) {
  const truss = trussOf({
    points: [
      [0, 0, 0],
      [10, 0, rise],
      [20, 0, 0],
    ],
    bars: [
      [0, 1],
      [1, 2],
    ],
  });
  const fixed: readonly Vec3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const supports: Supports = {
    restraints: [
      ...[0, 2].flatMap((node) => fixed.map((direction) => ({ node, direction }))),
      { node: 1, direction: [0, 1, 0] },
    ],
    springs: [],
  };
  const hung: LoadCase = { name: 'hung', nature: 'permanent', loads: [{ node: 1, force: [0, 0, -1000] }] };
  const { cases } = solveCases(truss, supports, assessStability(truss, supports), [hung]);
  return forcesBeyondReason(truss, [hung], cases);
}

describe('forces beyond reason', () => {
  it('are none where a shallow truss asks for a hundred times the load', () => {
    expect(shallow(0.05)).toEqual([]);
  });

  it('are an error where the truss stands by a small dimension only, with bar, force and how many times the loads', () => {
    const [found, ...others] = shallow(0.01);
    expect(others).toEqual([]);
    expect(found).toMatchObject({ code: 'load-moves-it', severity: 'error', nodes: expect.arrayContaining([1]) });
    expect(found.message).toMatch(/-500 kN into bar .*, 5\.0e\+2 times the sum/);
  });
});
