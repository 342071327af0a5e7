import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Member } from '../../src/domain/member.ts';
import type { Truss } from '../../src/domain/truss.ts';
import type { Vec3 } from '../../src/domain/vector.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { cutBack, hollow, member, round } from '../support/members.ts';

/** Three Pratt trusses with purlins on top, rods crossed in the roof plane, a splice and a sag rod. */
function smallRoof(gap: number): Member[] {
  const members: Member[] = [];
  const chord = { section: hollow(0.12) };
  const web = { section: hollow(0.08) };
  for (const [frame, y] of [0, 5, 10].entries()) {
    const p = (x: number, z: number): Vec3 => [x, y, z];
    const mark = (text: string) => `T${frame}${text}`;
    members.push(member(mark('top'), p(0, 2), p(12, 2), chord));
    members.push(member(mark('low a'), p(0, 0), p(7.5, 0), chord), member(mark('low b'), p(7.51, 0), p(12, 0), chord));
    for (let i = 0; i <= 4; i++) members.push(cutBack(mark(`post ${i}`), p(3 * i, 0), p(3 * i, 2), gap, web));
    for (let i = 0; i < 4; i++) members.push(cutBack(mark(`diagonal ${i}`), p(3 * i, 0), p(3 * i + 3, 2), gap, web));
  }
  const above = 2 + 0.06 + 0.05;
  for (let i = 0; i <= 4; i++) {
    members.push(member(`purlin ${i} a`, [3 * i, 0, above], [3 * i, 4.99, above]));
    members.push(member(`purlin ${i} b`, [3 * i, 5.01, above], [3 * i, 10, above]));
  }
  const rod = { section: round(0.02) };
  members.push(cutBack('rod a', [0, 0, 2], [3, 5, 2], gap, rod), cutBack('rod b', [3, 0, 2], [0, 5, 2], gap, rod));
  members.push(member('sag rod', [3, 2.5, above], [6, 2.5, above], rod));
  return members;
}

/** The truss without numbers: each bar by its members and the members at its two ends. */
function signature(truss: Truss, members: readonly Member[]): string[] {
  const marks = (own: readonly number[]) =>
    own
      .map((i) => members[i].globalId)
      .sort()
      .join('+');
  const node = (i: number) => {
    const { carriedBy } = truss.nodes[i];
    return marks(truss.nodes[i].members) + (carriedBy ? ` on ${marks(truss.bars[carriedBy.bar].members)}` : '');
  };
  return truss.bars
    .map(
      (bar) => `${marks(bar.members)}: ${[node(bar.from), node(bar.to)].sort().join(' - ')} ${bar.length.toFixed(5)}`,
    )
    .sort();
}

const move =
  (turn: number, by: Vec3) =>
  (p: Vec3): Vec3 => {
    const [c, s] = [Math.cos(turn), Math.sin(turn)];
    return [c * p[0] - s * p[1] + by[0], s * p[0] + c * p[1] + by[1], p[2] + by[2]];
  };

const moved = (m: Member, turn: number, by: Vec3): Member => ({
  ...m,
  axis: [move(turn, by)(m.axis[0]), move(turn, by)(m.axis[1])],
  zAxis: move(turn, [0, 0, 0])(m.zAxis),
});

const drawn = smallRoof(0.08);
const expected = signature(joinMembers(drawn).truss, drawn);

describe('the truss does not depend on', () => {
  it('where its model came from: the roof joins whole', () => {
    const { truss, findings } = joinMembers(drawn);
    expect(findings.map(({ code }) => code)).toEqual(['carried-node']);
    expect(truss.nodes.filter(({ carriedBy }) => carriedBy !== null)).toHaveLength(2);
    expect(truss.nodes).toHaveLength(30 + 2);
    // Chords 4 + 4, posts 5, diagonals 4 a frame; 10 purlins, 2 rods, 1 sag rod; the spliced low chord adds none.
    expect(truss.bars).toHaveLength(3 * 17 + 10 + 3);
  });

  it('the order of the elements', () => {
    fc.assert(
      fc.property(fc.shuffledSubarray(drawn, { minLength: drawn.length, maxLength: drawn.length }), (shuffled) => {
        expect(signature(joinMembers(shuffled).truss, shuffled)).toEqual(expected);
      }),
      { numRuns: 40 },
    );
  });

  it('which way its members are drawn', () => {
    fc.assert(
      fc.property(fc.array(fc.boolean(), { minLength: drawn.length, maxLength: drawn.length }), (flips) => {
        const flipped = drawn.map((m, i): Member => (flips[i] ? { ...m, axis: [m.axis[1], m.axis[0]] } : m));
        expect(signature(joinMembers(flipped).truss, flipped)).toEqual(expected);
      }),
      { numRuns: 40 },
    );
  });

  it('where the model stands and how it is turned about the vertical', () => {
    const far = fc.double({ min: -1e4, max: 1e4, noNaN: true });
    fc.assert(
      fc.property(fc.double({ min: -4, max: 4, noNaN: true }), fc.tuple(far, far, far), (turn, by) => {
        const members = drawn.map((m) => moved(m, turn, by));
        expect(signature(joinMembers(members).truss, members)).toEqual(expected);
      }),
      { numRuns: 40 },
    );
  });

  it('how far webs are cut back, within the reach', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 0.1, noNaN: true }), (gap) => {
        const members = smallRoof(gap);
        expect(signature(joinMembers(members).truss, members)).toEqual(expected);
      }),
      { numRuns: 40 },
    );
  });
});
