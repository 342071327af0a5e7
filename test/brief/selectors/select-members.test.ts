import { describe, expect, it } from 'vitest';
import { selectMembers } from '../../../src/brief/selectors/select-members.ts';
import { makeMember } from '../make-truss.ts';

const caught = (changes: Parameters<typeof makeMember>[0], selector: object): boolean =>
  selectMembers([makeMember(changes)], [{ line: 1, ...selector }]).length === 1;

describe('a member selector', () => {
  it('compares whole texts without regard to case', () => {
    expect(caught({ name: 'Purlin 1' }, { name: 'PURLIN 1' })).toBe(true);
    expect(caught({ name: 'Purlin 12' }, { name: 'Purlin 1' })).toBe(false);
    expect(caught({ name: null }, { name: '*' })).toBe(false);
  });

  it.each([
    ['P*', 'P12', true],
    ['*handrail*', 'Left handrail 3', true],
    ['T*-C*', 'T1-D-C4', true],
    ['T*-C*', 'T1-D', false],
    ['a*a', 'a', false],
    ['*', '', true],
    ['P.1', 'Px1', false],
    ['ä*', 'A\u0308rger', true],
  ])('takes %s for %s: %s', (pattern, name, expected) => {
    expect(caught({ name }, { name: pattern })).toBe(expected);
  });

  it('comes to an end on a pattern made to be slow', () => {
    expect(caught({ name: 'a'.repeat(20_000) }, { name: `${'*a'.repeat(2000)}*b` })).toBe(false);
  });

  it('keeps the case of GlobalIds', () => {
    expect(caught({ globalId: 'aB' }, { globalId: 'aB' })).toBe(true);
    expect(caught({ globalId: 'ab' }, { globalId: 'aB' })).toBe(false);
  });

  it('takes the StandardCase form of a class with it, not the other way round', () => {
    expect(caught({ class: 'IfcBeamStandardCase' }, { class: 'IfcBeam' })).toBe(true);
    expect(caught({ class: 'IfcBeam' }, { class: 'IfcBeamStandardCase' })).toBe(false);
    expect(caught({ class: 'IfcColumn' }, { class: 'IfcBeam' })).toBe(false);
  });

  it('measures level, length and slope on the axis, ends of ranges included', () => {
    const axis = [
      [0, 0, 4],
      [3, 0, 8],
    ] as const;
    expect(caught({ axis }, { level: [6, null] })).toBe(true);
    expect(caught({ axis }, { level: [null, 5.9] })).toBe(false);
    expect(caught({ axis }, { length: [5, 5] })).toBe(true);
    expect(caught({ axis }, { slope: [Math.atan2(4, 3), Math.PI / 2] })).toBe(true);
    expect(caught({ axis }, { slope: [0, 0.9] })).toBe(false);
  });

  it('needs all of its keys, and takes back what `not` says', () => {
    expect(caught({ name: 'P1', storey: 'Roof' }, { name: 'P*', storey: 'Roof' })).toBe(true);
    expect(caught({ name: 'P1', storey: 'Ground' }, { name: 'P*', storey: 'Roof' })).toBe(false);
    expect(caught({ name: 'P1', storey: 'Roof' }, { name: 'P*', not: { line: 1, storey: 'Roof' } })).toBe(false);
  });

  it('of a list any may hold, and each member comes once, in order', () => {
    const members = ['A', 'B', 'C'].map((name) => makeMember({ name }));
    expect(
      selectMembers(members, [
        { line: 1, name: 'C' },
        { line: 2, name: '*' },
      ]),
    ).toEqual([0, 1, 2]);
    expect(
      selectMembers(members, [
        { line: 1, name: 'C' },
        { line: 2, name: 'A' },
      ]),
    ).toEqual([0, 2]);
    expect(selectMembers(members, [])).toEqual([]);
  });
});
