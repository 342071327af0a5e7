import { type ChildProcess, spawn } from 'node:child_process';
import {
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import * as nodeFiles from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Writable } from 'node:stream';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { RequestError } from '../../src/domain/errors.ts';
import { encodeText } from '../../src/exporter/chunks.ts';
import type { Content } from '../../src/exporter/outputs/formats.ts';
import { temporaryName } from '../../src/exporter/outputs/temporary.ts';
import { planOutputs } from '../../src/exporter/outputs.ts';
import { type WriteOptions, writeOutputs } from '../../src/exporter/write-outputs.ts';

let folder: string;
const at = (name: string) => join(folder, name);
const read = (name: string) => readFileSync(at(name), 'utf8');
const put = (name: string, text = 'old') => writeFileSync(at(name), text);
const named = (content: Content) => encodeText(['new ', content.kind]);
const write = (names: string[], options: Partial<WriteOptions> = {}, contentOf = named) =>
  writeOutputs(
    planOutputs(
      names.map((name) => (name === '-' ? name : `${folder}/${name}`)),
      at('roof.ifc'),
    ),
    contentOf,
    options,
  );
const failing = (code: string) => Object.assign(new Error(code), { code });

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'pinwright-write-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

describe('writing the outputs', () => {
  it('writes every file whole, in place of what was there', async () => {
    put('a.json', 'something much longer than what comes');
    await write(['a.json', 'b.ifc', 't.csv/']);
    expect(read('a.json')).toBe('new json');
    expect(read('b.ifc')).toBe('new ifc');
    expect(read('t.csv/members.csv')).toBe('new csv');
    expect(readdirSync(folder).sort()).toEqual(['a.json', 'b.ifc', 't.csv']);
    expect(readdirSync(at('t.csv')).every((name) => name.endsWith('.csv'))).toBe(true);
  });

  it('leaves files alone that were in the folder of tables', async () => {
    mkdirSync(at('t.csv'));
    put('t.csv/mine.txt');
    await write(['t.csv/']);
    expect(read('t.csv/mine.txt')).toBe('old');
  });

  it('keeps who may read a file', async () => {
    writeFileSync(at('a.json'), 'old', { mode: 0o600 });
    await write(['a.json']);
    expect(statSync(at('a.json')).mode & 0o777).toBe(0o600);
  });

  it('leaves every file as it was when a content cannot be made', async () => {
    put('a.json');
    const contentOf = (content: Content) => {
      if (content.kind === 'csv') throw new Error('a fault of ours');
      return named(content);
    };
    await expect(write(['a.json', 'b.ifc', 't.csv/'], {}, contentOf)).rejects.toThrow('a fault of ours');
    expect(read('a.json')).toBe('old');
    expect(readdirSync(folder)).toEqual(['a.json']);
  });

  it('names the path when the disk is full, and leaves every file as it was', async () => {
    put('a.json');
    const open: typeof nodeFiles.open = async (...parameters) => {
      const handle = await nodeFiles.open(...parameters);
      handle.writeFile = async () => {
        await handle.write('cut');
        throw failing('ENOSPC');
      };
      return handle;
    };
    const attempt = write(['a.json', 'b.ifc'], { files: { ...nodeFiles, open }, filesAtOnce: 1 });
    await expect(attempt).rejects.toThrow(/a\.json: the disk is full/);
    await expect(attempt).rejects.toBeInstanceOf(RequestError);
    expect(read('a.json')).toBe('old');
    expect(readdirSync(folder)).toEqual(['a.json']);
  });

  it('puts back what it has replaced when a later name cannot be taken', async () => {
    put('a.json');
    put('c.ifc');
    const renamed: string[] = [];
    const rename: typeof nodeFiles.rename = async (from, to) => {
      if (String(to).endsWith('c.ifc')) {
        expect(read('a.json')).toBe('new json');
        expect(read('b.csv')).toBe('new csv');
        throw failing('EIO');
      }
      renamed.push(String(to));
      await nodeFiles.rename(from, to);
    };
    const attempt = write(['a.json', 'b.csv', 'c.ifc'], { files: { ...nodeFiles, rename } });
    await expect(attempt).rejects.toThrow(/c\.ifc: cannot be written \(EIO\)/);
    expect(renamed).toHaveLength(3);
    expect(read('a.json')).toBe('old');
    expect(read('c.ifc')).toBe('old');
    expect(readdirSync(folder).sort()).toEqual(['a.json', 'c.ifc']);
  });

  it('puts back what it has replaced when a folder has come in the way meanwhile', async () => {
    put('a.json');
    const contentOf = (content: Content) => {
      if (content.kind === 'ifc') mkdirSync(at('b.ifc'));
      return named(content);
    };
    await expect(write(['a.json', 'b.ifc'], {}, contentOf)).rejects.toThrow(/b\.ifc: /);
    expect(read('a.json')).toBe('old');
    expect(readdirSync(folder).sort()).toEqual(['a.json', 'b.ifc']);
  });

  it('does without hard links where the disk knows none', async () => {
    put('a.json');
    put('b.ifc');
    const link = async () => {
      throw failing('EPERM');
    };
    const rename: typeof nodeFiles.rename = async (from, to) => {
      if (String(to).endsWith('b.ifc')) throw failing('EIO');
      await nodeFiles.rename(from, to);
    };
    await expect(write(['a.json', 'b.ifc'], { files: { ...nodeFiles, link, rename } })).rejects.toThrow(/b\.ifc/);
    expect(read('a.json')).toBe('old');
    await write(['a.json', 'b.ifc'], { files: { ...nodeFiles, link } });
    expect(read('a.json')).toBe('new json');
    expect(readdirSync(folder).sort()).toEqual(['a.json', 'b.ifc']);
  });

  it('has no more files open at once than it may', async () => {
    let opened = 0;
    let most = 0;
    const open: typeof nodeFiles.open = async (...parameters) => {
      most = Math.max(most, ++opened);
      const handle = await nodeFiles.open(...parameters);
      const close = handle.close.bind(handle);
      handle.close = async () => {
        await close();
        opened--;
      };
      return handle;
    };
    await write(['t.csv/'], { filesAtOnce: 2, files: { ...nodeFiles, open } });
    expect(most).toBe(2);
  });
});

