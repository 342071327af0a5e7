import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { pinwright } from '../support/run-cli.ts';

const checkout = fileURLToPath(new URL('../..', import.meta.url));
const readme = readFileSync(`${checkout}/README.md`, 'utf8');

/** Blocks of text in the README that show what a command prints. */
const shown = [...readme.matchAll(/```text\n(.*?)```/gs)].map(([, text]) => text.trimEnd());

/** Rounding noise differs from machine to machine. */
const withoutNoise = (text: string) => text.replace(/ +\de-1\d\b/g, ' ~0');

describe('the README shows what', () => {
  it('the demo prints', () => {
    const { stdout } = pinwright(
      ['analyse', 'fixtures/boat-hall-a.ifc', '--brief', 'fixtures/boat-hall.yaml'],
      checkout,
    );
    const [demo] = shown[0].split('\n\nWritten:');
    expect(withoutNoise(demo)).toBe(withoutNoise(stdout.trimEnd()));
  });

  it('the survey of the faulty hall prints, but for the caution', () => {
    const { stdout } = pinwright(
      ['survey', 'fixtures/boat-hall-faults.ifc', '--brief', 'fixtures/boat-hall.yaml'],
      checkout,
    );
    expect(withoutNoise(stdout)).toContain(withoutNoise(shown[1]));
  });
});

describe('the README shows of a joint', () => {
  it('what --joint prints', () => {
    const asked = ['--joint', '12,18,6.4', '--case', 'hoist'];
    const { stdout } = pinwright(
      ['analyse', 'fixtures/boat-hall-a.ifc', '--brief', 'fixtures/boat-hall.yaml', ...asked],
      checkout,
    );
    expect(withoutNoise(stdout)).toContain(withoutNoise(shown[2]));
  });
});

describe('every code that the README explains', () => {
  it('is a code of the program, and every example brief in it is accepted', async () => {
    const { FINDING_SEVERITY } = await import('../../src/domain/finding.ts');
    const table = readme.slice(readme.indexOf('## Findings'), readme.indexOf('## As a library'));
    const codes = [...table.matchAll(/^\| (`.*?`) \|/gm)].flatMap(([, cell]) => [...cell.matchAll(/`([^`]+)`/g)]);
    expect(codes.length).toBeGreaterThan(20);
    for (const [, code] of codes) expect(FINDING_SEVERITY).toHaveProperty(code);

    const { parseBrief } = await import('../../src/brief/parse-brief.ts');
    const briefs = [...readme.matchAll(/```yaml\n(.*?)```/gs)];
    expect(briefs).toHaveLength(1);
    for (const [, text] of briefs) expect(() => parseBrief(text, 'README')).not.toThrow();
  });
});
