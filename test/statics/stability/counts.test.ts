import { describe, expect, test } from 'vitest';
import { distance } from '../../../src/domain/vector.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { Restraint } from '../../../src/statics/types.ts';
import { checkJudgement } from '../support/check-judgement.ts';
import { denseMechanisms } from '../support/dense.ts';
import { randomTruss } from '../support/trusses.ts';

describe('counts of random trusses', () => {
  const seeds = Array.from({ length: 500 }, (_, i) => i + 1);

  test('mechanisms equal those of a dense singular value decomposition wherever both have a clear gap', () => {
    let compared = 0;
    let moving = 0;
    for (const seed of seeds) {
      const { truss, supports } = randomTruss(seed, (seed % 7) - 4);
      const dense = denseMechanisms(truss, supports);
      const judged = assessStability(truss, supports);
      if (dense.gap < 1e3 || judged.gap === null) {
        expect(
          judged.findings.map(({ code }) => code),
          `seed ${seed}`,
        ).toContain('nearly-moves');
        continue;
      }
      expect(judged.mechanisms, `seed ${seed}`).toBe(dense.mechanisms);
      checkJudgement(truss, supports, judged);
      compared++;
      if (dense.mechanisms > 0) moving++;
    }
    expect(compared).toBeGreaterThan(490);
    expect(moving).toBeGreaterThan(150);
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

  test('with every bar that is proposed put in, and the rest held, nothing moves, and each alone takes one mechanism away', () => {
    let put = 0;
    for (const seed of seeds.slice(0, 60)) {
      const { truss, supports } = randomTruss(seed, -1 - (seed % 3));
      const judged = assessStability(truss, supports);
      if (judged.gap === null) continue;
      const barsOf = (modes: typeof judged.modes) =>
        modes.flatMap(({ otherRemedy }) => otherRemedy.flatMap((r) => ('bar' in r ? [r.bar] : [])));
      const braced = (bars: ReturnType<typeof barsOf>) => ({
        ...truss,
        bars: [
          ...truss.bars,
          ...bars.map(([from, to]) => ({
            ...truss.bars[0],
            from,
            to,
            length: distance(truss.nodes[from].at, truss.nodes[to].at),
          })),
        ],
      });
      const others = judged.modes
        .filter(({ otherRemedy }) => otherRemedy.length === 0)
        .flatMap((mode) => mode.remedy.filter((r): r is Restraint => 'node' in r));
      const bars = barsOf(judged.modes);
      const held = { ...supports, restraints: [...supports.restraints, ...others] };
      expect(assessStability(braced(bars), held).mechanisms, `seed ${seed}`).toBe(0);
      for (const bar of bars)
        expect(assessStability(braced([bar]), supports).mechanisms, `seed ${seed}`).toBe(judged.mechanisms - 1);
      put += bars.length;
    }
    expect(put).toBeGreaterThan(60);
  });
});
