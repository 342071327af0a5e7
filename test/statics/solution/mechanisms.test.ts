import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { checkJudgement } from '../support/check-judgement.ts';
import { caseOf, fix, trussOf } from '../support/trusses.ts';

/** Seven flat trusses side by side, each on its own supports and held by nothing sideways: the plane turned by `angle` about z. */
function flatTrusses(howMany: number, angle: number) {
  const points: Vec3[] = [];
  const bars: [number, number][] = [];
  const held: Record<number, string> = {};
  for (let k = 0; k < howMany; k++) {
    const first = points.length;
    const at = (x: number, z: number): Vec3 => [
      x * Math.cos(angle) - 5 * k * Math.sin(angle),
      x * Math.sin(angle) + 5 * k * Math.cos(angle),
      z,
    ];
    points.push(at(0, 0), at(3, 0), at(6, 0), at(9, 0), at(1.5, 2), at(4.5, 2), at(7.5, 2));
    for (const [a, b] of ['01', '12', '23', '04', '14', '15', '25', '26', '36', '45', '56'].map((p) =>
      [...p].map(Number),
    ))
      bars.push([first + a!, first + b!]);
    held[first] = 'xyz';
    held[first + 3] = 'xyz';
  }
  return { truss: trussOf({ points, bars }), supports: fix(held) };
}

