import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Carriage } from '../../../src/domain/truss.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { combine } from '../../../src/statics/solution/combine.ts';
import { envelope } from '../../../src/statics/solution/envelope.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { caseOf, fix, type RandomTruss, randomTruss, trussOf } from '../support/trusses.ts';

const TRIPOD: Vec3[] = [
  [0, 0, 0],
  [4, 0, 0],
  [0, 4, 0],
  [1, 1, 3],
];
const LEGS: [number, number][] = [
  [0, 3],
  [1, 3],
  [2, 3],
];
const FEET = fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz' });

describe('solving cases', () => {
  test('parts that nothing supports are set aside and get nulls, and the load on them is said and left out', () => {
    const truss = trussOf({
      points: [...TRIPOD, [9, 9, 0], [9, 9, 3]],
      bars: [...LEGS, [4, 5]],
    });
    const judged = assessStability(truss, FEET);
    expect(judged.setAside).toEqual([3]);
    expect([judged.nodes, judged.bars, judged.mechanisms, judged.freeBody]).toEqual([4, 3, 0, false]);
    const loads = [
      { node: 3, force: [0, 0, -6e3] },
      { node: 5, force: [0, 0, -1e3] },
    ] as const;
    const { cases, findings } = solveCases(truss, FEET, judged, [caseOf(loads)]);
    const one = cases[0]!;
    expect(one.axialForce[3]).toBeNull();
    expect(one.displacement.slice(4)).toEqual([null, null]);
    expect(one.loadSum).toEqual([0, 0, -6e3]);
    expect(findings.map(({ code, nodes }) => [code, nodes])).toEqual([['no-load', [5]]]);
    expect(findings[0]!.message).toContain('1.00 kN');
    expect(one.reactions.reduce((sum, r) => sum + r.force[2], 0)).toBeCloseTo(6e3, 6);
  });

  test('a case that could not be put on the truss whole is refused, the others are not', () => {
    const truss = trussOf({ points: TRIPOD, bars: LEGS });
    const load = caseOf([{ node: 3, force: [0, 0, -6e3] }]);
    const { cases } = solveCases(truss, FEET, assessStability(truss, FEET), [
      load,
      { ...load, name: 'snow', incomplete: 'line 9 of the brief: its nodes span no area' },
    ]);
    expect(cases[0]!.refused).toBeNull();
    expect(cases[1]!.refused).toContain('line 9 of the brief');
    expect(cases[1]!.axialForce).toEqual([null, null, null]);
  });

  test('a determinate truss with a bar without section keeps its forces and has no displacements', () => {
    const truss = trussOf({ points: TRIPOD, bars: LEGS, stiffness: [1e8, null, 1e8] });
    const whole = trussOf({ points: TRIPOD, bars: LEGS, stiffness: 3e7 });
    const load = [caseOf([{ node: 3, force: [1e3, 2e3, -6e3] }])];
    const one = solveCases(truss, FEET, assessStability(truss, FEET), load).cases[0]!;
    const other = solveCases(whole, FEET, assessStability(whole, FEET), load).cases[0]!;
    one.axialForce.forEach((force, b) => {
      expect(force).toBeCloseTo(other.axialForce[b]!, 6);
    });
    expect(one.displacement).toEqual([null, null, null, null]);
  });

  test('an indeterminate truss with a bar without section is refused by the name of the bar', () => {
    const bars: [number, number][] = [...LEGS, [4, 3]];
    const truss = trussOf({ points: [...TRIPOD, [4, 4, 0]], bars, stiffness: [1e8, 1e8, 1e8, null] });
    const supports = fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz', 4: 'xyz' });
    const judged = assessStability(truss, supports);
    expect(judged.selfStressStates).toBe(1);
    const { cases } = solveCases(truss, supports, judged, [caseOf([{ node: 3, force: [0, 0, -1e3] }])]);
    expect(cases[0]!.refused).toContain('bar 3 has no section');
  });

  test('a load on a carried node goes to the ends of its bar by the lever rule, through carriages on carriages too', () => {
    // A ridge between two tripods carries node 8 at a quarter; a bar from there to node 9 carries node 10 in its middle.
    const points: Vec3[] = [
      [0, -2, 0],
      [0, 2, 0],
      [-2, 0, 0],
      [8, -2, 0],
      [8, 2, 0],
      [10, 0, 0],
      [0, 0, 4],
      [8, 0, 4],
      [2, 0, 4],
      [6, 0, 4],
      [4, 0, 4],
    ];
    const bars: [number, number][] = [
      [0, 6],
      [1, 6],
      [2, 6],
      [3, 7],
      [4, 7],
      [5, 7],
      [6, 7],
      [8, 9],
    ];
    const carried = new Map<number, Carriage>([
      [8, { bar: 6, t: 0.25 }],
      [9, { bar: 6, t: 0.75 }],
      [10, { bar: 7, t: 0.25 }],
    ]);
    const supports = fix({ 0: 'xyz', 1: 'xyz', 2: 'xyz', 3: 'xyz', 4: 'xyz', 5: 'xyz' });
    const truss = trussOf({ points, bars, carried });
    const judged = assessStability(truss, supports);
    expect(judged.nodes).toBe(8);
    const one = solveCases(truss, supports, judged, [caseOf([{ node: 10, force: [0, 0, -8e3] }])]).cases[0]!;
    const uplift = (feet: number[]) =>
      one.reactions.filter((r) => feet.includes(r.node)).reduce((sum, r) => sum + r.force[2], 0);
    // 8 kN at x = 3 of 8.
    expect(uplift([0, 1, 2])).toBeCloseTo(5e3, 6);
    expect(uplift([3, 4, 5])).toBeCloseTo(3e3, 6);
    expect(one.residual!).toBeLessThan(1e-12);
    const [a, b] = [one.displacement[6]!, one.displacement[7]!];
    expect(one.displacement[8]![2]).toBeCloseTo(0.75 * a[2] + 0.25 * b[2], 12);
  });

  test('a support on a carried node takes its share', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [6, 0, 0],
      [2, 0, 0],
    ];
    const truss = trussOf({ points, bars: [[0, 1]], carried: new Map([[2, { bar: 0, t: 1 / 3 }]]) });
    const supports = fix({ 0: 'xyz', 1: 'y', 2: 'z' });
    const judged = assessStability(truss, supports);
    expect([judged.restraints, judged.mechanisms]).toEqual([5, 0]);
    const one = solveCases(truss, supports, judged, [caseOf([{ node: 1, force: [0, 0, -1e3] }])]).cases[0]!;
    expect(one.refused).toBeNull();
    expect(one.reactions.find((r) => r.node === 2)!.force[2]).toBeCloseTo(3e3, 9);
    expect(one.reactions.find((r) => r.node === 0)!.force[2]).toBeCloseTo(-2e3, 9);
    expect(one.residual!).toBeLessThan(1e-12);
  });

  test('restraints that repeat others are merged and both counts still hold', () => {
    const repeated = { ...FEET, restraints: [...FEET.restraints, { node: 0, direction: [0.6, 0.8, 0] as Vec3 }] };
    const judged = assessStability(trussOf({ points: TRIPOD, bars: LEGS }), repeated);
    expect([judged.restraints, judged.rank, judged.mechanisms, judged.selfStressStates]).toEqual([9, 3, 0, 0]);
  });

  test('combinations are sums of cases and refused with a refused case, the envelope keeps the extremes', () => {
    const truss = trussOf({ points: TRIPOD, bars: LEGS });
    const judged = assessStability(truss, FEET);
    const solved = solveCases(truss, FEET, judged, [
      caseOf([{ node: 3, force: [0, 0, -6e3] }], 'dead'),
      caseOf([{ node: 3, force: [0, 0, 10e3] }], 'wind'),
    ]).cases;
    const rule = (name: string, factors: Record<string, number>) => ({
      line: 1,
      name,
      limit: 'strength' as const,
      factors,
    });
    const sums = combine(solved, [rule('down', { dead: 1.35 }), rule('up', { dead: 1, wind: 1.5 })]);
    expect(sums[1]!.axialForce[0]).toBeCloseTo(solved[0]!.axialForce[0]! + 1.5 * solved[1]!.axialForce[0]!, 9);
    expect(sums[1]!.reactions.reduce((sum, r) => sum + r.force[2], 0)).toBeCloseTo(-9e3, 6);
    const [leg] = envelope(truss, solved, sums);
    expect(leg!.compression!.from).toBe('down');
    expect(leg!.tension!.from).toBe('up');
    const refused = combine([solved[0]!, { ...solved[1]!, refused: 'it moves' }], [rule('up', { dead: 1, wind: 1.5 })]);
    expect(refused[0]!.refused).toContain('wind');
    expect(refused[0]!.axialForce).toEqual([null, null, null]);
    expect(envelope(truss, solved, refused)).toEqual(
      truss.bars.map((_, bar) => ({ bar, tension: null, compression: null })),
    );
  });
});

