import { RequestError } from '../domain/errors.ts';
import { findNameProblems } from './check-names.ts';
import { findCheckProblems } from './check-rules.ts';
import { describeIssues } from './describe-issue.ts';
import { normaliseBrief } from './normalise.ts';
import { oneLine } from './one-line.ts';
import { briefInputSchema } from './schema.ts';
import type { Brief } from './types.ts';
import { type Problem, readSource, type WrittenSource } from './written-source.ts';

/** Bytes; a brief is written by hand, so a larger one is some other file. */
export const LARGEST_BRIEF = 2 ** 20;

const MOST_LISTED = 100;

/**
 * Reads a brief, YAML 1.2 or JSON.
 * @param text the whole file, as bytes or already decoded
 * @param fileName stands in front of every problem
 * @throws RequestError listing every problem, one a line: `file:line:column: "text": what is wrong`
 * @example parseBrief('pinwright: 1\nsupports:\n  - {at: {lowest: true}, fix: xyz}\n', 'brief.yaml')
 */
export function parseBrief(text: string | Uint8Array, fileName: string): Brief {
  const file = oneLine(fileName);
  const size = typeof text === 'string' ? new TextEncoder().encode(text).length : text.length;
  if (size > LARGEST_BRIEF) {
    throw new RequestError(`${file}: ${size} bytes; a brief is at most ${LARGEST_BRIEF} bytes (1 MiB)`);
  }
  const decoded = (typeof text === 'string' ? text : decode(text, file)).replace(/^\uFEFF/u, '');
  const source = readShallow(decoded, file);
  if (source.problems.length > 0) throw problemsIn(file, source.problems);
  const version = findVersionProblem(source);
  if (version !== null) throw problemsIn(file, [version]);
  const checked = briefInputSchema.safeParse(source.value);
  if (!checked.success) throw problemsIn(file, describeIssues(checked.error.issues, source));
  const further = [...findNameProblems(checked.data, source), ...findCheckProblems(checked.data, source)];
  if (further.length > 0) throw problemsIn(file, further);
  return normaliseBrief(checked.data, (path) => source.place(path).line);
}

function decode(bytes: Uint8Array, file: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    const before = new TextDecoder('utf-8').decode(bytes).split('\uFFFD')[0]!;
    const lines = before.split('\n');
    throw problemsIn(file, [
      { line: lines.length, column: lines.at(-1)!.length + 1, message: 'this is not UTF-8; save the brief as UTF-8' },
    ]);
  }
}

/** The parser calls itself for every level of nesting, so absurdly deep files end its stack; no brief goes ten deep. */
function readShallow(text: string, file: string): WrittenSource {
  try {
    return readSource(text);
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    throw problemsIn(file, [{ line: 1, column: 1, message: 'this is nested too deeply to be a brief' }]);
  }
}

function findVersionProblem(source: WrittenSource): Problem | null {
  const { value } = source;
  if (value === null || value === undefined) {
    return { line: 1, column: 1, message: 'the brief is empty; it begins with "pinwright: 1"' };
  }
  if (typeof value !== 'object' || Array.isArray(value)) {
    return {
      ...source.place([]),
      message: `${source.excerpt([])}a brief is a mapping that begins with "pinwright: 1"`,
    };
  }
  if (!Object.hasOwn(value, 'pinwright')) {
    return { line: 1, column: 1, message: 'the key "pinwright: 1" is missing; every brief begins with it' };
  }
  if ((value as { pinwright: unknown }).pinwright === 1) return null;
  return {
    ...source.place(['pinwright']),
    message: `${source.excerpt(['pinwright'])}this version reads briefs of "pinwright: 1"`,
  };
}

function problemsIn(file: string, problems: readonly Problem[]): RequestError {
  const lines = problems
    .toSorted((a, b) => a.line - b.line || a.column - b.column)
    .map((problem) => `${file}:${problem.line}:${problem.column}: ${problem.message}`);
  const distinct = [...new Set(lines)];
  const listed = distinct.slice(0, MOST_LISTED);
  if (distinct.length > MOST_LISTED) listed.push(`${file}: and ${distinct.length - MOST_LISTED} more`);
  return new RequestError(listed.join('\n'));
}
