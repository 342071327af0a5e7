import { copyFileSync, existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { type Result, resultSchema } from '../../src/domain/result.ts';
import { type CliRun, pinwright } from '../support/run-cli.ts';
import { fixture } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const folder = temporaryFolder();
const hall = fixture('boat-hall-a.ifc');
const brief = fixture('boat-hall.yaml');

const oneLine = /^[^\n]+\n$/;

describe('pinwright analyse on the demo roof', () => {
  const json = join(folder, 'hall.json');
  let run: CliRun;
  let result: Result;
  beforeAll(() => {
    run = pinwright(['analyse', hall, '--brief', brief, '-o', json]);
    result = JSON.parse(readFileSync(json, 'utf8')) as Result;
  });

  it('ends with 0 and says nothing on stderr', () => {
    expect({ code: run.code, stderr: run.stderr }).toEqual({ code: 0, stderr: '' });
  });

  it('writes a result that its schema accepts, with nothing it does not know', () => {
    expect(() => resultSchema.parse(result)).not.toThrow();
  });

  it('prints a summary of at most 80 columns that ends with what was written and holds the caution', () => {
    const widest = Math.max(...run.stdout.split('\n').map((line) => line.length));
    expect(widest).toBeLessThanOrEqual(Math.max(80, `Written: ${json}`.length));
    expect(run.stdout).toContain('licensed engineer');
    expect(run.stdout.trimEnd().endsWith(`Written: ${json}`)).toBe(true);
  });

  it('gives the same bytes every time', () => {
    const again = join(folder, 'again.json');
    pinwright(['analyse', hall, '--brief', brief, '-o', again, '--quiet']);
    expect(readFileSync(again, 'utf8')).toBe(readFileSync(json, 'utf8'));
  });

  it('prints the JSON and nothing else with -o -', () => {
    const { stdout } = pinwright(['analyse', hall, '--brief', brief, '-o', '-']);
    expect(stdout).toBe(readFileSync(json, 'utf8'));
  });

  it('is silent with --quiet', () => {
    const { code, stdout, stderr } = pinwright(['analyse', hall, '--brief', brief, '--quiet']);
    expect({ code, stdout, stderr }).toEqual({ code: 0, stdout: '', stderr: '' });
  });

  it('shows joints, cuts and the whole for a check by hand in place of the summary', () => {
    const asked = ['--joint', '12,18,6.4', '--cut', 'x=7.5', '--cut', '12,0,0/1,1,0', '--balance'];
    const { code, stdout } = pinwright(['analyse', hall, '--brief', brief, ...asked, '--case', 'hoist']);
    expect(code).toBe(0);
    expect(Math.max(...stdout.split('\n').map((line) => line.length))).toBeLessThanOrEqual(80);
    expect(stdout).toMatch(/^Balance of the whole/);
    expect(stdout).toContain('Joint n65 at 12.000 18.000 6.400 (C/4, +6.40), in hoist');
    expect(stdout).toMatch(/load +0\.0 +0\.0 +-20\.0/);
    for (const [, left] of stdout.matchAll(/left over: (?:less than )?(\S+) of/g))
      expect(Number(left)).toBeLessThan(1e-9);
    expect([...stdout.matchAll(/left over: /g)]).toHaveLength(3);
    expect(stdout).toContain('licensed engineer');
  });

  it('says in one line what a check by hand cannot find', () => {
    for (const asked of [
      ['--cut', 'q=1'],
      ['--joint', 'top'],
      ['--joint', 'n9999'],
      ['--balance', '--case', 'rain'],
    ]) {
      const { code, stderr } = pinwright(['analyse', hall, '--brief', brief, '--quiet', ...asked]);
      expect(code).toBe(2);
      expect(stderr).toMatch(oneLine);
    }
  });

  it('gives one line of timings with --timings', () => {
    const { stderr } = pinwright(['analyse', hall, '--brief', brief, '--timings', '--quiet']);
    expect(stderr).toMatch(oneLine);
    const timings = JSON.parse(stderr) as Record<string, number>;
    expect(Object.keys(timings).sort()).toEqual(
      ['checks', 'export', 'import', 'peakMemory', 'solve', 'stability', 'topology'].sort(),
    );
    expect(timings.import).toBeGreaterThan(0);
    expect(timings.peakMemory).toBeGreaterThan(1e6);
  });

  it('writes a folder with every table', () => {
    const { code } = pinwright(['analyse', hall, '--brief', brief, '--quiet', '-o', `${join(folder, 'tables.csv')}/`]);
    expect(code).toBe(0);
    expect(readdirSync(join(folder, 'tables.csv')).sort()).toEqual(
      expect.arrayContaining(['bars.csv', 'findings.csv', 'members.csv', 'nodes.csv', 'reactions.csv']),
    );
  });
});

describe('pinwright survey', () => {
  it('needs no brief and judges the roof as a free body', () => {
    const { code, stdout } = pinwright(['survey', hall, '-o', '-']);
    const result = JSON.parse(stdout) as Result;
    expect(code).toBe(result.findings.some(({ severity }) => severity === 'error') ? 1 : 0);
    expect(result.stability.freeBody).toBe(true);
    expect(result.cases).toEqual([]);
    expect(result.findings.find(({ code: found }) => found === 'no-support')?.severity).toBe('note');
  });

  it('ends with 1 where the model has faults', () => {
    expect(pinwright(['survey', fixture('boat-hall-faults.ifc'), '--brief', brief, '--quiet']).code).toBe(1);
  });
});

describe('a wrong request ends with 2 and one line', () => {
  it.each<[string, string[], RegExp]>([
    ['an unknown command', ['analise', hall], /unknown command 'analise'/],
    ['an unknown option', ['survey', hall, '--brieff', brief], /unknown option/],
    ['no model', ['survey'], /missing required argument/],
    ['an ending nobody knows', ['survey', hall, '-o', join(folder, 'x.docx')], /x\.docx: the ending picks the format/],
    ['an output folder that is not there', ['survey', hall, '-o', join(folder, 'no', 'x.json')], /does not exist/],
    ['a brief that is not there', ['survey', hall, '--brief', join(folder, 'no.yaml')], /no\.yaml: no such file/],
  ])('%s', (_, args, words) => {
    const { code, stdout, stderr } = pinwright(args);
    expect({ code, stdout }).toEqual({ code: 2, stdout: '' });
    expect(stderr).toMatch(words);
    expect(stderr).not.toMatch(/\n\s+at .*:\d+:\d+/);
  });

  it('an output that is the input', () => {
    const copy = join(folder, 'copy.ifc');
    copyFileSync(hall, copy);
    const { code, stderr } = pinwright(['survey', copy, '-o', copy]);
    expect(code).toBe(2);
    expect(stderr).toMatch(/is the input itself/);
    expect(readFileSync(copy).equals(readFileSync(hall))).toBe(true);
  });

  it('a wrong brief, with its line and column and the nearest right word', () => {
    const wrong = join(folder, 'wrong.yaml');
    writeFileSync(wrong, 'pinwright: 1\nsuports:\n  - at: {lowest: true}\n    fix: xyz\n');
    const { code, stderr } = pinwright(['survey', hall, '--brief', wrong]);
    expect(code).toBe(2);
    expect(stderr).toMatch(/wrong\.yaml:2:1/);
    expect(stderr).toMatch(/supports/);
  });
});

describe('a model that cannot be read ends with 3, one line and no output', () => {
  const broken = (name: string, content: string | Uint8Array): string => {
    const path = join(folder, name);
    writeFileSync(path, content);
    return path;
  };
  const text = readFileSync(hall, 'latin1');
  it.each<[string, () => string]>([
    ['a missing file', () => join(folder, 'missing.ifc')],
    [
      'a folder',
      () => {
        mkdirSync(join(folder, 'folder.ifc'), { recursive: true });
        return join(folder, 'folder.ifc');
      },
    ],
    ['an empty file', () => broken('empty.ifc', '')],
    ['a file of something else', () => broken('other.ifc', 'hello, world\n')],
    ['a file cut off in the middle', () => broken('cut.ifc', text.slice(0, text.length / 2))],
    ['an unknown schema', () => broken('schema.ifc', text.replace("FILE_SCHEMA(('IFC4'))", "FILE_SCHEMA(('AP214'))"))],
  ])('%s', (_, path) => {
    const output = join(folder, 'never.json');
    const { code, stdout, stderr } = pinwright(['survey', path(), '-o', output]);
    expect({ code, stdout }).toEqual({ code: 3, stdout: '' });
    expect(stderr).toMatch(oneLine);
    expect(existsSync(output)).toBe(false);
  });
});

describe('help', () => {
  it.each(['survey', 'analyse'])('of %s shows an example', (command) => {
    const { code, stdout } = pinwright([command, '--help']);
    expect(code).toBe(0);
    expect(stdout).toContain(`Example:\n  pinwright ${command} `);
  });
});
