import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { developedLength, type Member } from '../../src/domain/member.ts';
import type { Truss } from '../../src/domain/truss.ts';
import { distance, type Vec3 } from '../../src/domain/vector.ts';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import { joinMembers } from '../../src/topology/join-members.ts';
import { caseOf, fix } from '../statics/support/trusses.ts';
import { cutBack, hollow, member, round } from '../support/members.ts';

/** An arch of 12 m span and 2 m rise over [0, 12]: a circle of 10 m about (6, -8). */
const RADIUS = 10;
const onArch = (x: number, y = 0): Vec3 => [x, y, Math.sqrt(RADIUS ** 2 - (x - 6) ** 2) - 8];
const offArch = ([x, , z]: Vec3): number => Math.abs(Math.hypot(x - 6, z + 8) - RADIUS);
const angleAt = (x: number) => Math.asin((x - 6) / RADIUS);

/** The arch from one x to another, drawn as one member of so many straight pieces. */
function arch(mark: string, fromX = 0, toX = 12, pieces = 48, y = 0): Member {
  const [from, to] = [angleAt(fromX), angleAt(toX)];
  const bow = Array.from({ length: pieces + 1 }, (_, i): Vec3 => {
    const t = from + (i / pieces) * (to - from);
    return [6 + RADIUS * Math.sin(t), y, RADIUS * Math.cos(t) - 8];
  });
  return { ...member(mark, bow[0], bow[pieces], { section: hollow(0.12) }), bow };
}

const PANELS = [2, 4, 6, 8, 10];

/** Bottom chord, posts, and diagonals that fall towards the middle; webs stop short of the work points. */
function underArch(gap: number, y = 0, mark = ''): Member[] {
  const low = (x: number): Vec3 => [x, y, 0];
  const web = { section: hollow(0.08) };
  return [
    member(`${mark}low`, low(0), low(12), { section: hollow(0.12) }),
    ...PANELS.map((x) => cutBack(`${mark}post ${x}`, low(x), onArch(x, y), gap, web)),
    ...[2, 4].map((x) => cutBack(`${mark}left ${x}`, onArch(x, y), low(x + 2), gap, web)),
    ...[10, 8].map((x) => cutBack(`${mark}right ${x}`, onArch(x, y), low(x - 2), gap, web)),
  ];
}

const straightArch = (mark = ''): Member[] =>
  [0, ...PANELS].map((x) => member(`${mark}top ${x}`, onArch(x), onArch(x + 2), { section: hollow(0.12) }));

const codes = (findings: readonly { code: string }[]) => findings.map(({ code }) => code);

const nodeAt = (truss: Truss, at: Vec3, within = 0.002) =>
  truss.nodes.findIndex((node) => distance(node.at, at) < within);

/** Axial forces of a flat truss on pin and roller, 10 kN down on each upper panel point, by the middle of the bar. */
function forcesOf(truss: Truss): Map<string, number> {
  const flat = Object.fromEntries(truss.nodes.map((_, node) => [node, 'y']));
  const supports = fix({ ...flat, [nodeAt(truss, [0, 0, 0])]: 'xyz', [nodeAt(truss, [12, 0, 0])]: 'yz' });
  const loads = PANELS.map((x) => ({ node: nodeAt(truss, onArch(x)), force: [0, 0, -1e4] as Vec3 }));
  const judged = assessStability(truss, supports);
  expect(judged.mechanisms).toBe(0);
  const [solved] = solveCases(truss, supports, judged, [caseOf(loads)]).cases;
  return new Map(
    truss.bars.map(({ from, to }, bar) => {
      const middle = [0, 2].map((k) => ((truss.nodes[from].at[k] + truss.nodes[to].at[k]) / 2).toFixed(1));
      return [middle.join(' '), solved.axialForce[bar] ?? Number.NaN];
    }),
  );
}

