import { describe, expect, it } from 'vitest';
import { LIMITS } from '../../src/brief/code-rule.ts';
import { parseBrief } from '../../src/brief/parse-brief.ts';

const brief = (lines: string) => parseBrief(`pinwright: 1\n${lines}\n`, 'brief.yaml');

describe('combinations by a code', () => {
  it.each(['EN1990', 'EN1990:2002', 'EN1990:2002+A1'])(
    '%s is the edition of 2002 with its amendment, expression 6.10',
    (word) => {
      expect(brief(`combinations: ${word}`).codeRule).toEqual({
        code: 'EN1990:2002+A1',
        expression: '6.10',
        besideAccident: 'psi1',
        sets: LIMITS,
        gammas: {},
        psi: {},
      });
      expect(brief(`combinations: ${word}`).combinations).toEqual([]);
    },
  );

  it('an expression may be written as YAML reads it: 6.10 without quotes is the number 6.1', () => {
    for (const written of ['6.10', '"6.10"'])
      expect(brief(`combinations: {rule: EN1990, expression: ${written}}`).codeRule).toMatchObject({
        expression: '6.10',
      });
    const ab = brief('combinations: {rule: EN1990, expression: 6.10a/b}').codeRule;
    expect(ab).toMatchObject({ expression: '6.10a/b' });
  });

  it('takes national choices', () => {
    const { codeRule } = brief(
      'combinations: {rule: EN1990:2002, gammas: {permanent: 1.2, xi: 0.89, equilibrium: {favourable: 0.95}}, psi: {snow: [0.6, 0.3, 0.1], E: [1, 0.9, 0.8]}, sets: [strength]}',
    );
    expect(codeRule).toMatchObject({
      gammas: { permanent: 1.2, xi: 0.89, equilibrium: { favourable: 0.95 } },
      psi: { snow: [0.6, 0.3, 0.1] },
      sets: ['strength'],
    });
  });

  it('ASCE7 is 7-22 by strength design, with the full live load beside others, unless it says otherwise', () => {
    expect(brief('combinations: ASCE7').codeRule).toEqual({ code: 'ASCE7-22', method: 'LRFD', companionLive: 1 });
    expect(brief('combinations: {rule: ASCE7-16, method: ASD, companionLive: 0.5}').codeRule).toEqual({
      code: 'ASCE7-16',
      method: 'ASD',
      companionLive: 0.5,
    });
  });

  it('the site and the cases say what the factors hang on', () => {
    const { site, cases } = brief(
      'site: {altitude: 350 m, nordic: true}\ncases:\n  - {name: a, nature: imposed, category: H, loads: []}\n  - {name: b, nature: wind, alternative: west, loads: []}',
    );
    expect(site).toEqual({ altitude: 350, nordic: true });
    expect(cases).toMatchObject([{ category: 'H' }, { alternative: 'west' }]);
  });

  it.each([
    ['combinations: EN1991', 'ASCE7-16 or ASCE7-22 is due; did you mean "EN1990"?'],
    ['combinations: {rule: EN1990, methd: ASD}', '"methd": there is no such key here'],
    ['combinations: {rule: EN1990, expression: 6.11}', '6.10 or 6.10a/b is due'],
    ['combinations: {rule: EN1990, gammas: {permanent: -1}}', 'a factor of a code lies between 0 and 10'],
    ['combinations: {rule: EN1990, psi: {snow: [1.5, 0, 0]}}', 'psi lies between 0 and 1'],
    ['combinations: {rule: ASCE7, companionLive: 0.7}', '0.5 or 1.0 is due'],
    ['cases: [{name: a, nature: wind, category: H, loads: []}]', 'only imposed loads have a category'],
    ['cases: [{name: a, nature: permanent, alternative: b, loads: []}]', 'permanent cases always act together'],
  ])('says what is wrong with %s', (line, expected) => {
    expect(() => brief(line)).toThrow(expected);
  });

  it.each([
    ['combinations: none', 'EN1993-1-1', 'combinations: EN1990'],
    ['combinations: ASCE7', 'EN1993-1-1', 'combinations: EN1990'],
    ['combinations: {rule: EN1990, sets: [characteristic]}', 'EN1993-1-1', 'combinations: EN1990'],
    ['combinations: EN1990', 'AISC360', 'combinations: ASCE7'],
  ])(
    'with %s, checks by %s are told that strength combinations of their method are missing',
    (line, rule, expected) => {
      expect(() => brief(`${line}\nchecks: ${rule}`)).toThrow(`strength combinations of its own method: ${expected}`);
    },
  );

  it('checks that have their combinations are refused by name, for they cannot be made yet', () => {
    for (const line of [
      'combinations: EN1990',
      'cases: [{name: g, nature: permanent, loads: []}]\ncombinations: [{name: u, limit: strength, factors: {g: 1}}]',
    ]) {
      expect(() => brief(`${line}\nchecks: EN1993-1-1`)).toThrow(/"EN1993-1-1": this is not available yet$/u);
    }
  });
});
