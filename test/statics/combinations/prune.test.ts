import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type CodeRule, LIMITS } from '../../../src/brief/code-rule.ts';
import { generateCombinations, type NamedCombination } from '../../../src/statics/combinations/generate.ts';
import { withoutInner } from '../../../src/statics/combinations/prune.ts';
import { cases } from './support.ts';

const ALL = cases(
  'G permanent',
  'settlement permanent',
  'S snow',
  'T snow',
  'W wind',
  'V wind',
  'Q imposed C',
  'R imposed H',
  'K thermal',
);
const RULES: CodeRule[] = [
  { code: 'EN1990:2002+A1', expression: '6.10', besideAccident: 'psi1', sets: LIMITS, gammas: {}, psi: {} },
  { code: 'EN1990:2002+A1', expression: '6.10a/b', besideAccident: 'psi1', sets: LIMITS, gammas: {}, psi: {} },
  ...(['ASCE7-16', 'ASCE7-22'] as const).flatMap((code) =>
    (['LRFD', 'ASD'] as const).map((method): CodeRule => ({ code, method, companionLive: 1 })),
  ),
];

const value = (one: NamedCombination, effects: Readonly<Record<string, number>>) =>
  Object.entries(one.factors).reduce((sum, [name, factor]) => sum + factor * effects[name], 0);

describe('combinations that can never govern', () => {
  test.each(RULES)('are left out and the envelope stays as it is: %o', (rule) => {
    const whole = generateCombinations(ALL, rule, { superposable: false });
    const pruned = generateCombinations(ALL, rule);
    expect(pruned.generated).toBe(whole.combinations.length);
    // By 6.10 alone every combination of these is an extreme of its own.
    if (!('expression' in rule) || rule.expression !== '6.10') expect(pruned.between).toBeGreaterThan(0);
    expect(pruned.combinations.length + pruned.between).toBe(pruned.generated);
    const effects = fc.record(
      Object.fromEntries(ALL.map(({ name }) => [name, fc.double({ min: -1e3, max: 1e3, noNaN: true })])),
    );
    fc.assert(
      fc.property(effects, (effect) => {
        for (const limit of LIMITS) {
          const of = (list: readonly NamedCombination[]) =>
            list.filter((one) => one.limit === limit).map((one) => value(one, effect));
          const [all, kept] = [of(whole.combinations), of(pruned.combinations)];
          expect(Math.max(...kept)).toBeCloseTo(Math.max(...all), 6);
          expect(Math.min(...kept)).toBeCloseTo(Math.min(...all), 6);
        }
      }),
      { numRuns: 60 },
    );
  });

  test('ends of a line are kept, and what lies between, but not what differs in two factors', () => {
    const draft = (G: number, S: number) => ({ limit: 'strength', what: '', factors: { G, S } });
    const kept = withoutInner(['G', 'S'], [draft(1, 0), draft(1.2, 0), draft(1.35, 0), draft(1.2, 0.1)]);
    expect(kept.map(({ factors }) => factors)).toEqual([
      { G: 1, S: 0 },
      { G: 1.35, S: 0 },
      { G: 1.2, S: 0.1 },
    ]);
  });

  test('cases that make more combinations than anyone could mean are refused, with the way out', () => {
    const many = cases(...Array.from({ length: 16 }, (_, i) => `q${i} imposed A`));
    expect(() => generateCombinations(many, RULES[0])).toThrow('`alternative:`');
    const grouped = many.map((one) => ({ ...one, alternative: 'position' }));
    expect(generateCombinations(grouped, RULES[0]).combinations.length).toBeGreaterThan(16);
  });
});
