import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import type { NodalForce, SolvedCase, Supports } from '../../src/statics/types.ts';
import { alsoFlat, caseOf, fix, type Sketch, trussOf } from '../statics/support/trusses.ts';

function solve(sketch: Sketch, supports: Supports, loads: readonly NodalForce[]): SolvedCase {
  const truss = trussOf(sketch);
  return solveCases(truss, supports, assessStability(truss, supports), [caseOf(loads)]).cases[0];
}

describe('closed-form trusses', () => {
  // Source: equilibrium and virtual work by hand: N = -P / (2 sin a), w = P L / (2 E A sin^2 a).
  test('two inclined bars share a load at their apex', () => {
    const [half, rise, load, stiffness] = [3, 1.25, 40e3, 2.5e8];
    const points: Vec3[] = [
      [-half, 0, 0],
      [half, 0, 0],
      [0, 0, rise],
    ];
    const bars = [
      [0, 2],
      [1, 2],
    ] as const;
    const length = Math.hypot(half, rise);
    const sine = rise / length;
    const solved = solve({ points, bars, stiffness }, alsoFlat(fix({ 0: 'xz', 1: 'xz' }), 3, 'y'), [
      { node: 2, force: [0, 0, -load] },
    ]);
    for (const force of solved.axialForce) expect(force).toBeCloseTo(-load / (2 * sine), 6);
    expect(solved.displacement[2]![2]).toBeCloseTo((-load * length) / (2 * stiffness * sine ** 2), 12);
    expect(solved.reactions.find((r) => r.node === 0)!.force[0]).toBeCloseTo(((load / 2) * half) / rise, 6);
  });

  // Source: method of sections by hand. Six panels of 3 m, 2 m high, 12 kN at each inner lower node: reaction 30 kN.
  test('a parallel-chord truss with falling diagonals has the forces of the method of sections', () => {
    const [panel, height, load] = [3, 2, 12e3];
    const lower = (i: number) => i;
    const upper = (i: number) => 7 + i;
    const points: Vec3[] = [];
    for (const z of [0, height]) for (let i = 0; i <= 6; i++) points.push([panel * i, 0, z]);
    const bars: [number, number][] = [];
    const index = (a: number, b: number) => bars.push([a, b]) - 1;
    const bottom = [0, 1, 2, 3, 4, 5].map((i) => index(lower(i), lower(i + 1)));
    const top = [0, 1, 2, 3, 4, 5].map((i) => index(upper(i), upper(i + 1)));
    const post = [0, 1, 2, 3, 4, 5, 6].map((i) => index(lower(i), upper(i)));
    const diagonal = [0, 1, 2].map((i) => index(upper(i), lower(i + 1)));
    for (const i of [3, 4, 5]) index(lower(i), upper(i + 1));
    const loads = [1, 2, 3, 4, 5].map((i): NodalForce => ({ node: lower(i), force: [0, 0, -load] }));
    const solved = solve({ points, bars }, alsoFlat(fix({ 0: 'xz', 6: 'z' }), 14, 'y'), loads);
    const reaction = (5 * load) / 2;
    const moment = (i: number) => reaction * panel * i - (load * panel * i * (i - 1)) / 2;
    const shear = (i: number) => reaction - load * i;
    const sine = height / Math.hypot(panel, height);
    [0, 1, 2].forEach((i) => {
      expect(solved.axialForce[top[i]]).toBeCloseTo(-moment(i + 1) / height, 5);
      expect(solved.axialForce[bottom[i]]).toBeCloseTo(moment(i) / height, 5);
      expect(solved.axialForce[diagonal[i]]).toBeCloseTo(shear(i) / sine, 5);
      expect(solved.axialForce[post[i]]).toBeCloseTo(-shear(i), 5);
    });
    expect(solved.axialForce[post[3]]).toBeCloseTo(0, 5);
  });

  // Source: symmetry and vertical balance by hand: N = -P L / (n h).
  test('a regular n-legged pyramid shares its load equally', () => {
    for (const legs of [3, 4, 7]) {
      const points: Vec3[] = [[0, 0, 2]];
      const bars: [number, number][] = [];
      const held: Record<number, string> = {};
      for (let i = 1; i <= legs; i++) {
        const angle = (2 * Math.PI * i) / legs;
        points.push([3 * Math.cos(angle), 3 * Math.sin(angle), 0]);
        bars.push([0, i]);
        held[i] = 'xyz';
      }
      const solved = solve({ points, bars }, fix(held), [{ node: 0, force: [0, 0, -9e3] }]);
      for (const force of solved.axialForce) expect(force).toBeCloseTo((-9e3 * Math.hypot(3, 2)) / (legs * 2), 6);
    }
  });
});

const INCH = 0.0254;
const POUND = 4.4482216152605;
const PSI = POUND / INCH ** 2;

