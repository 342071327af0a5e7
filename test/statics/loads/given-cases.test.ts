import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { add, along, between, cross, ORIGIN, scale, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import type { GivenLoad } from '../../../src/importer/given.ts';
import { buildGivenCases } from '../../../src/statics/loads/given-cases.ts';
import { makeTruss } from '../../brief/make-truss.ts';

/** A member from (0, 0, 0) over (3, 0, 0) to (9, 0, 0), and a post on the middle node. */
const made = makeTruss(
  [
    [0, 0, 0],
    [3, 0, 0],
    [9, 0, 0],
    [3, 0, 4],
  ],
  [
    { nodes: [0, 1, 2], member: { globalId: 'chord' } },
    { nodes: [1, 3], member: { globalId: 'post' } },
  ],
);

const build = (...loads: GivenLoad[]) =>
  buildGivenCases(made.truss, made.members, [{ name: 'dead', nature: 'permanent', loads }]);

const line = (from: number, to: number, forceFrom: Vec3, forceTo: Vec3, globalId = 'chord'): GivenLoad => ({
  kind: 'line',
  globalId,
  from: [from, 0, 0],
  to: [to, 0, 0],
  forceFrom,
  forceTo,
});

const at = (node: number, result: ReturnType<typeof build>): Vec3 =>
  result.cases[0].loads.find((load) => load.node === node)?.force ?? ORIGIN;

describe('a force that the model gives', () => {
  it('goes to the node within a millimetre of its point', () => {
    const result = build({ kind: 'point', at: [3.0004, 0, 3.9995], force: [1, 2, 3] });
    expect(result.cases[0]).toEqual({ name: 'dead', nature: 'permanent', loads: [{ node: 3, force: [1, 2, 3] }] });
    expect(result.findings).toEqual([]);
  });

  it('on a bar goes to its ends by the lever rule, and its bending is said', () => {
    const result = build({ kind: 'point', at: [5, 0, 0], force: [0, 0, -30] });
    expect(at(1, result)[2]).toBeCloseTo(-20, 12);
    expect(at(2, result)[2]).toBeCloseTo(-10, 12);
    expect(result.findings.map(({ code }) => code)).toEqual(['bends-between-nodes']);
  });

  it('on nothing is not put, which is said', () => {
    const result = build({ kind: 'point', at: [5, 1, 0], force: [0, 0, -30] });
    expect(result.cases[0].loads).toEqual([]);
    expect(result.findings).toMatchObject([{ code: 'no-load', at: [5, 1, 0] }]);
  });
});

describe('a line load that the model gives', () => {
  it('is shared bar by bar like that of a simply supported beam', () => {
    // 10 N/m on 3 m and on 6 m: 15 N to the first node, 15 + 30 to the middle, 30 to the last.
    const result = build(line(0, 9, [0, 0, -10], [0, 0, -10]));
    expect([0, 1, 2].map((node) => at(node, result)[2])).toEqual([-15, -45, -30].map((f) => expect.closeTo(f, 9)));
    expect(result.findings).toEqual([]);
  });

  it('that grows from nothing gives a third to the start and two thirds to the end', () => {
    const result = build(line(3, 9, [0, 0, 0], [0, 0, -12]));
    expect(at(1, result)[2]).toBeCloseTo(-12, 9);
    expect(at(2, result)[2]).toBeCloseTo(-24, 9);
  });

  it('keeps its force and moment, wherever it begins and ends and whichever way it is drawn', () => {
    const ordinate = fc.double({ min: -50, max: 50, noNaN: true });
    const place = fc.double({ min: 0, max: 9, noNaN: true });
    const force = fc.tuple(ordinate, ordinate, ordinate);
    fc.assert(
      fc.property(place, place, force, force, (from, to, q1, q2) => {
        fc.pre(Math.abs(to - from) > 0.01);
        const { loads } = build(line(from, to, q1, q2)).cases[0];
        const put = loads.reduce<Vec3>((sum, load) => add(sum, load.force), ORIGIN);
        const turn = loads.reduce<Vec3>(
          (sum, load) => add(sum, cross(made.truss.nodes[load.node].at, load.force)),
          ORIGIN,
        );
        // Gauss: two points integrate a product of two linear functions without error.
        const half = Math.abs(to - from) / 2;
        let [sum, moment]: [Vec3, Vec3] = [ORIGIN, ORIGIN];
        for (const t of [0.5 - 0.5 / Math.sqrt(3), 0.5 + 0.5 / Math.sqrt(3)]) {
          const f = scale(between(q1, q2, t), half);
          sum = add(sum, f);
          moment = add(moment, cross([from + t * (to - from), 0, 0], f));
        }
        for (const i of [0, 1, 2] as const) {
          expect(Math.abs(put[i] - sum[i])).toBeLessThan(1e-9);
          expect(Math.abs(turn[i] - moment[i])).toBeLessThan(1e-8);
        }
      }),
    );
  });

  it('on a member that is not in the truss, or beyond its bars, is said to be lost', () => {
    expect(build(line(0, 9, [0, 0, -1], [0, 0, -1], 'other')).findings).toMatchObject([
      { code: 'no-load', members: ['other'] },
    ]);
    const partly = build(line(6, 12, [0, 0, -1], [0, 0, -1]));
    expect(at(2, partly)[2]).toBeLessThan(0);
    expect(partly.findings).toMatchObject([{ code: 'no-load', members: ['chord'] }]);
  });
});

describe('self weight that the model gives', () => {
  it('acts along its vector', () => {
    // 10 kg/m, 13 m of bars.
    const direction = unit([1, 0, -2]) as Vec3;
    const result = build({ kind: 'selfWeight', factors: scale(direction, 1.5) });
    const put = result.cases[0].loads.reduce<Vec3>((sum, load) => add(sum, load.force), ORIGIN);
    const off = subtract(put, along(ORIGIN, direction, 1.5 * 130 * 9.80665));
    expect(Math.hypot(...off)).toBeLessThan(1e-9);
  });
});

it('a case of the model without loads is said to be empty', () => {
  expect(build().findings).toMatchObject([
    { code: 'no-load', message: "The model's case dead puts no load on the truss." },
  ]);
});
