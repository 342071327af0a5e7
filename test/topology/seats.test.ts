import { describe, expect, it } from 'vitest';
import { makeAxes } from '../../src/topology/axes.ts';
import { findContacts } from '../../src/topology/contacts.ts';
import { pairKey } from '../../src/topology/evidence.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { JOIN_DEFAULTS } from '../../src/topology/options.ts';
import { hollow, member } from '../support/members.ts';

const rafter = member('R', [0, 0, 0], [6, 0, 0], { section: hollow(0.3, 0.15) });
const purlin = (height: number) => member('P', [3, -4, height], [3, 4, height], { section: hollow(0.2, 0.07) });

const kindAt = (height: number, evidence: readonly string[] = []) => {
  const key = new Map(evidence.length === 0 ? [] : [[pairKey(0, 1, 2), evidence] as const]);
  return findContacts(makeAxes([rafter, purlin(height)]), JOIN_DEFAULTS, key).map(({ kind, isNear, by }) => ({
    kind,
    isNear,
    by,
  }));
};

describe('a purlin that runs on over a rafter that runs on', () => {
  it('sits where their axes lie half the two depths apart, within a packing', () => {
    expect(kindAt(0.25)).toEqual([{ kind: 'seat', isNear: true, by: [] }]);
    expect(kindAt(0.27)).toEqual([{ kind: 'seat', isNear: true, by: [] }]);
    expect(kindAt(0.29)).toEqual([]);
  });

  it('sits, and does not cross, where a cleat fastens the two; with a cleat higher above too', () => {
    expect(kindAt(0.26, ['plate CL'])).toEqual([{ kind: 'seat', isNear: true, by: ['plate CL'] }]);
    expect(kindAt(0.29, ['plate CL'])).toEqual([{ kind: 'seat', isNear: false, by: ['plate CL'] }]);
  });

  it('is carried by it between panel points, and the seat is told with its height', () => {
    const { truss } = joinMembers([rafter, purlin(0.25)]);
    const node = truss.nodes.find(({ members }) => members.length === 2)!;
    expect(node.carriedBy).not.toBeNull();
    expect(node.joining).toEqual({
      by: ['nearness', 'seat'],
      eccentricities: [{ of: 'seat', member: 1, others: [], e: expect.closeTo(0.25, 9), share: null }],
    });
  });
});

describe('an upright purlin on a ridge', () => {
  it('sits on the apex with the middle of its flange, nearer to the slopes than its edge would let it', () => {
    // Slopes of 32 degrees, chords of 140 mm: the apex lies 0.07 / cos 32 = 83 mm above the work point.
    const slope = (mark: string, side: number) =>
      member(mark, [side * 5, 0, -5 * Math.tan(0.5585)], [side * 0.05, 0, -0.05 * Math.tan(0.5585)], {
        section: hollow(0.14),
      });
    const height = 0.07 / Math.cos(0.5585) + 0.11;
    const ridge = member('P', [0, 0, height], [0, 6, height], { section: hollow(0.22, 0.11) });
    const { truss } = joinMembers([slope('A', -1), slope('B', 1), ridge]);
    expect(truss.nodes.some(({ members }) => members.length === 3)).toBe(true);
  });
});
