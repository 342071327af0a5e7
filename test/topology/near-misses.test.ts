import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { flatTrusses, shortened } from '../support/flat-trusses.ts';
import { hollow, member } from '../support/members.ts';

const misses = (members: Parameters<typeof joinMembers>[0]) =>
  joinMembers(members).findings.filter(({ code }) => code === 'near-miss');

describe('near misses', () => {
  it('say how many other ends of the kind are joined, and over what gap', () => {
    const [miss, ...more] = misses(shortened(flatTrusses(4, 0.08), 'T2-post2', 0.25));
    expect(more).toEqual([]);
    // 4 frames of 4 diagonals and 5 posts are of one section; posts have two ends each, one of the 40 is astray.
    expect(miss!.message).toContain('misses T2-top by 330 mm');
    expect(miss!.message).toContain(
      '; 39 other ends of this kind (RHS 80x80x5 post) meet their chord over at most 80 mm',
    );
    expect(miss!.advice).toContain('Carry the end of T2-post2 on by 330 mm to the axis of T2-top');
  });

  it('come in the order of how likely they are a slip, wherever they lie', () => {
    const rare = member('strut', [0.42, 0, 0.75], [0.42, 5, 0.75], { section: hollow(0.07) });
    const drawn = [...shortened(flatTrusses(3, 0.08), 'T2-post4', 0.25), rare];
    const found = misses(drawn);
    expect(found[0]!.members[0]).toBe('T2-post4');
    expect(misses([...drawn].reverse()).map(({ message }) => message)).toEqual(found.map(({ message }) => message));
  });

  it('of one kind that miss alike everywhere are told once, with the reach that would join them', () => {
    const gap = 0.3;
    const drawn = flatTrusses(3, 0.08).map((one) => {
      if (!one.globalId.includes('post')) return one;
      const [[x, y], [, , z]] = [one.axis[0], one.axis[1]];
      return {
        ...one,
        section: hollow(0.07),
        axis: [
          [x, y, 0.08],
          [x, y, z + 0.08 - gap],
        ] as [Vec3, Vec3],
      };
    });
    // Two posts are joined at both ends: the others stay a pattern.
    const joinable = drawn.map((one) =>
      ['T0-post0', 'T1-post0'].includes(one.globalId)
        ? { ...one, axis: [one.axis[0], [one.axis[1][0], one.axis[1][1], 1.92]] as [Vec3, Vec3] }
        : one,
    );
    const found = misses(joinable);
    expect(found).toHaveLength(1);
    expect(found[0]!.nodes).toHaveLength(13);
    expect(found[0]!.message).toContain('13 ends of one kind (RHS 70x70x5 post) miss their chord by 300 mm');
    expect(found[0]!.message).toContain('the same at all 13');
    expect(found[0]!.gap).toBeCloseTo(gap, 9);
    const [, reach] = /reach: .*use: (\d+) mm/.exec(found[0]!.advice)!;
    const { findings } = joinMembers(joinable, { reach: Number(reach) / 1000 });
    expect(findings.filter(({ code }) => code === 'near-miss')).toEqual([]);
  });

  it('are told with the member or the part that they leave alone, and not once more', () => {
    const both = shortened(flatTrusses(3, 0.08), 'T1-post2', 0.25).map((one) =>
      one.globalId === 'T1-post2' ? { ...one, axis: [[6, 5, 0.35], one.axis[1]] as [Vec3, Vec3] } : one,
    );
    const { findings } = joinMembers(both);
    const about = findings.filter(({ members }) => members.includes('T1-post2'));
    expect(about.map(({ code }) => code)).toEqual(['lone-member']);
    expect(about[0]!.message).toContain('an end of T1-post2 misses T1-low by 350 mm');
    expect(about[0]!.message).toContain('an end of T1-post2 misses T1-top by 330 mm');
  });
});
