import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { orthonormalSpan } from '../../src/brief/held-directions.ts';
import { resolveGivenSupports, resolveSupports } from '../../src/brief/supports.ts';
import type { SupportRule } from '../../src/brief/types.ts';
import { dot, unit, type Vec3 } from '../../src/domain/vector.ts';
import type { Supports } from '../../src/statics/types.ts';
import { makeTruss } from './make-truss.ts';

const X: Vec3 = [1, 0, 0];
const Y: Vec3 = [0, 1, 0];
const Z: Vec3 = [0, 0, 1];
const { truss, members } = makeTruss(
  [
    [0, 0, 0],
    [6, 0, 0],
    [3, 0, 2],
  ],
  [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
);
const at = (near: Vec3) => [{ line: 9, near, within: 0.05 }];
const resolve = (...rules: Omit<SupportRule, 'line'>[]) =>
  resolveSupports(truss, members, { supports: rules.map((rule, i) => ({ line: i + 1, ...rule })) });

describe('supports', () => {
  it('have the shape that the solver takes', () => {
    const supports: Supports = resolve().supports;
    expect(supports).toEqual({ restraints: [], springs: [] });
  });

  it('add up on one node, each direction once, whatever the order of the rules', () => {
    const rules = [
      { at: [{ line: 1, lowest: true }], fix: [Z], springs: [] },
      { at: at([0, 0, 0]), fix: [X, Z, unit([1, 1, 0])!], springs: [] },
    ];
    const expected = [X, Y, Z].map((direction) => ({ node: 0, direction })).concat({ node: 1, direction: Z });
    expect(resolve(...rules).supports.restraints).toEqual(expected);
    expect(resolve(...rules.toReversed()).supports.restraints).toEqual(expected);
  });

  it('let a fixed direction beat a spring along it, and keep the rest of an oblique spring', () => {
    const { springs } = resolve(
      {
        at: at([0, 0, 0]),
        fix: [Z],
        springs: [
          { direction: Z, stiffness: 1e6 },
          { direction: X, stiffness: 2e6 },
        ],
      },
      { at: at([0, 0, 0]), fix: [], springs: [{ direction: X, stiffness: 3e6 }] },
      { at: at([6, 0, 0]), fix: [unit([1, 0, 1])!], springs: [{ direction: X, stiffness: 4e6 }] },
    ).supports;
    expect(springs).toHaveLength(2);
    expect(springs[0]).toEqual({ node: 0, direction: X, stiffness: 5e6 });
    expect(springs[1]!.node).toBe(1);
    expect(springs[1]!.stiffness).toBeCloseTo(2e6, 3);
    expect(Math.abs(dot(springs[1]!.direction, unit([1, 0, -1])!))).toBeCloseTo(1, 12);
  });

  it('warn of a selector that catches no node, naming its line', () => {
    const { findings } = resolve({ at: [...at([0, 0, 0]), { line: 12, level: [9, null] }], fix: [Z], springs: [] });
    expect(findings.map(({ code, message }) => [code, message])).toEqual([
      ['selector-empty', 'Line 12 of the brief: no node is caught by {level: [9, null]}.'],
    ]);
  });

  it('hold orthonormal directions that span what was asked', () => {
    const vector = fc.tuple(
      fc.integer({ min: -3, max: 3 }),
      fc.integer({ min: -3, max: 3 }),
      fc.integer({ min: -3, max: 3 }),
    );
    fc.assert(
      fc.property(fc.array(vector, { maxLength: 6 }), (given) => {
        const asked = given.map((v) => unit(v)).filter((v) => v !== null);
        const span = orthonormalSpan(asked);
        span.forEach((a, i) => {
          for (const [j, b] of span.entries()) expect(dot(a, b)).toBeCloseTo(i === j ? 1 : 0, 9);
        });
        for (const direction of asked) {
          expect(span.reduce((sum, axis) => sum + dot(axis, direction) ** 2, 0)).toBeCloseTo(1, 9);
        }
      }),
    );
  });
});

describe('supports that the model gives', () => {
  const given = (point: Vec3, fix: readonly Vec3[], name = 'foot') => ({
    globalId: name,
    name,
    at: point,
    fix,
    springs: [],
  });

  it('stand on the node within a millimetre of their point, and add up', () => {
    const { supports, findings } = resolveGivenSupports(truss, [
      given([6.0005, 0, 0], [Z]),
      given([6, 0, 0.0005], [X]),
      given([0, 0, 0], [Y]),
    ]);
    expect(supports.restraints).toEqual([
      { node: 0, direction: Y },
      { node: 1, direction: X },
      { node: 1, direction: Z },
    ]);
    expect(findings).toEqual([]);
  });

  it('that meet no node hold nothing, which is said', () => {
    const { supports, findings } = resolveGivenSupports(truss, [given([1, 0, 0], [Z], 'lost')]);
    expect(supports.restraints).toEqual([]);
    expect(findings).toMatchObject([{ code: 'selector-empty', members: ['lost'], at: [1, 0, 0] }]);
  });
});
