import { describe, expect, it } from 'vitest';
import type { Member } from '../../src/domain/member.ts';
import type { Vec3 } from '../../src/domain/vector.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { hollow, member } from '../support/members.ts';

/** Three frames 5 m apart with a purlin over them in two lengths; the first runs `past` the middle frame, the second begins there. */
function hall(past: number, beside: number): Member[] {
  const frames = [0, 5, 10].flatMap((y) => {
    const p = (x: number, z: number): Vec3 => [x, y, z];
    return [member(`R${y}`, p(0, 0), p(3, 0)), member(`C${y}`, p(0, 0), p(0, -3)), member(`D${y}`, p(3, 0), p(0, -3))];
  });
  const z = { section: hollow(0.1, 0.06) };
  return [
    ...frames,
    member('P1', [3, 0, 0.1], [3, 5 + past, 0.1], z),
    member('P2', [3 + beside, 5 - past, 0.1], [3 + beside, 10, 0.1], z),
  ];
}

const looseEnds = (members: readonly Member[]) =>
  joinMembers(members).findings.filter(
    ({ code, message }) => code === 'loose-end' && message.includes('past its last'),
  );

describe('a tail past the last joint', () => {
  it('is no fault where purlins lap over the frame, each beside the other', () => {
    expect(looseEnds(hall(0.3, 0.06))).toEqual([]);
  });

  it('is said where nothing lies beside it', () => {
    const alone = hall(0.3, 0.06).filter(({ tag }) => tag !== 'P2');
    expect(looseEnds(alone).map(({ members, gap, at }) => [members, gap, at])).toEqual([
      [['P1'], expect.closeTo(0.3, 1), [3, 5.3, 0.1]],
    ]);
  });
});