describe('an arched chord drawn in one piece', () => {
  const { truss, findings } = joinMembers([arch('top'), ...underArch(0.09)]);

  it('becomes a row of straight bars between its joints, which lie on the curve', () => {
    expect(truss.nodes).toHaveLength(12);
    expect(truss.bars.filter(({ members }) => members[0] === 0).map(({ name }) => name)).toHaveLength(6);
    for (const x of [0, ...PANELS, 12]) expect(nodeAt(truss, onArch(x))).toBeGreaterThanOrEqual(0);
    for (const { at, members } of truss.nodes) if (members.includes(0)) expect(offArch(at)).toBeLessThan(0.001);
  });

  it('says how far its bars stray from it: the sagitta of the worst panel, and no more', () => {
    expect(codes(findings)).toEqual(['bent-axis']);
    // Of the panel next to an end, whose chord is the longest: r - sqrt(r^2 - c^2 / 4).
    const sagitta = RADIUS - Math.sqrt(RADIUS ** 2 - (distance(onArch(0), onArch(2)) / 2) ** 2);
    expect(findings[0].gap! / sagitta).toBeCloseTo(1, 1);
    expect(findings[0].members).toEqual(['top']);
    expect(findings[0].message).toContain('bending from it is not in the forces');
  });

  it('carries the forces that the method of sections gives', () => {
    const forces = forcesOf(truss);
    // Moment of 5 loads of 10 kN on 12 m, over the height of the upper joint opposite.
    const moment = (x: number) => 25e3 * x - PANELS.filter((a) => a < x).reduce((sum, a) => sum + 1e4 * (x - a), 0);
    const height = (x: number) => onArch(x)[2];
    for (const [panel, opposite] of [
      [1, 2],
      [3, 2],
      [5, 4],
    ]) {
      const force = forces.get(`${panel.toFixed(1)} 0.0`)!;
      expect(force / (moment(opposite) / height(opposite))).toBeCloseTo(1, 2);
    }
  });

  it('gives the truss of an arch drawn as straight pieces, bar for bar and force for force', () => {
    const explicit = forcesOf(joinMembers([...straightArch(), ...underArch(0)]).truss);
    const bent = forcesOf(truss);
    expect([...bent.keys()].sort()).toEqual([...explicit.keys()].sort());
    for (const [middle, force] of explicit) expect(Math.abs(bent.get(middle)! - force)).toBeLessThan(50);
  });

  it('weighs what it weighs along the curve', () => {
    const mass = truss.bars
      .filter(({ members }) => members[0] === 0)
      .reduce((sum, { massPerLength, length }) => sum + massPerLength * length, 0);
    const { section, material } = arch('top');
    const alongCurve = developedLength(arch('top'));
    expect(alongCurve).toBeCloseTo(2 * RADIUS * Math.asin(0.6), 2);
    expect(mass / (section!.area * material.density * alongCurve)).toBeCloseTo(1, 3);
  });

  it('is not moved off its curve: shift and turn are measured from it', () => {
    expect(truss.faith[0].shift).toBeLessThan(0.001);
    expect(truss.faith[0].turn).toBeLessThan(0.001);
  });

  it('is the same truss however the members are shuffled, however finely it is drawn, and whichever way round', () => {
    const members = [arch('top'), ...underArch(0.06)];
    const shapeOf = (those: readonly Member[]) => {
      const joined = joinMembers(those);
      expect(codes(joined.findings)).toEqual(['bent-axis']);
      const at = (node: number) => joined.truss.nodes[node].at.map((x) => Math.abs(x).toFixed(1)).join(' ');
      return joined.truss.bars.map(({ from, to }) => [at(from), at(to)].sort().join(' - ')).sort();
    };
    const reference = shapeOf(members);
    fc.assert(
      fc.property(
        fc.shuffledSubarray(members.slice(1), { minLength: members.length - 1 }),
        fc.nat(members.length - 1),
        fc.integer({ min: 24, max: 120 }),
        fc.boolean(),
        (rest, place, pieces, turned) => {
          const top = arch('top', 0, 12, pieces);
          const own: Member = turned ? { ...top, axis: [top.axis[1], top.axis[0]], bow: [...top.bow!].reverse() } : top;
          expect(shapeOf([...rest.slice(0, place), own, ...rest.slice(place)])).toEqual(reference);
        },
      ),
      { numRuns: 30 },
    );
  });

  it('is the same truss where it is spliced anywhere between two joints', () => {
    fc.assert(
      fc.property(fc.double({ min: 4.6, max: 5.4, noNaN: true }), (x) => {
        const spliced = joinMembers([arch('top a', 0, x, 24), arch('top b', x, 12, 24), ...underArch(0.09)]);
        expect(codes(spliced.findings)).toEqual(['bent-axis']);
        expect(spliced.truss.nodes).toHaveLength(12);
        expect(spliced.truss.bars).toHaveLength(truss.bars.length);
      }),
      { numRuns: 20 },
    );
  });
});

