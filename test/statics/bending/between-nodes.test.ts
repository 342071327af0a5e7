import { describe, expect, it } from 'vitest';
import { bendingBetweenNodes } from '../../../src/statics/bending/between-nodes.ts';
import { combine } from '../../../src/statics/solution/combine.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { caseOf, fix, trussOf } from '../support/trusses.ts';

/** Two supports 6 m apart, a bar between them, and nodes that the bar carries at these fractions of it. */
function beam(fractions: readonly number[]) {
  const carried = new Map(fractions.map((t, i) => [2 + i, { bar: 0, t }] as const));
  const truss = trussOf({
    points: [[0, 0, 0], [6, 0, 0], ...fractions.map((t) => [6 * t, 0, 0] as const)],
    bars: [[0, 1]],
    carried,
  });
  const supports = fix({ 0: 'xyz', 1: 'xyz' });
  return {
    truss,
    solve: (loads: Parameters<typeof caseOf>[0], name?: string) => {
      const asked = [caseOf(loads, name)];
      return solveCases(truss, supports, assessStability(truss, supports), asked).cases;
    },
  };
}

describe('the bending of a bar between its nodes', () => {
  it('is F a b / L of the load on a node that it carries', () => {
    const { truss, solve } = beam([1 / 3]);
    const found = bendingBetweenNodes(truss, solve([{ node: 2, force: [0, 0, -3000] }]), []);
    expect(found).toEqual([{ bar: 0, node: 2, moment: expect.closeTo((3000 * 2 * 4) / 6, 6), from: 'dead' }]);
  });

  it('is the sum of what several carried loads cause, and only of what acts across the bar', () => {
    const { truss, solve } = beam([1 / 3, 2 / 3]);
    const cases = solve([
      { node: 2, force: [700, 0, -3000] },
      { node: 3, force: [0, 0, -3000] },
    ]);
    // Two equal loads at the thirds of a simple beam: M = F L / 3.
    const [found] = bendingBetweenNodes(truss, cases, []);
    expect(found.moment).toBeCloseTo((3000 * 6) / 3, 6);
  });

  it('adds loads in two directions as vectors', () => {
    const { truss, solve } = beam([0.5]);
    const [found] = bendingBetweenNodes(truss, solve([{ node: 2, force: [0, 400, -300] }]), []);
    expect(found.moment).toBeCloseTo((500 * 6) / 4, 6);
  });

  it('is that of the worst combination, where there are any', () => {
    const { truss, solve } = beam([0.5]);
    const cases = [
      ...solve([{ node: 2, force: [0, 0, -1000] }], 'dead'),
      ...solve([{ node: 2, force: [0, 0, 4000] }], 'wind'),
    ];
    const rule = { line: 1, limit: 'strength' } as const;
    const combinations = combine(cases, [
      { ...rule, name: 'down', factors: { dead: 1.35 } },
      { ...rule, name: 'up', factors: { dead: 1, wind: 1.5 } },
    ]);
    const [found] = bendingBetweenNodes(truss, cases, combinations);
    expect(found).toMatchObject({ from: 'up', moment: expect.closeTo((5000 * 6) / 4, 6) });
  });

  it('counts what bars bring to the carried node, and what they in turn carry', () => {
    // A bar along y rests with one end on the middle of the beam and carries a load at its own middle.
    const truss = trussOf({
      points: [
        [0, 0, 0],
        [6, 0, 0],
        [3, 0, 0],
        [3, 4, 0],
        [3, 2, 0],
      ],
      bars: [
        [0, 1],
        [2, 3],
      ],
      carried: new Map([
        [2, { bar: 0, t: 0.5 }],
        [4, { bar: 1, t: 0.5 }],
      ]),
    });
    const supports = fix({ 0: 'xyz', 1: 'xyz', 3: 'xyz' });
    const loads = [{ node: 4, force: [0, 0, -2000] as const }];
    const { cases } = solveCases(truss, supports, assessStability(truss, supports), [caseOf(loads)]);
    expect(bendingBetweenNodes(truss, cases, []).map(({ bar, moment }) => [bar, moment])).toEqual([
      [0, expect.closeTo((1000 * 6) / 4, 6)],
      [1, expect.closeTo((2000 * 4) / 4, 6)],
    ]);
  });

  it('is none where nothing is carried or the case is refused', () => {
    const { truss, solve } = beam([]);
    expect(bendingBetweenNodes(truss, solve([{ node: 1, force: [0, 0, -1] }]), [])).toEqual([]);
    const carrying = beam([0.5]);
    const free = fix({ 0: 'xyz', 1: 'xy' });
    const load = caseOf([{ node: 2, force: [0, 0, -1000] }]);
    const { cases } = solveCases(carrying.truss, free, assessStability(carrying.truss, free), [load]);
    expect(cases[0].refused).not.toBeNull();
    expect(bendingBetweenNodes(carrying.truss, cases, [])).toEqual([]);
  });
});
