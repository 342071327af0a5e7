import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { joinChunks } from '../../src/exporter/chunks.ts';
import { csvCell, csvLines, tableToCsv } from '../../src/exporter/csv.ts';
import type { Cell } from '../../src/exporter/table.ts';
import { TABLE_NAMES, TABLES } from '../../src/exporter/tables.ts';
import { someResult } from './support.ts';

const text = (chunks: Iterable<Uint8Array>) => new TextDecoder().decode(joinChunks(chunks));

/** A reader of RFC 4180 of its own. */
function parseCsv(csv: string): string[][] {
  const rows: string[][] = [[]];
  const cell = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n|$)/y;
  while (cell.lastIndex < csv.length) {
    const match = cell.exec(csv);
    if (match === null) throw new Error(`no cell can be read at ${cell.lastIndex}`);
    rows.at(-1)!.push(match[1]?.replaceAll('""', '"') ?? match[2] ?? '');
    if (match[3] === '\r\n') rows.push([]);
  }
  return rows.slice(0, -1);
}

describe('comma separated values', () => {
  it('give back every text that is put in, whatever it holds', () => {
    const texts = fc.array(fc.array(fc.string({ unit: 'binary' }), { minLength: 2, maxLength: 2 }), { maxLength: 5 });
    fc.assert(
      fc.property(texts, (rows) => {
        const read = parseCsv([...csvLines({ heads: ['a', 'b'], rows })].join(''));
        const neutralised = rows.map((row) => row.map((cell) => (/^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell)));
        expect(read).toEqual([['a', 'b'], ...neutralised]);
      }),
    );
  });

  it.each(['=1+1', '+49', '-x', '@a', '\tx', '\rx', '-3.5'])('never let the text %j run as a formula', (cell) => {
    expect(parseCsv(`${csvCell(cell)}\r\n`)[0]![0]).toBe(`'${cell}`);
  });

  it.each<[Cell, string]>([
    [-1250.5, '-1250.5'],
    [1e-9, '1e-9'],
    [0, '0'],
    [null, ''],
  ])('leave the number %j a number', (cell, written) => {
    expect(csvCell(cell)).toBe(written);
  });
});

describe('the tables of a result', () => {
  const result = someResult(['a'.repeat(22), 'b'.repeat(22), 'c'.repeat(22)]);

  it.each(TABLE_NAMES)('have as many cells in every row of %s as there are heads', (name) => {
    const rows = parseCsv(text(tableToCsv(result, name)));
    expect(rows.length).toBeGreaterThan(1);
    for (const row of rows) expect(row).toHaveLength(rows[0]!.length);
  });

  it.each(TABLE_NAMES)('say the unit of every head in %s whose cells have fractions', (name) => {
    const { heads, rows } = TABLES[name](result);
    const exempt = new Set(['residual', 'fraction along bar']);
    for (const row of rows) {
      for (const [k, cell] of row.entries()) {
        if (typeof cell === 'number' && !Number.isInteger(cell) && !exempt.has(heads[k]!)) {
          expect(heads[k]).toMatch(/\(.+\)$/);
        }
      }
    }
  });

  it('hold the bars with member, section and envelope', () => {
    const [heads, first] = parseCsv(text(tableToCsv(result, 'bars')));
    const cell = (head: string) => first![heads!.indexOf(head)];
    expect(cell('member')).toBe('a'.repeat(22));
    expect(cell('section')).toBe('CHS 88.9x4');
    expect(Number(cell('tension (N)'))).toBe(result.envelope[0]!.tension!.force);
    expect(cell('tension from')).toBe(result.envelope[0]!.tension!.from);
    expect(cell('length (m)')).toBe('3');
  });

  it('list the reactions of cases and combinations', () => {
    const rows = parseCsv(text(tableToCsv(result, 'reactions')));
    expect(rows).toHaveLength(1 + 4 * 3);
    expect(rows[1]).toEqual(['case', 'dead', 'n1', 'C/4, +6.20', '100', '0', '1000']);
  });

  it('leave the cells of a refused case empty', () => {
    const refused = structuredClone(result);
    refused.cases[0]!.axialForce = refused.bars.map(() => null);
    const rows = parseCsv(text(tableToCsv(refused, 'forces')));
    expect(rows[1]![2]).toBe('');
    expect(rows[1]![3]).not.toBe('');
  });
});
