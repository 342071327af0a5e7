import { describe, expect, it } from 'vitest';
import type { FindingCode } from '../../src/domain/finding.ts';
import type { Member } from '../../src/domain/member.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { hollow, member } from '../support/members.ts';
import { spellPoint } from '../support/spell-point.ts';

/** A girder of two panels, 2 m deep. */
const GIRDER = [
  member('B', [0, 0, 0], [8, 0, 0]),
  member('T', [0, 0, 2], [8, 0, 2]),
  ...[0, 8].map((x) => member(`E${x}`, [x, 0, 0], [x, 0, 2])),
  member('P', [4, 0, 0], [4, 0, 2]),
  member('D1', [0, 0, 0], [4, 0, 2]),
  member('D2', [8, 0, 0], [4, 0, 2]),
];

const without = (...marks: string[]) => GIRDER.filter(({ tag }) => !marks.includes(tag ?? ''));
const small = { section: hollow(0.06) };

interface Case {
  readonly members: readonly Member[];
  readonly named: readonly string[];
  /** m; null where the code has none. */
  readonly gap: number | null;
}

/** Of every code that joining raises by itself, one model that has it once. */
const CASES: Partial<Record<FindingCode, Case>> = {
  'near-miss': {
    members: [...without('P', 'D1', 'D2'), member('P', [4, 0, 0], [4, 0, 1.7])],
    named: ['P', 'T'],
    gap: 0.3,
  },
  'loose-end': { members: [...GIRDER, member('L', [8, 0, 0], [8, 4, 0])], named: ['L'], gap: null },
  'lone-member': { members: [...GIRDER, member('L', [8, 1, 0], [8, 5, 0])], named: ['L'], gap: 1 },
  'separate-part': {
    members: [
      ...GIRDER,
      member('L', [8, 3, 0], [8, 6, 0]),
      member('M', [8, 6, 0], [4, 6, 0]),
      member('N', [8, 3, 0], [4, 6, 0]),
    ],
    named: ['L', 'M', 'N'],
    gap: 3,
  },
  'twin-members': { members: [...GIRDER, member('P2', [4, 0, 0.1], [4, 0, 1.9])], named: ['P', 'P2'], gap: null },
  overlap: {
    members: [...without('B'), member('B1', [0, 0, 0], [4, 0, 0]), member('B2', [3.4, 0, 0], [8, 0, 0])],
    named: ['B1', 'B2'],
    gap: 0.6,
  },
  'zero-length': { members: [...GIRDER, member('Z', [1, 1, 1], [1, 1, 1])], named: ['Z'], gap: null },
  'crossing-apart': { members: [...GIRDER, member('X', [2, -2, 1], [2, 2, 1], small)], named: ['D1', 'X'], gap: 0 },
  'offset-joint': {
    members: [
      ...without('P', 'D1', 'D2'),
      member('D1', [2, 0, 0], [3.9, 0, 1.93]),
      member('D2', [6, 0, 0], [4.1, 0, 1.93]),
    ],
    named: ['T', 'D1', 'D2'],
    gap: 2 * (1.93 / 1.9) - 2,
  },
  'crowded-joint': {
    members: [...without('D1'), member('D1', [0, 0, 0], [3.82, 0, 2])],
    named: ['T'],
    gap: 0.18,
  },
  'axis-moved': {
    members: [
      member('A', [0, 0, 0], [4, 0, 0]),
      member('C', [0, 0.09, 0.6], [4, 0.09, 0.6]),
      ...[0, 4].map((x) => member(`E${x}`, [x, 0, 0], [x, 0.09, 0.6])),
      member('S', [2, 0.045, 0], [2, 0.045, 0.6]),
    ],
    named: ['S'],
    gap: 0.045,
  },
  'pair-joined': {
    members: [
      ...without('P'),
      member('P1', [4, -0.035, 0], [4, -0.035, 2], small),
      member('P2', [4, 0.035, 0], [4, 0.035, 2], small),
    ],
    named: ['P1', 'P2'],
    gap: 0.07,
  },
  'carried-node': { members: [...GIRDER, member('H', [2, 0, 0], [2, 3, 0], small)], named: ['B'], gap: null },
};

describe('every finding of joining', () => {
  it.each(Object.entries(CASES))(
    '%s names its members, place and gap, and what to do',
    (code, { members, named, gap }) => {
      const { findings } = joinMembers(members, {}, { placeOf: (at) => `at ${spellPoint(at, 2)}` });
      const [found, ...more] = findings.filter((one) => one.code === code);
      expect(found, findings.map((one) => `${one.code} ${one.members} ${one.gap}`).join('; ')).toBeDefined();
      expect(more).toEqual([]);
      expect(found.members).toEqual(named);
      if (gap === null) expect(found.gap).toBeNull();
      else expect(found.gap).toBeCloseTo(gap, 6);
      expect(found.at).not.toBeNull();
      expect(found.place).toBe(`at ${spellPoint(found.at!, 2)}`);
      expect(found.advice).toMatch(/^[A-Z].*\.$/);
      expect(found.message).toMatch(/^[^\n]*\.$/);
    },
  );
});
