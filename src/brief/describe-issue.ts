import type { z } from 'zod';
import { didYouMean, nearestWord } from '../domain/nearest-word.ts';
import { knownKeysAt } from './known-keys.ts';
import { isValueNotYetAvailable } from './not-yet.ts';
import { oneLine } from './one-line.ts';
import type { Path, Problem, WrittenSource } from './written-source.ts';

type Issue = z.core.$ZodIssue;

/** An issue inside no union, with its path from the root of the brief. */
interface PlainIssue {
  readonly issue: Issue;
  readonly path: Path;
}

/** Says the issues of the schema in the words of a brief, each at its place in the file. */
export function describeIssues(issues: readonly Issue[], source: WrittenSource): Problem[] {
  const plain = issues.flatMap((issue) => resolveUnions(issue, [], source.value));
  const unknown = new Map<string, string[]>();
  for (const { issue, path } of plain)
    if (issue.code === 'unrecognized_keys') unknown.set(JSON.stringify(path), issue.keys);
  return plain
    .filter(({ issue, path }) => !followsFromUnknownKey(issue, path, unknown, source))
    .flatMap(({ issue, path }) => describe(issue, path, source));
}

/**
 * Of a union the branch that was most likely meant: one of the right kind (text, list, mapping), then with the fewest unknown
 * keys, then with the fewest issues. Where no branch is of the right kind the union itself is the issue.
 */
function resolveUnions(issue: Issue, around: Path, root: unknown): PlainIssue[] {
  const path = [...around, ...issue.path];
  if (issue.code !== 'invalid_union' || issue.errors.length === 0) return [{ issue, path }];
  const isMapping = typeof valueAt(root, path) === 'object';
  const fitting = issue.errors.filter(
    (branch) => !branch.some((inner) => inner.path.length === 0 && isWrongKind(inner, isMapping)),
  );
  const [best] = fitting.toSorted((a, b) => unknownKeys(a) - unknownKeys(b) || a.length - b.length);
  return best === undefined ? [{ issue, path }] : best.flatMap((inner) => resolveUnions(inner, path, root));
}

/** A mapping or list where one of some words is due is of the wrong kind; a wrong word is not, unless there is but one. */
const isWrongKind = (issue: Issue, isMapping: boolean): boolean =>
  issue.code === 'invalid_type' ||
  (issue.code === 'invalid_value' && (isMapping || issue.values.length === 1)) ||
  issue.code === 'invalid_union';

const unknownKeys = (issues: readonly Issue[]): number =>
  issues.reduce(
    (sum, issue) => sum + (issue.code === 'unrecognized_keys' && issue.path.length === 0 ? issue.keys.length : 0),
    0,
  );

/** Whether an issue only says again what a misspelt or unavailable key in the same mapping has already said. */
function followsFromUnknownKey(
  issue: Issue,
  path: Path,
  unknown: ReadonlyMap<string, readonly string[]>,
  source: WrittenSource,
): boolean {
  if (issue.code === 'unrecognized_keys') return false;
  if (issue.code === 'custom') return unknown.has(JSON.stringify(path));
  if (valueAt(source.value, path) !== undefined) return false;
  const keys = unknown.get(JSON.stringify(path.slice(0, -1))) ?? [];
  const absent = String(path.at(-1));
  return keys.some((key) => nearestWord(key, knownKeysAt(path.slice(0, -1))) === absent);
}

function describe(issue: Issue, path: Path, source: WrittenSource): Problem[] {
  const value = valueAt(source.value, path);
  const here = (message: string): Problem[] => [
    { ...source.place(path), message: `${source.excerpt(path)}${message}` },
  ];
  if (isValueNotYetAvailable(path, value)) return here('this is not available yet');
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({ ...source.placeOfKey(path, key), message: sayUnknownKey(key, path) }));
  }
  if (value === undefined && path.length > 0) {
    const key = oneLine(String(path.at(-1)));
    return [
      {
        ...source.place(path.slice(0, -1)),
        message: `${source.excerpt(path.slice(0, -1))}the key "${key}" is missing`,
      },
    ];
  }
  return here(saySomethingElseIsDue(issue, value));
}

function sayUnknownKey(key: string, path: Path): string {
  const shown = `"${oneLine(key, 60)}"`;
  return `${shown}: there is no such key here${didYouMean(key, knownKeysAt(path))}`;
}

const DUE: Readonly<Record<string, string>> = {
  string: 'a text is due',
  number: 'a number is due',
  boolean: 'true or false is due',
  object: 'a mapping (key: value) is due',
  record: 'a mapping (key: value) is due',
  array: 'a list is due',
  tuple: 'a list is due',
};

function saySomethingElseIsDue(issue: Issue, value: unknown): string {
  switch (issue.code) {
    case 'invalid_type': {
      const quote = issue.expected === 'string' && (typeof value === 'number' || typeof value === 'boolean');
      return `${DUE[issue.expected] ?? `${issue.expected} is due`}${quote ? `; put it in quotes: "${value}"` : ''}`;
    }
    case 'invalid_value':
      return `${listOf(issue.values.map(String))} is due${didYouMean(String(value), issue.values.map(String))}`;
    case 'too_small':
      if (issue.origin !== 'array') return 'this may not be empty';
      return issue.minimum === 1 ? 'an empty list selects nothing' : `a list of ${issue.minimum} is due`;
    case 'too_big':
      return `a list of ${issue.maximum} is due`;
    case 'invalid_union':
      return issue.message === 'Invalid input' ? 'a mapping (key: value), or a list of such, is due' : issue.message;
    case 'invalid_key':
      return issue.issues[0]?.message ?? issue.message;
    default:
      return issue.message;
  }
}

function listOf(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} or ${words.at(-1)}`;
}

function valueAt(root: unknown, path: Path): unknown {
  let value = root;
  for (const step of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, step)) return undefined;
    value = (value as Record<PropertyKey, unknown>)[step];
  }
  return value;
}
