import { readFileSync } from 'node:fs';
import { XMLValidator } from 'fast-xml-parser';
import { beforeAll, describe, expect, it } from 'vitest';
import { CAUTION } from '../../../src/domain/caution.ts';
import type { Result } from '../../../src/domain/result.ts';
import { verdict } from '../../../src/domain/verdict.ts';
import { joinChunks } from '../../../src/exporter/chunks.ts';
import { escaped } from '../../../src/exporter/report/html.ts';
import { reportOf } from '../../../src/exporter/report/report.ts';
import { runModel } from '../../../src/pipeline.ts';
import { fixture } from '../../support/shared.ts';
import { someMember, someResult } from '../support.ts';

const textOf = (result: Result): string => new TextDecoder().decode(joinChunks(reportOf(result)));

/** HTML's void elements closed, so that any slip in nesting or escaping is a fault of the XML. */
const asXml = (report: string): string =>
  report
    .replace('<!doctype html>\n', '')
    .replace(/<(meta|input)([^>]*)>/g, '<$1$2/>')
    .replace(/ type=checkbox/g, '');

describe('the report of the hall with planted faults', () => {
  let result: Result;
  let report: string;
  beforeAll(async () => {
    const bytes = readFileSync(fixture('boat-hall-faults.ifc'));
    ({ result } = await runModel(bytes, { extent: 'survey', fileName: 'boat-hall-faults.ifc' }));
    report = textOf(result);
  });

  it('begins with the verdict and says the caution at both ends', () => {
    expect(report.indexOf(escaped(verdict(result)))).toBeLessThan(report.indexOf('id="findings"'));
    expect(report.split(escaped(CAUTION))).toHaveLength(3 + (report.match(/<desc>/g)?.length ?? 0));
  });

  it('tells every finding, with pictures of those that have a spot', () => {
    for (const { message } of result.findings) expect(report).toContain(escaped(message));
    expect(report.match(/<figure>/g)!.length).toBeGreaterThanOrEqual(6);
    expect(report.match(/<figure class="view">/g)!.length).toBeGreaterThanOrEqual(3);
  });

  it('needs nothing from outside', () => {
    expect(report).not.toMatch(/(src|href)="(?!#)/);
    expect(report).not.toMatch(/@import|url\(/);
  });

  it('is well formed throughout', () => {
    expect(XMLValidator.validate(asXml(report).replace(/<(input[^>]*)\/>/g, '<i/>'))).toBe(true);
  });

  it('is the same every time', () => {
    expect(textOf(result)).toBe(report);
  });
});

describe('a name in a report', () => {
  it('stays a name, whatever it holds', () => {
    const name = '<script>alert("x")</script>';
    const report = textOf({ ...someResult(['a']), members: [someMember('a', { name, class: '<b>&' })] });
    expect(report).not.toContain('<script>');
    expect(report).toContain('&lt;b&gt;&amp;');
  });
});
