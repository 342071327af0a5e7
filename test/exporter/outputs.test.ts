import {
  existsSync,
  linkSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join, relative } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { RequestError } from '../../src/domain/errors.ts';
import { planOutputs } from '../../src/exporter/outputs.ts';
import { TABLE_NAMES } from '../../src/exporter/tables.ts';

let folder: string;
let input: string;
const at = (name: string) => join(folder, name);
const plan = (...names: string[]) =>
  planOutputs(
    names.map((name) => (name === '-' ? name : `${folder}/${name}`)),
    input,
  );
const refuses = (names: string[], why: RegExp) => {
  const before = readdirSync(folder);
  expect(() => plan(...names)).toThrow(why);
  expect(() => plan(...names)).toThrow(RequestError);
  expect(readdirSync(folder)).toEqual(before);
};

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'pinwright-plan-'));
  input = at('roof.ifc');
  writeFileSync(input, 'model');
});
afterEach(() => rmSync(folder, { recursive: true }));

describe('planning the outputs', () => {
  it('picks the formats by the endings, whatever their case', () => {
    const { files, folders, stdout } = plan('a.json', 'b.CSV', 'c.Ifc', 'd.svg', 'e.bcf', 'f.bcfzip', '-');
    expect(files.map((file) => file.content)).toEqual([
      { kind: 'json' },
      { kind: 'csv', table: 'bars' },
      { kind: 'ifc' },
      { kind: 'svg' },
      { kind: 'bcf' },
      { kind: 'bcf' },
    ]);
    expect(files.map((file) => file.target)).toEqual(
      ['a.json', 'b.CSV', 'c.Ifc', 'd.svg', 'e.bcf', 'f.bcfzip'].map(at),
    );
    expect(folders).toEqual([]);
    expect(stdout).toBe(true);
  });

  it('makes every table of a folder a file of its own', () => {
    const { files, folders } = plan('tables.csv/');
    expect(folders).toEqual([at('tables.csv')]);
    expect(files.map((file) => file.target)).toEqual(TABLE_NAMES.map((name) => at(`tables.csv/${name}.csv`)));
  });

  it('leaves nothing behind, neither probes nor folders', () => {
    plan('a.json', 'tables.csv/');
    expect(readdirSync(folder)).toEqual(['roof.ifc']);
  });

  it.each(['x.txt', 'x', 'json'])('refuses the unknown ending of %s', (name) => {
    refuses([name], /the ending picks the format/);
  });

  it('refuses a folder of anything but tables', () => {
    refuses(['x.json/'], /only one ending in \.csv\/ can be written/);
    refuses([''], /is a folder/);
  });

  it('refuses a path whose folder is missing', () => {
    refuses(['none/x.json'], /the folder .*none does not exist/);
    refuses(['none/x.csv/'], /does not exist/);
  });

  it('refuses a path through a file', () => {
    refuses(['roof.ifc/x.json'], /is not a folder/);
  });

  it('refuses a folder where a file is due, and the other way round', () => {
    mkdirSync(at('x.json'));
    writeFileSync(at('y.csv'), '');
    refuses(['x.json'], /a folder of this name is there/);
    refuses(['y.csv/'], /a folder is due/);
    mkdirSync(at('z.csv/bars.csv'), { recursive: true });
    refuses(['z.csv/'], /a folder of this name is there/);
  });

  it('refuses what is no plain file, and a link to nothing', () => {
    symlinkSync('/dev/null', at('x.json'));
    symlinkSync(at('gone'), at('y.json'));
    refuses(['x.json'], /is not a plain file/);
    refuses(['y.json'], /is a link to nothing/);
  });

  it.skipIf(process.getuid?.() === 0)('refuses a folder that may not be written to', () => {
    mkdirSync(at('locked'), { mode: 0o555 });
    refuses(['locked/x.json'], /no permission/);
  });

  it('refuses a name that is too long', () => {
    refuses([`${'x'.repeat(300)}.json`], /the name is too long/);
    refuses([`${'x'.repeat(300)}.csv/`], /the name is too long/);
  });

  it('refuses one path twice, under whatever names', () => {
    const twice = /two outputs would be written to/;
    writeFileSync(at('there.json'), '');
    symlinkSync(at('there.json'), at('link.json'));
    symlinkSync(folder, at('again'));
    refuses(['a.json', 'a.json'], twice);
    refuses(['a.json', '../'.concat(relative(tmpdir(), folder), '/a.json')], twice);
    refuses(['there.json', 'link.json'], twice);
    refuses(['a.json', 'again/a.json'], twice);
    refuses(['t.csv', 't.csv/'], twice);
    refuses(['t.csv/', 'again/t.csv/'], twice);
    refuses(['-', '-'], /stands twice/);
  });

  it('refuses the input as an output, under whatever name', () => {
    symlinkSync(input, at('link.ifc'));
    linkSync(input, at('hard.ifc'));
    symlinkSync(folder, at('again'));
    for (const name of ['roof.ifc', './roof.ifc', 'link.ifc', 'hard.ifc', 'again/roof.ifc']) {
      refuses([name], /is the input itself/);
    }
    expect(readFileSync(input, 'utf8')).toBe('model');
  });

  it('writes behind a link to a file, not over the link', () => {
    writeFileSync(at('there.json'), '');
    symlinkSync(at('there.json'), at('link.json'));
    expect(plan('link.json').files[0]!.target).toBe(at('there.json'));
  });

  it('does not change a file that is there', () => {
    writeFileSync(at('a.json'), 'old');
    const before = statSync(at('a.json')).mtimeMs;
    plan('a.json');
    expect(readFileSync(at('a.json'), 'utf8')).toBe('old');
    expect(statSync(at('a.json')).mtimeMs).toBe(before);
    expect(existsSync(at('b.json'))).toBe(false);
  });
});
