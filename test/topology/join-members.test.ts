import { describe, expect, it } from 'vitest';
import type { Member } from '../../src/domain/member.ts';
import type { Truss } from '../../src/domain/truss.ts';
import { distance, type Vec3 } from '../../src/domain/vector.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { cutBack, hollow, member, round } from '../support/members.ts';

/** A pitched truss of 12 m: continuous chords, webs cut back by 90 mm from the work points. */
function pitchedTruss(y = 0, mark = ''): Member[] {
  const p = (x: number, z: number): Vec3 => [x, y, z];
  return [
    member(`${mark}BC`, p(0, 0), p(12, 0)),
    member(`${mark}TL`, p(0, 0), p(6, 2)),
    member(`${mark}TR`, p(12, 0), p(6, 2)),
    cutBack(`${mark}P`, p(6, 0), p(6, 2), 0.09),
    cutBack(`${mark}DL`, p(6, 0), p(3, 1), 0.09),
    cutBack(`${mark}DR`, p(6, 0), p(9, 1), 0.09),
  ];
}

function nodeAt(truss: Truss, at: Vec3): number {
  return truss.nodes.findIndex((node) => distance(node.at, at) < 1e-6);
}

const codes = (findings: readonly { code: string }[]) => findings.map(({ code }) => code);

