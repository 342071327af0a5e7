import { describe, expect, test } from 'vitest';
import type { Limit } from '../../../src/brief/types.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { analyseWhole } from '../../../src/statics/analyse-whole.ts';
import { combine } from '../../../src/statics/solution/combine.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { alsoFlat, caseOf, fix, trussOf } from '../support/trusses.ts';

/** A shallow pair of bars that snaps through at about 14.4 kN; the second bar may lack its section. */
function shallow(stiffness: readonly (number | null)[] = [1e8, 1e8]) {
  const points: Vec3[] = [
    [-5, 0, 0],
    [5, 0, 0],
    [0, 0, 0.35],
  ];
  const bars: [number, number][] = [
    [0, 2],
    [1, 2],
  ];
  const truss = trussOf({ points, bars, stiffness });
  const supports = alsoFlat(fix({ 0: 'xz', 1: 'xz' }), 3, 'y');
  const stability = assessStability(truss, supports);
  const { cases } = solveCases(truss, supports, stability, [
    caseOf([{ node: 2, force: [0, 0, -1e3] }], 'light'),
    caseOf([{ node: 2, force: [0, 0, -20e3] }], 'heavy'),
  ]);
  const combinations = (factors: Readonly<Record<string, number>>, limit: Limit = 'strength') =>
    combine(cases, [{ name: `${limit} of ${Object.keys(factors).join(' and ')}`, limit, factors }]);
  return { truss, supports, stability, cases, combinations };
}

describe('the truss as a whole', () => {
  test('is judged under strength and accidental combinations only, where there are combinations', () => {
    const { truss, supports, stability, cases, combinations } = shallow();
    const all = [
      ...combinations({ light: 1 }),
      ...combinations({ heavy: 1 }, 'characteristic'),
      ...combinations({ heavy: 1 }, 'accidental'),
    ];
    const { buckling } = analyseWhole(truss, supports, stability, cases, all);
    expect([...buckling.factors.keys()]).toEqual(['strength of light', 'accidental of heavy']);
    expect(buckling.governing!.from).toBe('accidental of heavy');
    expect(buckling.factors.get('strength of light')! / buckling.factors.get('accidental of heavy')!).toBeCloseTo(
      20,
      6,
    );
  });

  test('is judged under the cases where there is no combination', () => {
    const { truss, supports, stability, cases } = shallow();
    expect([...analyseWhole(truss, supports, stability, cases, []).buckling.factors.keys()]).toEqual([
      'light',
      'heavy',
    ]);
  });

  test('is not judged where a bar has no section', () => {
    const { truss, supports, stability, cases } = shallow([1e8, null]);
    const { buckling, findings } = analyseWhole(truss, supports, stability, cases, []);
    expect(buckling.factors.size).toBe(0);
    expect(findings).toEqual([]);
  });

  test('by second order refuses the combination that snaps through and carries the other', () => {
    const { truss, supports, stability, cases, combinations } = shallow();
    const all = [...combinations({ light: 1.35 }), ...combinations({ light: 1.35, heavy: 1.5 })];
    const whole = analyseWhole(truss, supports, stability, cases, all, { analysis: 'second-order' });
    const [light, both] = whole.combinations;
    expect(light.refused).toBeNull();
    expect(light.displacement[2]![2]).toBeLessThan(all[0].displacement[2]![2]);
    expect(both.refused).toMatch(/snaps through at 0\.\d+ of its load/u);
    expect(whole.findings.map(({ code }) => code)).toEqual(['unstable-balance']);
    expect(whole.findings[0].nodes).toEqual([2]);
    expect(whole.cases).toBe(cases);
  });

  test('by second order is told to want a section for every bar', () => {
    const { truss, supports, stability, cases } = shallow([1e8, null]);
    const [light] = analyseWhole(truss, supports, stability, cases, [], { analysis: 'second-order' }).cases;
    expect(light.refused).toContain('bar 1 has none');
    expect(light.residual).toBeNull();
  });
});
