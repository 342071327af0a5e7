import { execFileSync, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { solveCases } from '../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../src/statics/stability/assess-stability.ts';
import { type RandomTruss, randomTruss } from '../statics/support/trusses.ts';

const program = fileURLToPath(new URL('../statics/support/scipy-solve.py', import.meta.url));
const hasScipy = spawnSync('python3', ['-c', 'import scipy.linalg']).status === 0;

interface Answer {
  readonly condition: number;
  readonly cases: readonly { axial: number[]; moves: number[][]; reactions: number[][] }[];
}

// Source: SciPy's dense LU (LAPACK dgetrf) on the saddle-point form, written apart from the engine.
describe.skipIf(!hasScipy)('against an independent linear solver (python3 with scipy)', () => {
  test('bar forces, displacements and reactions of 200 random trusses with springs and carried nodes agree to 1e-9', () => {
    const stable: RandomTruss[] = [];
    for (let seed = 1000; stable.length < 260 && seed < 2400; seed++) {
      const random = randomTruss(seed, seed % 5);
      const touched = new Set(random.truss.bars.flatMap((bar) => [bar.from, bar.to]));
      if (random.truss.nodes.some((node, i) => node.carriedBy === null && !touched.has(i))) continue;
      if (assessStability(random.truss, random.supports).mechanisms === 0) stable.push(random);
    }
    expect(stable.length).toBe(260);
    const answers = JSON.parse(
      execFileSync('python3', [program], { input: JSON.stringify(stable.map(asInput)), maxBuffer: 1 << 28 }).toString(),
    ) as Answer[];
    let compared = 0;
    stable.forEach(({ truss, supports, cases }, i) => {
      // The reference has no digits to compare where its own system is nearly singular.
      if (answers[i].condition > 1e6) return;
      compared++;
      const solved = solveCases(truss, supports, assessStability(truss, supports), cases).cases;
      solved.forEach((one, c) => {
        const wanted = answers[i].cases[c];
        expect(one.refused).toBeNull();
        expect(one.residual!).toBeLessThan(1e-12);
        expect(difference(one.axialForce as number[], wanted.axial, 1), `truss ${i}`).toBeLessThan(1e-9);
        expect(
          difference(
            one.displacement.flatMap((movement) => [...movement!]),
            wanted.moves.flat(),
            1e-8,
          ),
          `truss ${i}`,
        ).toBeLessThan(1e-9);
        const reactions = truss.nodes.map(() => [0, 0, 0]);
        for (const { node, force } of one.reactions) reactions[node] = [...force];
        expect(difference(reactions.flat(), wanted.reactions.flat(), 1), `truss ${i}`).toBeLessThan(1e-9);
      });
    });
    expect(compared).toBeGreaterThanOrEqual(200);
  }, 60_000);
});

function asInput({ truss, supports, cases }: RandomTruss) {
  return {
    points: truss.nodes.map((node) => node.at),
    bars: truss.bars.map((bar) => [bar.from, bar.to]),
    stiffness: truss.bars.map((bar) => bar.stiffnessEA),
    carried: truss.nodes.flatMap((node, i) => (node.carriedBy ? [[i, node.carriedBy.bar, node.carriedBy.t]] : [])),
    restraints: supports.restraints,
    springs: supports.springs,
    loads: cases.map((one) => one.loads.map(({ node, force }) => [node, force])),
  };
}

/** `least` stands for the size of what comes to nothing (loads that go straight into supports). */
function difference(got: readonly number[], wanted: readonly number[], least: number): number {
  const scale = Math.max(least, ...wanted.map(Math.abs));
  return Math.max(...got.map((v, i) => Math.abs(v - wanted[i]))) / scale;
}
