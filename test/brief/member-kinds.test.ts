import { describe, expect, it } from 'vitest';
import { memberKinds } from '../../src/brief/member-kinds.ts';
import { hollow, member } from '../support/members.ts';

describe('kinds of members', () => {
  it('are counted by class, section and material, what is in scope first', () => {
    const wide = { section: hollow(0.2) };
    const read = [
      member('a', [0, 0, 0], [3, 0, 0]),
      member('b', [0, 0, 0], [0, 4, 0]),
      member('c', [0, 0, 0], [0, 0, 5], wide),
      ...[0, 1, 2].map((i) => member(`d${i}`, [0, 0, i], [1, 0, i], { section: null, class: 'IfcBeam' })),
    ];
    const kinds = memberKinds(read, read.slice(1, 3));
    expect(
      kinds.map(({ class: of, section, count, inScope, length }) => [of, section, count, inScope, length]),
    ).toEqual([
      ['IfcMember', 'RHS 100x100x5', 2, 1, 7],
      ['IfcMember', 'RHS 200x200x5', 1, 1, 5],
      ['IfcBeam', null, 3, 0, 3],
    ]);
  });
});
