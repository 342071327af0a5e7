import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { mapElongations } from '../../src/statics/model/elongation.ts';
import { projectGeometric } from '../../src/statics/model/geometric-stiffness.ts';
import { mapMovement } from '../../src/statics/model/movement.ts';
import { findParts } from '../../src/statics/model/parts.ts';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { judgeBalance } from '../../src/statics/solution/stable-balance.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import type { Restraint, Supports } from '../../src/statics/types.ts';
import { caseOf, fix, trussOf } from '../statics/support/trusses.ts';

/** A flat truss of 6 m by 2 m under P at the top: chords along x, bottom nodes 0..3, top nodes 4..6. */
const points: Vec3[] = [
  [0, 0, 0],
  [3, 0, 0],
  [6, 0, 0],
  [9, 0, 0],
  [1.5, 0, 2],
  [4.5, 0, 2],
  [7.5, 0, 2],
];
const bars = ['01', '12', '23', '04', '14', '15', '25', '26', '36', '45', '56'].map(
  (pair) => [Number(pair[0]), Number(pair[1])] as const,
);
const truss = trussOf({ points, bars });
const ends = fix({ 0: 'xyz', 3: 'yz' });
const across = (nodes: readonly number[]): Restraint[] => nodes.map((node) => ({ node, direction: [0, 1, 0] }));
const down = (nodes: readonly number[], force: number) =>
  caseOf(nodes.map((node) => ({ node, force: [0, 0, force] as const })));

function judge(supports: Supports, load: ReturnType<typeof down>) {
  const judged = assessStability(truss, supports);
  const solved = solveCases(truss, supports, judged, [load]);
  expect(solved.findings).toEqual([]);
  return { judged, solved, balance: judgeBalance(truss, judged, solved.cases, []) };
}

// Timoshenko & Gere, Theory of Elastic Stability, 2.10 (from memory): a pin-jointed chord in compression that nothing holds sideways has no critical load
// above zero; one that is held in its nodes has.
describe('a compressed chord of a flat truss', () => {
  test('that nothing holds sideways is in unstable balance under any load, with the chord named', () => {
    for (const force of [-1, -1e6]) {
      const { balance } = judge(ends, down([4, 5, 6], force));
      expect(balance.isStable).toBe(false);
      expect(balance.findings.map(({ code, severity }) => [code, severity])).toEqual([['unstable-balance', 'error']]);
      expect(balance.findings[0].message).toContain('sideways (along y)');
      expect(balance.findings[0].message).toMatch(/bar \d+, .* are compressed/);
      expect(balance.cases[0].unstable!.bars).toContain(9);
    }
  });

  test('that is held at its nodes is stable though the tied chord is not held: its tension brings it back', () => {
    const supports = { ...ends, restraints: [...ends.restraints, ...across([4, 5, 6])] };
    const { judged, balance } = judge(supports, down([4, 5, 6], -1e3));
    expect(judged.mechanisms).toBe(2);
    expect(balance).toMatchObject({ isStable: true, findings: [] });
    expect(balance.cases[0].unstable).toBeUndefined();
  });

  test('is in unstable balance at the bottom where the load lifts', () => {
    const supports = { ...ends, restraints: [...ends.restraints, ...across([4, 5, 6])] };
    const { balance } = judge(supports, down([4, 5, 6], 1e3));
    expect(balance.isStable).toBe(false);
    expect(balance.findings[0].message).toMatch(/bar [012]/);
  });

  test('held at every second node is as a strut of two bars with a hinge: unstable between the holds', () => {
    const supports = { ...ends, restraints: [...ends.restraints, ...across([1, 2, 4, 6])] };
    const { balance } = judge(supports, down([4, 5, 6], -1e3));
    expect(balance.isStable).toBe(false);
    expect(balance.findings[0].nodes).toEqual([5]);
  });

  test('gives the energy of the engine: the sum over bars of N / L times the movements across', () => {
    const { judged, solved } = judge(ends, down([4, 5, 6], -1e3));
    const parts = findParts(truss, ends);
    const elongations = mapElongations(truss, parts, ends, mapMovement(truss, parts, ends.restraints));
    const moves = judged.modes.map((mode) => {
      const own = new Float64Array(3 * points.length);
      mode.nodes.forEach((node, i) => {
        own.set(mode.movement[i], 3 * node);
      });
      return own;
    });
    const axial = elongations.bars.map((b) => solved.cases[0].axialForce[b]!);
    const projected = projectGeometric(truss, elongations, axial, moves);
    expect(Math.min(...projected.diagonal())).toBeLessThan(0);
  });
});

// A pendulum: a mass on a hanging bar swings back, one on a standing bar falls over.
describe('a bar on one hinge', () => {
  const standing = (height: number) =>
    trussOf({
      points: [
        [0, 0, 0],
        [0, 0, height],
      ],
      bars: [[0, 1]],
    });
  test.each([
    [-2, true],
    [2, false],
  ])('with a weight at height %f is in stable balance: %s', (height, isStable) => {
    const one = standing(height);
    const supports = fix({ 0: 'xyz' });
    const judged = assessStability(one, supports);
    const solved = solveCases(one, supports, judged, [down([1], -1e3)]);
    expect(judgeBalance(one, judged, solved.cases, []).isStable).toBe(isStable);
  });

  test('without a force in it is in indifferent balance only', () => {
    const points: Vec3[] = [...[0, 2, 4].map((x): Vec3 => [x, 0, 0]), [1, 2, 0], [1, 1, 2], [4, 0, 3]];
    const one = trussOf({
      points,
      bars: [
        [0, 4],
        [1, 4],
        [3, 4],
        [2, 5],
      ],
    });
    const supports = fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz', 3: 'xyz' });
    const judged = assessStability(one, supports);
    const solved = solveCases(one, supports, judged, [down([4], -1e3)]);
    const { isStable, findings, cases } = judgeBalance(one, judged, solved.cases, []);
    expect(isStable).toBe(false);
    expect(findings[0].message).toContain('indifferent');
    expect(cases[0].unstable).toMatchObject({ bars: [] });
  });
});
