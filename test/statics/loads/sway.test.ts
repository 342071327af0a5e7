import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../../src/brief/parse-brief.ts';
import { withSway } from '../../../src/statics/combinations/with-sway.ts';
import { addSway, heightFactor } from '../../../src/statics/loads/sway.ts';
import { combine } from '../../../src/statics/solution/combine.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { LoadCase } from '../../../src/statics/types.ts';
import { alsoFlat, caseOf, fix, trussOf } from '../support/trusses.ts';

/** Two columns 5 m high, 6 m apart, a beam between their heads and one diagonal from foot to head. */
const frame = trussOf({
  points: [
    [0, 0, 0],
    [6, 0, 0],
    [0, 0, 5],
    [6, 0, 5],
  ],
  bars: [
    [0, 2],
    [1, 3],
    [2, 3],
    [0, 3],
  ],
});
const supports = alsoFlat(fix({ 0: 'xz', 1: 'xz' }), 4, 'y');
const heads = (down: number) => [2, 3].map((node) => ({ node, force: [0, 0, -down] as const }));
const dead = caseOf(heads(100e3));
const uplift: LoadCase = { name: 'uplift', nature: 'wind', loads: heads(-50e3) };
const en = { rule: 'EN1993-1-1', along: [1, 0] } as const;

describe('sway imperfections', () => {
  it('have the height factor of EN 1993-1-1 (5.5): 2 / sqrt h between 2/3 and 1', () => {
    expect([0, 1, 4, 6.25, 9, 25].map(heightFactor)).toEqual([1, 1, 1, 0.8, 2 / 3, 2 / 3]);
  });

  it('follow each case with downward load, along both ways, by phi of the load at its node', () => {
    const { cases, words } = addSway(frame, supports, [dead, uplift], en);
    expect(cases.map(({ name }) => name)).toEqual(['dead', 'uplift', 'dead: sway x', 'dead: sway y']);
    // 5 m from the feet to the heads: phi = 1/200 x 2 / sqrt 5.
    const phi = 2 / Math.sqrt(5) / 200;
    for (const { force } of cases[2].loads) expect(force[0]).toBeCloseTo(phi * 100e3, 6);
    for (const { force } of cases[3].loads) expect(force).toEqual([-0, expect.closeTo(phi * 100e3, 6), 0]);
    expect(words).toContain('1/224 of every downward load');
  });

  it('by AISC 360 are 0.002 of the gravity loads', () => {
    const { cases } = addSway(frame, supports, [dead], { rule: 'AISC360', along: [1, 0] });
    expect(cases[1].loads[0].force[0]).toBeCloseTo(200, 9);
  });

  it('load the bracing: the diagonal of a braced frame takes phi V / cos', () => {
    const { cases } = addSway(frame, supports, [dead], en);
    const solved = solveCases(frame, supports, assessStability(frame, supports), cases.slice(0, 2)).cases;
    expect(solved[0].axialForce[3]).toBeCloseTo(0, 6);
    const phi = 2 / Math.sqrt(5) / 200;
    expect(solved[1].axialForce[3]).toBeCloseTo((phi * 200e3 * Math.hypot(6, 5)) / 6, 6);
  });

  it('make each strength combination lean four ways by its own factors, and leave the others as they are', () => {
    const { cases } = addSway(frame, supports, [dead, uplift], en);
    const rules = [
      { name: 'strength 1', limit: 'strength', factors: { dead: 1.35 } },
      { name: 'strength 2', limit: 'strength', factors: { uplift: 1.5 } },
      { name: 'service 1', limit: 'characteristic', factors: { dead: 1 } },
    ] as const;
    const all = withSway(rules, cases);
    expect(all.map(({ factors }) => factors)).toEqual([
      { dead: 1.35, 'dead: sway x': 1.35 },
      { dead: 1.35, 'dead: sway x': -1.35 },
      { dead: 1.35, 'dead: sway y': 1.35 },
      { dead: 1.35, 'dead: sway y': -1.35 },
      { uplift: 1.5 },
      { dead: 1 },
    ]);
    expect(all[1].name).toBe('strength 1, leaning -x');
    // The upright one that is left out lies in the middle of two that are there.
    const { cases: solved } = solveCases(frame, supports, assessStability(frame, supports), cases);
    const upright = combine(solved, [rules[0]])[0];
    const leaning = combine(solved, all.slice(0, 2));
    upright.axialForce.forEach((force, bar) => {
      const pair = leaning.map(({ axialForce }) => axialForce[bar]!);
      expect(force).toBeCloseTo((pair[0] + pair[1]) / 2, 6);
    });
  });

  it('are asked for in the brief, along a direction of the building where it stands askew', () => {
    const parse = (line: string) => parseBrief(Buffer.from(`pinwright: 1\n${line}\n`), 'b.yaml').imperfections;
    expect(parse('imperfections: EN1993-1-1')).toEqual(en);
    expect(parse('imperfections: none')).toBeNull();
    expect(parse('title: t')).toBeNull();
    expect(parse('imperfections: {rule: AISC360, along: [3, 4]}')).toEqual({ rule: 'AISC360', along: [0.6, 0.8] });
    expect(() => parse('imperfections: EN1993')).toThrow(/EN1993-1-1, AISC360 or none/);
  });
});
