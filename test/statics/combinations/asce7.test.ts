import { describe, expect, test } from 'vitest';
import type { Asce7Rule } from '../../../src/brief/code-rule.ts';
import { generateCombinations } from '../../../src/statics/combinations/generate.ts';
import { asSet, cases } from './support.ts';

const ALL = cases(
  'D1 permanent',
  'D2 permanent',
  'settlement permanent',
  'Lr imposed H',
  'L imposed C',
  'M imposed',
  'S snow',
  'drift snow',
  'W1 wind',
  'W2 wind',
  'warm thermal',
  'cold thermal',
);
const NAMES = ALL.map(({ name }) => name);
/** Cases that may stand for each letter of the standard; of S, W and the temperatures one at a time. */
const MEANS: Record<string, string[][]> = {
  Lr: [['Lr']],
  L: [['L'], ['M'], ['L', 'M']],
  S: [['S'], ['drift']],
  W: [['W1'], ['W2']],
  T: [['settlement'], ['warm'], ['cold'], ['settlement', 'warm'], ['settlement', 'cold']],
};

/** The standards' formulas as they are printed (from memory), with the companion live load written as 1L. */
const PRINTED: Record<string, string[]> = {
  'ASCE7-16 LRFD': [
    '1.4D',
    '1.2D + 1.6L + 0.5(Lr or S) + 1T',
    '1.2D + 1.6(Lr or S) + (1L or 0.5W) + 1T',
    '1.2D + 1W + 1L + 0.5(Lr or S) + 1T',
    '0.9D + 1W + 1T',
    '1.2D + 1.2T + 0.5L',
  ],
  'ASCE7-22 LRFD': [
    '1.4D',
    '1.2D + 1.6L + (0.5Lr or 0.3S) + 1T',
    '1.2D + (1.6Lr or 1S) + (1L or 0.5W) + 1T',
    '1.2D + 1W + 1L + (0.5Lr or 0.3S) + 1T',
    '0.9D + 1W + 1T',
    '1.2D + 1.2T + 0.5L',
  ],
  'ASCE7-16 ASD': [
    '1D + 1T',
    '1D + 1L + 0.75T',
    '1D + (1Lr or 1S) + 0.75T',
    '1D + 0.75L + (0.75Lr or 0.75S) + 0.75T',
    '1D + 0.6W + 0.75T',
    '1D + 0.75L + 0.45W + (0.75Lr or 0.75S) + 0.75T',
    '0.6D + 0.6W + 0.75T',
  ],
  'ASCE7-22 ASD': [
    '1D + 1T',
    '1D + 1L + 0.75T',
    '1D + (1Lr or 0.7S) + 0.75T',
    '1D + 0.75L + (0.75Lr or 0.525S) + 0.75T',
    '1D + 0.6W + 0.75T',
    '1D + 0.75L + 0.45W + (0.75Lr or 0.525S) + 0.75T',
    '0.6D + 0.6W + 0.75T',
  ],
};

/** Every way to act of a printed formula: of "(a or b)" one, every load but dead present or not. */
function waysOf(formula: string): Record<string, number>[] {
  let ways: Record<string, number>[] = [{}];
  for (const term of formula.split(' + ')) {
    const [, before, inside] = /^([\d.]*)\(?(.*?)\)?$/u.exec(term)!;
    const choices = (inside.includes(' or ') ? inside.split(' or ') : [inside]).map((choice) => {
      const [, own, letter] = /^([\d.]*)(\w+)$/u.exec(choice)!;
      return { factor: Number(own || before), letter };
    });
    ways = ways.flatMap((way) => [
      ...(choices[0].letter === 'D' ? [] : [way]),
      ...choices.flatMap(({ factor, letter }) =>
        (MEANS[letter] ?? [['D1', 'D2']]).map((acting) => ({
          ...way,
          ...Object.fromEntries(acting.map((name) => [name, factor])),
        })),
      ),
    ]);
  }
  return ways;
}

describe('combinations of ASCE 7', () => {
  test.each(Object.entries(PRINTED))(
    '%s are those of the printed formulas with any load not acting',
    (title, formulas) => {
      const [code, method] = title.split(' ') as [Asce7Rule['code'], Asce7Rule['method']];
      const { combinations } = generateCombinations(ALL, { code, method, companionLive: 1 }, { superposable: false });
      expect(
        asSet(
          NAMES,
          combinations.map(({ factors }) => factors),
        ),
      ).toEqual(asSet(NAMES, formulas.flatMap(waysOf)));
      for (const { limit } of combinations) expect(limit).toBe('strength');
    },
  );

  test('the companion live load is halved where the brief allows it', () => {
    const all = cases('D permanent', 'L imposed A', 'W wind');
    const { combinations } = generateCombinations(all, { code: 'ASCE7-22', method: 'LRFD', companionLive: 0.5 });
    const factors = combinations.map((one) => one.factors);
    expect(factors).toContainEqual({ D: 1.2, L: 0.5, W: 1 });
    expect(factors).not.toContainEqual({ D: 1.2, L: 1, W: 1 });
  });

  test('an extraordinary load stands in combinations of its own, in strength design only', () => {
    const all = cases('D permanent', 'S snow', 'A accidental');
    const of = (rule: Asce7Rule) => {
      const { combinations, notes } = generateCombinations(all, rule, { superposable: false });
      return {
        notes,
        accidental: asSet(
          ['D', 'S', 'A'],
          combinations.filter(({ factors }) => factors.A).map((one) => one.factors),
        ),
      };
    };
    expect(of({ code: 'ASCE7-16', method: 'LRFD', companionLive: 1 }).accidental).toEqual([
      '0.9 0 1',
      '0.9 0.2 1',
      '1.2 0 1',
      '1.2 0.2 1',
    ]);
    const allowable = of({ code: 'ASCE7-16', method: 'ASD', companionLive: 1 });
    expect(allowable.accidental).toEqual([]);
    expect(allowable.notes.join()).toContain('accidental cases');
  });
});
