import { describe, expect, test } from 'vitest';
import { factorise } from '../../../src/statics/engine/factor.ts';
import { solveRefined } from '../../../src/statics/engine/refine.ts';
import { realStiffness } from '../../../src/statics/model/elastic.ts';
import { gatherForces } from '../../../src/statics/model/movement.ts';
import { findParts } from '../../../src/statics/model/parts.ts';
import { buildSystem } from '../../../src/statics/model/system.ts';
import { OneWayBars } from '../../../src/statics/one-way/one-way-bars.ts';
import { oneWayRows } from '../../../src/statics/one-way/one-way-rows.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { solveCombinations } from '../../../src/statics/solution/solve-combinations.ts';
import { Solver } from '../../../src/statics/solution/solver.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { alsoFlat, caseOf, fix, randomFrom, trussOf } from '../support/trusses.ts';
import { bracedFrame } from './braced-frames.ts';

const only = (tensionOnly: readonly number[], compressionOnly: readonly number[] = []) => ({
  oneWay: { tensionOnly, compressionOnly },
});

describe('100 random frames braced by rods', () => {
  const frames = Array.from({ length: 100 }, (_, seed) => bracedFrame(seed + 1));

  test('settle, no rod pushes, joints balance, and taking the slack rods out of the frame gives the same forces', () => {
    let slackRods = 0;
    for (const { sketch, supports, rods, cases } of frames) {
      const truss = trussOf(sketch);
      const stability = assessStability(truss, supports);
      const { cases: solved, findings } = solveCases(truss, supports, stability, cases, only(rods));
      expect(findings).toEqual([]);
      for (const [i, one] of solved.entries()) {
        expect(one.refused).toBeNull();
        expect(one.residual).toBeLessThan(1e-9);
        const largest = Math.max(...one.axialForce.map((force) => Math.abs(force!)));
        for (const rod of rods) expect(one.axialForce[rod]).toBeGreaterThanOrEqual(-1e-9 * largest);
        slackRods += one.slack!.length;
        // Rods of next to no stiffness are as good as gone, by another factorisation and without any search.
        const stiffness = (sketch.stiffness as number[]).map((ea, b) => (one.slack!.includes(b) ? 1e-5 * ea : ea));
        const without = trussOf({ ...sketch, stiffness });
        const [again] = solveCases(without, supports, stability, [cases[i]]).cases;
        one.axialForce.forEach((force, b) => {
          expect(Math.abs(force! - again.axialForce[b]!)).toBeLessThan(2e-4 * largest);
        });
      }
    }
    expect(slackRods).toBeGreaterThan(300);
  });

  test('have the same forces wherever the search starts', () => {
    const random = randomFrom(7);
    for (const { sketch, supports, rods, cases } of frames) {
      const truss = trussOf(sketch);
      const system = buildSystem({ truss, supports, parts: findParts(truss, supports) }, [], realStiffness(truss));
      const factor = factorise(system.matrix);
      const rows = oneWayRows(system, only(rods).oneWay);
      const components = new Float64Array(3 * truss.nodes.length);
      for (const { node, force } of cases[0].loads) components.set(force, 3 * node);
      const load = gatherForces(system.movement, components);
      const [linear] = solveRefined(system, factor, [load]);
      const all = rows.map((_, j) => j);
      const starts = [[], all, ...[0, 1, 2].map(() => all.filter(() => random() < 0.5))];
      const answers = starts.map((start) => {
        const found = new OneWayBars(system, factor, rows).slacken(linear, load, null, 1e5, start);
        if ('stuck' in found) throw new Error('stuck');
        return found.answer.axial;
      });
      for (const axial of answers)
        axial.forEach((force, row) => {
          expect(Math.abs(force - answers[0][row])).toBeLessThan(1e-6 * 1e5);
        });
    }
  });

  test('have combinations that are solved from their combined loads, not summed up', () => {
    let differs = 0;
    for (const { sketch, supports, rods, cases } of frames.slice(0, 20)) {
      const truss = trussOf(sketch);
      const stability = assessStability(truss, supports);
      const solver = new Solver(truss, supports, stability, only(rods));
      const rule = { name: 'sum', limit: 'strength', factors: { a: 1.35, b: 1.5, c: -0.9 } } as const;
      const [combined] = solveCombinations(solver, cases, [rule]).combinations;
      const loads = cases.flatMap((one) =>
        one.loads.map(({ node, force }) => {
          const factor = rule.factors[one.name as 'a'];
          return { node, force: [factor * force[0], factor * force[1], factor * force[2]] as const };
        }),
      );
      const [direct] = solveCases(truss, supports, stability, [caseOf(loads)], only(rods)).cases;
      combined.axialForce.forEach((force, b) => {
        expect(force).toBeCloseTo(direct.axialForce[b]!, 3);
      });
      const solved = solver.solve(cases).cases;
      const summed = truss.bars.map((_, b) =>
        solved.reduce((sum, one) => sum + rule.factors[one.name as 'a'] * one.axialForce[b]!, 0),
      );
      if (summed.some((force, b) => Math.abs(force - direct.axialForce[b]!) > 100)) differs++;
    }
    expect(differs).toBeGreaterThan(10);
  });
});

