import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { pinwright } from '../support/run-cli.ts';
import { fixture } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const folder = temporaryFolder();
const hall = fixture('boat-hall-a.ifc');
const annotated = join(folder, 'annotated.ifc');

describe('pinwright clean', () => {
  beforeAll(() => {
    pinwright(['analyse', hall, '--brief', fixture('boat-hall.yaml'), '--quiet', '-o', annotated]);
  });

  it('gives the model back byte for byte, and says so', () => {
    const out = join(folder, 'clean.ifc');
    const { code, stdout, stderr } = pinwright(['clean', annotated, '-o', out]);
    expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    expect(stdout).toMatch(/^\d+ instances of ours taken out of .*byte for byte\.\nWritten: /);
    expect(readFileSync(out).equals(readFileSync(hall))).toBe(true);
  });

  it('says where there is nothing to take out, and copies', () => {
    const out = join(folder, 'same.ifc');
    const { code, stdout } = pinwright(['clean', hall, '-o', out]);
    expect(code).toBe(0);
    expect(stdout).toContain('holds nothing of ours');
    expect(readFileSync(out).equals(readFileSync(hall))).toBe(true);
  });

  it('says that it edits a file which another program has rewritten', () => {
    const rewritten = join(folder, 'rewritten.ifc');
    writeFileSync(rewritten, readFileSync(annotated, 'latin1').replace(/^\/\* Pinwright.*\n/gm, ''), 'latin1');
    const out = join(folder, 'edited.ifc');
    const { code, stdout } = pinwright(['clean', rewritten, '-o', out]);
    expect(code).toBe(0);
    expect(stdout).toContain('This is an edit of that file');
    expect(readFileSync(out).equals(readFileSync(hall))).toBe(true);
    expect(pinwright(['survey', rewritten]).stdout).toContain('An annotated copy is an edit of it.');
  });

  it.each([
    [['clean', annotated], 2, "required option '-o, --output <file>'"],
    [['clean', annotated, '-o', join(folder, 'x.json')], 2, 'clean writes a model; name an .ifc'],
    [['clean', annotated, '-o', annotated], 2, 'is the input itself'],
    [['clean', join(folder, 'none.ifc'), '-o', join(folder, 'x.ifc')], 3, 'no such file'],
  ])('refuses %j', (args, code, words) => {
    const run = pinwright(args);
    expect({ code: run.code, words: run.stderr.includes(words) }).toEqual({ code, words: true });
    expect(existsSync(join(folder, 'x.ifc'))).toBe(false);
  });

  it('says nothing with --quiet', () => {
    expect(pinwright(['clean', annotated, '-o', join(folder, 'q.ifc'), '--quiet']).stdout).toBe('');
  });
});
