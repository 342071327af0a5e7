import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { membersOf, randomRoof } from '../../scripts/bench/roofs/random-roof.ts';
import type { Member } from '../../src/domain/member.ts';
import type { Truss } from '../../src/domain/truss.ts';
import { add, along, distance, dot, scale, subtract, unit, type Vec3 } from '../../src/domain/vector.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { flatTrusses } from '../support/flat-trusses.ts';

/** Roofs drawn as detailers draw them: tubes, double angles, seated purlins, rods, spliced chords. */
const ROOFS = [2, 7, 16, 26].map((seed) => membersOf(randomRoof(seed)));

/** The truss without numbers and places: each bar by its members, its length and the members at its two ends. */
function signature(truss: Truss, members: readonly Member[], size = 1): string[] {
  const marks = (own: readonly number[]) =>
    own
      .map((i) => members[i]!.globalId)
      .sort()
      .join('+');
  const node = (i: number) => {
    const { carriedBy, members: met } = truss.nodes[i]!;
    return marks(met) + (carriedBy ? ` on ${marks(truss.bars[carriedBy.bar]!.members)}` : '');
  };
  return truss.bars
    .map(
      (bar) =>
        `${marks(bar.members)}: ${[node(bar.from), node(bar.to)].sort().join(' - ')} ${(bar.length / size).toFixed(5)}`,
    )
    .sort();
}

const of = (members: readonly Member[]): string[] => signature(joinMembers(members).truss, members);
const roofs = fc.constantFrom(...ROOFS.map((members) => ({ members, expected: of(members) })));

interface Motion {
  readonly point: (p: Vec3) => Vec3;
  readonly direction: (d: Vec3) => Vec3;
}

const moved = (members: readonly Member[], { point, direction }: Motion): Member[] =>
  members.map((m) => ({ ...m, axis: [point(m.axis[0]), point(m.axis[1])], zAxis: direction(m.zAxis) }));

/** A turn about any axis (Rodrigues' formula), then a shift. */
function turnAbout(axis: Vec3, angle: number, by: Vec3): Motion {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const direction = (d: Vec3): Vec3 => {
    const side: Vec3 = [
      axis[1] * d[2] - axis[2] * d[1],
      axis[2] * d[0] - axis[0] * d[2],
      axis[0] * d[1] - axis[1] * d[0],
    ];
    return add(add(scale(d, c), scale(side, s)), scale(axis, dot(axis, d) * (1 - c)));
  };
  return { direction, point: (p) => add(direction(p), by) };
}

const part = fc.double({ min: -1, max: 1, noNaN: true });
const anyAxis = fc
  .tuple(part, part, part)
  .filter((v) => Math.hypot(...v) > 1e-3)
  .map((v) => unit(v) as Vec3);
const angle = fc.double({ min: -Math.PI, max: Math.PI, noNaN: true });
const far = fc.double({ min: -1e4, max: 1e4, noNaN: true });
const place = fc.tuple(far, far, far);

describe('drawn as detailers draw, the truss does not depend on', () => {
  it('where it stands and how it is turned about the vertical', () => {
    fc.assert(
      fc.property(roofs, angle, place, ({ members, expected }, turn, by) => {
        expect(of(moved(members, turnAbout([0, 0, 1], turn, by)))).toEqual(expected);
      }),
      { numRuns: 12 },
    );
  });

  it('whether it is mirrored', () => {
    fc.assert(
      fc.property(roofs, angle, ({ members, expected }, turn) => {
        const normal: Vec3 = [Math.cos(turn), Math.sin(turn), 0];
        const direction = (d: Vec3): Vec3 => subtract(d, scale(normal, 2 * dot(d, normal)));
        expect(of(moved(members, { direction, point: direction }))).toEqual(expected);
      }),
      { numRuns: 12 },
    );
  });

  it('the order of its elements', () => {
    fc.assert(
      fc.property(roofs, fc.infiniteStream(fc.nat()), ({ members, expected }, numbers) => {
        const keyed = members.map((m) => ({ m, key: numbers.next().value as number }));
        expect(of(keyed.sort((a, b) => a.key - b.key).map(({ m }) => m))).toEqual(expected);
      }),
      { numRuns: 12 },
    );
  });

  it('a turn about any axis, where it has neither seats nor columns to tell up from down', () => {
    const bare = flatTrusses(1, 0.09).filter((m) => !m.globalId.startsWith('P'));
    const expected = of(bare);
    fc.assert(
      fc.property(anyAxis, angle, place, (axis, turn, by) => {
        expect(of(moved(bare, turnAbout(axis, turn, by)))).toEqual(expected);
      }),
      { numRuns: 60 },
    );
  });

  it('a turn of the whole roof about any axis, but for which of a seat carries and what stands on the ground', () => {
    const drawn = flatTrusses(3, 0.09);
    const expected = of(drawn);
    fc.assert(
      fc.property(anyAxis, angle, (axis, turn) => {
        expect(of(moved(drawn, turnAbout(axis, turn, [0, 0, 0])))).toEqual(expected);
      }),
      { numRuns: 60 },
    );
  });
});

/** The member cut in two at `s` from its start. */
function cutInTwo(member: Member, s: number): [Member, Member] {
  const [from, to] = member.axis;
  const middle = along(from, unit(subtract(to, from)) as Vec3, s);
  const rest = { ...member, globalId: `${member.globalId} rest`, tag: `${member.globalId} rest` };
  return [
    { ...member, axis: [from, middle] },
    { ...rest, axis: [middle, to] },
  ];
}

describe('a chord cut in two is the chord', () => {
  const drawn = flatTrusses(3, 0.09);
  const whole = joinMembers(drawn).truss;

  it('wherever the splice lies', () => {
    const chords = drawn.filter((m) => /top|low/.test(m.globalId));
    fc.assert(
      fc.property(fc.constantFrom(...chords), fc.double({ min: 0.06, max: 0.94, noNaN: true }), (chord, share) => {
        const members = drawn.flatMap((m) => (m === chord ? cutInTwo(m, share * distance(...m.axis)) : [m]));
        const { truss, findings } = joinMembers(members);
        const mended = members.map((m) => ({ ...m, globalId: m.globalId.replace(' rest', '') }));
        const names = (t: Truss, own: readonly Member[]) =>
          signature(t, own)
            .map((line) => line.replace(/([\w-]+)(\+\1)+/g, '$1'))
            .sort();
        expect(names(truss, mended)).toEqual(names(whole, drawn));
        expect(findings.filter(({ severity }) => severity !== 'note')).toEqual([]);
      }),
      { numRuns: 80 },
    );
  });
});

describe('ends shrunk by less than the reach', () => {
  it('leave every roof the truss it is', () => {
    const drawn = flatTrusses(3, 0);
    const expected = of(drawn);
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.double({ min: 0, max: 0.1, noNaN: true }), fc.double({ min: 0, max: 0.1, noNaN: true })), {
          minLength: drawn.length,
          maxLength: drawn.length,
        }),
        (gaps) => {
          const shrunk = drawn.map((m, i): Member => {
            const [from, to] = m.axis;
            const direction = unit(subtract(to, from)) as Vec3;
            return { ...m, axis: [along(from, direction, gaps[i]![0]), along(to, direction, -gaps[i]![1])] };
          });
          const found = signature(joinMembers(shrunk).truss, shrunk).map((line) => line.replace(/ [\d.]+$/, ''));
          expect(found).toEqual(expected.map((line) => line.replace(/ [\d.]+$/, '')));
        },
      ),
      { numRuns: 60 },
    );
  });
});
