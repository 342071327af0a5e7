import { describe, expect, it } from 'vitest';
import { resolveHolds } from '../../src/brief/holds.ts';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import type { Vec3 } from '../../src/domain/vector.ts';
import { makeTruss } from './make-truss.ts';

/** Two flat trusses, the second turned by 30 degrees in plan, and a purlin between their tops. */
function twoTrusses(lift = 0) {
  const at: Vec3[] = [];
  const runs: Parameters<typeof makeTruss>[1][number][] = [];
  for (const [name, angle, y] of [
    ['Truss 1', 0, 0],
    ['Truss 2', Math.PI / 6, 5],
  ] as const) {
    const first = at.length;
    const point = (x: number, z: number, off = 0): Vec3 => [
      x * Math.cos(angle) - off * Math.sin(angle),
      y + x * Math.sin(angle) + off * Math.cos(angle),
      z,
    ];
    at.push(point(0, 0), point(4, 0), point(8, 0), point(2, 2), point(6, 2, lift));
    const member = { assembly: name };
    for (const nodes of [
      [0, 1, 2],
      [3, 4],
      [0, 3],
      [3, 1],
      [1, 4],
      [4, 2],
    ])
      runs.push({ nodes: nodes.map((n) => first + n), member: { ...member, name: nodes.length === 3 ? 'BC' : 'web' } });
  }
  runs.push({ nodes: [3, 8], member: { name: 'purlin' } });
  return makeTruss(at, runs);
}

const rulesOf = (holds: string) => parseBrief(`pinwright: 1\nholds:\n  - ${holds}\n`, 'brief.yaml').holds;
const resolve = (holds: string, lift = 0) => {
  const { truss, members } = twoTrusses(lift);
  return resolveHolds(truss, members, rulesOf(holds));
};

describe('holds', () => {
  it('across act at right angles to the plane of each truss, at the nodes that both selectors catch', () => {
    const { holds, findings } = resolve(
      '{on: {assembly: "Truss *"}, nodes: {level: [1.9, 2.1]}, across: true, because: roof sheeting}',
    );
    expect(findings).toEqual([]);
    expect(holds.map(({ node }) => node)).toEqual([3, 4, 8, 9]);
    expect(holds[0]).toEqual({ node: 3, direction: [0, 1, 0], because: 'roof sheeting' });
    const [x, y, z] = holds[2].direction;
    expect([Math.abs(x), Math.abs(y), z].map((v) => Number(v.toFixed(6)))).toEqual([0.5, 0.866025, 0]);
  });

  it('take the plane of the whole truss where they name one chord of it', () => {
    const { holds } = resolve('{on: {name: BC}, across: true, because: ceiling}');
    expect(holds.map(({ node }) => node)).toEqual([0, 1, 2, 5, 6, 7]);
    expect(holds[1].direction).toEqual([0, 1, 0]);
  });

  it('along a vector need no plane', () => {
    const { holds } = resolve('{nodes: {near: [2, 0, 2], within: 50 mm}, along: [0, 3, 0], because: a wall}');
    expect(holds).toEqual([{ node: 3, direction: [0, 1, 0], because: 'a wall' }]);
  });

  it('say where they hold nothing, and where there is no plane to be across of', () => {
    expect(resolve('{on: {name: Q*}, across: true, because: x}').findings[0].message).toContain('holds no node');
    expect(resolve('{on: {name: purlin}, across: true, because: x}').findings[0].message).toContain('one plane');
    const { holds, findings } = resolve('{on: {assembly: "Truss 1"}, across: true, because: x}', 1.5);
    expect(holds).toEqual([]);
    expect(findings[0]).toMatchObject({ code: 'selector-empty' });
    expect(findings[0].message).toContain('line 3');
  });

  it.each([
    ['{nodes: {top: true}, because: x}', 'a hold needs "across: true"'],
    ['{nodes: {top: true}, across: true, along: [0, 1, 0], because: x}', 'one of them'],
    ['{nodes: {top: true}, along: [0, 0, 0], because: x}', 'no length'],
    ['{across: true, because: x}', 'a hold needs "on" or "nodes"'],
    ['{nodes: {top: true}, across: true}', 'because'],
  ])('written wrong (%s) are refused', (written, message) => {
    expect(() => rulesOf(written)).toThrow(message);
  });
});