describe('joining members', () => {
  it('splits continuous chords where webs end and carries cut-back webs to the work points', () => {
    const { truss, findings } = joinMembers(pitchedTruss());
    expect(truss.nodes.map((node) => node.at.map((x) => Math.round(x * 1e6) / 1e6))).toEqual([
      [0, 0, 0],
      [3, 0, 1],
      [6, 0, 0],
      [6, 0, 2],
      [9, 0, 1],
      [12, 0, 0],
    ]);
    expect(truss.bars.map((bar) => bar.name).sort()).toEqual(
      ['BC.1', 'BC.2', 'DL', 'DR', 'P', 'TL.1', 'TL.2', 'TR.1', 'TR.2'].sort(),
    );
    expect(findings).toEqual([]);
  });

  it('numbers the bars of a split member in order along it', () => {
    const { truss } = joinMembers(pitchedTruss());
    const [first, second] = ['BC.1', 'BC.2'].map((name) => truss.bars.find((bar) => bar.name === name));
    expect(truss.nodes[first!.from].at[0]).toBeCloseTo(0);
    expect(truss.nodes[first!.to].at[0]).toBeCloseTo(6);
    expect(second!.from).toBe(first!.to);
  });

  it('lets no steep web reach down to a column under it as if it ran along its side', () => {
    // The column's half depth over the sine of the slant (0.6 m) would bridge the gap of 0.5 m between the two ends.
    const column = member('C', [0, 0, -4], [0, 0, 0], { section: hollow(0.2) });
    const web = (gap: number) => member('W', [0.17 * gap, 0, gap], [0.34, 0, 2]);
    const nodesOf = (gap: number) => joinMembers([column, web(gap)]).truss.nodes.length;
    expect(nodesOf(0.2)).toBe(3);
    expect(nodesOf(0.5)).toBe(4);
  });

  it('splits a post where webs beside it end, as far off as if they sat on it', () => {
    // Angles on the two sides of one gusset: their axes pass the post's at 70 mm.
    const angle = { section: hollow(0.12) };
    const beside = (mark: string, z: number) => member(mark, [0, 0.07, 1.5], [2, 0.07, z], angle);
    const frame = [
      member('P', [0, 0, 0], [0, 0, 3], { section: hollow(0.1) }),
      member('Q', [2, 0.07, 0], [2, 0.07, 3], angle),
      member('T', [0, 0.03, 3], [2, 0.03, 3], angle),
      member('B', [0, 0.03, 0], [2, 0.03, 0], angle),
    ];
    const { truss } = joinMembers([...frame, beside('K1', 3), beside('K2', 0)]);
    const middle = truss.nodes.find(({ at }) => Math.abs(at[2] - 1.5) < 0.1)!;
    expect(middle.members.length).toBe(3);
    expect(middle.carriedBy).toBeNull();
  });

  it('takes a purlin that sits on a panel point to the chord node', () => {
    const purlin = member('PU', [3, 0, 1 + 0.1 * Math.hypot(1, 1 / 3)], [3, 6, 1 + 0.1 * Math.hypot(1, 1 / 3)]);
    const { truss, findings } = joinMembers([...pitchedTruss(0, 'A'), ...pitchedTruss(6, 'B'), purlin]);
    const bar = truss.bars.find(({ name }) => name === 'PU')!;
    expect([bar.from, bar.to]).toEqual([nodeAt(truss, [3, 0, 1]), nodeAt(truss, [3, 6, 1])]);
    expect(codes(findings)).toEqual([]);
  });

  it('leaves the seat apart where the brief says so', () => {
    const purlin = member('PU', [3, 0, 1.105], [3, 6, 1.105]);
    const { truss } = joinMembers([...pitchedTruss(0, 'A'), ...pitchedTruss(6, 'B'), purlin], { seated: 'apart' });
    const bar = truss.bars.find(({ name }) => name === 'PU')!;
    expect(truss.nodes[bar.from].members).toHaveLength(1);
  });

  it('lets a chord carry a purlin between panel points instead of putting a hinge in it', () => {
    const z = 0.5 + 0.1 * Math.hypot(1, 1 / 3);
    const purlin = member('PU', [1.5, 0, z], [1.5, 6, z]);
    const { truss } = joinMembers([...pitchedTruss(0, 'A'), ...pitchedTruss(6, 'B'), purlin]);
    const carried = truss.nodes.filter((node) => node.carriedBy !== null);
    expect(carried).toHaveLength(2);
    for (const { carriedBy, at } of carried) {
      const bar = truss.bars[carriedBy!.bar];
      expect(bar.name).toMatch(/TL\.1$/);
      // The purlin lies square above the chord, so its foot is a little further up the slope than its x says.
      expect(carriedBy!.t).toBeCloseTo(0.5 + (0.1 * (1 / 3)) / Math.hypot(3, 1), 6);
      const [a, b] = [truss.nodes[bar.from].at, truss.nodes[bar.to].at];
      const lever = a.map((x, k) => x + carriedBy!.t * (b[k] - x));
      expect(distance(at, lever as unknown as Vec3)).toBeLessThan(1e-12);
    }
  });

  it('splits a purlin that runs over a ridge: it sits on the node and cannot carry it', () => {
    const above = 2 + 0.1;
    const purlin = member('PU', [6, 0, above], [6, 12, above]);
    const frames = [0, 6, 12].flatMap((y, i) => pitchedTruss(y, 'ABC'[i]));
    const { truss } = joinMembers([...frames, purlin]);
    expect(truss.nodes[nodeAt(truss, [6, 6, 2])].carriedBy).toBeNull();
    expect(truss.bars.filter(({ name }) => name.startsWith('PU'))).toHaveLength(2);
  });

  it('splits a chord under every purlin when chords are strict', () => {
    const z = 0.5 + 0.1 * Math.hypot(1, 1 / 3);
    const purlin = member('PU', [1.5, 0, z], [1.5, 6, z]);
    const members = [...pitchedTruss(0, 'A'), ...pitchedTruss(6, 'B'), purlin];
    const { truss } = joinMembers(members, { chords: 'strict' });
    expect(truss.nodes.some((node) => node.carriedBy !== null)).toBe(false);
    expect(truss.bars.some(({ name }) => name === 'ATL.3')).toBe(true);
  });

  it('lets purlins carry a sag rod at midspan', () => {
    const rods = member('SR', [3, 3, 0], [6, 3, 0], { section: round(0.016) });
    const { truss } = joinMembers([member('P1', [3, 0, 0], [3, 6, 0]), member('P2', [6, 0, 0], [6, 6, 0]), rods]);
    expect(truss.nodes.filter((node) => node.carriedBy !== null)).toHaveLength(2);
    expect(truss.bars.map(({ name }) => name).sort()).toEqual(['P1', 'P2', 'SR']);
  });

  it('keeps crossed bracing apart, unless the brief joins crossings or a third member ends there', () => {
    const rod = { section: round(0.02) };
    const frame = [
      member('A', [0, 0, 0], [4, 0, 0]),
      member('B', [0, 4, 0], [4, 4, 0]),
      member('C', [0, 0, 0], [0, 4, 0]),
      member('D', [4, 0, 0], [4, 4, 0]),
      member('X1', [0, 0, 0], [4, 4, 0], rod),
      member('X2', [4, 0, 0], [0, 4, 0], rod),
    ];
    const post = member('K', [2, 2, 0], [2, 2, 3], rod);
    expect(joinMembers(frame).truss.nodes).toHaveLength(4);
    expect(joinMembers(frame, { crossings: 'joined' }).truss.nodes).toHaveLength(5);
    const { truss } = joinMembers([...frame, post]);
    expect(truss.nodes[nodeAt(truss, [2, 2, 0])].members).toHaveLength(3);
  });

  it('makes one bar of two members spliced in line, with their stiffness in series', () => {
    const thick = hollow(0.2);
    const { truss } = joinMembers([
      member('S1', [0, 0, 0], [3, 0, 0]),
      member('S2', [3.02, 0, 0], [5, 0, 0], { section: thick }),
    ]);
    expect(truss.nodes).toHaveLength(2);
    expect(truss.bars).toHaveLength(1);
    expect(truss.bars[0].members).toEqual([0, 1]);
    const [l1, l2] = [3.01, 1.99];
    const flexibility = l1 / (2.1e11 * hollow(0.1).area) + l2 / (2.1e11 * thick.area);
    expect(truss.bars[0].stiffnessEA).toBeCloseTo(5 / flexibility, -3);
  });

  it('makes one bar of two members side by side: their areas add, and both stand in it', () => {
    const post = (mark: string, y: number) => cutBack(mark, [6, y, 0], [6, y, 2], 0.09, { section: hollow(0.06) });
    const members = [...pitchedTruss().filter(({ tag }) => tag !== 'P'), post('P1', -0.035), post('P2', 0.035)];
    const { truss, findings } = joinMembers(members);
    const bar = truss.bars.find(({ name }) => name === 'P1/P2')!;
    expect(bar.members.map((i) => members[i].tag)).toEqual(['P1', 'P2']);
    expect(bar.stiffnessEA).toBeCloseTo(2 * 2.1e11 * hollow(0.06).area, -1);
    expect(truss.nodes[bar.from].members.map((i) => members[i].tag)).toEqual(
      expect.arrayContaining(['P1', 'P2', 'BC']),
    );
    expect(truss.nodes).toHaveLength(6);
    expect(codes(findings)).toEqual(['pair-joined']);
    expect(findings[0].severity).toBe('note');
  });

  it('keeps a pair as two bars where the brief says so', () => {
    const post = (mark: string, y: number) => cutBack(mark, [6, y, 0], [6, y, 2], 0.09, { section: hollow(0.06) });
    const members = [...pitchedTruss().filter(({ tag }) => tag !== 'P'), post('P1', -0.035), post('P2', 0.035)];
    const { truss } = joinMembers(members, { pairs: 'apart' });
    expect(truss.bars.filter(({ name }) => name.startsWith('P'))).toHaveLength(2);
  });

  it('takes a gusset that two members touch, or a relationship in the file, for evidence of a joint', () => {
    const members = pitchedTruss().map((m) => (m.tag === 'P' ? { ...m, axis: [m.axis[0], [6, 0, 1.72]] as const } : m));
    const gusset = {
      globalId: 'G',
      name: 'GP-1',
      class: 'IfcPlate',
      centre: [6, 0, 1.8] as const,
      axes: [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ] as const,
      halfSizes: [0.3, 0.005, 0.25] as const,
      assembly: null,
    };
    const related = ['TL', 'TR'].map((b) => ({ a: 'P', b, by: 'IfcRelConnectsElements' as const, realising: [] }));
    const topNode = (evidence: object | null) => {
      const { truss } = joinMembers(members, {}, { evidence: evidence as never });
      return truss.nodes[nodeAt(truss, [6, 0, 2])].members.map((i) => members[i].tag);
    };
    expect(topNode(null)).not.toContain('P');
    expect(topNode({ plates: [gusset], related: [] })).toContain('P');
    expect(topNode({ plates: [], related })).toContain('P');
  });

  it('cuts an overhang off and leaves its weight at the last joint', () => {
    const eaves = pitchedTruss().map((m) =>
      m.tag === 'TL' ? { ...m, axis: [[-1.5, 0, -0.5], m.axis[1]] as const } : m,
    );
    const { truss } = joinMembers(eaves);
    expect(truss.nodes).toHaveLength(6);
    const mass = truss.nodes[nodeAt(truss, [0, 0, 0])].overhangMass;
    expect(mass).toBeCloseTo(hollow(0.1).area * 7850 * Math.hypot(1.5, 0.5), 6);
  });

  it('keeps an end that stands on a support', () => {
    const column = member('C', [0, 0, -4], [0, 0, 2]);
    const context = {
      supportedNodes: (truss: Truss) => new Set(truss.nodes.flatMap((node, i) => (node.at[2] < -3.9 ? [i] : []))),
    };
    const members = [...pitchedTruss(), column];
    const { truss, findings } = joinMembers(members, {}, context);
    expect(nodeAt(truss, [0, 0, -4])).toBeGreaterThanOrEqual(0);
    expect(codes(findings)).not.toContain('loose-end');
  });

  it('does not turn a short member far from its axis for the sake of a joint', () => {
    const cleat = member('CL', [2.9, 0.02, 0.85], [2.9, 0.3, 0.85], { section: hollow(0.1) });
    const { truss } = joinMembers([...pitchedTruss(), ...pitchedTruss(0.32, 'far '), cleat]);
    expect(truss.faith[truss.faith.length - 1].turn).toBeLessThan((21 * Math.PI) / 180);
    for (const { turn } of truss.faith) expect(turn).toBeLessThan((21 * Math.PI) / 180);
  });

  it('never merges the two ends of one member', () => {
    const short = member('S', [0, 0, 0], [0.05, 0, 0]);
    const { truss } = joinMembers([short, member('A', [0.05, 0, 0], [3, 0, 0]), member('B', [0, 0, 0], [0, 3, 0])]);
    for (const bar of truss.bars) expect(bar.from).not.toBe(bar.to);
  });
});

