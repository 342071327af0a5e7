import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { LoadRule, NodeSelector } from '../../../src/brief/types.ts';
import { add, cross, ORIGIN, scale, type Vec3 } from '../../../src/domain/vector.ts';
import { buildCases } from '../../../src/statics/loads/build-cases.ts';
import type { NodalForce } from '../../../src/statics/types.ts';
import { makeGrid, makeTruss } from '../../brief/make-truss.ts';

type Made = ReturnType<typeof makeTruss>;
const ALL: NodeSelector = { line: 8, level: [null, 1e6] };
const TOP: NodeSelector = { line: 8, top: true };

const build = ({ truss, members }: Made, ...loads: LoadRule[]) =>
  buildCases(truss, members, { cases: [{ line: 5, name: 'snow', nature: 'snow', loads }] });

const area = (pressure: number, acts: 'down' | 'normal', per: 'slope' | 'plan', over = ALL): LoadRule => ({
  kind: 'area',
  line: 7,
  pressure,
  over: [over],
  acts,
  per,
});

const total = (loads: readonly NodalForce[]): Vec3 => loads.reduce<Vec3>((sum, { force }) => add(sum, force), ORIGIN);
const momentOf = ({ truss }: Made, loads: readonly NodalForce[]): Vec3 =>
  loads.reduce<Vec3>((sum, { node, force }) => add(sum, cross(truss.nodes[node].at, force)), ORIGIN);
const downAt = (made: Made, loads: readonly NodalForce[]): number[] =>
  made.truss.nodes.map((_, node) => -(loads.find((load) => load.node === node)?.force[2] ?? 0));

describe('self weight', () => {
  it('is mass times g, half of each bar to each end, with what was cut off at a node', () => {
    const made = makeTruss(
      [
        [0, 0, 0],
        [3, 0, 4],
        [3, 0, 0],
      ],
      [
        [0, 1],
        [1, 2],
      ],
    );
    const nodes = made.truss.nodes.map((node, i) => ({ ...node, overhangMass: i === 2 ? 7 : 0 }));
    const { cases, findings } = build(
      { ...made, truss: { ...made.truss, nodes } },
      { kind: 'selfWeight', line: 6, factor: 1.1 },
    );
    expect(findings).toEqual([]);
    const g = 9.80665 * 1.1;
    expect(cases[0].loads.map(({ node, force }) => [node, force[2]])).toEqual([
      [0, expect.closeTo(-25 * g, 9)],
      [1, expect.closeTo(-45 * g, 9)],
      [2, expect.closeTo(-27 * g, 9)],
    ]);
  });
});

describe('point and line loads', () => {
  const made = makeTruss(
    [
      [0, 0, 0],
      [3, 0, 4],
      [6, 0, 0],
    ],
    [
      { nodes: [0, 1], member: { name: 'P1' } },
      { nodes: [1, 2], member: { name: 'Q' } },
    ],
  );

  it('put a point load in full on every node, and sum all loads of a node into one entry', () => {
    const point: LoadRule = { kind: 'point', line: 6, force: [0, 0, -1700], at: [{ line: 6, lowest: true }] };
    const { cases } = build(made, point, { ...point, force: [500, 0, 0] });
    expect(cases[0]).toEqual({
      name: 'snow',
      nature: 'snow',
      loads: [
        { node: 0, force: [500, 0, -1700] },
        { node: 2, force: [500, 0, -1700] },
      ],
    });
  });

  it('put a line load on the true length or the plan of the members', () => {
    const line = (per: 'length' | 'plan'): LoadRule => ({
      kind: 'line',
      line: 6,
      force: [0, 10, -20],
      on: [{ line: 6, name: 'P*' }],
      per,
    });
    expect(build(made, line('length')).cases[0].loads).toEqual([
      { node: 0, force: [0, 25, -50] },
      { node: 1, force: [0, 25, -50] },
    ]);
    expect(build(made, line('plan')).cases[0].loads).toEqual([
      { node: 0, force: [0, 15, -30] },
      { node: 1, force: [0, 15, -30] },
    ]);
  });
});

