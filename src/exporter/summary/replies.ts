import type { Result, ResultFinding } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { harmless, shortened, wrapped } from './layout.ts';
import type { SummaryOptions } from './options.ts';

const LONGEST_COMMENT = 160;

/** What came back of a finding's topic, in a sentence or two; null where nothing did. */
export function replyWords({ reply }: ResultFinding): string | null {
  if (reply === undefined) return null;
  const { status, closed, assignedTo, comments } = reply;
  const last = comments.at(-1);
  return [
    closed
      ? `Reply: the topic came back as ${harmless(status)}, but the finding stands.`
      : `Reply: ${harmless(status) || 'no status'}${assignedTo === null ? '' : `, assigned to ${harmless(assignedTo)}`}.`,
    ...(last === undefined
      ? []
      : [`${harmless(last.author) || 'Somebody'} wrote: ${shortened(harmless(last.text), LONGEST_COMMENT)}`]),
    ...(comments.length > 1 ? [`(${comments.length} comments)`] : []),
  ].join(' ');
}

const TOLD = 5;

/** What a returned BCF file said, as a whole. */
export function replies(result: Result, { width }: SummaryOptions): string[] {
  if (result.replies === undefined) return [];
  const { file, topics, matched, gone, others, unreadable } = result.replies;
  const stands = result.findings.filter(({ reply }) => reply?.closed === true).length;
  const said = [
    `${harmless(file)}: ${count(topics, 'topic')}, ${matched} about findings that stand`,
    ...(stands > 0 ? [`${count(stands, 'finding')} of topics that were closed`] : []),
    ...(gone.length > 0 ? [`${count(gone.length, 'topic')} whose finding is gone: closed in the next BCF`] : []),
    ...(others > 0 ? [`${count(others, 'topic')} about something else`] : []),
    ...(unreadable > 0 ? [`${count(unreadable, 'topic')} that could not be read`] : []),
  ];
  const lines = wrapped(said.join('; '), width, 'Replies  ', '         ');
  for (const { title } of gone.slice(0, TOLD))
    lines.push(...wrapped(`gone: ${harmless(title)}`, width, '         - ', '           '));
  if (gone.length > TOLD) lines.push(`         - and ${gone.length - TOLD} more`);
  return lines;
}
