import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import { applySections, withoutSettled } from '../../src/brief/sections.ts';
import { RequestError } from '../../src/domain/errors.ts';
import { finding } from '../../src/domain/finding.ts';
import { member } from '../support/members.ts';

const rulesOf = (text: string) => parseBrief(`pinwright: 1\n${text}\n`, 'brief.yaml').sections;

const problemOf = (text: string): string => {
  try {
    rulesOf(text);
  } catch (error) {
    if (error instanceof RequestError) return error.message;
    throw error;
  }
  return '';
};

const S355 = {
  name: 'S355',
  elasticModulus: 210e9,
  density: 7850,
  expansion: 12e-6,
  yieldStrength: 355e6,
  ultimateStrength: 470e6,
  from: 'name',
} as const;

const members = [
  member('D1', [0, 0, 0], [1, 0, 1], { material: S355 }),
  member('D2', [1, 0, 1], [2, 0, 0], { section: null }),
  member('C1', [0, 0, 0], [2, 0, 0]),
];

describe('sections of the brief', () => {
  it('are given to the members that a rule catches, and no others', () => {
    const { members: changed, findings } = applySections(
      members,
      rulesOf('sections: [{on: {name: "D*"}, use: "CHS 88.9x4"}]'),
    );
    expect(changed.map(({ section }) => section?.name)).toEqual(['CHS 88.9x4', 'CHS 88.9x4', 'RHS 100x100x5']);
    expect(changed[1]?.section).toMatchObject({ from: 'brief', shape: 'CHS' });
    expect(changed[2]).toBe(members[2]);
    expect(findings).toEqual([]);
  });

  it('go by the last rule where several catch a member, and by what the model says, not by earlier rules', () => {
    const rules = rulesOf(
      'sections:\n  - {on: {name: "*"}, use: HEA 200}\n  - {on: [{name: D1}, {section: "HEA*"}], use: IPE 300}',
    );
    const { members: changed, findings } = applySections(members, rules);
    expect(changed.map(({ section }) => section?.name)).toEqual(['IPE 300', 'HEA 200', 'HEA 200']);
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({ code: 'selector-empty' });
    expect(findings[0]?.message).toContain('Line 4');
  });

  it('change strengths with the thickness', () => {
    const { members: changed } = applySections(members, rulesOf('sections: [{on: {name: D1}, use: HEB 300}]'));
    expect(changed[0]?.material.yieldStrength).toBe(345e6);
  });

  it('settle what the model left open of those members', () => {
    const { members: changed } = applySections(members, rulesOf('sections: [{on: {name: "D*"}, use: HEA 200}]'));
    const about = (code: 'no-section' | 'near-miss', ids: string[]) => finding(code, 'm', 'a', { members: ids });
    const kept = withoutSettled(
      [about('no-section', ['D2']), about('no-section', ['D2', 'C1']), about('near-miss', ['D2'])],
      changed,
    );
    expect(kept.map(({ code, members: ids }) => [code, ids.length])).toEqual([
      ['no-section', 2],
      ['near-miss', 1],
    ]);
  });

  it.each([
    [
      'sections: [{on: {name: D}, use: HEA 205}]',
      'brief.yaml:2:33: "HEA 205": this section is not known; did you mean "HEA 20',
    ],
    [
      'sections: [{on: {name: D}, use: RHS 100x100x70}]',
      'brief.yaml:2:33: "RHS 100x100x70": this section is not known',
    ],
    ['sections:\n  - {on: {name: D}}', 'the key "use" is missing'],
    ['sections: [{on: {nam: D}, use: HEA 200}]', 'did you mean "name"'],
    ['materials: {default: S356}', 'brief.yaml:2:22: "S356": this is no steel grade that is known'],
  ])('are refused with their place: %s', (text, expected) => {
    expect(problemOf(text)).toContain(expected);
  });
});
