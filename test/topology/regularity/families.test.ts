import { describe, expect, it } from 'vitest';
import { joinMembers } from '../../../src/topology/join-members.ts';
import { flatTrusses, shortened } from '../../support/flat-trusses.ts';
import { hollow, member, round } from '../../support/members.ts';

const told = (members: Parameters<typeof joinMembers>[0]) =>
  joinMembers(members).families.map(({ role, section, length, members: own, oddBeside }) => ({
    role,
    section,
    length: Number(length.toFixed(3)),
    count: own.length,
    odd: oddBeside?.count ?? null,
  }));

describe('families of members', () => {
  it('are alike in role, section and length as drawn', () => {
    expect(told(flatTrusses(3, 0.08))).toEqual([
      { role: 'post', section: 'RHS 80x80x5', length: 1.84, count: 15, odd: null },
      { role: 'diagonal', section: 'RHS 80x80x5', length: 3.446, count: 12, odd: null },
      { role: 'purlin', section: 'RHS 100x100x5', length: 4.98, count: 10, odd: null },
      { role: 'chord', section: 'RHS 120x120x5', length: 12, count: 6, odd: null },
    ]);
  });

  it('show one odd length among many first, even where the member is joined all the same', () => {
    const drawn = shortened(flatTrusses(6, 0.05), 'T3-diagonal1', 0.04);
    const { families, findings } = joinMembers(drawn);
    expect(findings.filter(({ severity }) => severity !== 'note')).toEqual([]);
    expect(families[0]!.members.map((index) => drawn[index]!.globalId)).toEqual(['T3-diagonal1']);
    expect(families[0]!.oddBeside!.count).toBe(23);
    expect(families[1]!.oddBeside).toBeNull();
  });

  it('do not call lengths odd that come in their own numbers', () => {
    const drawn = flatTrusses(4, 0.05).map((one) =>
      one.globalId.endsWith('diagonal0') ? shortened([one], one.globalId, 0.03)[0]! : one,
    );
    expect(told(drawn).filter(({ odd }) => odd !== null)).toEqual([]);
  });

  it('do not call lengths odd where hardly two are alike, as in a free-form grid', () => {
    const drawn = flatTrusses(6, 0.05).map((one, i) =>
      /diagonal[0-2]/.test(one.globalId) ? shortened([one], one.globalId, 0.003 * i)[0]! : one,
    );
    expect(told(drawn).filter(({ role, odd }) => role === 'diagonal' && odd !== null)).toEqual([]);
  });

  it('tell columns, posts, bracing and struts apart by what they meet', () => {
    const corners = [0, 12].flatMap((x) =>
      [0, 5].map((y) => member(`C${x}-${y}`, [x, y, -6], [x, y, -0.1], { section: hollow(0.2) })),
    );
    const rod = { section: round(0.02) };
    const drawn = [
      ...flatTrusses(2, 0.05),
      ...corners,
      member('rod', [0, 0, 2], [3, 5, 2], rod),
      member('strut', [6, 0.06, 0], [6, 4.94, 0], { section: hollow(0.09) }),
    ];
    const { families } = joinMembers(drawn);
    const roleOf = (mark: string) =>
      families.find(({ members }) => members.some((i) => drawn[i]!.globalId === mark))?.role;
    expect(['C0-0', 'C12-5', 'T0-post2', 'rod', 'strut'].map(roleOf)).toEqual([
      'column',
      'column',
      'post',
      'bracing',
      'beam',
    ]);
  });
});