describe('bars that only pull or only push', () => {
  const points = [
    [0, 0, 0],
    [4, 0, 0],
    [0, 0, 3],
    [4, 0, 3],
  ] as const;
  const bars = [
    [0, 2],
    [1, 3],
    [2, 3],
    [0, 3],
    [1, 2],
  ] as const;
  const supports = alsoFlat(fix({ 0: 'xz', 1: 'xz' }), 4, 'y');
  const push = (force: number, name = 'wind') => caseOf([{ node: 2, force: [force, 0, 0] }], name);

  test('a case without which a rod would have to push and nothing else can is refused, naming the rod; the others are carried', () => {
    const truss = trussOf({ points, bars: bars.slice(0, 4) });
    const stability = assessStability(truss, supports);
    const { cases, findings } = solveCases(truss, supports, stability, [push(1e4), push(-1e4, 'back')], only([3]));
    expect(cases[0].refused).toBeNull();
    expect(cases[0].axialForce[3]).toBeCloseTo(1e4 / 0.8, 6);
    expect(cases[1].refused).toContain('bar 3 would have to push');
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['load-moves-it', 'error']]);
  });

  test('a strut that only pushes carries what the rod does not', () => {
    const truss = trussOf({ points, bars });
    const stability = assessStability(truss, supports);
    const [one] = solveCases(truss, supports, stability, [push(1e4)], only([3], [4])).cases;
    expect(one.axialForce[3]!).toBeGreaterThan(0);
    expect(one.axialForce[4]!).toBeLessThan(0);
    expect(one.slack).toEqual([]);
    const [back] = solveCases(truss, supports, stability, [push(-1e4)], only([3, 4])).cases;
    expect(back.slack).toEqual([3]);
    expect(back.axialForce[3]).toBe(0);
  });

  test('a load that brings no sway leaves crossed rods slack without a word, but a single rod one way is said to hang loose', () => {
    const down = caseOf([
      { node: 2, force: [0, 0, -1e4] },
      { node: 3, force: [0, 0, -1e4] },
    ]);
    const rule = [{ name: 'all', limit: 'strength', factors: { dead: 1.35 } }] as const;
    const solveWith = (list: typeof bars | readonly (readonly [number, number])[], rods: number[]) => {
      const truss = trussOf({ points, bars: list });
      const solver = new Solver(truss, supports, assessStability(truss, supports), only(rods));
      return solveCombinations(solver, [down], rule);
    };
    const crossed = solveWith(bars, [3, 4]);
    expect(crossed.combinations[0].slack).toEqual([3, 4]);
    expect(crossed.combinations[0].axialForce.slice(0, 2)).toEqual([-13.5e3, -13.5e3].map((v) => expect.closeTo(v, 6)));
    expect(crossed.findings).toEqual([]);
    const single = solveWith(bars.slice(0, 4), [3]);
    expect(single.combinations[0].refused).toBeNull();
    expect(single.findings.map(({ code, severity }) => [code, severity])).toEqual([['moves-freely', 'warning']]);
    expect(single.findings[0].message).toContain('bar 3 is slack');
  });
});
