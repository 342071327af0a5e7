import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type Category, type En1990Rule, LIMITS, type Limit } from '../../../src/brief/code-rule.ts';
import type { ActionCase } from '../../../src/statics/combinations/action-case.ts';
import { generateCombinations } from '../../../src/statics/combinations/generate.ts';
import { asSet, cases } from './support.ts';

const RULE: En1990Rule = {
  code: 'EN1990:2002+A1',
  expression: '6.10',
  besideAccident: 'psi1',
  sets: LIMITS,
  gammas: {},
  psi: {},
};
const LOWLAND = { altitude: 200, nordic: false };

const namesOf = (all: readonly ActionCase[]) => all.map(({ name }) => name);
const made = (all: readonly ActionCase[], rule: En1990Rule, limit: Limit, superposable = false) => {
  const { combinations } = generateCombinations(all, rule, { site: LOWLAND, superposable });
  return asSet(
    namesOf(all),
    combinations.filter((one) => one.limit === limit).map(({ factors }) => factors),
  );
};

/**
 * The same lists by another road: every case is absent, leads or accompanies; every assignment of these roles is tried and those that the code
 * forbids are struck out. Nothing of the program is used, the factors are typed in again from the tables.
 */
function enumerate(all: readonly ActionCase[], limit: Limit, expression: '6.10' | '6.10a' | '6.10b'): string[] {
  const psi = (one: ActionCase): readonly number[] => {
    if (one.nature === 'snow') return [0.5, 0.2, 0];
    if (one.nature === 'wind') return [0.6, 0.2, 0];
    if (one.nature === 'thermal') return [0.6, 0.5, 0];
    const of: Record<string, readonly number[]> = {
      A: [0.7, 0.5, 0.3],
      C: [0.7, 0.7, 0.6],
      E: [1, 0.9, 0.8],
      H: [0, 0, 0],
    };
    return of[one.category ?? 'E'];
  };
  const permanents = { strength: expression === '6.10b' ? [1.35 * 0.85, 1] : [1.35, 1], equilibrium: [1.1, 0.9] }[
    limit as 'strength'
  ] ?? [1];
  const isUltimate = limit === 'strength' || limit === 'equilibrium';
  const variable = all.filter(({ nature }) => nature !== 'permanent' && nature !== 'accidental');
  const accidents = limit === 'accidental' ? all.filter(({ nature }) => nature === 'accidental') : [null];
  const out: Record<string, number>[] = [];
  for (let code = 0; code < 3 ** variable.length; code++) {
    const role = (i: number) => Math.floor(code / 3 ** i) % 3; // 0 absent, 1 leads, 2 accompanies
    const present = variable.filter((_, i) => role(i) > 0);
    const leading = variable.filter((_, i) => role(i) === 1);
    const groupOf = (one: ActionCase) =>
      one.alternative ?? (['wind', 'snow', 'thermal'].includes(one.nature) ? one.nature : `only ${one.name}`);
    const clash = present.some((a) =>
      present.some((b) => a !== b && groupOf(a) === groupOf(b) && a.alternative !== 'none' && b.alternative !== 'none'),
    );
    const roofWithWeather =
      present.some(({ category }) => category === 'H') &&
      present.some(({ nature }) => ['snow', 'wind'].includes(nature));
    if (clash || roofWithWeather) continue;
    const noLead = expression === '6.10a' || limit === 'quasi-permanent';
    if (noLead && leading.length > 0) continue;
    if (!noLead && present.length > 0) {
      const natures = new Set(leading.map(({ nature }) => nature));
      if (natures.size !== 1) continue;
      if (present.some((one) => natures.has(one.nature) && !leading.includes(one))) continue;
    }
    for (const g of permanents)
      for (const set of [isUltimate ? 1.2 : 1, 0])
        for (const accident of accidents) {
          const factors: Record<string, number> = {};
          all.forEach((one) => {
            if (one.isSettlement) factors[one.name] = set;
            else if (one.nature === 'permanent') factors[one.name] = g;
            else if (one === accident) factors[one.name] = 1;
            else if (leading.includes(one))
              factors[one.name] = isUltimate ? 1.5 : limit === 'characteristic' ? 1 : psi(one)[1];
            else if (present.includes(one))
              factors[one.name] = (isUltimate ? 1.5 : 1) * psi(one)[isUltimate || limit === 'characteristic' ? 0 : 2];
          });
          out.push(factors);
        }
  }
  return asSet(namesOf(all), out);
}

const HALL = cases(
  'G1 permanent',
  'G2 permanent',
  'settlement permanent',
  'snow snow',
  'drift-left snow',
  'west wind',
  'east wind',
  'roof imposed H',
  'crane imposed C',
  'warm thermal',
  'cold thermal',
  'impact accidental',
);

