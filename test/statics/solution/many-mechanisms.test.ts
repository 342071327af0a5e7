import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { balanceOf } from '../../../src/statics/solution/group-balance.ts';
import { groupMotions } from '../../../src/statics/solution/mode-groups.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { judgeBalance } from '../../../src/statics/solution/stable-balance.ts';
import { WholeBalance } from '../../../src/statics/solution/whole-balance.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { LoadCase } from '../../../src/statics/types.ts';
import { caseOf, fix, randomFrom, randomTruss, trussOf } from '../support/trusses.ts';

/** Weights on bars of 2 m, each on its own hinge, the hinges joined in a zigzag: all hang but for those that stand. */
function pendulums(count: number, standing: readonly number[]) {
  const points = Array.from({ length: count }, (_, k): Vec3[] => [
    [3 * k, k % 2, 5],
    [3 * k, k % 2, standing.includes(k) ? 7 : 3],
  ]).flat();
  const hanging = Array.from({ length: count }, (_, k) => [2 * k, 2 * k + 1] as const);
  const bars = [...hanging, ...hanging.slice(1).map(([node]) => [node - 2, node] as const)];
  const load = caseOf(hanging.map(([, node]) => ({ node, force: [0, 0, -1e3] as const })));
  return {
    truss: trussOf({ points, bars }),
    supports: fix(Object.fromEntries(hanging.map(([node]) => [node, 'xyz']))),
    load,
  };
}

/** A flat net of square meshes, its edge pinned: every inner node can move up and down. */
function net(meshes: number) {
  const points: Vec3[] = [];
  const held: Record<number, string> = {};
  const bars: [number, number][] = [];
  const node = (i: number, j: number) => i * (meshes + 1) + j;
  for (let i = 0; i <= meshes; i++)
    for (let j = 0; j <= meshes; j++) {
      points.push([i, j, 0]);
      if (i % meshes === 0 || j % meshes === 0) held[node(i, j)] = 'xyz';
    }
  for (let i = 0; i <= meshes; i++)
    for (let j = 0; j <= meshes; j++) {
      if (i < meshes && j % meshes !== 0) bars.push([node(i, j), node(i + 1, j)]);
      if (j < meshes && i % meshes !== 0) bars.push([node(i, j), node(i, j + 1)]);
    }
  return { truss: trussOf({ points, bars }), supports: fix(held), bars, lineOf: (bar: number) => points[bars[bar][0]] };
}

describe('with more mechanisms than are listed', () => {
  test('one standing pendulum among 179 hanging ones is found, though its modes are not listed', () => {
    const { truss, supports, load } = pendulums(180, [179]);
    const judged = assessStability(truss, supports);
    expect([judged.mechanisms, judged.modes.length]).toEqual([360, 200]);
    expect(judged.modes.some(({ nodes }) => nodes.includes(359))).toBe(false);
    const { cases } = solveCases(truss, supports, judged, [load]);
    const balance = judgeBalance(truss, judged, cases, []);
    expect(balance.isStable).toBe(false);
    expect(balance.findings.map(({ nodes }) => nodes)).toEqual([[359]]);
    expect(balance.cases[0].unstable!.bars).toEqual([179]);
  });

  test('none is called unstable where all of them hang', () => {
    const { truss, supports, load } = pendulums(180, []);
    const judged = assessStability(truss, supports);
    const { cases } = solveCases(truss, supports, judged, [load]);
    expect(judgeBalance(truss, judged, cases, [])).toMatchObject({ isStable: true, findings: [] });
  });

  test.each([
    ['tight', 0, true],
    ['with its last wire pushed hard', 10, false],
  ])('a net of 361 nodes %s: in stable balance %#', (_, push, isStable) => {
    const { truss, supports, bars, lineOf } = net(20);
    const judged = assessStability(truss, supports);
    expect(judged.mechanisms).toBe(361);
    const freeStretch = bars.map((__, bar) => ({
      bar,
      by: lineOf(bar)[0] === 19 && truss.nodes[bars[bar][1]].at[0] === 19 ? 1e-4 * (push || -1) : -1e-4,
    }));
    const load: LoadCase = { ...caseOf([]), freeStretch };
    const { cases } = solveCases(truss, supports, judged, [load]);
    const balance = judgeBalance(truss, judged, cases, []);
    expect(balance.isStable).toBe(isStable);
    if (!isStable) {
      expect(balance.findings[0].at![0]).toBe(19);
      expect(balance.findings[0].message).toContain('up and down (along z)');
    }
  });

  test('the inertia of the whole says the same of 60 random trusses as the stiffness on the modes', () => {
    const seen = { stable: 0, unstable: 0, indifferent: 0 };
    for (let seed = 1; seed <= 60; seed++) {
      const { truss, supports } = randomTruss(seed, -1 - (seed % 3));
      const judged = assessStability(truss, supports);
      if (judged.mechanisms === 0 || judged.gap === null || judged.gap < 1e6) continue;
      const random = randomFrom(seed);
      const groups = groupMotions(truss, judged.space.motions()!)!;
      const whole = new WholeBalance(judged.space);
      for (const sign of [-1, 0, 1]) {
        const forces = truss.bars.map(() => 1e4 * (sign + random() - 0.5));
        const kinds = groups.map((group) => balanceOf(truss, group, forces).kind);
        const expected = kinds.includes('unstable')
          ? 'unstable'
          : kinds.includes('indifferent')
            ? 'indifferent'
            : 'stable';
        expect(whole.judge(forces).kind, `seed ${seed}`).toBe(expected);
        seen[expected]++;
      }
    }
    expect(seen.stable).toBeGreaterThan(20);
    expect(seen.unstable).toBeGreaterThan(20);
  });
});
