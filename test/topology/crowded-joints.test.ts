import { describe, expect, it } from 'vitest';
import { joinMembers } from '../../src/topology/join-members.ts';
import { hollow, member } from '../support/members.ts';

/** A girder whose two middle braces meet the bottom chord, 160 mm deep, this far apart. */
function girder(apart: number) {
  const thin = { section: hollow(0.06) };
  return [
    member('B', [0, 0, 0], [8, 0, 0], { section: hollow(0.16) }),
    member('T', [0, 0, 2], [8, 0, 2]),
    ...[0, 8].map((x) => member(`E${x}`, [x, 0, 0], [x, 0, 2])),
    member('D1', [2, 0, 2], [4 - apart / 2, 0, 0], thin),
    member('D2', [6, 0, 2], [4 + apart / 2, 0, 0], thin),
    member('D0', [0, 0, 0], [2, 0, 2], thin),
    member('D3', [8, 0, 0], [6, 0, 2], thin),
  ];
}

const crowded = (apart: number) => joinMembers(girder(apart)).findings.filter(({ code }) => code === 'crowded-joint');

describe('two joints close together on one member', () => {
  it('are left two and said, with their distance and both nodes', () => {
    const [found, ...more] = crowded(0.28);
    expect(more).toEqual([]);
    expect(found).toMatchObject({ severity: 'warning', members: ['B'], gap: expect.closeTo(0.28, 6) });
    expect(found.nodes).toHaveLength(2);
    expect(found.at![0]).toBeCloseTo(4, 6);
    expect(found.message).toContain('280 mm apart on B');
  });

  it('are panels like any other where they are farther apart than two depths, and one joint where nearer than one', () => {
    expect(crowded(0.4)).toEqual([]);
    expect(crowded(0.1)).toEqual([]);
  });
});
