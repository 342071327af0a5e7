import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/domain/vector.ts';
import { judgeBuckling } from '../../src/statics/buckling/judge-buckling.ts';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import type { GroundSpring, NodalForce, Restraint, Supports } from '../../src/statics/types.ts';
import { alsoFlat, caseOf, fix, type Sketch, trussOf } from '../statics/support/trusses.ts';

function judge(sketch: Sketch, supports: Supports, loads: readonly NodalForce[]) {
  const truss = trussOf(sketch);
  const stability = assessStability(truss, supports);
  const { cases } = solveCases(truss, supports, stability, [caseOf(loads)]);
  expect(cases[0].refused).toBeNull();
  return judgeBuckling(truss, stability, cases, []);
}

/** A straight chord of `panels` bars under an end thrust, held up everywhere and sideways at its ends, besides what `holds` and `springs` do. */
function chord(
  panels: number,
  panel: number,
  thrust: number,
  heldAt: readonly number[],
  springs: readonly GroundSpring[],
) {
  const points = Array.from({ length: panels + 1 }, (_, i): Vec3 => [panel * i, 0, 0]);
  const bars = Array.from({ length: panels }, (_, i): [number, number] => [i, i + 1]);
  const holds = [0, panels, ...heldAt].map((node): Restraint => ({ node, direction: [0, 1, 0] }));
  const flat = alsoFlat(fix({ 0: 'x' }), panels + 1, 'z');
  const supports = { restraints: [...flat.restraints, ...holds], springs };
  return judge({ points, bars, stiffness: 1e9 }, supports, [{ node: panels, force: [-thrust, 0, 0] }]);
}

const sideways = (node: number, stiffness: number): GroundSpring => ({ node, direction: [0, 1, 0], stiffness });

describe('a compressed chord of pinned bars', () => {
  test('that nobody holds sideways has a critical load factor of 0', () => {
    const { factors, governing, findings } = chord(6, 2, 100e3, [], []);
    expect(factors.get('dead')).toBe(0);
    expect(governing!.modes).toHaveLength(1);
    // What a mechanism does is said by the judgement of stability.
    expect(findings).toEqual([]);
  });

  // Source: balance of one node by hand: it moves by v, two bars at slope v / a push it with 2 N v / a, the spring with c v: N = c a / 2.
  test('held at every second node and by springs in between buckles at half the springs times the panel', () => {
    const [panel, stiffness, thrust] = [2, 250e3, 100e3];
    const { factors, findings } = chord(
      6,
      panel,
      thrust,
      [2, 4],
      [1, 3, 5].map((i) => sideways(i, stiffness)),
    );
    expect(factors.get('dead')! / ((stiffness * panel) / 2 / thrust)).toBeCloseTo(1, 9);
    expect(findings.map(({ code, severity }) => ({ code, severity }))).toEqual([
      { code: 'second-order-matters', severity: 'warning' },
    ]);
    expect(findings[0].message).toContain('2.50 times the load');
    expect(findings[0].message).toContain('sideways (along y)');
  });

  // Source: by hand, a chain of n rigid links on equal springs moves as sin(m pi i / n): N = c a / (4 sin^2(m pi / 2n)), least for m = n - 1.
  test.each([3, 6, 11])(
    'on springs at all its nodes, %i panels, buckles in a zigzag at the chain formula',
    (panels) => {
      const [panel, stiffness, thrust] = [1.5, 80e3, 10e3];
      const springs = Array.from({ length: panels - 1 }, (_, i) => sideways(i + 1, stiffness));
      const { factors, governing } = chord(panels, panel, thrust, [], springs);
      const half = ((panels - 1) * Math.PI) / (2 * panels);
      expect(factors.get('dead')! / ((stiffness * panel) / (4 * Math.sin(half) ** 2) / thrust)).toBeCloseTo(1, 9);
      const [{ moves }] = governing!.modes;
      for (let i = 1; i + 1 < panels; i++) expect(moves[3 * i + 1] * moves[3 * i + 4]).toBeLessThan(0);
      governing!.modes.forEach(({ factor }, k) => {
        const m = ((panels - 1 - k) * Math.PI) / (2 * panels);
        expect(factor / ((stiffness * panel) / (4 * Math.sin(m) ** 2) / thrust)).toBeCloseTo(1, 6);
      });
    },
  );

  test('too weakly sprung for its load is an error, and in tension buckles at no load', () => {
    const springs = [1, 2, 3].map((i) => sideways(i, 10e3));
    const weak = chord(4, 2, 100e3, [], springs);
    expect(weak.findings.map(({ code, severity }) => ({ code, severity }))).toEqual([
      { code: 'unstable-balance', severity: 'error' },
    ]);
    expect(chord(4, 2, -100e3, [], springs).factors.get('dead')).toBeNull();
  });

  test('that nobody holds sideways is stable in tension', () => {
    expect(chord(4, 2, -100e3, [], []).factors.get('dead')).toBeNull();
  });
});

// Source: by hand. Bifurcation of the upright pair: a mast of one bar of height h held by two level springs c along x and y at its head: P = c h.
test('a mast on its hinge, held by springs at its head, buckles at the softer spring times its height', () => {
  const points: Vec3[] = [
    [0, 0, 0],
    [0, 0, 3],
  ];
  const springs: GroundSpring[] = [
    { node: 1, direction: [1, 0, 0], stiffness: 5e4 },
    { node: 1, direction: [0, 1, 0], stiffness: 3e4 },
  ];
  const { factors, governing } = judge({ points, bars: [[0, 1]] }, { ...fix({ 0: 'xyz' }), springs }, [
    { node: 1, force: [0, 0, -10e3] },
  ]);
  expect(factors.get('dead')).toBeCloseTo(9, 9);
  expect(Math.abs(governing!.modes[0].moves[4])).toBe(1);
  expect(governing!.modes[1].factor).toBeCloseTo(15, 9);
});
