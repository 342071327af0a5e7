import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { findIdleBars } from '../../../src/statics/idle/idle-bars.ts';
import { idleByJoints } from '../../../src/statics/idle/joint-rules.ts';
import { idleFindings } from '../../../src/statics/idle/words.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { LoadCase, Supports } from '../../../src/statics/types.ts';
import { alsoFlat, caseOf, fix, randomTruss, trussOf } from '../support/trusses.ts';

const none = { tensionOnly: [], compressionOnly: [] };

/**
 *   4 - 5 - 6       posts 1-5 only; the load hangs on 5
 *  / \  |  / \      4-5 and 5-6 top chord, 0-1-2 bottom chord with 3 hanging out on one bar
 * 0 -- 1 -- 2
 */
const points: Vec3[] = [
  [0, 0, 0],
  [4, 0, 0],
  [8, 0, 0],
  [12, 0, 0],
  [2, 0, 2],
  [4, 0, 2],
  [6, 0, 2],
];
const bars = [
  [0, 1],
  [1, 2],
  [2, 3],
  [0, 4],
  [4, 1],
  [4, 5],
  [1, 5],
  [5, 6],
  [1, 6],
  [6, 2],
] as const;
const truss = trussOf({ points, bars });
const supports = alsoFlat(fix({ 0: 'xz', 2: 'z', 3: 'z' }), points.length, 'y');
const flat = (load: Vec3, node: number): LoadCase => caseOf([{ node, force: load }]);

function solved(over: Supports, cases: readonly LoadCase[]) {
  return solveCases(truss, over, assessStability(truss, over), cases).cases;
}

describe('a bar that carries nothing', () => {
  it('is shown by the joint at which all others lie in one line', () => {
    expect(idleByJoints(truss, supports, [[{ node: 4, force: [0, 0, -1e3] }]])).toContainEqual({
      bar: 6,
      node: 5,
      rule: 'out-of-plane',
    });
    const space = trussOf({ points, bars });
    const unheld = { restraints: fix({ 0: 'xyz' }).restraints, springs: [] };
    expect(idleByJoints(space, unheld, [[{ node: 4, force: [0, 0, -1e3] }]])).toContainEqual({
      bar: 6,
      node: 5,
      rule: 'out-of-line',
    });
  });

  it('is not shown where a load stands on the joint across that line', () => {
    const shown = idleByJoints(truss, supports, [[{ node: 5, force: [0, 0, -1e3] }]]);
    expect(shown.map(({ bar }) => bar)).not.toContain(6);
  });

  it('is found in rounds: what hangs on an idle bar only is idle in the next', () => {
    // A triangle on top of a loaded one: the tip's two bars first, then what is left of the joints below it.
    const tower = trussOf({
      points: [
        [0, 0, 0],
        [2, 0, 0],
        [1, 0, 2],
        [3, 0, 3],
        [3.5, 0, 5],
      ],
      bars: [
        [0, 2],
        [1, 2],
        [2, 3],
        [1, 3],
        [3, 4],
        [2, 4],
      ],
    });
    const bare = { restraints: fix({ 0: 'xyz', 1: 'xyz' }).restraints, springs: [] };
    const shown = idleByJoints(tower, bare, [[{ node: 2, force: [0, 0, -1e3] }]]);
    expect(shown).toEqual([
      { bar: 4, node: 4, rule: 'two' },
      { bar: 5, node: 4, rule: 'two' },
      { bar: 2, node: 3, rule: 'two' },
      { bar: 3, node: 3, rule: 'two' },
    ]);
  });

  it('is told by three bars that meet out of plane at an unloaded joint, and by one alone', () => {
    const tripod = trussOf({
      points: [
        [0, 0, 0],
        [2, 0, 0],
        [0, 2, 0],
        [0.7, 0.7, 2],
        [0.7, 0.7, 4],
      ],
      bars: [
        [0, 3],
        [1, 3],
        [2, 3],
        [3, 4],
      ],
    });
    const held = { restraints: fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz' }).restraints, springs: [] };
    expect(idleByJoints(tripod, held, [[]]).map(({ rule }) => rule)).toEqual(['alone', 'three', 'three', 'three']);
  });

  it('really has no force, on random trusses with few loads, supports anywhere and carried nodes', () => {
    let found = 0;
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1e6 }), fc.integer({ min: 0, max: 2 }), (seed, extra) => {
        const random = randomTruss(seed, extra);
        const stability = assessStability(random.truss, random.supports);
        if (stability.mechanisms > 0) return;
        const one = caseOf(random.cases[0].loads.slice(0, 1));
        const [{ axialForce, refused }] = solveCases(random.truss, random.supports, stability, [one]).cases;
        if (refused !== null) return;
        const largest = Math.max(...axialForce.map((force) => Math.abs(force ?? 0)));
        for (const { bar } of idleByJoints(random.truss, random.supports, [one.loads])) {
          found++;
          expect(Math.abs(axialForce[bar] ?? 0)).toBeLessThanOrEqual(1e-7 * largest);
        }
      }),
      { numRuns: 300, seed: 7 },
    );
    expect(found).toBeGreaterThan(20);
  });

  it('is listed by case and over all cases, and a bar that only the whole shows is said to be so', () => {
    const cases = solved(supports, [flat([0, 0, -1e3], 4), { ...flat([0, 0, -2e3], 6), name: 'snow' }]);
    const idle = findIdleBars(truss, supports, { cases, combinations: [] }, none);
    expect(idle.cases.map((one) => one.case)).toEqual(['dead', 'snow']);
    expect(idle.everywhere.map(({ bar }) => bar)).toContain(6);
    for (const { bar } of idle.everywhere)
      for (const { axialForce } of cases) expect(Math.abs(axialForce[bar]!)).toBeLessThan(1e-3);
    // Every bar without force is listed in its case.
    cases.forEach(({ axialForce }, c) => {
      const without = axialForce.flatMap((force, bar) => (Math.abs(force!) < 1e-6 ? [bar] : []));
      expect(idle.cases[c].bars.map(({ bar }) => bar).toSorted((a, b) => a - b)).toEqual(without);
    });
  });

  it('is a note; bracing waits for loads that are not there, and is told apart', () => {
    const members = bars.map((_, i) => ({ globalId: `g${i}` }));
    const everywhere = [
      { bar: 6, rule: 'out-of-line', node: 5 },
      { bar: 2, rule: 'whole', node: null },
      { bar: 4, rule: 'slack', node: null },
    ] as const;
    const found = idleFindings(truss, members, everywhere, new Set([2]));
    expect(found.map(({ code, severity }) => [code, severity])).toEqual([
      ['slack-bar', 'note'],
      ['slack-bar', 'note'],
    ]);
    expect(found[0].message).toContain('1 bar carries nothing in any load case: bar 6');
    expect(found[0].members).toEqual(['g6']);
    expect(found[1].message).toContain('1 bar of bracing');
    expect(found[1].advice).toContain('imperfections');
  });
});
