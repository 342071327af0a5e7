import { describe, expect, test } from 'vitest';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { Restraint } from '../../../src/statics/types.ts';
import { checkJudgement } from '../support/check-judgement.ts';
import { denseMechanisms } from '../support/dense.ts';
import { randomTruss } from '../support/trusses.ts';

describe('counts of random trusses', () => {
  const seeds = Array.from({ length: 500 }, (_, i) => i + 1);

  test('mechanisms equal those of a dense singular value decomposition wherever it has a clear gap', () => {
    let compared = 0;
    let moving = 0;
    for (const seed of seeds) {
      const { truss, supports } = randomTruss(seed, (seed % 7) - 4);
      const dense = denseMechanisms(truss, supports);
      if (!dense.clear) continue;
      const judged = assessStability(truss, supports);
      expect(judged.mechanisms, `seed ${seed}`).toBe(dense.mechanisms);
      expect(judged.gap, `seed ${seed}`).toBeGreaterThan(1e3);
      checkJudgement(truss, supports, judged);
      compared++;
      if (dense.mechanisms > 0) moving++;
    }
    expect(compared).toBeGreaterThan(330);
    expect(moving).toBeGreaterThan(100);
  });

  test('with every remedy of the modes applied nothing moves, and each alone takes one mechanism away', () => {
    for (const seed of seeds.slice(0, 40)) {
      const { truss, supports } = randomTruss(seed, -2);
      const judged = assessStability(truss, supports);
      const remedies = judged.modes.flatMap((mode) => mode.remedy.filter((r): r is Restraint => 'node' in r));
      expect(remedies.length).toBe(judged.mechanisms);
      const held = assessStability(truss, { ...supports, restraints: [...supports.restraints, ...remedies] });
      expect(held.mechanisms, `seed ${seed}`).toBe(0);
      for (const remedy of remedies) {
        const one = assessStability(truss, { ...supports, restraints: [...supports.restraints, remedy] });
        expect(one.mechanisms, `seed ${seed}`).toBe(judged.mechanisms - 1);
      }
    }
  });
});
