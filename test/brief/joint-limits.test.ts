import { describe, expect, it } from 'vitest';
import { jointLimits } from '../../src/brief/joint-limits.ts';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import { RequestError } from '../../src/domain/errors.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { member } from '../support/members.ts';

const limitsOf = (text: string) => parseBrief(`pinwright: 1\njoints:\n${text}\n`, 'brief.yaml').joints;

const problemOf = (text: string): string => {
  try {
    limitsOf(text);
  } catch (error) {
    if (error instanceof RequestError) return error.message;
    throw error;
  }
  return '';
};

const members = [
  member('D1', [0, 0, 0], [1, 0, 1]),
  member('D2', [1, 0, 1], [2, 0, 0]),
  member('C1', [0, 0, 0], [2, 0, 0]),
];

describe('reach and offset of the brief', () => {
  it('are one length for all members', () => {
    expect(jointLimits(members, limitsOf('  reach: 150 mm'))).toEqual({ reach: 0.15, offset: null, findings: [] });
  });

  it('are given to the members that a rule catches, of several rules by the last, and to no others', () => {
    const rules =
      '  reach: [{on: {name: "D*"}, use: 200 mm}, {on: {name: D2}, use: 0.3}]\n  offset: [{on: {name: C1}, use: 40 mm}]';
    expect(jointLimits(members, limitsOf(rules))).toEqual({
      reach: [0.2, 0.3, null],
      offset: [null, null, 0.04],
      findings: [],
    });
  });

  it('say a rule that catches nothing, with its line', () => {
    const { findings } = jointLimits(members, limitsOf('  reach:\n    - {on: {name: "X*"}, use: 200 mm}'));
    expect(findings.map(({ code, message }) => [code, message])).toEqual([
      ['selector-empty', expect.stringContaining('Line 4 of the brief')],
    ]);
  });

  it('are refused with their place where they are no length or no rule', () => {
    expect(problemOf('  reach: 150 kN')).toMatch(/^brief\.yaml:3:10: .*length/);
    expect(problemOf('  reach: [{on: {name: "D*"}, use: 200 kg}]')).toMatch(/^brief\.yaml:3:\d+: .*kg/);
    expect(problemOf('  reach: [{on: {name: "D*"}}]')).toContain('the key "use" is missing');
    expect(problemOf('  reach: [{on: {name: "D*"}, used: 200 mm}]')).toContain('did you mean "use"');
    expect(problemOf('  offset: {use: 3}')).toContain(', or a list of {on: ..., use: 200 mm}, is due');
  });
});

describe('joining with them', () => {
  const chord = member('C', [0, 0, 0], [6, 0, 0]);
  const post = (mark: string, x: number, gap: number) => member(mark, [x, 0, gap], [x, 0, 3]);
  const joins = (reach: number | (number | null)[] | null, gap: number): string[] => {
    const all = [chord, post('P', 2, gap), post('Q', 4, gap)];
    const { truss } = joinMembers(all, { reach });
    const onChord = truss.nodes.filter(({ members: met }) => met.includes(0) && met.length > 1);
    return onChord.flatMap(({ members: met }) => met.filter((m) => m > 0).map((m) => all[m].tag as string));
  };

  it('carries only the ends of the members that a rule catches', () => {
    expect(joins(null, 0.5)).toEqual([]);
    expect(joins([null, 0.6, null], 0.5)).toEqual(['P']);
    expect(joins([null, null, 0.01], 0.05)).toEqual(['P']);
    expect(joins(0.6, 0.5)).toEqual(['P', 'Q']);
  });

  it('lets axes pass as far apart as either of the two may', () => {
    const brace = member('B', [3, 0.15, 0], [3, 0.15, 3]);
    const meets = (offset: (number | null)[]) =>
      joinMembers([chord, brace], { offset }).truss.nodes.some(({ members: met }) => met.length === 2);
    expect(meets([null, null])).toBe(false);
    expect(meets([0.2, null])).toBe(true);
    expect(meets([null, 0.2])).toBe(true);
    expect(meets([0.2, 0.02])).toBe(true);
  });

  it('tells the limits that were used: those set, and the range that the sections gave', () => {
    const { limits } = joinMembers([chord, post('P', 2, 0.05), post('Q', 4, 0.05)], { reach: [null, 0.2, null] });
    expect(limits.reach.set).toEqual([{ value: 0.2, members: 1 }]);
    // Half the chord's depth and a detailer's gap, at right angles: 50 + 150 mm.
    expect(limits.reach.bySections?.[0]).toBeCloseTo(0.2, 9);
    expect(limits.reach.bySections?.[1]).toBeCloseTo(0.2, 9);
    expect(limits.offset).toEqual({ set: [], bySections: [0.05, 0.05] });
  });
});
