import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type Complementarity, settle } from '../../../src/statics/one-way/complementarity.ts';

/** M = B B^T of a given rank, q = -M z0 + w0 with z0, w0 >= 0 complementary where `solvable`: such a problem has a solution. */
function problemOf(size: number, rank: number, numbers: readonly number[], solvable: boolean): Complementarity {
  let next = 0;
  const take = () => numbers[next++ % numbers.length] + 0.37 * Math.sin(next);
  const b = Array.from({ length: size }, () => Array.from({ length: rank }, take));
  const m = b.map((row) => b.map((other) => row.reduce((sum, v, k) => sum + v * other[k], 0)));
  const z = Array.from({ length: size }, () => Math.max(0, take()));
  const q = solvable
    ? z.map((v, i) => (v > 0 ? 0 : Math.abs(take())) - m[i].reduce((sum, entry, j) => sum + entry * z[j], 0))
    : Array.from({ length: size }, take);
  return {
    size,
    q: Float64Array.from(q),
    prepare: () => {},
    column: (j) => Float64Array.from(m, (row) => row[j]),
    measure: Float64Array.from(m, (row, i) => Math.max(row[i], 1e-3)),
    tolerance: 1e-9,
  };
}

const forcesOf = ({ size, q, column }: Complementarity, z: Float64Array) => {
  const w = q.slice();
  for (let j = 0; j < size; j++) for (const [i, m] of column(j).entries()) w[i] = w[i] + m * z[j];
  return w;
};

const some = fc.record({
  size: fc.integer({ min: 1, max: 12 }),
  rank: fc.integer({ min: 1, max: 12 }),
  numbers: fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 40, maxLength: 40 }),
});

describe('the search for what is slack', () => {
  test('ends with both signs right and nothing both open and stressed, from whatever start, and finds the same forces', () => {
    fc.assert(
      fc.property(some, ({ size, rank, numbers }) => {
        const problem = problemOf(size, rank, numbers, true);
        const all = Array.from({ length: size }, (_, i) => i);
        const starts = [[], all, all.filter((i) => numbers[i] > 0)];
        const forces = starts.map((start) => {
          const found = settle(problem, start);
          if (found.kind !== 'settled') throw new Error(found.kind);
          const w = forcesOf(problem, found.z);
          for (let i = 0; i < size; i++) {
            expect(found.z[i]).toBeGreaterThanOrEqual(0);
            expect(w[i]).toBeGreaterThan(-1e-6);
            expect(Math.abs(w[i] * found.z[i])).toBeLessThan(1e-5 * (1 + found.z[i]));
          }
          return w;
        });
        for (const w of forces) for (const [i, v] of w.entries()) expect(v).toBeCloseTo(forces[0][i], 4);
      }),
      { numRuns: 300 },
    );
  });

  test('says where there is no end: a direction in which everything opens, nothing answers and the load wins', () => {
    let without = 0;
    fc.assert(
      fc.property(some, ({ size, rank, numbers }) => {
        const problem = problemOf(size, rank, numbers, false);
        const found = settle(problem, []);
        if (found.kind !== 'unbounded') return;
        without++;
        const { direction } = found;
        const answer = forcesOf({ ...problem, q: new Float64Array(size) }, direction);
        for (const v of direction) expect(v).toBeGreaterThan(-1e-6);
        for (const v of answer) expect(Math.abs(v)).toBeLessThan(1e-3 * Math.max(...direction));
        expect(direction.reduce((sum, v, i) => sum + v * problem.q[i], 0)).toBeLessThan(0);
      }),
      { numRuns: 200 },
    );
    expect(without).toBeGreaterThan(10);
  });
});
