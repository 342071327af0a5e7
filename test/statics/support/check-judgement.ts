import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { expect } from 'vitest';
import type { Truss } from '../../../src/domain/truss.ts';
import type { Stability, Supports } from '../../../src/statics/types.ts';
import { denseRows } from './dense.ts';

/** What must hold in every judgement of a small truss: both counts, and modes that are independent, strain nothing and move no support. */
export function checkJudgement(truss: Truss, supports: Supports, judged: Stability): void {
  expect(judged.mechanisms).toBe(3 * judged.nodes - judged.restraints - judged.rank);
  expect(judged.selfStressStates).toBe(judged.bars + judged.springs - judged.rank);
  expect(judged.modes.length).toBe(judged.mechanisms);
  if (judged.modes.length === 0) return;
  const { strains, conditions } = denseRows(truss, supports);
  const columns = judged.modes.map((mode) => {
    const column = new Array<number>(3 * truss.nodes.length).fill(0);
    mode.nodes.forEach((node, i) => {
      mode.movement[i].forEach((v, axis) => {
        column[3 * node + axis] = v;
      });
    });
    expect(Math.max(...column.map(Math.abs))).toBeCloseTo(1, 9);
    return column;
  });
  const movement = new Matrix(columns).transpose();
  const conditionsOnReal = conditions.mmul(movement);
  expect(largestEntry(strains.mmul(movement))).toBeLessThan(1e-9);
  expect(largestEntry(conditionsOnReal)).toBeLessThan(1e-9);
  const values = new SingularValueDecomposition(movement, { autoTranspose: true }).diagonal;
  expect(Math.min(...values)).toBeGreaterThan(1e-6);
}

const largestEntry = (matrix: Matrix): number => Math.max(...matrix.to1DArray().map(Math.abs));
