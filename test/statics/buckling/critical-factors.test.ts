import { CholeskyDecomposition, EigenvalueDecomposition, inverse, Matrix } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import type { Truss } from '../../../src/domain/truss.ts';
import type { Vec3 } from '../../../src/domain/vector.ts';
import { criticalFactors, prepareBuckling } from '../../../src/statics/buckling/critical-factors.ts';
import { realStiffness } from '../../../src/statics/model/elastic.ts';
import { findParts } from '../../../src/statics/model/parts.ts';
import { buildSystem } from '../../../src/statics/model/system.ts';
import { solveCases } from '../../../src/statics/solution/solve-cases.ts';
import { assessStability } from '../../../src/statics/stability/assess-stability.ts';
import type { Supports } from '../../../src/statics/types.ts';
import { denseRows } from '../support/dense.ts';
import { randomTruss } from '../support/trusses.ts';

const AXES: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

const symmetric = (a: Matrix): Matrix => Matrix.add(a, a.transpose()).mul(0.5);

/** All factors by dense matrices: K and K_G over all nodes' movements, restraints by a basis of what they leave free. */
function denseFactors(truss: Truss, supports: Supports, axial: readonly number[]): number[] {
  const { strains, conditions } = denseRows(truss, supports);
  const width = strains.columns;
  const stiffness = [
    ...truss.bars.map((bar) => bar.stiffnessEA! / bar.length),
    ...supports.springs.map((s) => s.stiffness),
  ];
  const k = strains.transpose().mmul(Matrix.diag(stiffness)).mmul(strains);
  const g = Matrix.zeros(width, width);
  // Unit springs on every node along every axis are the rows of its movement.
  const everyNode = AXES.map((direction) => {
    const springs = truss.nodes.map((_, node) => ({ node, direction, stiffness: 1 }));
    return denseRows(truss, { restraints: [], springs }).strains;
  });
  truss.bars.forEach((bar, b) => {
    const between = everyNode.map((rows) =>
      Matrix.sub(rows.getRowVector(truss.bars.length + bar.to), rows.getRowVector(truss.bars.length + bar.from)),
    );
    const along = strains.getRowVector(b);
    const density = axial[b] / bar.length;
    for (const row of between) g.add(Matrix.mul(row.transpose().mmul(row), density));
    g.sub(Matrix.mul(along.transpose().mmul(along), density));
  });
  const gram = new EigenvalueDecomposition(conditions.transpose().mmul(conditions), { assumeSymmetric: true });
  const free = gram.realEigenvalues.flatMap((v, i) => (Math.abs(v) < 1e-9 ? [i] : []));
  const basis = gram.eigenvectorMatrix.subMatrixColumn(free);
  const kFree = symmetric(basis.transpose().mmul(k).mmul(basis));
  const gFree = basis.transpose().mmul(g).mmul(basis);
  const lower = inverse(new CholeskyDecomposition(kFree).lowerTriangularMatrix);
  const ratios = new EigenvalueDecomposition(symmetric(lower.mmul(gFree).mmul(lower.transpose()).mul(-1)), {
    assumeSymmetric: true,
  });
  return ratios.realEigenvalues
    .filter((v) => v > 1e-9)
    .map((v) => 1 / v)
    .sort((a, b) => a - b);
}

describe('critical load factors', () => {
  test('agree with dense matrices on random trusses with springs, skew supports and carried nodes', () => {
    let compared = 0;
    for (let seed = 1; seed <= 36; seed++) {
      const { truss, supports, cases } = randomTruss(seed, 3);
      const stability = assessStability(truss, supports);
      if (stability.mechanisms > 0) continue;
      const [solved] = solveCases(truss, supports, stability, cases).cases;
      const system = buildSystem({ truss, supports, parts: findParts(truss, supports) }, [], realStiffness(truss));
      const modes = criticalFactors(prepareBuckling(system, [], 0), solved.axialForce, 2);
      const wanted = denseFactors(truss, supports, solved.axialForce as number[]);
      compared++;
      modes.forEach(({ factor, moves }, i) => {
        expect(Math.abs(factor / wanted[i] - 1), `truss ${seed}, factor ${i}`).toBeLessThan(1e-6);
        expect(Math.max(...moves.map(Math.abs))).toBe(1);
      });
      expect(modes.length).toBe(Math.min(2, wanted.length));
    }
    expect(compared).toBeGreaterThan(15);
  });
});