describe('an area load', () => {
  it('gives the corners of a rectangular grid a quarter of a cell, its edges a half, its inside a whole', () => {
    const { at, runs } = makeGrid([0, 2, 4], [0, 6, 12]);
    const made = makeTruss(at, runs);
    const { cases, coverage } = build(made, area(100, 'down', 'plan'));
    expect(downAt(made, cases[0].loads)).toEqual([3, 6, 3, 6, 12, 6, 3, 6, 3].map((m2) => expect.closeTo(100 * m2, 9)));
    expect(coverage).toEqual([
      {
        case: 'snow',
        line: 7,
        formedBy: 'bars',
        patches: 4,
        area: expect.closeTo(48, 9),
        planArea: expect.closeTo(48, 9),
        askedPlanArea: null,
        force: [0, 0, expect.closeTo(-4800, 8)],
        asked: [0, 0, expect.closeTo(-4800, 8)],
        unloaded: [],
        openings: [],
      },
    ]);
  });

  const pitch = Math.atan(0.5);
  const pitched = () => {
    const { at, runs } = makeGrid([0, 3, 6, 9, 12], [0, 6, 12], (x) => 10 - Math.abs(x - 6) / 2);
    return makeTruss(at, runs);
  };

  it('per slope is 1/cos of the pitch times that per plan', () => {
    const made = pitched();
    const plan = total(build(made, area(600, 'down', 'plan', TOP)).cases[0].loads);
    const slope = total(build(made, area(600, 'down', 'slope', TOP)).cases[0].loads);
    expect(plan[2]).toBeCloseTo(-600 * 144, 6);
    expect(slope[2] / plan[2]).toBeCloseTo(1 / Math.cos(pitch), 9);
  });

  it('normal to a pitched roof presses down and outwards, and sucks when negative', () => {
    const made = pitched();
    const { loads } = build(made, area(1000, 'normal', 'slope')).cases[0];
    expect(total(loads).map((c) => Math.round(c * 1e6) / 1e6 + 0)).toEqual([0, 0, -144_000]);
    // On the left half the roof rises to the right: pressing pushes to the right.
    expect(loads.find(({ node }) => node === 5)!.force[0]).toBeGreaterThan(0);
    const suction = build(made, area(-1000, 'normal', 'slope')).cases[0].loads;
    expect(total(suction)[2]).toBeCloseTo(144_000, 6);
  });

  it('is as symmetric as the roof, crossed rods or not', () => {
    const { at, runs, index } = makeGrid([0, 3, 6, 9, 12], [0, 6, 12, 18], (x) => 10 - Math.abs(x - 6) / 2);
    const plain = makeTruss(at, runs);
    const cross = (i: number, j: number): [number, number][] => [
      [index(i, j), index(i + 1, j + 1)],
      [index(i + 1, j), index(i, j + 1)],
    ];
    const braced = makeTruss(at, [...runs, ...cross(0, 0), ...cross(1, 0), ...cross(3, 2)]);
    const down = downAt(plain, build(plain, area(600, 'down', 'slope')).cases[0].loads);
    expect(downAt(braced, build(braced, area(600, 'down', 'slope', TOP)).cases[0].loads)).toEqual(
      down.map((f) => expect.closeTo(f, 9)),
    );
    for (let j = 0; j < 4; j++) {
      for (let i = 0; i < 5; i++) expect(down[index(i, j)]).toBeCloseTo(down[index(4 - i, 3 - j)], 9);
    }
  });

  it('keeps the cells of purlins under which long rods cross several bays', () => {
    const { at, runs, index } = makeGrid([0, 3, 6, 9], [0, 6]);
    const plain = makeTruss(at, runs);
    const braced = makeTruss(at, [...runs, [index(0, 0), index(3, 1)], [index(3, 0), index(0, 1)]]);
    const built = build(braced, area(600, 'down', 'plan'));
    expect(built.coverage[0].patches).toBe(3);
    expect(built.cases[0].loads).toEqual(build(plain, area(600, 'down', 'plan')).cases[0].loads);
  });

  it('finds cells at purlins that chords carry between their panel points, whether these are chosen or not', () => {
    const at: Vec3[] = [
      [0, 0, 5],
      [6, 0, 5],
      [0, 4, 5],
      [6, 4, 5],
      [2, 0, 5],
      [2, 4, 5],
      [4, 0, 5],
      [4, 4, 5],
    ];
    const carried = (a: number, b: number) => [
      { node: a, t: 1 / 3 },
      { node: b, t: 2 / 3 },
    ];
    const purlin = { name: 'purlin' };
    const made = makeTruss(at, [
      { nodes: [0, 1], carried: carried(4, 6) },
      { nodes: [2, 3], carried: carried(5, 7) },
      { nodes: [4, 5], member: purlin },
      { nodes: [6, 7], member: purlin },
      { nodes: [0, 2], member: purlin },
    ]);
    const { cases } = build(made, area(100, 'down', 'plan'));
    expect(downAt(made, cases[0].loads)).toEqual([2, 0, 2, 0, 4, 4, 2, 2].map((m2) => expect.closeTo(100 * m2, 9)));
    const byPurlins: NodeSelector = { line: 8, joins: [{ line: 8, name: 'purlin' }] };
    expect(build(made, area(100, 'down', 'plan', byPurlins)).cases).toEqual(cases);
    expect(build(made, area(100, 'down', 'plan')).coverage[0].unloaded).toEqual([1, 3]);
  });

  it('gives the panel points of two chords joined at their ends only what lies beside each', () => {
    const xs = [0, 2, 4, 6, 8];
    const at: Vec3[] = [0, 3].flatMap((y) => xs.map((x): Vec3 => [x, y, 0]));
    const made = makeTruss(at, [{ nodes: [0, 1, 2, 3, 4] }, { nodes: [5, 6, 7, 8, 9] }, [0, 5], [4, 9]]);
    const down = downAt(made, build(made, area(10, 'down', 'plan')).cases[0].loads);
    expect(down).toEqual([15, 30, 30, 30, 15, 15, 30, 30, 30, 15].map((f) => expect.closeTo(f, 9)));
  });

  it('shares a regular hexagon alike among its corners', () => {
    const at = Array.from(
      { length: 6 },
      (_, k): Vec3 => [3 * Math.cos((k * Math.PI) / 3), 3 * Math.sin((k * Math.PI) / 3), 0],
    );
    const made = makeTruss(
      at,
      at.map((_, k) => [k, (k + 1) % 6] as const),
    );
    const each = (10 * 1.5 * Math.sqrt(3) * 9) / 6;
    expect(downAt(made, build(made, area(10, 'down', 'plan')).cases[0].loads)).toEqual(
      at.map(() => expect.closeTo(each, 9)),
    );
  });

  it('takes a roof that is not convex as its bars close it', () => {
    const { at, runs, index } = makeGrid([0, 3, 6], [0, 3, 6]);
    const corner = index(2, 2);
    const ell = makeTruss(
      at.map((p, i): Vec3 => (i === corner ? [6, 6, -50] : p)),
      runs.filter((run) => !run.includes(corner)),
    );
    const { coverage } = build(ell, area(1, 'down', 'plan', { line: 8, level: [-1, 1] }));
    expect(coverage[0]).toMatchObject({ planArea: expect.closeTo(27, 9), formedBy: 'bars' });
  });

  it('leaves out a court that bars close round, and says so with its area', () => {
    const lines = Array.from({ length: 14 }, (_, i) => 3 * i);
    const { at, runs, index } = makeGrid(lines, lines);
    const inCourt = (k: number) => k > 2 && k < 11;
    const gone = new Set(
      lines.flatMap((_, i) => lines.flatMap((_, j) => (inCourt(i) && inCourt(j) ? [index(i, j)] : []))),
    );
    const court = makeTruss(
      at.map((p, i): Vec3 => (gone.has(i) ? [p[0], p[1], -50] : p)),
      runs.flatMap((run) => {
        const kept: [number, number][] = [];
        for (let k = 1; k < run.length; k++)
          if (!gone.has(run[k - 1]) && !gone.has(run[k])) kept.push([run[k - 1], run[k]]);
        return kept;
      }),
    );
    const { coverage, findings } = build(court, area(1, 'down', 'plan', { line: 8, level: [-1, 1] }));
    expect(coverage[0]).toMatchObject({ formedBy: 'bars', planArea: expect.closeTo(39 ** 2 - 27 ** 2, 6) });
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['surface-skipped', 'warning']]);
    expect(findings[0].message).toContain('729 m2 in plan with 36 corners');
  });

  it('refuses nodes at heights too different to be one surface', () => {
    const at = [0, 3, 6, 9].flatMap((x) => [0, 3, 6].map((y): Vec3 => [x, y, (x + y) % 2 === 0 ? 0 : 9]));
    const { cases, findings } = build(makeTruss(at, []), area(1, 'down', 'slope'));
    expect(cases[0].incomplete).toContain('too different heights');
    expect(findings.map(({ code }) => code)).toEqual(['no-load']);
  });

  it('over nodes that no bars close goes to their convex outline, and a warning says so', () => {
    const at: Vec3[] = [0, 6].flatMap((y) => [0, 3, 6, 9].map((x): Vec3 => [x, y, 0]));
    const made = makeTruss(at, [{ nodes: [0, 1, 2, 3] }, { nodes: [4, 5, 6, 7] }]);
    const { cases, coverage, findings } = build(made, area(10, 'down', 'plan'));
    expect(coverage[0]).toMatchObject({ formedBy: 'outline', planArea: expect.closeTo(54, 9) });
    expect(downAt(made, cases[0].loads)).toEqual([45, 90, 90, 45, 45, 90, 90, 45].map((f) => expect.closeTo(f, 9)));
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['surface-skipped', 'warning']]);
    expect(findings[0].message).toContain('line 7 of the brief');
    expect(findings[0].message).toContain('54.0 m2 in plan');
  });

  it('over any scattered nodes covers their convex outline exactly once', () => {
    const whole = fc.integer({ min: 0, max: 12 });
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.tuple(whole, whole), { minLength: 4, maxLength: 60, selector: String }),
        (places) => {
          const at = places.map(([x, y]): Vec3 => [x, y + x / 7, 0]);
          const made = makeTruss(at, []);
          const { coverage, findings } = build(made, area(1, 'down', 'slope'));
          const outline = hullArea(at);
          if (outline < 0.01) expect(findings[0].code).toBe('no-load');
          else {
            expect(coverage[0].planArea).toBeCloseTo(outline, 8);
            expect(coverage[0].area).toBeCloseTo(outline, 8);
            expect(coverage[0].unloaded).toEqual([]);
          }
        },
      ),
    );
  });

  it('is not put on, and says why, where nodes or bars lie one above another, stand alone inside a cell, or are in line', () => {
    const square: Vec3[] = [
      [0, 0, 0],
      [6, 0, 0],
      [6, 6, 0],
      [0, 6, 0],
    ];
    const ring = (first: number) => [0, 1, 2, 3].map((k): [number, number] => [first + k, first + ((k + 1) % 4)]);
    const above = square.map(([x, y]): Vec3 => [x, y, 2]);
    const shifted = square.map(([x, y]): Vec3 => [x + 3, y + 3, 2]);
    const inside = square.map(([x, y]): Vec3 => [2 + x / 3, 2 + y / 3, 0]);
    const faults = [above, shifted, inside].map((second) =>
      build(makeTruss([...square, ...second], [...ring(0), ...ring(4)]), area(1, 'down', 'plan')),
    );
    faults.push(
      build(
        makeTruss(
          [
            [0, 0, 0],
            [3, 0, 0],
            [6, 0, 0],
          ],
          [{ nodes: [0, 1, 2] }],
        ),
        area(1, 'down', 'plan'),
      ),
    );
    const words = [
      'some of its nodes lie one above another',
      'bars between its nodes pass one above another',
      'some of its nodes stand alone inside a larger cell',
      'its nodes span no area in plan',
    ];
    faults.forEach(({ cases, coverage, findings }, i) => {
      expect(cases[0].loads).toEqual([]);
      expect(cases[0].incomplete).toContain(words[i]);
      expect(coverage).toEqual([]);
      expect(findings.map(({ code }) => code)).toEqual(['no-load']);
      expect(findings[0].message).toContain(words[i]);
      expect(findings[0].nodes.length).toBeGreaterThan(0);
    });
  });

  it('keeps force and moment of the even load on any warped grid', () => {
    const number = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(fc.tuple(number, number, number), { minLength: 12, maxLength: 12 }), (shifts) => {
        const { at, runs } = makeGrid([0, 5, 10, 15], [0, 5, 10]);
        const made = makeTruss(
          at.map(([x, y, z], i): Vec3 => [x + shifts[i][0], y + shifts[i][1], z + shifts[i][2]]),
          runs,
        );
        const { cases, coverage } = build(made, area(100, 'down', 'plan'));
        const boundary = [0, 1, 2, 3, 7, 11, 10, 9, 8, 4].map((node) => made.truss.nodes[node].at);
        const { area: planArea, first } = polygonIntegrals(boundary);
        expect(coverage[0].patches).toBe(6);
        expect(coverage[0].planArea).toBeCloseTo(planArea, 8);
        expect(total(cases[0].loads)[2]).toBeCloseTo(-100 * planArea, 6);
        const [mx, my] = momentOf(made, cases[0].loads);
        expect(mx).toBeCloseTo(-100 * first[1], 5);
        expect(my).toBeCloseTo(100 * first[0], 5);
      }),
    );
  });

  it('normal to a closed boundary has the resultant of its vector area, however the inside is warped', () => {
    const number = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(number, { minLength: 9, maxLength: 9 }), (heights) => {
        const { at, runs } = makeGrid([0, 5, 10], [0, 5, 10]);
        const made = makeTruss(
          at.map(([x, y], i): Vec3 => [x, y, heights[i]]),
          runs,
        );
        const loop = [0, 1, 2, 5, 8, 7, 6, 3].map((node) => made.truss.nodes[node].at);
        const vectorArea = loop.reduce<Vec3>((sum, a, i) => add(sum, scale(cross(a, loop[(i + 1) % 8]), 0.5)), ORIGIN);
        const sum = total(build(made, area(100, 'normal', 'slope')).cases[0].loads);
        sum.forEach((component, k) => {
          expect(component).toBeCloseTo(-100 * vectorArea[k], 6);
        });
      }),
    );
  });
});