describe('what sits on an arch', () => {
  const frames = [0, 5].flatMap((y) => {
    const mark = `${y} `;
    return [arch(`${mark}top`, 0, 12, 48, y), ...underArch(0.09, y, mark)];
  });
  /** A purlin that stands square on the curve at x. */
  const purlin = (x: number): Member => {
    const t = angleAt(x);
    const away = RADIUS + 0.06 + 0.05;
    const at = (y: number): Vec3 => [6 + away * Math.sin(t), y, away * Math.cos(t) - 8];
    return member(`purlin ${x}`, at(0), at(5), { section: hollow(0.1), zAxis: [Math.sin(t), 0, Math.cos(t)] });
  };

  it('comes down to the panel point it stands over', () => {
    const { truss, findings } = joinMembers([...frames, ...PANELS.map(purlin)]);
    expect(codes(findings)).toEqual(['bent-axis']);
    for (const x of PANELS) expect(truss.nodes[nodeAt(truss, onArch(x))].members).toHaveLength(x === 6 ? 3 : 4);
  });

  it('is carried by the bar where it stands between panel points, if the curve is no farther off than a joint may be', () => {
    const { truss } = joinMembers([...frames, purlin(5)]);
    const carried = truss.nodes.filter(({ carriedBy }) => carriedBy !== null);
    expect(carried).toHaveLength(2);
    for (const { at } of carried) expect(distance(at, onArch(5, at[1]))).toBeLessThan(0.06);
  });

  it('splits a bare arch, where the straight line between its ends would carry it metres below the curve', () => {
    const { truss } = joinMembers([arch('A', 0, 12, 48, 0), arch('B', 0, 12, 48, 5), ...[3, 6, 9].map(purlin)]);
    for (const x of [3, 6, 9]) expect(nodeAt(truss, onArch(x))).toBeGreaterThanOrEqual(0);
    expect(truss.nodes.every(({ carriedBy }) => carriedBy === null)).toBe(true);
  });
});

describe('a bent member', () => {
  it('that nothing meets is one bar, and says its rise', () => {
    const { truss, findings } = joinMembers([arch('top'), member('tie', [0, 0, 0], [12, 0, 0])]);
    expect(truss.bars).toHaveLength(2);
    expect(findings.find(({ code }) => code === 'bent-axis')?.gap).toBeCloseTo(2, 2);
    expect(codes(findings)).not.toContain('twin-members');
    expect(codes(findings)).not.toContain('overlap');
  });

  it('does not take its own two ends for one joint, however near they are', () => {
    const ring = Array.from({ length: 73 }, (_, i): Vec3 => {
      const t = 0.005 + (i / 72) * (2 * Math.PI - 0.01);
      return [3 * Math.cos(t), 3 * Math.sin(t), 0];
    });
    const spokes = [0, 1, 2, 3].map((k): Member => {
      const t = Math.PI / 4 + (k * Math.PI) / 2;
      return cutBack(`spoke ${k}`, [0, 0, 0], [3 * Math.cos(t), 3 * Math.sin(t), 0], 0.06, { section: round(0.02) });
    });
    const { truss, findings } = joinMembers([{ ...member('ring', ring[0], ring[72]), bow: ring }, ...spokes]);
    // A gap of 30 mm is left: what runs on to it from the last spokes is two tails.
    expect(truss.bars.filter(({ members }) => members[0] === 0)).toHaveLength(3);
    expect(codes(findings).filter((code) => code === 'loose-end')).toHaveLength(2);
    for (const { from, to } of truss.bars) expect(from).not.toBe(to);
  });

  it('meets another twice where two half rings close a circle', () => {
    const half = (mark: string, from: number): Member => {
      const bow = Array.from({ length: 37 }, (_, i): Vec3 => {
        const t = from + (i / 36) * Math.PI;
        return [3 * Math.cos(t), 3 * Math.sin(t), 0];
      });
      return { ...member(mark, bow[0], bow[36]), bow };
    };
    const strut = cutBack('strut', [-3, 0, 0], [3, 0, 0], 0.05);
    const cross = cutBack('cross', [0, -3, 0], [0, 3, 0], 0.05);
    const { truss } = joinMembers([half('A', 0), half('B', Math.PI), strut, cross]);
    for (const at of [
      [3, 0, 0],
      [-3, 0, 0],
    ] as Vec3[])
      expect(truss.nodes[nodeAt(truss, at)]?.members).toEqual([0, 1, 2]);
    expect(truss.bars).toHaveLength(6);
  });

  it('drawn twice is one, and two side by side are a pair on the curve between them', () => {
    const twice = joinMembers([arch('top'), arch('again'), ...underArch(0.09)]);
    expect(codes(twice.findings)).toEqual(expect.arrayContaining(['twin-members', 'bent-axis']));
    expect(twice.truss.nodes).toHaveLength(12);
    const pair = joinMembers([arch('A', 0, 12, 48, -0.08), arch('B', 0, 12, 48, 0.08), ...underArch(0.09)]);
    expect(codes(pair.findings)).toEqual(expect.arrayContaining(['pair-joined', 'bent-axis']));
    expect(pair.truss.nodes).toHaveLength(12);
    for (const x of PANELS) expect(nodeAt(pair.truss, onArch(x))).toBeGreaterThanOrEqual(0);
  });
});
