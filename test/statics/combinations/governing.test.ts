import { expect, test } from 'vitest';
import { LIMITS } from '../../../src/brief/code-rule.ts';
import { generateCombinations } from '../../../src/statics/combinations/generate.ts';
import { listed } from '../../../src/statics/combinations/listed.ts';
import { combine } from '../../../src/statics/solution/combine.ts';
import { envelope } from '../../../src/statics/solution/envelope.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { supportLifts } from '../../../src/statics/solution/support-lifts.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { fix, randomTruss, trussOf } from '../support/trusses.ts';

const RULE = {
  code: 'EN1990:2002+A1',
  expression: '6.10',
  besideAccident: 'psi1',
  sets: LIMITS,
  gammas: {},
  psi: {},
} as const;

test('combinations that are not listed in full are greatest nowhere: bars, supports and movements have the same extremes without them', () => {
  for (const seed of [1, 2, 3, 4, 5]) {
    const { truss, supports, cases: loads } = randomTruss(seed, 2);
    const natures = ['permanent', 'snow', 'wind'] as const;
    const asked = loads.map((one, i) => ({ ...one, nature: natures[i] }));
    const solved = solveCases(truss, supports, assessStability(truss, supports), asked).cases;
    const generated = generateCombinations(asked, RULE);
    const all = combine(solved, generated.combinations);
    const { combinations, combining } = listed(all, envelope(truss, solved, all), generated);
    expect(combinations.length).toBeLessThan(all.length);
    expect(combinations.length + combining!.notGoverning.length).toBe(all.length);
    expect(envelope(truss, solved, combinations)).toEqual(envelope(truss, solved, all));
    for (const limit of LIMITS)
      for (const pick of ['reactions', 'displacement'] as const) {
        const isOfForces = ['strength', 'equilibrium', 'accidental'].includes(limit);
        if ((pick === 'reactions') !== isOfForces) continue;
        const extremes = (list: typeof all) => {
          const rows = list
            .filter((one) => one.limit === limit && one.refused === null)
            .map((one) =>
              pick === 'reactions'
                ? one.reactions.flatMap((r) => [...r.force])
                : one.displacement.flatMap((d) => [...d!]),
            );
          return (rows[0] ?? []).map((_, k) => [
            Math.min(...rows.map((row) => row[k])),
            Math.max(...rows.map((row) => row[k])),
          ]);
        };
        const [whole, part] = [extremes(all), extremes([...combinations])];
        const scale = Math.max(...whole.flat().map(Math.abs), 0);
        expect(part.length).toBe(whole.length);
        for (const [k, pair] of whole.entries())
          for (const e of [0, 1]) expect(Math.abs(pair[e] - part[k][e])).toBeLessThanOrEqual(1e-8 * scale);
      }
  }
});

test('a support that the equilibrium set lifts is said with its pull, one that only stands down is not', () => {
  // A beam of two bars over three supports would not lift; a tripod pushed at its top does: by moments about a foot.
  const truss = trussOf({
    points: [
      [0, 0, 0],
      [4, 0, 0],
      [2, 3, 0],
      [2, 1, 4],
    ],
    bars: [
      [0, 3],
      [1, 3],
      [2, 3],
    ],
  });
  const supports = fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz' });
  const solved = solveCases(truss, supports, assessStability(truss, supports), [
    { name: 'G', nature: 'permanent', loads: [{ node: 3, force: [0, 0, -9e3] }] },
    { name: 'W', nature: 'wind', loads: [{ node: 3, force: [0, 3e3, 0] }] },
  ]).cases;
  const generated = generateCombinations(solved, RULE);
  const found = supportLifts(truss, combine(solved, generated.combinations));
  // 0.9 G presses 2.7 kN on each foot, 1.5 W lifts 0 and 1 by 4.5 kN x 4 m / 3 m / 2 = 3 kN each.
  expect(found).toHaveLength(1);
  expect(found[0].nodes).toEqual([0, 1]);
  expect(found[0].code).toBe('support-lifts');
  expect(found[0].message).toContain('0.300 kN in equilibrium');
  const calm = solved.filter(({ name }) => name === 'G');
  expect(supportLifts(truss, combine(calm, generateCombinations(calm, RULE).combinations))).toEqual([]);
});
