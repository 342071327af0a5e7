import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { stretchByMisfit, stretchByWarmth } from '../../src/statics/loads/strains.ts';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import type { LoadCase, Supports } from '../../src/statics/types.ts';
import { alsoFlat, fix, type Sketch, trussOf } from '../statics/support/trusses.ts';

function solve(sketch: Sketch, supports: Supports, one: Partial<LoadCase>) {
  const truss = trussOf(sketch);
  const loads = { name: 'case', nature: 'thermal', loads: [], ...one } as const;
  const [solved] = solveCases(truss, supports, assessStability(truss, supports), [loads]).cases;
  expect(solved.refused).toBeNull();
  expect(solved.residual).toBeLessThan(1e-9);
  return solved;
}

/** Sources: the strain of one bar and virtual work by hand. trussOf gives every bar an expansion of 1.2e-5 / K. */
/** N */
const EA = 4e8;

/** Two bars that lean by `lean` and one upright between them, hung at height `h`, meet at the origin. */
function threeBars(h: number, lean: number) {
  const points: Vec3[] = [
    [-h * Math.tan(lean), 0, h],
    [0, 0, h],
    [h * Math.tan(lean), 0, h],
    [0, 0, 0],
  ];
  const sketch: Sketch = {
    points,
    bars: [
      [0, 3],
      [1, 3],
      [2, 3],
    ],
    stiffness: EA,
  };
  const supports = alsoFlat(fix({ 0: 'xz', 1: 'xz', 2: 'xz' }), 4, 'y');
  return { sketch, supports };
}

describe('temperature, misfit and settlement', () => {
  test('a bar between two fixed points and warmed has N = -EA alpha dT', () => {
    const sketch = {
      points: [
        [0, 0, 0],
        [5, 0, 0],
      ] as Vec3[],
      bars: [[0, 1]] as [number, number][],
      stiffness: EA,
    };
    const truss = trussOf(sketch);
    const solved = solve(sketch, fix({ 0: 'xyz', 1: 'xyz' }), { freeStretch: stretchByWarmth(truss, [0], 25) });
    expect(solved.axialForce[0]).toBeCloseTo(-EA * 1.2e-5 * 25, 6);
    expect(solved.reactions.find(({ node }) => node === 1)!.force[0]).toBeCloseTo(-EA * 1.2e-5 * 25, 6);
  });

  test('a bar that is free to grow does so without force, by alpha dT L', () => {
    const sketch = {
      points: [
        [0, 0, 0],
        [5, 0, 0],
      ] as Vec3[],
      bars: [[0, 1]] as [number, number][],
      stiffness: EA,
    };
    const truss = trussOf(sketch);
    const solved = solve(sketch, fix({ 0: 'xyz', 1: 'yz' }), { freeStretch: stretchByWarmth(truss, [0], 40) });
    expect(solved.axialForce[0]).toBeCloseTo(0, 6);
    expect(solved.displacement[1]![0]).toBeCloseTo(1.2e-5 * 40 * 5, 12);
  });

  // Three bars meet at the bottom node; the middle one hangs straight down (h), the outer ones lean by a. With the middle one made d too long:
  // N (1 + 2 cos^3 a) h / EA ... from compatibility: N_mid = -EA d / h * 2 cos^3 a / (1 + 2 cos^3 a), N_out = -N_mid / (2 cos a).
  test('of three bars that meet, the middle one too long pushes against the others', () => {
    const [h, lean, d] = [3, 0.6, 2e-3];
    const { sketch, supports } = threeBars(h, lean);
    const solved = solve(sketch, supports, { freeStretch: stretchByMisfit(trussOf(sketch), [1], d) });
    const cubed = Math.cos(lean) ** 3;
    const middle = (-EA * d * 2 * cubed) / (h * (1 + 2 * cubed));
    expect(solved.axialForce[1]).toBeCloseTo(middle, 5);
    for (const outer of [0, 2]) expect(solved.axialForce[outer]).toBeCloseTo(-middle / (2 * Math.cos(lean)), 5);
  });

  // The same three bars; the middle support sinks by s: N_mid is as with the bar made too long by s.
  test('a support that settles strains an indeterminate truss like a bar made too long, and moves with its node', () => {
    const [h, lean, s] = [3, 0.6, 2e-3];
    const { sketch, supports } = threeBars(h, lean);
    const solved = solve(sketch, supports, { settlements: [{ node: 1, movement: [0, 0, -s] }] });
    const cubed = Math.cos(lean) ** 3;
    expect(solved.axialForce[1]).toBeCloseTo((-EA * s * 2 * cubed) / (h * (1 + 2 * cubed)), 5);
    expect(solved.displacement[1]).toEqual([0, 0, -s]);
  });

  test('a determinate truss takes a settlement without force; a carried support carries its bar along by the lever rule', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [4, 0, 0],
      [2, 0, 0],
      [2, 0, 2],
    ];
    const carried = new Map([[2, { bar: 0, t: 0.5 }]]);
    const sketch: Sketch = {
      points,
      bars: [
        [0, 1],
        [0, 3],
        [1, 3],
      ],
      carried,
    };
    const supports = alsoFlat(fix({ 0: 'xz', 2: 'z' }), 4, 'y');
    const solved = solve(sketch, supports, { settlements: [{ node: 2, movement: [0, 0, -5e-3] }] });
    for (const force of solved.axialForce) expect(force).toBeCloseTo(0, 5);
    expect(solved.displacement[2]![2]).toBeCloseTo(-5e-3, 12);
    expect(solved.displacement[1]![2]).toBeCloseTo(-10e-3, 12);
  });
});
