import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { graphOf } from '../../../src/statics/engine/graph.ts';
import { nestedDissection } from '../../../src/statics/engine/nested-dissection.ts';
import { Separator } from '../../../src/statics/engine/separator.ts';

const randomGraph = fc
  .integer({ min: 1, max: 60 })
  .chain((count) =>
    fc.record({
      count: fc.constant(count),
      edges: fc.array(fc.tuple(fc.nat(count - 1), fc.nat(count - 1)), { maxLength: 150 }),
    }),
  )
  .map(({ count, edges }) => graphOf(count, edges.filter(([a, b]) => a !== b).flat()));

/** Cells of a square grid, each joined to its right and lower neighbour. */
function squareGrid(side: number) {
  const ends: number[] = [];
  for (let i = 0; i < side; i++)
    for (let j = 0; j < side; j++) {
      if (i + 1 < side) ends.push(side * i + j, side * (i + 1) + j);
      if (j + 1 < side) ends.push(side * i + j, side * i + j + 1);
    }
  return graphOf(side * side, ends);
}

describe('separators', () => {
  test('the pieces of any graph keep all their blocks and do not touch each other', () => {
    fc.assert(
      fc.property(randomGraph, (graph) => {
        const order = Int32Array.from({ length: graph.count }, (_, i) => i);
        const sizes = new Separator(graph).part(order, 0, graph.count);
        expect([...order].sort((a, b) => a - b)).toEqual([...order.keys()]);
        const pieceOf = new Map<number, number>();
        let at = 0;
        sizes.forEach((size, piece) => {
          for (let k = 0; k < size; k++) pieceOf.set(order[at++], piece);
        });
        for (const [i, piece] of pieceOf)
          for (let p = graph.start[i]; p < graph.start[i + 1]; p++)
            expect(pieceOf.get(graph.neighbour[p]) ?? piece).toBe(piece);
      }),
      { numRuns: 300 },
    );
  });

  test('a square grid is cut into halves by no more than one row', () => {
    for (const side of [8, 21, 40]) {
      const graph = squareGrid(side);
      const order = Int32Array.from({ length: graph.count }, (_, i) => i);
      const [first, second] = new Separator(graph).part(order, 0, graph.count);
      expect(graph.count - first - second).toBeLessThanOrEqual(side);
      expect(Math.min(first, second)).toBeGreaterThan(0.3 * graph.count);
    }
  });

  test('many blocks that nothing couples are ordered in one go', () => {
    const order = nestedDissection(graphOf(20_000, [0, 1]));
    expect(new Set(order).size).toBe(20_000);
  });
});
