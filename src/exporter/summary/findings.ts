import type { Result, ResultFinding } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { millimetres } from '../../domain/words.ts';
import { harmless, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';
import { replyWords } from './replies.ts';

/** What is wrong with the file itself is told first: much of the rest may follow from it. */
const FAULTS_OF_FILE: ReadonlySet<string> = new Set([
  'unreadable-element',
  'cyclic-placement',
  'dangling-reference',
  'doubled-id',
  'doubled-globalid',
  'units-missing',
  'schema-guessed',
  'encoding-broken',
]);

const SEVERITIES = ['error', 'warning', 'note'] as const;

/** The findings by severity and code, the first few of each told with place and gap. */
export function findings(result: Result, options: SummaryOptions): string[] {
  const all = result.findings;
  const totals = SEVERITIES.map((severity) =>
    count(all.filter((found) => found.severity === severity).length, severity),
  );
  const lines = [`Found    ${totals.join(', ')}`];
  const grouped = [
    ...SEVERITIES.map((severity) =>
      all.filter((found) => found.severity === severity && FAULTS_OF_FILE.has(found.code)),
    ),
    ...SEVERITIES.map((severity) =>
      all.filter((found) => found.severity === severity && !FAULTS_OF_FILE.has(found.code)),
    ),
  ];
  for (const ofSeverity of grouped) {
    const severity = ofSeverity[0]?.severity ?? 'note';
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
  const told = group.slice(0, shown);
  const lines = told.flatMap((found, i) => {
    const isSaid = severity === 'note' || found.advice === told[i + 1]?.advice;
    return [
      ...wrapped(sentence(found), width, '         - ', '           '),
      ...wrapped(replyWords(found) ?? '', width, '           ', '           '),
      ...(isSaid ? [] : wrapped(`To do: ${harmless(found.advice)}`, width, '           ', '           ')),
    ];
  });
  const more = group.length - shown;
  if (more > 0) lines.push(`         - and ${more} more`);
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