describe('findings of joining', () => {
  it('says a near miss with the gap and both members', () => {
    const members = pitchedTruss().map((m) => (m.tag === 'P' ? { ...m, axis: [m.axis[0], [6, 0, 1.7]] as const } : m));
    const { findings } = joinMembers(members);
    const [miss] = findings.filter(({ code }) => code === 'near-miss');
    expect(miss.members[0]).toBe('P');
    expect(miss.at).toEqual([6, 0, 1.7]);
    // Straight to the nearest point of a chord that slopes by 1 in 3: 0.3 m x cos.
    expect(miss.gap).toBeCloseTo(0.3 * Math.cos(Math.atan(1 / 3)), 6);
  });

  it('says a loose end where nothing is near', () => {
    const { findings } = joinMembers([...pitchedTruss(), member('T', [0, 0, 0], [0, 5, 0])]);
    expect(findings.filter(({ code }) => code === 'loose-end').map(({ members, at }) => [members, at])).toEqual([
      [['T'], [0, 5, 0]],
    ]);
  });

  it('says a lone member once, at its end nearest to the rest', () => {
    const { findings } = joinMembers([...pitchedTruss(), member('L', [0, 9, 0], [0, 4, 0])]);
    expect(codes(findings)).toEqual(['lone-member']);
    expect(findings[0].at).toEqual([0, 4, 0]);
    expect(findings[0].gap).toBeCloseTo(4);
  });

  it('says a separate part once, with all its members', () => {
    const { findings } = joinMembers([...pitchedTruss(), ...pitchedTruss(8, 'far ').slice(0, 3)]);
    expect(codes(findings)).toEqual(['separate-part']);
    expect(findings[0].members).toEqual(['far BC', 'far TL', 'far TR']);
    expect(findings[0].gap).toBeCloseTo(8);
  });

  it('has nothing to say of a second part that stands on its own supports', () => {
    const members = [...pitchedTruss(), ...pitchedTruss(8, 'far ')];
    const lowest = (truss: Truss) => new Set(truss.nodes.flatMap((node, i) => (node.at[2] < 0.01 ? [i] : [])));
    expect(joinMembers(members, {}, { supportedNodes: lowest }).findings).toEqual([]);
  });

  it('leaves a member drawn twice out once and names both', () => {
    const twin = {
      ...member('P twin', [6, 0, 0.1], [6, 0, 1.9]),
      material: { ...member('', [0, 0, 0], [1, 0, 0]).material, from: 'default' as const },
    };
    const { truss, findings } = joinMembers([...pitchedTruss(), twin]);
    expect(codes(findings)).toEqual(['twin-members']);
    expect(findings[0].members).toEqual(['P', 'P twin']);
    expect(truss.bars).toHaveLength(9);
  });

  it('finds a twin in the very same place on a sloping axis', () => {
    const { findings } = joinMembers([...pitchedTruss(), member('TL copy', [0, 0, 0], [6, 0, 2])]);
    expect(codes(findings)).toEqual(['twin-members']);
  });

  it('says where braces meet too far beyond the axis of the chord, by EN 1993-1-8 5.1.5(5)', () => {
    const drawn = (beyond: number) =>
      pitchedTruss().map((m): Member => {
        if (m.tag === 'DL') return cutBack('DL', [6 + 3 * beyond, 0, 0], [3, 0, 1], 0.09);
        return m.tag === 'DR' ? cutBack('DR', [6 - 3 * beyond, 0, 0], [9, 0, 1], 0.09) : m;
      });
    const offsets = (beyond: number) =>
      joinMembers(drawn(beyond)).findings.filter(({ code }) => code === 'offset-joint');
    // The chord is 100 mm deep; the diagonals rise by about 1 in 3, so they cross `beyond` before its axis.
    expect(offsets(0.02)).toEqual([]);
    expect(offsets(0.05)).toEqual([]);
    expect(offsets(-0.02)).toEqual([]);
    const [outside] = offsets(-0.03);
    expect(outside.members[0]).toBe('BC');
    expect(outside.members).toHaveLength(3);
    expect(outside.gap).toBeCloseTo(0.03, 2);
    expect(outside.message).toContain('beyond the axis of BC');
  });

  it('says where two members in line run in one another, and keeps both', () => {
    const { truss, findings } = joinMembers([member('A', [0, 0, 0], [4, 0, 0]), member('B', [3.4, 0, 0], [8, 0, 0])]);
    const [overlap] = findings.filter(({ code }) => code === 'overlap');
    expect(overlap.members).toEqual(['A', 'B']);
    expect(overlap.gap).toBeCloseTo(0.6);
    expect(truss.bars).toHaveLength(2);
  });

  it('leaves out a member without length', () => {
    const { truss, findings } = joinMembers([...pitchedTruss(), member('Z', [1, 1, 1], [1, 1, 1])]);
    expect(codes(findings)).toEqual(['zero-length']);
    expect(truss.bars).toHaveLength(9);
  });
});