describe('benchmark trusses of the optimisation literature', () => {
  // Source, from memory: the ten-bar cantilever (Venkayya 1971; Schmit & Farshi 1974), E 1e7 psi, 0.1 lb/in3, 100 kip at both lower nodes; its
  // published optimum weighs 5061 lb with a largest displacement at the limit of 2.0 in.
  test('the ten-bar cantilever with its published optimum areas weighs 5061 lb and moves 2.0 in', () => {
    const points = inches([
      [720, 0, 360],
      [720, 0, 0],
      [360, 0, 360],
      [360, 0, 0],
      [0, 0, 360],
      [0, 0, 0],
    ]);
    const bars = oneBased('5-3 3-1 6-4 4-2 3-4 1-2 5-4 6-3 3-2 4-1');
    const areas = [30.52, 0.1, 23.2, 15.22, 0.1, 0.55, 7.457, 21.04, 21.53, 0.1];
    const solved = solve(
      { points, bars, stiffness: stiffnesses(areas) },
      alsoFlat(fix({ 4: 'xz', 5: 'xz' }), 6, 'y'),
      [1, 3].map((node): NodalForce => ({ node, force: [0, 0, -100e3 * POUND] })),
    );
    expect(weight(points, bars, areas)).toBeCloseTo(5061, -1);
    expect(largestMove(solved) / INCH).toBeCloseTo(2, 2);
    for (const [b, force] of solved.axialForce.entries())
      expect(Math.abs(force!) / (areas[b] * INCH ** 2) / PSI).toBeLessThan(25_100);
  });

  // Source, from memory: the 25-bar transmission tower (Schmit & Farshi 1974), two load cases, displacements of the two top nodes limited to 0.35 in;
  // published optimum areas in eight groups, 545.2 lb.
  test('the 25-bar tower with its published optimum areas weighs 545 lb and moves 0.35 in at the top', () => {
    const points = inches([
      [-37.5, 0, 200],
      [37.5, 0, 200],
      [-37.5, 37.5, 100],
      [37.5, 37.5, 100],
      [37.5, -37.5, 100],
      [-37.5, -37.5, 100],
      [-100, 100, 0],
      [100, 100, 0],
      [100, -100, 0],
      [-100, -100, 0],
    ]);
    const bars = oneBased(
      '1-2 1-4 2-3 1-5 2-6 2-5 2-4 1-3 1-6 3-6 4-5 3-4 5-6 3-10 6-7 4-9 5-8 4-7 3-8 5-10 6-9 6-10 3-7 4-8 5-9',
    );
    const groups = [1, 4, 4, 2, 2, 4, 4, 4];
    const group = [0.01, 1.987, 2.991, 0.01, 0.012, 0.683, 1.679, 2.664];
    const areas = groups.flatMap((size, g) => new Array<number>(size).fill(group[g]));
    const cases: NodalForce[][] = [
      pounds({ 0: [0, 20e3, -5e3], 1: [0, -20e3, -5e3] }),
      pounds({ 0: [1e3, 10e3, -5e3], 1: [0, 10e3, -5e3], 2: [500, 0, 0], 5: [500, 0, 0] }),
    ];
    const supports = fix({ 6: 'xyz', 7: 'xyz', 8: 'xyz', 9: 'xyz' });
    const sketch = { points, bars, stiffness: stiffnesses(areas) };
    const moves = cases.map((loads) => {
      const { displacement } = solve(sketch, supports, loads);
      return Math.max(...[0, 1].flatMap((node) => displacement[node]!.map(Math.abs))) / INCH;
    });
    expect(weight(points, bars, areas)).toBeCloseTo(545.2, 0);
    expect(Math.max(...moves)).toBeCloseTo(0.35, 3);
  });
});