describe('cases', () => {
  const made = makeTruss(
    [
      [0, 0, 0],
      [6, 0, 0],
    ],
    [[0, 1]],
  );

  it('are kept in order, an empty one with a finding of its line', () => {
    const { cases, findings } = buildCases(made.truss, made.members, {
      cases: [
        { line: 3, name: 'a', nature: 'wind', loads: [] },
        { line: 4, name: 'b', nature: 'permanent', loads: [{ kind: 'selfWeight', line: 5, factor: 1 }] },
      ],
    });
    expect(cases.map(({ name, loads }) => [name, loads.length])).toEqual([
      ['a', 0],
      ['b', 2],
    ]);
    expect(findings.map(({ code, message }) => [code, message])).toEqual([
      ['no-load', 'Case a (line 3 of the brief) puts no load on the truss.'],
    ]);
  });

  it('warn of selectors that catch nothing', () => {
    const { findings } = build(
      made,
      { kind: 'selfWeight', line: 6, factor: 1 },
      { kind: 'point', line: 7, force: [1, 0, 0], at: [{ line: 7, level: [5, null] }] },
      { kind: 'line', line: 9, force: [1, 0, 0], on: [{ line: 9, name: 'P*' }], per: 'length' },
    );
    expect(findings.map(({ code, message }) => [code, message])).toEqual([
      ['selector-empty', 'Line 7 of the brief: no node is caught by {level: [5, null]}.'],
      ['selector-empty', 'Line 9 of the brief: no member is caught by {name: P*}.'],
    ]);
  });
});

