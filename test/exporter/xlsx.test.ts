import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { XMLParser } from 'fast-xml-parser';
import { strFromU8, unzipSync } from 'fflate';
import { afterAll, describe, expect, it } from 'vitest';
import { filledRows } from '../../src/exporter/xlsx/cells.ts';
import { SHEETS } from '../../src/exporter/xlsx/sheets.ts';
import { workbook } from '../../src/exporter/xlsx/workbook.ts';
import { someResult } from './support.ts';

const NASTY = ['=1+1', '+49 123', '@SUM(A1)', '-x', "'quoted'", 'Ελλάδα 屋根 🏗 & <b>"\\', 'tab\tand\u0007bell'];

function nastyResult() {
  const result = someResult(['a'.repeat(22), 'b'.repeat(22), 'c'.repeat(22)]);
  for (const [k, member] of result.members.entries()) member.name = NASTY[k % NASTY.length]!;
  for (const [k, bar] of result.bars.entries()) bar.name = NASTY[(k + 3) % NASTY.length]!;
  return result;
}

async function bytesOf(result: ReturnType<typeof someResult>): Promise<Uint8Array> {
  const pieces: Uint8Array[] = [];
  for await (const piece of workbook(result)) pieces.push(piece);
  return Buffer.concat(pieces);
}

describe('a workbook', () => {
  it('is the same for the same result, with no time of the clock in it', async () => {
    const [first, second] = [await bytesOf(nastyResult()), await bytesOf(nastyResult())];
    expect(Buffer.compare(first, second)).toBe(0);
    // Dates of a zip's directory: 1980-01-01, 0:00.
    const at = Buffer.from(first).indexOf('PK\x01\x02', 0, 'latin1');
    expect(Buffer.from(first).readUInt32LE(at + 12)).toBe(0x00210000);
    const all = Object.values(unzipSync(first))
      .map((part) => strFromU8(part))
      .join();
    expect(all).not.toContain(String(new Date().getFullYear()));
  });

  it('has frozen heads and a filter over all rows on every sheet but the first', async () => {
    const parts = unzipSync(await bytesOf(nastyResult()));
    const sheets = Object.keys(parts).filter((name) => /^xl\/worksheets\/sheet\d+\.xml$/.test(name));
    const parser = new XMLParser({ ignoreAttributes: false, attributeNamePrefix: '' });
    const read = sheets.map((name) => parser.parse(strFromU8(parts[name]!)).worksheet);
    expect(read.filter(({ autoFilter }) => autoFilter !== undefined)).toHaveLength(sheets.length - 1);
    for (const { sheetViews, autoFilter, sheetData } of read) {
      if (autoFilter === undefined) continue;
      expect(sheetViews.sheetView.pane).toMatchObject({ ySplit: '1', xSplit: '1', state: 'frozen' });
      expect(autoFilter.ref.endsWith(`${[sheetData.row].flat().length}`)).toBe(true);
    }
  });

  it('leaves a sheet without rows out', async () => {
    const result = { ...nastyResult(), findings: [] };
    const text = strFromU8(unzipSync(await bytesOf(result))['xl/workbook.xml']!);
    expect(text).toContain('"bars"');
    expect(text).not.toContain('"findings"');
  });

  it('says how many rows a sheet does not hold', () => {
    function* many() {
      for (let k = 0; k < 1_048_580; k++) yield [k];
    }
    const rows = filledRows(['n'], many());
    expect(rows).toHaveLength(1_048_576);
    expect(rows.at(-1)![0]).toMatchObject({ value: expect.stringContaining('and 6 more rows') });
  });
});

/** Another library, where it is at hand. */
const python = ['python3', '/usr/bin/python3'].find((candidate) => {
  try {
    execFileSync(candidate, ['-c', 'import openpyxl'], { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
});

const READ = `
import json, openpyxl, sys, warnings
warnings.simplefilter('error')
book = openpyxl.load_workbook(sys.argv[1])
print(json.dumps({s.title: {'freeze': s.freeze_panes, 'filter': s.auto_filter.ref, 'kinds': [[c.data_type for c in row] for row in s.rows],
  'formats': [c.number_format for c in list(s.rows)[-1]], 'rows': [[c.value for c in row] for row in s.rows]} for s in book}))
`;

describe.skipIf(python === undefined)('a workbook that another library opens', () => {
  const folder = mkdtempSync(join(tmpdir(), 'pinwright-xlsx-'));
  afterAll(() => rmSync(folder, { recursive: true }));

  it('has every cell of every table, texts as texts and numbers as numbers, without a warning', async () => {
    const result = nastyResult();
    const path = join(folder, 'x.xlsx');
    writeFileSync(path, await bytesOf(result));
    const read = JSON.parse(execFileSync(python!, ['-c', READ, path], { encoding: 'utf8' }));
    for (const { title, table } of SHEETS) {
      const { heads, rows } = table(result);
      const expected = [heads, ...[...rows].map((row) => row.map((cell) => (cell === '' ? null : cell)))];
      const sheet = read[title];
      expect(sheet.freeze, title).toBe('B2');
      expect(sheet.rows, title).toEqual(
        expected.map((row) =>
          row.map((cell) => (typeof cell === 'string' ? cell.replace('\u0007', '') : cell === 0 ? 0 : cell)),
        ),
      );
      // s: text, n: number or empty; never f: formula.
      expect(new Set(sheet.kinds.flat()), title).toEqual(
        new Set([...sheet.kinds.flat()].filter((kind) => kind === 's' || kind === 'n')),
      );
    }
    expect(read.about.rows[0][1]).toContain('not a design');
    expect(read.bars.formats).toContain('0.000');
    expect(read.bars.formats).toContain('#,##0');
  });
});