describe('counts of Maxwell and Calladine', () => {
  const count = (sketch: Sketch, supports: Supports) => assessStability(trussOf(sketch), supports);

  // Source: Maxwell 1864: a triangulated convex polyhedron has 3 v - 6 bars and is just rigid (Cauchy).
  test('tetrahedron, octahedron and icosahedron are just rigid as free bodies', () => {
    for (const points of [TETRAHEDRON, OCTAHEDRON, ICOSAHEDRON]) {
      const judged = count({ points, bars: nearestPairs(points) }, fix({}));
      expect(judged.bars).toBe(3 * points.length - 6);
      expect([judged.mechanisms, judged.selfStressStates, judged.freeBody]).toEqual([6, 0, true]);
      expect(judged.modes.every((mode) => mode.kind === 'whole')).toBe(true);
      expect(judged.findings).toEqual([]);
    }
  });

  // Source: Maxwell's rule by hand: 12 bars on 8 nodes leave 24 - 6 - 12 = 6 inner mechanisms.
  test('a cube of bars has six inner mechanisms', () => {
    const judged = count({ points: CUBE, bars: nearestPairs(CUBE) }, fix({}));
    expect([judged.mechanisms, judged.selfStressStates]).toEqual([12, 0]);
    expect(judged.modes.filter((mode) => mode.kind === 'whole').length).toBe(6);
  });

  // Source: Calladine 1978, Pellegrino & Calladine 1986: two bars in line between fixed points have m = 1 in the plane with s = 1, stiffened by
  // prestress; in space m = 2.
  test('two bars in one line have a self-stress that stiffens their infinitesimal mechanism', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [2, 0, 0],
      [4, 0, 0],
    ];
    const bars = [
      [0, 1],
      [1, 2],
    ] as const;
    const space = count({ points, bars }, fix({ 0: 'xyz', 2: 'xyz' }));
    expect([space.mechanisms, space.selfStressStates]).toEqual([2, 1]);
    expect(space.modes.map((mode) => mode.order)).toEqual(['infinitesimal', 'infinitesimal']);
    const plane = count({ points, bars }, alsoFlat(fix({ 0: 'xz', 2: 'xz' }), 3, 'y'));
    expect([plane.mechanisms, plane.selfStressStates]).toEqual([1, 1]);
    const loose = count({ points, bars }, fix({ 0: 'xyz', 2: 'yz' }));
    expect([loose.mechanisms, loose.selfStressStates]).toEqual([2, 0]);
    expect(loose.modes.every((mode) => mode.order === 'finite')).toBe(true);
  });

  // Source: by hand: a square with both diagonals has one self-stress, with none it racks.
  test('a square panel racks without a diagonal, is just rigid with one, self-stressed with two', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [1, 0, 0],
      [1, 0, 1],
      [0, 0, 1],
    ];
    const supports = alsoFlat(fix({ 0: 'xz', 1: 'z' }), 4, 'y');
    const frame: [number, number][] = oneBased('1-2 2-3 3-4 4-1');
    const results = [frame, [...frame, ...oneBased('1-3')], [...frame, ...oneBased('1-3 2-4')]].map((bars) => {
      const { mechanisms, selfStressStates } = count({ points, bars }, supports);
      return [mechanisms, selfStressStates];
    });
    expect(results).toEqual([
      [1, 0],
      [0, 0],
      [0, 1],
    ]);
  });
});

const inches = (points: readonly Vec3[]): Vec3[] => points.map(([x, y, z]) => [x * INCH, y * INCH, z * INCH]);
const stiffnesses = (areas: readonly number[]): number[] => areas.map((area) => 1e7 * PSI * area * INCH ** 2);
const oneBased = (text: string): [number, number][] =>
  text.split(' ').map((pair) => {
    const [a, b] = pair.split('-').map(Number) as [number, number];
    return [a - 1, b - 1];
  });
const pounds = (forces: Readonly<Record<number, Vec3>>): NodalForce[] =>
  Object.entries(forces).map(([node, f]) => ({
    node: Number(node),
    force: [f[0] * POUND, f[1] * POUND, f[2] * POUND],
  }));
const largestMove = (one: SolvedCase): number => Math.max(...one.displacement.flatMap((v) => v!.map(Math.abs)));

/** lb, at 0.1 lb/in3. */
function weight(
  points: readonly Vec3[],
  bars: readonly (readonly [number, number])[],
  areas: readonly number[],
): number {
  return bars.reduce((sum, [a, b], i) => sum + (0.1 * areas[i] * between(points[a], points[b])) / INCH, 0);
}

function between(p: Vec3, q: Vec3): number {
  return Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
}

const TETRAHEDRON: Vec3[] = [
  [1, 1, 1],
  [1, -1, -1],
  [-1, 1, -1],
  [-1, -1, 1],
];
const OCTAHEDRON: Vec3[] = [
  [1, 0, 0],
  [-1, 0, 0],
  [0, 1, 0],
  [0, -1, 0],
  [0, 0, 1],
  [0, 0, -1],
];
const GOLDEN = (1 + Math.sqrt(5)) / 2;
const ICOSAHEDRON: Vec3[] = [1, -1].flatMap((a) =>
  [GOLDEN, -GOLDEN].flatMap((b): Vec3[] => [
    [0, a, b],
    [a, b, 0],
    [b, 0, a],
  ]),
);
const CUBE: Vec3[] = [-1, 1].flatMap((x) => [-1, 1].flatMap((y) => [-1, 1].map((z): Vec3 => [x, y, z])));

/** The edges of a polyhedron of equal edges: all pairs at the least distance. */
function nearestPairs(points: readonly Vec3[]): [number, number][] {
  const pairs: [number, number][] = [];
  for (let a = 0; a < points.length; a++) for (let b = a + 1; b < points.length; b++) pairs.push([a, b]);
  const least = Math.min(...pairs.map(([a, b]) => between(points[a], points[b])));
  return pairs.filter(([a, b]) => between(points[a], points[b]) < least * 1.01);
}
