import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { solveSecondOrder } from '../../src/statics/second-order/solve-second-order.ts';
import { combine } from '../../src/statics/solution/combine.ts';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import type { NodalForce, Supports } from '../../src/statics/types.ts';
import { alsoFlat, caseOf, fix, type Sketch, trussOf } from '../statics/support/trusses.ts';

function solve(sketch: Sketch, supports: Supports, loads: readonly NodalForce[]) {
  const truss = trussOf(sketch);
  const stability = assessStability(truss, supports);
  const cases = solveCases(truss, supports, stability, [caseOf(loads)]).cases;
  const { solved, findings } = solveSecondOrder(
    truss,
    supports,
    stability,
    cases.map((firstOrder) => ({ firstOrder, loads: firstOrder.loads })),
  );
  return { firstOrder: cases[0], solved: solved[0], findings };
}

/** Two bars from supports `half` away to an apex `rise` above them. */
function shallow(half: number, rise: number) {
  const points: Vec3[] = [
    [-half, 0, 0],
    [half, 0, 0],
    [0, 0, rise],
  ];
  const bars: [number, number][] = [
    [0, 2],
    [1, 2],
  ];
  return { sketch: { points, bars, stiffness: 1e8 }, supports: alsoFlat(fix({ 0: 'xz', 1: 'xz' }), 3, 'y') };
}

// Source: equilibrium at the moved apex by hand (von Mises 1923 for the shallow case): at height z above the supports
// P = 2 EA z (1 / l - 1 / L), l^2 = half^2 + z^2, which is greatest where l^3 = half^2 L.
const loadAt = (half: number, rise: number, z: number) =>
  2e8 * z * (1 / Math.hypot(half, z) - 1 / Math.hypot(half, rise));
function snapLoad(half: number, rise: number): number {
  const length = Math.cbrt(half ** 2 * Math.hypot(half, rise));
  return loadAt(half, rise, Math.sqrt(length ** 2 - half ** 2));
}

describe('second order', () => {
  test.each([
    [5, 0.1],
    [5, 0.5],
    [3, 2],
  ])('the two-bar truss of half span %f and rise %f snaps through at its closed-form load', (half, rise) => {
    const { sketch, supports } = shallow(half, rise);
    const most = snapLoad(half, rise);
    const { firstOrder, solved, findings } = solve(sketch, supports, [{ node: 2, force: [0, 0, -2 * most] }]);
    expect(firstOrder.refused).toBeNull();
    const [, share] = /snaps through at ([\d.]+) of its load/u.exec(solved.refused!)!;
    expect(Number(share)).toBeCloseTo(0.5, 3);
    expect(findings.map((f) => f.code)).toEqual(['unstable-balance']);
    expect(solved.axialForce).toEqual([null, null]);
    expect(solve(sketch, supports, [{ node: 2, force: [0, 0, -0.999 * most] }]).solved.refused).toBeNull();
    expect(solve(sketch, supports, [{ node: 2, force: [0, 0, -1.001 * most] }]).solved.refused).not.toBeNull();
  });

  test.each([0.3, 0.7, 0.95])('its apex comes to rest where the closed form says, at %f of the snap load', (share) => {
    const [half, rise] = [5, 0.5];
    const { sketch, supports } = shallow(half, rise);
    const load = share * snapLoad(half, rise);
    const { firstOrder, solved } = solve(sketch, supports, [{ node: 2, force: [0, 0, -load] }]);
    const z = rise + solved.displacement[2]![2];
    expect(loadAt(half, rise, z) / load).toBeCloseTo(1, 9);
    expect(solved.axialForce[0]! / (1e8 * (Math.hypot(half, z) / Math.hypot(half, rise) - 1))).toBeCloseTo(1, 9);
    expect(solved.displacement[2]![2]).toBeLessThan(firstOrder.displacement[2]![2]);
    const reaction = solved.reactions.find(({ node }) => node === 0)!.force;
    expect(reaction[2]).toBeCloseTo(load / 2, 4);
    expect(solved.residual).toBeLessThan(1e-9);
  });

  // Source: by hand. A straight tie of two bars, stressed by its own sag: P = 2 EA (w / l) (l - a) / a, l^2 = a^2 + w^2; to first order it has no stiffness.
  test('a load across a stressed tie is carried by the tension that the sag makes stiffer', () => {
    const [a, pull, across] = [4, 50e3, 2e3];
    const points: Vec3[] = [
      [0, 0, 0],
      [a, 0, 0],
      [2 * a, 0, 0],
    ];
    const bars: [number, number][] = [
      [0, 1],
      [1, 2],
    ];
    // A soft spring holds the middle, so that first order has an answer; the tie's pull comes from a load on its roller.
    const springs = [{ node: 1, direction: [0, 0, 1] as const, stiffness: 1e3 }];
    const supports = alsoFlat({ ...fix({ 0: 'xz', 2: 'z' }), springs }, 3, 'y');
    const { solved } = solve({ points, bars, stiffness: 1e8 }, supports, [
      { node: 2, force: [pull, 0, 0] },
      { node: 1, force: [0, 0, -across] },
    ]);
    const w = -solved.displacement[1]![2];
    // Balance of the middle node: twice the tension's slope and the spring carry the load; the roller's end keeps the horizontal pull.
    expect((2 * pull * w) / (a + solved.displacement[1]![0]) / (across - 1e3 * w)).toBeCloseTo(1, 6);
  });
});

describe('what second order leaves to first', () => {
  test('small movements give the same forces, and combinations are solved each for itself', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [4, 0, 0],
      [2, 0, 3],
    ];
    const bars: [number, number][] = [
      [0, 1],
      [1, 2],
      [0, 2],
    ];
    const truss = trussOf({ points, bars, stiffness: 1e12 });
    const supports = alsoFlat(fix({ 0: 'xz', 1: 'z' }), 3, 'y');
    const stability = assessStability(truss, supports);
    const { cases } = solveCases(truss, supports, stability, [
      caseOf([{ node: 2, force: [1e3, 0, 0] }], 'a'),
      caseOf([{ node: 2, force: [0, 0, -5e3] }], 'b'),
    ]);
    const [firstOrder] = combine(cases, [{ name: 'both', limit: 'strength', factors: { a: 1.5, b: 1.35 } }]);
    const loads = [{ node: 2, force: [1.5e3, 0, -6.75e3] as const }];
    const [solved] = solveSecondOrder(truss, supports, stability, [{ firstOrder, loads }]).solved;
    solved.axialForce.forEach((force, b) => {
      expect(force! / firstOrder.axialForce[b]!).toBeCloseTo(1, 6);
    });
    expect(solved.limit).toBe('strength');
  });
});
