import { describe, expect, it } from 'vitest';
import { selectNodes } from '../../../src/brief/selectors/select-nodes.ts';
import type { NodeSelector } from '../../../src/brief/types.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { makeGrid, makeTruss, type Run } from '../make-truss.ts';

const select = (made: ReturnType<typeof makeTruss>, selector: Omit<NodeSelector, 'line'>): number[] =>
  selectNodes(made.truss, made.members, [{ line: 1, ...selector }]);

/** A square-on-square double layer grid: `n` cells of 3 m a side on top, the bottom layer half a cell in, 2 m below. */
function makeDoubleLayer(n: number) {
  const at: Vec3[] = [];
  const runs: [number, number][] = [];
  const top = (i: number, j: number): number => j * (n + 1) + i;
  const bottom = (i: number, j: number): number => (n + 1) ** 2 + j * n + i;
  for (let j = 0; j <= n; j++) for (let i = 0; i <= n; i++) at.push([3 * i, 3 * j, 2]);
  for (let j = 0; j < n; j++) for (let i = 0; i < n; i++) at.push([3 * i + 1.5, 3 * j + 1.5, 0]);
  for (let j = 0; j <= n; j++) {
    for (let i = 0; i <= n; i++) {
      if (i < n) runs.push([top(i, j), top(i + 1, j)]);
      if (j < n) runs.push([top(i, j), top(i, j + 1)]);
    }
  }
  for (let j = 0; j < n; j++) {
    for (let i = 0; i < n; i++) {
      if (i + 1 < n) runs.push([bottom(i, j), bottom(i + 1, j)]);
      if (j + 1 < n) runs.push([bottom(i, j), bottom(i, j + 1)]);
      for (const [a, b] of [
        [i, j],
        [i + 1, j],
        [i, j + 1],
        [i + 1, j + 1],
      ] as const)
        runs.push([bottom(i, j), top(a, b)]);
    }
  }
  return { ...makeTruss(at, runs), topCount: (n + 1) ** 2 };
}

describe('a node selector', () => {
  const line = makeTruss(
    [
      [0, 0, 0],
      [3, 0, 0.009],
      [6, 0, 4],
    ],
    [
      [0, 1],
      [1, 2],
    ],
  );

  it('takes nodes near a point, the distance itself included', () => {
    expect(select(line, { near: [3, 0.05, 0.009], within: 0.05 })).toEqual([1]);
    expect(select(line, { near: [3, 0.06, 0.009], within: 0.05 })).toEqual([]);
  });

  it('takes what is within 10 mm of the lowest and the highest node', () => {
    expect(select(line, { lowest: true })).toEqual([0, 1]);
    expect(select(line, { lowest: false })).toEqual([2]);
    expect(select(line, { highest: true })).toEqual([2]);
  });

  it('takes levels, open at either end', () => {
    expect(select(line, { level: [1, null] })).toEqual([2]);
    expect(select(line, { level: [null, 0] })).toEqual([0]);
    expect(select(line, { not: { line: 1, level: [null, 0] } })).toEqual([1, 2]);
  });

  it('tells the ends of a member from the nodes it passes through and those it carries', () => {
    const chord: Run = { nodes: [0, 1, 2], carried: [{ node: 3, t: 0.5 }], member: { name: 'chord' } };
    const made = makeTruss(
      [
        [0, 0, 0],
        [3, 0, 0],
        [6, 0, 0],
        [1.5, 0, 0],
        [1.5, 3, 0],
      ],
      [chord, { nodes: [3, 4], member: { name: 'purlin' } }],
    );
    const named = (name: string) => [{ line: 1, name }];
    expect(select(made, { endOf: named('chord') })).toEqual([0, 2]);
    expect(select(made, { joins: named('chord') })).toEqual([0, 1, 2, 3]);
    expect(select(made, { endOf: named('purlin') })).toEqual([3, 4]);
    expect(select(made, { joins: named('chord'), endOf: named('purlin') })).toEqual([3]);
    expect(select(made, { endOf: named('nobody') })).toEqual([]);
  });

  it('gives each of two spliced members its own end of their common bar', () => {
    const made = makeTruss(
      [
        [0, 0, 0],
        [6, 0, 0],
      ],
      [[0, 1]],
    );
    const truss = {
      ...made.truss,
      nodes: made.truss.nodes.map((node, i) => ({ ...node, members: [i] })),
      bars: [{ ...made.truss.bars[0], members: [0, 1] }],
    };
    const members = ['left', 'right'].map((name) => ({ ...made.members[0], name }));
    for (const key of ['endOf', 'joins']) {
      expect(selectNodes(truss, members, [{ line: 1, [key]: [{ line: 1, name: 'right' }] }])).toEqual([1]);
    }
  });
});

describe('top', () => {
  it('is every node of the upper layer of a double layer grid and no other', () => {
    const grid = makeDoubleLayer(30);
    expect(grid.truss.nodes).toHaveLength(31 ** 2 + 30 ** 2);
    expect(select(grid, { top: true })).toEqual(Array.from({ length: grid.topCount }, (_, i) => i));
  });

  it('leaves out nodes below a chord, a post and a triangle, and takes the rest', () => {
    const at: Vec3[] = [
      [0, 0, 3],
      [6, 0, 3],
      [3, 6, 3],
      [3, 0, 0],
      [0, 0, 0],
      [3, 2, 0],
      [3, -1, 0],
    ];
    const made = makeTruss(at, [
      [0, 1],
      [1, 2],
      [2, 0],
      [3, 0],
      [3, 1],
      [4, 0],
      [5, 3],
      [6, 3],
    ]);
    // 3 lies under the bar 0-1, 4 under 0 at the foot of a post, 5 under the triangle; 6 is outside of all.
    expect(select(made, { top: true })).toEqual([0, 1, 2, 6]);
  });

  it('counts a bar that passes within a joint beside the vertical line, and nothing beyond', () => {
    const at = (y: number): Vec3[] => [
      [0, 0, 3],
      [6, 0, 3],
      [3, y, 0],
    ];
    expect(select(makeTruss(at(0.04), [[0, 1]]), { top: true })).toEqual([0, 1]);
    expect(select(makeTruss(at(0.06), [[0, 1]]), { top: true })).toEqual([0, 1, 2]);
  });

  it('sees a quadrilateral closed by the pieces of bars between the nodes they carry', () => {
    const at: Vec3[] = [
      [0, 0, 3],
      [9, 0, 3],
      [0, 6, 3],
      [9, 6, 3],
      [3, 0, 3],
      [6, 0, 3],
      [3, 6, 3],
      [6, 6, 3],
      [4.5, 3, 0],
    ];
    const carried = (a: number, b: number) => [
      { node: a, t: 1 / 3 },
      { node: b, t: 2 / 3 },
    ];
    const made = makeTruss(at, [
      { nodes: [0, 1], carried: carried(4, 5) },
      { nodes: [2, 3], carried: carried(6, 7) },
      [4, 6],
      [5, 7],
    ]);
    expect(select(made, { top: true })).toEqual([0, 1, 2, 3, 4, 5, 6, 7]);
  });

  it('takes all nodes of a pitched roof surface', () => {
    const { at, runs } = makeGrid([0, 3, 6, 9, 12], [0, 6, 12], (x) => 6 - Math.abs(x - 6) / 2);
    expect(select(makeTruss(at, runs), { top: true })).toHaveLength(15);
  });
});
