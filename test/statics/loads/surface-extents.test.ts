import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AreaRule, PlanPolygon } from '../../../src/brief/load-rule.ts';
import { add, cross, ORIGIN, type Vec3 } from '../../../src/domain/vector.ts';
import { buildCases } from '../../../src/statics/loads/build-cases.ts';
import { makeGrid, makeTruss } from '../../brief/make-truss.ts';

type Made = ReturnType<typeof makeTruss>;

const build = (made: Made, more: Partial<AreaRule> = {}) => {
  const rule: AreaRule = {
    kind: 'area',
    line: 7,
    pressure: 1000,
    over: [{ line: 7, level: [null, 1e6] }],
    acts: 'down',
    per: 'plan',
    ...more,
  };
  const { cases, asked, findings, coverage } = buildCases(made.truss, made.members, {
    cases: [{ line: 5, name: 'snow', nature: 'snow', loads: [rule] }],
  });
  const { loads } = cases[0];
  const sum = loads.reduce<Vec3>((total, { force }) => add(total, force), ORIGIN);
  const moment = loads.reduce<Vec3>(
    (total, { node, force }) => add(total, cross(made.truss.nodes[node].at, force)),
    ORIGIN,
  );
  return { loads, sum, moment, asked: asked[0], findings, coverage: coverage[0], refused: cases[0].incomplete };
};

const gridOf = (height: (x: number, y: number) => number = () => 6): Made => {
  const { at, runs } = makeGrid([0, 3, 6, 9, 12], [0, 5, 10], height);
  return makeTruss(at, runs);
};

/** Area and first moments of a polygon in plan: by its corners, without any cell. */
function integrals(polygon: PlanPolygon): { area: number; mx: number; my: number } {
  let [area, mx, my] = [0, 0, 0];
  polygon.forEach(([x, y], i) => {
    const [u, v] = polygon[(i + 1) % polygon.length];
    const twice = x * v - u * y;
    area += twice / 2;
    mx += (twice * (x + u)) / 6;
    my += (twice * (y + v)) / 6;
  });
  return area < 0 ? { area: -area, mx: -mx, my: -my } : { area, mx, my };
}

describe('an outline', () => {
  const inside = fc.tuple(
    fc.double({ min: 0.2, max: 11.8, noNaN: true }),
    fc.double({ min: 0.2, max: 9.8, noNaN: true }),
  );

  it('loads its own area, with force and moment as integrated over the polygon, cells or no cells', () => {
    const made = gridOf((x, y) => 6 + 0.1 * x - 0.05 * y);
    fc.assert(
      fc.property(fc.tuple(inside, inside, inside), (outline) => {
        const { area, mx, my } = integrals(outline);
        fc.pre(area > 0.5);
        const { sum, moment, asked, coverage, findings } = build(made, { outline });
        expect(sum[2]).toBeCloseTo(-1000 * area, 4);
        expect(moment[0]).toBeCloseTo(-1000 * my, 3);
        expect(moment[1]).toBeCloseTo(1000 * mx, 3);
        expect(asked.asked![2]).toBeCloseTo(asked.applied[2], 4);
        expect(coverage.planArea).toBeCloseTo(area, 6);
        expect(findings).toEqual([]);
      }),
      { numRuns: 100 },
    );
  });

  it('may have corners that turn inwards, and run either way round', () => {
    const outline: PlanPolygon = [
      [1, 1],
      [11, 1],
      [11, 9],
      [6, 3],
      [1, 9],
    ];
    const { area, mx, my } = integrals(outline);
    for (const one of [outline, outline.toReversed()]) {
      const { sum, moment } = build(gridOf(), { outline: one });
      expect(sum[2]).toBeCloseTo(-1000 * area, 6);
      expect(moment[0]).toBeCloseTo(-1000 * my, 5);
      expect(moment[1]).toBeCloseTo(1000 * mx, 5);
    }
  });

  it('beyond the nodes is said with both areas', () => {
    const { findings, coverage } = build(gridOf(), {
      outline: [
        [0, 0],
        [20, 0],
        [20, 10],
        [0, 10],
      ],
    });
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['surface-skipped', 'warning']]);
    expect(findings[0].message).toContain('200.0 m2');
    expect(coverage.planArea).toBeCloseTo(120, 9);
  });

  it('that crosses itself refuses the case', () => {
    const { refused, findings } = build(gridOf(), {
      outline: [
        [0, 0],
        [10, 8],
        [10, 0],
        [0, 8],
      ],
    });
    expect(refused).toContain('no simple polygon');
    expect(findings[0].code).toBe('no-load');
  });
});

