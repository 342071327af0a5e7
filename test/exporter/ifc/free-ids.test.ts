import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ModelError } from '../../../src/domain/errors.ts';
import { firstFreeId } from '../../../src/exporter/ifc/free-ids.ts';

const LIMIT = 2 ** 31 - 1;
const NONE: ReadonlySet<number> = new Set();
const firstFree = (ids: readonly number[], amount: number, dangling = NONE) =>
  firstFreeId({ ids: () => ids }, { highestId: Math.max(0, ...ids, ...dangling), dangling: () => dangling }, amount);

describe('the first free id', () => {
  it('begins a run that no instance is in, within 31 bits', () => {
    const id = fc.oneof(fc.integer({ min: 1, max: 300 }), fc.integer({ min: LIMIT - 300, max: 2 ** 32 - 1 }));
    fc.assert(
      fc.property(fc.uniqueArray(id, { maxLength: 60 }), fc.integer({ min: 1, max: 200 }), (ids, amount) => {
        const first = firstFree(ids, amount);
        const last = first + amount - 1;
        expect(first).toBeGreaterThan(0);
        expect(last).toBeLessThanOrEqual(LIMIT);
        for (const used of ids) expect(used < first || used > last).toBe(true);
        if (Math.max(0, ...ids) + amount <= LIMIT) expect(first).toBe(Math.max(0, ...ids) + 1);
      }),
    );
  });

  it('is just above the highest while there is room, and in the first gap else', () => {
    expect(firstFree([1, 2, 900], 10)).toBe(901);
    expect(firstFree([1, 2, 5, 50, LIMIT], 10)).toBe(6);
  });

  it('keeps clear of numbers that are referred to though no instance has them', () => {
    expect(firstFree([1, 2], 10, new Set([7]))).toBe(8);
    expect(firstFree([1, 2, LIMIT], 10, new Set([7]))).toBe(8);
  });

  it('is refused where no gap is wide enough', () => {
    expect(() => firstFree([1, 2 ** 30, LIMIT], 2 ** 30)).toThrow(ModelError);
  });
});