describe('numbering', () => {
  test('renumbering the nodes changes neither counts nor forces', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 5000 }), fc.integer({ min: 1, max: 5000 }), (seed, shuffle) => {
        const random = randomTruss(seed, 2);
        const turned = renumber(random, shuffle);
        const judged = assessStability(random.truss, random.supports);
        const again = assessStability(turned.truss, turned.supports);
        if (judged.gap === null || again.gap === null) return;
        expect(again.mechanisms).toBe(judged.mechanisms);
        expect(again.selfStressStates).toBe(judged.selfStressStates);
        if (judged.gap < 1e9 || judged.mechanisms > 0) return;
        const first = solveCases(random.truss, random.supports, judged, random.cases).cases;
        const second = solveCases(turned.truss, turned.supports, again, turned.cases).cases;
        first.forEach((one, c) => {
          const scale = Math.max(1, ...one.axialForce.map((v) => Math.abs(v ?? 0)));
          one.axialForce.forEach((force, b) => {
            expect(Math.abs(force! - second[c]!.axialForce[b]!) / scale).toBeLessThan(1e-8);
          });
        });
      }),
      { numRuns: 60, seed: 1 },
    );
  });
});

function renumber({ truss, supports, cases }: RandomTruss, shuffle: number): RandomTruss {
  const count = truss.nodes.length;
  // A stride that is prime to the count visits every number once.
  const step =
    [1, 3, 5, 7, 11, 13, 17]
      .map((p) => p + (shuffle % 19) * count)
      .find((p) => count % p !== 0 && gcd(p, count) === 1) ?? 1;
  const to = truss.nodes.map((_, i) => (i * step + shuffle) % count);
  const nodes = [...truss.nodes];
  truss.nodes.forEach((node, i) => {
    nodes[to[i]!] = node;
  });
  const moved = <T extends { readonly node: number }>(one: T): T => ({ ...one, node: to[one.node]! });
  return {
    truss: { ...truss, nodes, bars: truss.bars.map((bar) => ({ ...bar, from: to[bar.from]!, to: to[bar.to]! })) },
    supports: { restraints: supports.restraints.map(moved), springs: supports.springs.map(moved) },
    cases: cases.map((one) => ({ ...one, loads: one.loads.map(moved) })),
  };
}

const gcd = (a: number, b: number): number => (b === 0 ? a : gcd(b, a % b));
