import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { alsoFlat, fix, randomTruss, trussOf } from '../support/trusses.ts';

describe('bars that cannot be lost', () => {
  test('are exactly those without which the truss has one mechanism more', () => {
    let some = 0;
    for (let seed = 1; seed <= 12; seed++) {
      const { truss, supports } = randomTruss(seed, (seed % 5) - 1);
      const judged = assessStability(truss, supports);
      if (judged.gap === null || judged.gap < 1e6) continue;
      const carrying = new Set(truss.nodes.flatMap(({ carriedBy }) => (carriedBy === null ? [] : [carriedBy.bar])));
      truss.bars.forEach((_, lost) => {
        // Without its bar a carried node would hang in the air.
        if (carrying.has(lost)) return;
        const nodes = truss.nodes.map((node) => ({
          ...node,
          carriedBy:
            node.carriedBy === null
              ? null
              : { ...node.carriedBy, bar: node.carriedBy.bar - (node.carriedBy.bar > lost ? 1 : 0) },
        }));
        const without = { ...truss, nodes, bars: truss.bars.filter((__, b) => b !== lost) };
        const again = assessStability(without, supports);
        if (again.nodes !== judged.nodes) return;
        expect(again.mechanisms - judged.mechanisms, `seed ${seed}, bar ${lost}`).toBe(
          judged.criticalBars!.includes(lost) ? 1 : 0,
        );
        some++;
      });
    }
    expect(some).toBeGreaterThan(50);
  });
});

describe('redundancy by part', () => {
  /** A square with both diagonals, and apart from it one with a single diagonal. */
  const points = [0, 5].flatMap((x): Vec3[] => [
    [x, 0, 0],
    [x + 1, 0, 0],
    [x + 1, 0, 1],
    [x, 0, 1],
  ]);
  const frame = [
    [0, 1],
    [1, 2],
    [2, 3],
    [3, 0],
    [0, 2],
  ] as const;
  const bars = [...frame, [1, 3] as const, ...frame.map(([a, b]) => [a + 4, b + 4] as const)];
  const supports = alsoFlat(fix({ 0: 'xz', 1: 'z', 4: 'xz', 5: 'z' }), 8, 'y');

  test('counts the states of each part and names the bars that cannot be lost: those of the part without any', () => {
    const judged = assessStability(trussOf({ points, bars }), supports);
    expect(judged.mechanisms).toBe(0);
    expect(judged.parts.map((part) => part.selfStressStates)).toEqual([1, 0]);
    expect(judged.criticalBars).toEqual([6, 7, 8, 9, 10]);
  });
});
