import type { Result, ResultFinding } from '../../domain/result.ts';
import { count } from '../verdict.ts';
import { harmless, millimetres, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';

const SEVERITIES = ['error', 'warning', 'note'] as const;

/** The findings by severity and code, the first few of each told with place and gap. */
export function findings(result: Result, options: SummaryOptions): string[] {
  const all = result.findings;
  const totals = SEVERITIES.map((severity) =>
    count(all.filter((found) => found.severity === severity).length, severity),
  );
  const lines = [`Found    ${totals.join(', ')}`];
  for (const severity of SEVERITIES) {
    const ofSeverity = all.filter((found) => found.severity === severity);
    for (const code of new Set(ofSeverity.map((found) => found.code))) {
      const group = ofSeverity.filter((found) => found.code === code);
      lines.push(`  ${severity.padEnd(9)}${code}${group.length > 1 ? `, ${group.length} times` : ''}`);
      lines.push(...told(group, severity, options));
    }
  }
  return lines;
}

function told(group: readonly ResultFinding[], severity: string, { width, findingsOfACode }: SummaryOptions): string[] {
  const shown = severity === 'note' ? 1 : findingsOfACode;
  const lines = group.slice(0, shown).flatMap((found) => wrapped(sentence(found), width, '         - ', '           '));
  const more = group.length - shown;
  if (more > 0) lines.push(`         - and ${more} more`);
  const advice = severity === 'note' ? '' : harmless(group[0]!.advice);
  if (advice !== '') lines.push(...wrapped(`To do: ${advice}`, width, '         ', '         '));
  return lines;
}

/** The message, with the place and the gap before it where it does not say them itself. */
function sentence(found: ResultFinding): string {
  const message = harmless(found.message);
  const place = harmless(found.place ?? '');
  const gap = found.gap === null ? '' : millimetres(found.gap);
  const before = [place, gap].filter((word) => word !== '' && !message.includes(word));
  return before.length === 0 ? message : `${before.join(', ')}: ${message}`;
}