describe('combinations of EN 1990', () => {
  test.each(LIMITS)('the %s set is that of an enumeration written independently', (limit) => {
    expect(made(HALL, RULE, limit)).toEqual(enumerate(HALL, limit, '6.10'));
  });

  test('6.10a and 6.10b together are those of the enumeration', () => {
    const both = new Set([...enumerate(HALL, 'strength', '6.10a'), ...enumerate(HALL, 'strength', '6.10b')]);
    expect(made(HALL, { ...RULE, expression: '6.10a/b' }, 'strength')).toEqual([...both].sort());
  });

  test('of any cases the lists are those of the enumeration', () => {
    const aCase = fc.oneof(
      fc.record({
        nature: fc.constantFrom('snow', 'wind', 'thermal'),
        alternative: fc.constantFrom(undefined, 'x', 'none'),
      }),
      fc.record({
        nature: fc.constant('imposed'),
        category: fc.constantFrom<Category | undefined>(undefined, 'A', 'C', 'H'),
        alternative: fc.constantFrom(undefined, 'x'),
      }),
      fc.record({ nature: fc.constantFrom('permanent', 'accidental') }),
    );
    fc.assert(
      fc.property(fc.array(aCase, { maxLength: 6 }), fc.constantFrom(...LIMITS), (some, limit) => {
        const all = some.map((one, i) => ({ ...JSON.parse(JSON.stringify(one)), name: `c${i}` }) as ActionCase);
        expect(made(all, RULE, limit)).toEqual(enumerate(all, limit, '6.10'));
      }),
      { numRuns: 150 },
    );
  });

  test('by hand: dead, snow and wind below 1000 m have 1.35 G + 1.5 S + 0.9 W, 1.35 G + 0.75 S + 1.5 W and their subsets', () => {
    const all = cases('G permanent', 'S snow', 'W wind');
    expect(made(all, RULE, 'strength')).toEqual(
      [
        '1.35 0 0',
        '1.35 0 1.5',
        '1.35 0.75 1.5',
        '1.35 1.5 0',
        '1.35 1.5 0.9',
        '1 0 0',
        '1 0 1.5',
        '1 0.75 1.5',
        '1 1.5 0',
        '1 1.5 0.9',
      ].sort(),
    );
    expect(made(all, RULE, 'equilibrium')).toContain('0.9 0 1.5');
  });

  test('a category H load leads without snow and wind, and never accompanies them', () => {
    const all = cases('G permanent', 'S snow', 'H imposed H');
    expect(made(all, RULE, 'strength').filter((text) => !text.endsWith(' 0'))).toEqual(['1 0 1.5', '1.35 0 1.5']);
  });

  test('national factors take the place of the recommended ones', () => {
    const rule: En1990Rule = {
      ...RULE,
      sets: ['strength', 'equilibrium'],
      gammas: { permanent: 1.2, favourable: 0.95, variable: 1.6, settlement: 1.1, equilibrium: { favourable: 0.8 } },
      psi: { wind: [0.5, 0.2, 0] },
    };
    const all = cases('G permanent', 'settlement permanent', 'S snow', 'W wind');
    expect(made(all, rule, 'strength')).toContain('1.2 1.1 1.6 0.8');
    expect(made(all, rule, 'equilibrium')).toContain('0.8 0 0 1.5');
    expect(made(all, rule, 'characteristic')).toEqual([]);
  });

  test('beside an accident the leading action has psi1 or psi2, as the nation chooses', () => {
    const all = cases('G permanent', 'Q imposed C', 'A accidental');
    expect(made(all, RULE, 'accidental')).toContain('1 0.7 1');
    expect(made(all, { ...RULE, besideAccident: 'psi2' }, 'accidental')).toEqual(['1 0 1', '1 0.6 1']);
  });

  test('what is taken because the brief does not say it is said, and is on the safe side', () => {
    const all = cases('G permanent', 'S snow', 'hook imposed');
    const { notes, combinations } = generateCombinations(all, RULE);
    expect(notes).toHaveLength(2);
    expect(notes[0]).toContain('above 1000 m');
    expect(notes[1]).toContain('hook: taken as E');
    expect(combinations.map(({ factors }) => factors)).toContainEqual({ G: 1.35, S: 1.5, hook: 1.5 });
    expect(generateCombinations(cases('G permanent', 'S snow'), RULE, { site: LOWLAND }).notes).toEqual([]);
  });

  test('every combination has a name of its own that says its limit, its expression and what leads', () => {
    const { combinations } = generateCombinations(HALL, RULE, { site: LOWLAND });
    expect(new Set(combinations.map(({ name }) => name)).size).toBe(combinations.length);
    const one = combinations.find(({ factors }) => factors.west === 1.5 && factors.snow === undefined);
    expect(one?.name).toMatch(/^strength \d+ \(6\.10, west leads\)$/u);
  });
});
