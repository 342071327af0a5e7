import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect } from 'vitest';
import { makeTopics } from '../../src/bcf/make-topics.ts';
import { bcfOf, topicModel } from '../../src/bcf/write-bcf.ts';
import type { Result } from '../../src/domain/result.ts';
import { runChecker } from '../support/run-cli.ts';

/** Has an independent checker look at the topics of a result in both versions. */
export function checkBothVersions(checker: string, folder: string, result: Result, model: string): void {
  const about = topicModel(result);
  const topics = makeTopics(result, about.date);
  for (const version of ['3.0', '2.1'] as const) {
    const path = join(folder, `${version}.bcf`);
    writeFileSync(path, bcfOf(topics, about, version));
    const { code, output } = runChecker(checker, [path, '--ifc', model]);
    expect(output).toMatch(/^0 problems in \d+ topics/m);
    // Where the machine has no xmllint the checker says so by 3, after all its other checks.
    expect(code).toBe(output.includes('xmllint is missing') ? 3 : 0);
  }
}

/** One finding of each code, the last `most` of them: pictures take their time. */
export function someFindings(result: Result, most: number): Result {
  const codes = new Map(result.findings.map((finding) => [finding.code, finding]));
  return { ...result, findings: [...codes.values()].slice(-most) };
}