describe('standard output', () => {
  it('comes when all files stand', async () => {
    let text = '';
    const stdout = new Writable({
      write(chunk, _encoding, done) {
        expect(read('a.json')).toBe('new json');
        text += chunk;
        done();
      },
    });
    await write(['-', 'a.json'], { stdout });
    expect(text).toBe('new json');
  });

  it('gets nothing when a file could not be written', async () => {
    let text = '';
    const stdout = new Writable({
      write(chunk, _encoding, done) {
        text += chunk;
        done();
      },
    });
    const rename = async () => {
      throw failing('EACCES');
    };
    await expect(write(['-', 'a.json'], { stdout, files: { ...nodeFiles, rename } })).rejects.toThrow(/no permission/);
    expect(text).toBe('');
  });

  it('may be closed early by its reader, but not fail otherwise', async () => {
    const stdout = (code: string) => new Writable({ write: (_chunk, _encoding, done) => done(failing(code)) });
    await write(['-'], { stdout: stdout('EPIPE') });
    await expect(write(['-'], { stdout: stdout('ENOSPC') })).rejects.toThrow(/standard output/);
  });
});

describe('what a killed run leaves', () => {
  it('is swept by the next run, and nothing else is', async () => {
    const dead = temporaryName().replace(`-${process.pid}-`, `-${4_000_000}-`);
    const alive = temporaryName().replace(`-${process.pid}-`, `-${process.ppid}-`);
    const elsewhere = temporaryName().replace(/^\.pinwright-[0-9a-f]{8}/, '.pinwright-0123abcd');
    const foreign = ['.pinwright-mine', 'pinwright-1', '.pinwright'];
    for (const name of [dead, alive, elsewhere, temporaryName(), ...foreign]) put(name);
    const before = readdirSync(folder);
    await write(['a.json']);
    expect(readdirSync(folder).sort()).toEqual([...before.filter((name) => name !== dead), 'a.json'].sort());
  });

  it('does not take the age of what was written in a file for that of the file', async () => {
    const own = temporaryName();
    put(own);
    utimesSync(at(own), 0, 0);
    await write(['a.json']);
    expect(readdirSync(folder)).toContain(own);
  });

  it.each(['writing', 'renaming'])('while %s is files that are old or new, never cut', async (stage) => {
    for (const name of ['a.json', 'b.ifc']) put(name);
    const child = spawnWriter(stage);
    await said(child, 'ready');
    child.kill('SIGKILL');
    await new Promise((done) => child.once('exit', done));
    const strays = readdirSync(folder).filter((name) => name.startsWith('.pinwright-'));
    expect(strays.length).toBeGreaterThan(0);
    expect(read('a.json')).toBe(stage === 'writing' ? 'old' : 'new json');
    expect(read('b.ifc')).toBe('old');

    await write(['c.json']);
    expect(readdirSync(folder).sort()).toEqual(['a.json', 'b.ifc', 'c.json']);
  });
});

/** A process that hangs in the middle of writing its second file, or between the first name and the second. */
function spawnWriter(stage: string): ChildProcess {
  const source = new URL('../../src/exporter/', import.meta.url);
  const script = `
    import * as nodeFiles from 'node:fs/promises';
    const { planOutputs } = await import('${new URL('outputs.ts', source)}');
    const { writeOutputs } = await import('${new URL('write-outputs.ts', source)}');
    const hang = () => new Promise(() => { console.log('ready'); setInterval(() => {}, 1000); });
    const rename = async (from, to) => '${stage}' === 'renaming' && to.endsWith('b.ifc') ? hang() : nodeFiles.rename(from, to);
    const open = async (...parameters) => {
      const handle = await nodeFiles.open(...parameters);
      const writeFile = handle.writeFile.bind(handle);
      let chunks = 0;
      handle.writeFile = (chunk) => ('${stage}' === 'writing' && ++chunks === 2 ? hang() : writeFile(chunk));
      return handle;
    };
    const contentOf = ({ kind }) => [Buffer.from('new '), Buffer.from(kind)];
    const plan = planOutputs(['${at('a.json')}', '${at('b.ifc')}'], '${at('roof.ifc')}');
    await writeOutputs(plan, contentOf, { filesAtOnce: 1, files: { ...nodeFiles, open, rename } });
  `;
  return spawn(process.execPath, ['--import', 'tsx', '--input-type=module', '--eval', script], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
}

function said(child: ChildProcess, word: string): Promise<void> {
  return new Promise((done, fail) => {
    child.stdout!.on('data', (data) => {
      if (String(data).includes(word)) done();
    });
    child.once('exit', (code) => fail(new Error(`ended early (${code})`)));
  });
}
