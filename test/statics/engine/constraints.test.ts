import { Matrix, solve } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import { assemble } from '../../../src/statics/engine/assemble.ts';
import { estimateCondition } from '../../../src/statics/engine/condition.ts';
import { addCondition, fillFollowers, type Term, throughFollowers } from '../../../src/statics/engine/constraints.ts';
import { factorise } from '../../../src/statics/engine/factor.ts';
import { solveRefined } from '../../../src/statics/engine/refine.ts';
import { analysePattern } from '../../../src/statics/engine/symbolic.ts';
import { buildRows } from '../../../src/statics/engine/system.ts';
import { randomFrom } from '../support/trusses.ts';

const BLOCKS = 12;

/** Random forms over `stride` freedoms a block, random conditions among them, and a load. */
function randomProblem(stride: number, conditionCount: number) {
  const random = randomFrom(100 + stride);
  const size = BLOCKS * stride;
  const forms = Array.from({ length: 4 * size }, (_, row) => {
    const block = row % BLOCKS;
    return [block, (block + 1 + Math.floor(random() * 4)) % BLOCKS].flatMap((b) =>
      Array.from({ length: stride }, (_, c): Term => ({ unknown: b * stride + c, factor: random() - 0.5 })),
    );
  });
  const conditions = Array.from({ length: conditionCount }, () =>
    Array.from({ length: 4 }, (): Term => ({ unknown: Math.floor(random() * size), factor: random() - 0.5 })),
  );
  const stiffness = Float64Array.from(forms, () => 0.5 + random());
  const load = Float64Array.from({ length: size }, () => random() - 0.5);
  return { size, forms, conditions, stiffness, load };
}

function denseRow(terms: readonly Term[], size: number): number[] {
  const row = new Array<number>(size).fill(0);
  for (const { unknown, factor } of terms) row[unknown] += factor;
  return row;
}

describe.each([1, 2, 3, 6])('linear conditions over %i freedoms a block', (stride) => {
  const { size, forms, conditions, stiffness, load } = randomProblem(stride, 3);
  const followers = new Map<number, readonly Term[]>();
  const active = new Uint8Array(size).fill(1);
  const taken = conditions.map((condition) => addCondition(followers, active, condition));
  const rows = buildRows(forms.length, (row, put) => {
    for (const { unknown, factor } of forms[row]) throughFollowers(followers, unknown, factor, put);
  });
  const freedoms = { blocks: BLOCKS, stride, active };
  const system = { rows, stiffness, matrix: assemble(analysePattern(freedoms, rows), rows, stiffness) };
  const factor = factorise(system.matrix);

  test('are met, and the answer is that of multipliers in a dense system', () => {
    expect(taken.every((follower) => follower >= 0)).toBe(true);
    const gathered = new Float64Array(size);
    load.forEach((force, unknown) => {
      throughFollowers(followers, unknown, force, (u, v) => {
        gathered[u] += v;
      });
    });
    const [{ q }] = solveRefined(system, factor, [gathered]);
    const full = fillFollowers(followers, q);
    const form = new Matrix(forms.map((terms) => denseRow(terms, size)));
    const condition = new Matrix(conditions.map((terms) => denseRow(terms, size)));
    const k = form
      .transpose()
      .mmul(Matrix.diag([...stiffness]))
      .mmul(form);
    const saddle = Matrix.zeros(size + 3, size + 3);
    saddle.setSubMatrix(k, 0, 0);
    saddle.setSubMatrix(condition, size, 0);
    saddle.setSubMatrix(condition.transpose(), 0, size);
    const wanted = solve(saddle, Matrix.columnVector([...load, 0, 0, 0])).to1DArray();
    for (let u = 0; u < size; u++) expect(full[u]).toBeCloseTo(wanted[u], 9);
    condition
      .mmul(Matrix.columnVector(full))
      .to1DArray()
      .forEach((v) => {
        expect(Math.abs(v)).toBeLessThan(1e-12);
      });
  });

  test('that repeat others are passed over', () => {
    const sum = [...conditions[0], ...conditions[1].map(({ unknown, factor: f }) => ({ unknown, factor: -2 * f }))];
    expect(addCondition(new Map(followers), active.slice(), sum)).toBe(-1);
  });

  test('leave a condition number that the estimate comes near', () => {
    const unknown = [...active.keys()].filter((u) => active[u]);
    const form = new Matrix(
      Array.from({ length: rows.count }, (_, row) => {
        const out = new Array<number>(size).fill(0);
        for (let p = rows.start[row]; p < rows.start[row + 1]; p++) out[rows.unknown[p]] += rows.value[p];
        return unknown.map((u) => out[u]);
      }),
    );
    const k = form
      .transpose()
      .mmul(Matrix.diag([...stiffness]))
      .mmul(form);
    const norm = (a: Matrix) =>
      Math.max(
        ...a
          .transpose()
          .to2DArray()
          .map((column) => column.reduce((s, v) => s + Math.abs(v), 0)),
      );
    const exact = norm(k) * norm(solve(k, Matrix.eye(unknown.length)));
    const estimate = estimateCondition(system, factor);
    expect(estimate).toBeLessThan(exact * (1 + 1e-9));
    expect(estimate).toBeGreaterThan(exact / 3);
  });
});