describe('an opening', () => {
  it('takes its load off the corners of the cells it lies in, force and moment', () => {
    const opening: PlanPolygon = [
      [4, 2],
      [8, 2],
      [8, 7],
      [4, 7],
    ];
    const whole = build(gridOf());
    const { sum, moment, coverage } = build(gridOf(), { openings: [opening] });
    const { area, mx, my } = integrals(opening);
    expect(sum[2] - whole.sum[2]).toBeCloseTo(1000 * area, 6);
    expect(moment[0] - whole.moment[0]).toBeCloseTo(1000 * my, 5);
    expect(moment[1] - whole.moment[1]).toBeCloseTo(-1000 * mx, 5);
    expect(coverage.planArea).toBeCloseTo(100, 9);
  });

  it('keeps a symmetric roof symmetric', () => {
    const { loads } = build(gridOf(), {
      openings: [
        [
          [5, 4],
          [7, 4],
          [7, 6],
          [5, 6],
        ],
      ],
    });
    const at = (x: number, y: number) => {
      const made = gridOf();
      const node = made.truss.nodes.findIndex((one) => one.at[0] === x && one.at[1] === y);
      return loads.find((load) => load.node === node)!.force[2];
    };
    for (const [x, y] of [
      [3, 5],
      [6, 0],
      [3, 0],
    ]) {
      expect(at(x, y)).toBeCloseTo(at(12 - x, y), 8);
      expect(at(x, y)).toBeCloseTo(at(x, 10 - y), 8);
    }
  });
});

describe('an edge', () => {
  it('of a rectangular roof adds the strip all round, its corners to the corner nodes', () => {
    const { sum, loads, asked } = build(gridOf(), { edge: 0.5 });
    expect(sum[2]).toBeCloseTo(-1000 * 13 * 11, 6);
    // A quarter of a cell 3 x 5, half a strip along both sides and the corner itself.
    const corner = 3.75 + 0.5 * (1.5 + 2.5) + 0.25;
    expect(loads.find(({ node }) => node === 0)!.force[2]).toBeCloseTo(-1000 * corner, 6);
    expect(asked.asked![2]).toBeCloseTo(asked.applied[2], 6);
  });

  it('lies in the slope beside it: per slope and normal to it', () => {
    const made = gridOf((x) => 6 + x / 2);
    const slope = Math.hypot(1, 0.5);
    expect(build(made, { edge: 0.5, per: 'slope' }).sum[2]).toBeCloseTo(-1000 * 13 * 11 * slope, 6);
    const { sum } = build(made, { edge: 0.5, per: 'slope', acts: 'normal' });
    expect(sum[0]).toBeCloseTo(1000 * 13 * 11 * 0.5, 6);
    expect(sum[2]).toBeCloseTo(-1000 * 13 * 11, 6);
  });
});

describe('snow', () => {
  const ridge = () => {
    const { at, runs } = makeGrid(
      [0, 3, 6, 9, 12],
      [0, 5, 10],
      (x) => 10 - Math.abs(x - 6) * Math.tan((40 * Math.PI) / 180),
    );
    return makeTruss(at, runs);
  };
  const snow = (arrangement: 'undrifted' | 'half-left' | 'half-right', more = {}) =>
    build(ridge(), { pressure: 800, snow: { arrangement, left: null, guards: false, ...more } });
  // mu1 at 40 degrees is 0.8 x 20 / 30.
  const mu = (0.8 * 20) / 30;

  it('goes by the pitch and the plan area', () => {
    expect(snow('undrifted').sum[2]).toBeCloseTo(-800 * mu * 120, 6);
    expect(snow('undrifted', { guards: true }).sum[2]).toBeCloseTo(-800 * 0.8 * 120, 6);
    expect(snow('undrifted').asked.asked![2]).toBeCloseTo(-800 * mu * 120, 6);
  });

  it('half left has half of it on the slope that faces left, which is -x here; another way may count as left', () => {
    const { sum, moment } = snow('half-left');
    expect(sum[2]).toBeCloseTo(-800 * mu * 90, 6);
    // 60 m2 at x = 9 whole, 60 m2 at x = 3 half.
    expect(moment[1]).toBeCloseTo(800 * mu * (60 * 9 + 30 * 3), 5);
    expect(snow('half-right').moment[1]).toBeCloseTo(800 * mu * (30 * 9 + 60 * 3), 5);
    expect(snow('half-left', { left: [1, 0] }).moment[1]).toBeCloseTo(snow('half-right').moment[1], 6);
  });
});
