import { describe, expect, it } from 'vitest';
import type { Member } from '../../src/domain/member.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { hollow, member } from '../support/members.ts';

const told = (members: readonly Member[]) =>
  joinMembers(members)
    .findings.filter(({ severity }) => severity !== 'note')
    .map(({ code, members: named }) => [code, ...named].join(' '));

const chord = member('C', [0, 0, 0], [8, 0, 0]);
const frame = [
  chord,
  member('T', [0, 0, 0], [4, 0, 3]),
  member('U', [8, 0, 0], [4, 0, 3]),
  member('P', [4, 0, 0], [4, 0, 3]),
];

describe('what is wrong at one place is told once', () => {
  it('a lone member whose ends both nearly reach the rest is one lone member, and no near miss', () => {
    const lone = member('L', [2, 0, 0.4], [2, 0, 1.1]);
    expect(told([...frame, lone])).toEqual(['lone-member L']);
  });

  it('two ends that miss each other are one near miss', () => {
    const split = frame.filter(({ tag }) => tag !== 'P');
    const halves = [member('P1', [4, 0, 0], [4, 0, 1.25]), member('P2', [4, 0, 1.85], [4, 0, 3])];
    expect(told([...split, ...halves]).filter((one) => one.startsWith('near-miss'))).toHaveLength(1);
  });

  it('two ends that miss two others are two near misses', () => {
    const short = (mark: string, x: number) =>
      member(mark, [x, 0, 0], [x, 0, 0.75 * x - 0.45], { section: hollow(0.06) });
    expect(told([...frame, short('S', 2), short('R', 3)])).toEqual(['near-miss S T', 'near-miss R T']);
  });

  it('two pieces that run in one another are one overlap, and their ends no near miss', () => {
    const pieces = [member('A', [0, 5, 0], [4.4, 5, 0]), member('B', [4, 5, 0], [8, 5, 0])];
    const found = told([...frame, ...pieces]).filter((one) => /[AB]/.test(one.split(' ').slice(1).join(' ')));
    expect(found.filter((one) => one.startsWith('overlap'))).toHaveLength(1);
    expect(found.filter((one) => one.startsWith('near-miss'))).toEqual([]);
  });
});