/** Area and first moments (integrals of x and y) of a polygon in plan, by Green's theorem. */
function polygonIntegrals(corners: readonly Vec3[]): { area: number; first: [number, number] } {
  let [area2, x6, y6] = [0, 0, 0];
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length];
    const w = a[0] * b[1] - b[0] * a[1];
    area2 += w;
    x6 += (a[0] + b[0]) * w;
    y6 += (a[1] + b[1]) * w;
  });
  return { area: area2 / 2, first: [x6 / 6, y6 / 6] };
}

/** Area of the convex hull in plan: gift wrapping, independent of what is tested. */
function hullArea(points: readonly Vec3[]): number {
  const leftmost = points.reduce((a, b) => (b[0] < a[0] || (b[0] === a[0] && b[1] < a[1]) ? b : a));
  const side = (a: Vec3, b: Vec3, c: Vec3): number => (b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1]);
  const hull: Vec3[] = [];
  let at = leftmost;
  do {
    hull.push(at);
    let next = points.find((point) => point !== at)!;
    for (const point of points) {
      if (point === at) continue;
      const turned = side(at, next, point);
      const farther = Math.hypot(point[0] - at[0], point[1] - at[1]) > Math.hypot(next[0] - at[0], next[1] - at[1]);
      if (turned < -1e-9 || (Math.abs(turned) <= 1e-9 && farther)) next = point;
    }
    at = next;
  } while (at !== leftmost && hull.length <= points.length);
  return polygonIntegrals(hull).area;
}
