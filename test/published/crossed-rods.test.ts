import { describe, expect, test } from 'vitest';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import { alsoFlat, caseOf, fix, trussOf } from '../statics/support/trusses.ts';

/**
 * Source: equilibrium and virtual work by hand. A bay of width b and height h on pinned feet, crossed rods that only pull, pushed by H at one head:
 * the pulled rod has H d / b, the far column -H h / b, the beam -H, and the head moves by H (d^3 / EA_rod + h^3 / EA_column + b^3 / EA_beam) / b^2.
 */
describe('a bay with crossed rods', () => {
  const [b, h] = [6, 4];
  const d = Math.hypot(b, h);
  const [rod, column, beam] = [4.2e7, 5e8, 3e8];
  const truss = trussOf({
    points: [
      [0, 0, 0],
      [b, 0, 0],
      [0, 0, h],
      [b, 0, h],
    ],
    bars: [
      [0, 2],
      [1, 3],
      [2, 3],
      [0, 3],
      [1, 2],
    ],
    stiffness: [column, column, beam, rod, rod],
  });
  const supports = alsoFlat(fix({ 0: 'xz', 1: 'xz' }), 4, 'y');
  const stability = assessStability(truss, supports);
  const solve = (H: number) =>
    solveCases(truss, supports, stability, [caseOf([{ node: 2, force: [H, 0, 0] }])], {
      oneWay: { tensionOnly: [3, 4], compressionOnly: [] },
    }).cases[0];

  test('has the forces and the sway of the bay with one rod', () => {
    const H = 25e3;
    const solved = solve(H);
    expect(solved.slack).toEqual([4]);
    const wanted = [0, (-H * h) / b, -H, (H * d) / b, 0];
    solved.axialForce.forEach((force, i) => {
      expect(force).toBeCloseTo(wanted[i], 6);
    });
    const sway = (H * (d ** 3 / rod + h ** 3 / column + b ** 3 / beam)) / b ** 2;
    expect(solved.displacement[2]![0]).toBeCloseTo(sway, 12);
  });

  test('pushed the other way works with the other rod', () => {
    const H = -25e3;
    const solved = solve(H);
    expect(solved.slack).toEqual([3]);
    const wanted = [(H * h) / b, 0, 0, 0, (-H * d) / b];
    solved.axialForce.forEach((force, i) => {
      expect(force).toBeCloseTo(wanted[i], 6);
    });
  });
});
