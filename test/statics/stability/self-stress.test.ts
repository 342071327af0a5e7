import { describe, expect, test } from 'vitest';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import { randomTruss } from '../support/trusses.ts';

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
