import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { InstanceTable } from '../../src/step/instance-table.ts';

/** Ids as files number them: mostly ascending and close together, now and then anywhere. */
const idsInFile = fc
  .array(
    fc.oneof(
      { arbitrary: fc.integer({ min: 1, max: 30 }).map((step) => ({ step })), weight: 20 },
      { arbitrary: fc.integer({ min: 0, max: 3000 }).map((id) => ({ id })), weight: 1 },
      { arbitrary: fc.integer({ min: 0, max: 0xffff_ffff }).map((id) => ({ id })), weight: 1 },
    ),
    { maxLength: 400 },
  )
  .map((moves) => {
    const ids: number[] = [];
    for (const move of moves) ids.push('id' in move ? move.id : Math.min((ids.at(-1) ?? -1) + move.step, 0xffff_ffff));
    return ids;
  });

describe('the table of instances', () => {
  it('finds each id where it stands first, and types in file order, however a file is numbered', () => {
    fc.assert(
      fc.property(idsInFile, fc.boolean(), (ids, isAtOnce) => {
        const table = new InstanceTable(20 * ids.length + 20);
        const code = (row: number) => 1 + (row % 3);
        if (isAtOnce) {
          const [offsets, codes] = [ids.map((_, row) => 20 * row + 7), ids.map((_, row) => code(row))];
          table.addAll(Uint32Array.from(ids), Uint32Array.from(offsets), Uint16Array.from(codes), ids.length);
        } else for (const [row, id] of ids.entries()) table.add(id, 20 * row + 7, code(row));
        const doubled: number[] = [];
        table.close((id) => doubled.push(id));

        const first = new Map<number, number>();
        for (const [row, id] of ids.entries()) if (!first.has(id)) first.set(id, row);
        expect(doubled).toEqual(ids.filter((id, row) => first.get(id) !== row));
        expect([...table.allIds()]).toEqual([...first.keys()]);
        expect(table.count).toBe(first.size);
        expect(table.maxId).toBe(ids.reduce((most, id) => Math.max(most, id), 0));
        expect(table.lastId).toBe(ids.at(-1) ?? null);
        for (const [id, row] of first) {
          expect(table.offsetOf(table.rowOf(id))).toBe(20 * row + 7);
          expect(table.codeOf(table.rowOf(id))).toBe(code(row));
        }
        for (const absent of [-1, 5, 2999, 0xffff_fffe, 2 ** 40]) {
          if (!first.has(absent)) expect(table.rowOf(absent)).toBe(-1);
        }
        for (const asked of [1, 2, 3, 4]) {
          const expected = [...first].filter(([, row]) => code(row) === asked).map(([id]) => id);
          expect(table.idsOf(asked)).toEqual(expected);
          expect(table.firstOf(asked)).toBe(expected[0] ?? -1);
        }
      }),
      { numRuns: 400 },
    );
  });
});
