import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { comparisonSchema } from '../../src/revisions/comparison.ts';
import { type CliRun, pinwright } from '../support/run-cli.ts';
import { fixture } from '../support/shared.ts';
import { temporaryFolder } from '../support/temporary-folder.ts';

const folder = temporaryFolder();
const [a, b, faulty] = ['boat-hall-a.ifc', 'boat-hall-b.ifc', 'boat-hall-faults.ifc'].map(fixture);
const brief = fixture('boat-hall.yaml');

describe('pinwright compare on the two revisions of the demo hall', () => {
  const json = join(folder, 'changes.json');
  let run: CliRun;
  beforeAll(() => {
    run = pinwright(['compare', a, b, '--brief', brief, '-o', json, '-o', `${folder}/changes.csv/`]);
  });

  it('ends with 0, since no error finding is new', () => {
    expect({ code: run.code, stderr: run.stderr }).toEqual({ code: 0, stderr: '' });
  });

  it('tells in 80 columns what the revision is known to have changed', () => {
    const [told] = run.stdout.split('\nWritten:');
    expect(Math.max(...told.split('\n').map((line) => line.length))).toBeLessThanOrEqual(80);
    expect(told).toContain('14 times SHS 90x90x5 becomes SHS 100x100x6.3');
    expect(told).toContain('6 times HEA 140 becomes HEA 160');
    expect(told).toMatch(/removed\n(.*\n)*? +- GP-C7/);
    expect(told).toContain('none any more at C/7, +0.00 (was xyz)');
    expect(told).toContain('licensed engineer');
  });

  it('writes a comparison that its schema accepts, the greatest change of force first', () => {
    const comparison = comparisonSchema.parse(JSON.parse(readFileSync(json, 'utf8')));
    expect(comparison.changed).toHaveLength(20);
    const changes = comparison.forces.map(({ change }) => change);
    expect(changes).toEqual([...changes].sort((p, q) => q - p));
    expect(changes[0]).toBeGreaterThan(0);
  });

  it('writes every table', () => {
    const names = readdirSync(join(folder, 'changes.csv')).sort();
    expect(names).toEqual(['findings.csv', 'forces.csv', 'loads.csv', 'members.csv', 'supports.csv']);
    const members = readFileSync(join(folder, 'changes.csv', 'members.csv'), 'utf8')
      .trimEnd()
      .split('\r\n');
    expect(members).toHaveLength(1 + 315 + 4 + 3);
  });
});

describe('pinwright compare', () => {
  it('ends with 1 where the new revision has an error that the old one had not', () => {
    const { code, stdout } = pinwright(['compare', a, faulty]);
    expect(code).toBe(1);
    expect(stdout).toContain('error near-miss');
  });

  it('never writes over one of the two models', () => {
    const { code, stderr } = pinwright(['compare', a, b, '-o', a.replace('.ifc', '.html')]);
    expect({ code, stderr }).toEqual({ code: 2, stderr: expect.stringContaining('use one of .json .csv .csv/') });
  });
});