describe('a truss with mechanisms', () => {
  test('flat trusses that nothing holds sideways are one finding, which says at how many places it is the same', () => {
    const { truss, supports } = flatTrusses(7, 0);
    const judged = assessStability(truss, supports);
    expect(judged.mechanisms).toBe(35);
    const local = judged.modes.filter((mode) => mode.kind === 'local');
    expect([judged.modes.length, local.length]).toEqual([35, 28]);
    expect(local.every((mode) => mode.nodes.length === 1)).toBe(true);
    expect(local[0].words).toContain('sideways (along y)');
    checkJudgement(truss, supports, judged);
    expect(judged.findings.map((f) => f.code)).toEqual(['moves-freely']);
    expect(judged.findings[0].message).toBe(
      '5 nodes can move sideways (along y), each by itself: nothing holds them out of the plane of their bars; the same at 7 places in all.',
    );
    expect(judged.findings[0].nodes.length).toBe(35);
  });

  test.each([0, 0.3, Math.PI / 2])(
    'a load in the plane of a flat truss turned by %f is carried without moving it sideways',
    (angle) => {
      const { truss, supports } = flatTrusses(2, angle);
      const judged = assessStability(truss, supports);
      const { cases, findings } = solveCases(truss, supports, judged, [caseOf([{ node: 1, force: [0, 0, -9e3] }])]);
      expect(findings).toEqual([]);
      expect(cases[0].refused).toBeNull();
      expect(cases[0].residual!).toBeLessThan(1e-12);
      expect(cases[0].axialForce[3]).toBeCloseTo((-6e3 * 2.5) / 2, 4);
      for (const mode of judged.modes) {
        let along = 0;
        mode.nodes.forEach((node, i) => {
          mode.movement[i].forEach((v, axis) => {
            along += v * cases[0]!.displacement[node]![axis]!;
          });
        });
        expect(Math.abs(along)).toBeLessThan(1e-12);
      }
    },
  );

  test('a load that does work on a mode is refused for that case only, naming case, node and direction', () => {
    const { truss, supports } = flatTrusses(2, 0);
    const judged = assessStability(truss, supports);
    const { cases, findings } = solveCases(truss, supports, judged, [
      caseOf([{ node: 1, force: [0, 0, -9e3] }], 'dead'),
      caseOf([{ node: 5, force: [0, 1e3, 0] }], 'wind'),
    ]);
    expect(cases[0].refused).toBeNull();
    expect(cases[1].refused).toContain('(4.500, 0.000, 2.000) sideways (along y)');
    expect(cases[1].refused).toContain('(1.00 kNm for each metre that it moves)');
    expect(cases[1].axialForce.every((force) => force === null)).toBe(true);
    expect(cases[1].residual).toBeNull();
    expect(findings.map((f) => [f.code, f.nodes])).toEqual([['load-moves-it', [5]]]);
    expect(findings[0].message).toContain('Load case wind ');
  });

  test('a free body with balanced loads is solved, with unbalanced ones refused', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [2, 0, 0],
      [1, 2, 0],
      [1, 1, 2],
    ];
    const bars = [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
      [1, 3],
      [2, 3],
    ] as const;
    const truss = trussOf({ points, bars });
    const judged = assessStability(truss, fix({}));
    const pull = caseOf(
      [
        { node: 0, force: [-5e3, 0, 0] },
        { node: 1, force: [5e3, 0, 0] },
      ],
      'pull',
    );
    const push = caseOf([{ node: 0, force: [1, 0, 0] }], 'push');
    const { cases, findings } = solveCases(truss, fix({}), judged, [pull, push]);
    expect(cases[0].axialForce[0]).toBeCloseTo(5e3, 6);
    expect(cases[0].axialForce[5]).toBeCloseTo(0, 6);
    expect(cases[1].refused).not.toBeNull();
    expect(findings[0].message).toContain('Load case push ');
  });

  test('a mode that moves many nodes as one body against the rest is a part', () => {
    // Two braced cubes joined at two corners only: one swings about the line between them.
    const cube = (x: number): Vec3[] =>
      [0, 1].flatMap((a) => [0, 1].flatMap((b) => [0, 1].map((c): Vec3 => [x + a, b, c])));
    const points = [
      ...cube(0),
      ...cube(1)
        .slice(2, 8)
        .filter((_, i) => i >= 2),
    ];
    const stiff = (nodes: number[]) => nodes.flatMap((a, i) => nodes.slice(i + 1).map((b): [number, number] => [a, b]));
    const second = [4, 5, 8, 9, 10, 11];
    const seen = new Set<string>();
    const bars = [...stiff([0, 1, 2, 3, 4, 5, 6, 7]), ...stiff(second)].filter(([a, b]) => {
      const key = `${Math.min(a, b)}-${Math.max(a, b)}`;
      if (seen.has(key)) return false;
      seen.add(key);
      return true;
    });
    const truss = trussOf({ points, bars });
    const supports = fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz', 3: 'xyz' });
    const judged = assessStability(truss, supports);
    expect(judged.mechanisms).toBe(1);
    expect(judged.modes[0].kind).toBe('part');
    expect(judged.modes[0].nodes).toEqual([8, 9, 10, 11]);
    checkJudgement(truss, supports, judged);
  });

  test('a truss on one hinge turns as a whole', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [2, 0, 0],
      [1, 2, 0],
      [1, 1, 2],
    ];
    const bars = [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
      [1, 3],
      [2, 3],
    ] as const;
    const truss = trussOf({ points, bars });
    const judged = assessStability(truss, fix({ 0: 'xyz' }));
    expect(judged.modes.map((mode) => [mode.kind, mode.order])).toEqual(Array(3).fill(['whole', 'finite']));
    expect(judged.modes[0].words).toMatch(/along x through \(\d\.000, 0\.000, 0\.000\)/);
    expect(judged.findings.length).toBe(3);
    checkJudgement(truss, fix({ 0: 'xyz' }), judged);
  });

  test('the loose node of a free body is told apart from the motions of the whole', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [2, 0, 0],
      [1, 2, 0],
      [1, 1, 2],
      [-3, 0, 0.5],
    ];
    const bars = [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
      [1, 3],
      [2, 3],
      [0, 4],
    ] as const;
    const truss = trussOf({ points, bars });
    const judged = assessStability(truss, fix({}));
    expect(judged.modes.map((mode) => mode.kind)).toEqual([...Array(6).fill('whole'), 'local', 'local']);
    expect(judged.modes.slice(6).map((mode) => mode.nodes)).toEqual([[4], [4]]);
    expect(judged.findings.every((f) => f.nodes.length === 1 && f.nodes[0] === 4)).toBe(true);
    checkJudgement(truss, fix({}), judged);
  });
});
