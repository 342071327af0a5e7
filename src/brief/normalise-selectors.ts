import type { MemberSelector, NodeSelector } from './types.ts';
import type { WrittenMemberSelector, WrittenNodeSelector } from './written-selectors.ts';
import type { Path } from './written-source.ts';

type LineAt = (path: Path) => number;

export function toMemberSelectors(
  written: readonly WrittenMemberSelector[],
  path: Path,
  lineAt: LineAt,
): MemberSelector[] {
  return written.map((selector, i) => toMemberSelector(selector, [...path, i], lineAt));
}

function toMemberSelector(written: WrittenMemberSelector, path: Path, lineAt: LineAt): MemberSelector {
  const { not, ...keys } = withoutUndefined(written);
  const selector: MemberSelector = { line: lineAt(path), ...(keys as Omit<MemberSelector, 'line' | 'not'>) };
  return not === undefined ? selector : { ...selector, not: toMemberSelector(not, [...path, 'not'], lineAt) };
}

export function toNodeSelectors(written: readonly WrittenNodeSelector[], path: Path, lineAt: LineAt): NodeSelector[] {
  return written.map((selector, i) => toNodeSelector(selector, [...path, i], lineAt));
}

function toNodeSelector(written: WrittenNodeSelector, path: Path, lineAt: LineAt): NodeSelector {
  const { not, endOf, joins, ...keys } = withoutUndefined(written);
  return {
    line: lineAt(path),
    ...(keys as Omit<NodeSelector, 'line' | 'not' | 'endOf' | 'joins'>),
    ...(endOf === undefined ? {} : { endOf: toMemberSelectors(endOf, [...path, 'endOf'], lineAt) }),
    ...(joins === undefined ? {} : { joins: toMemberSelectors(joins, [...path, 'joins'], lineAt) }),
    ...(not === undefined ? {} : { not: toNodeSelector(not, [...path, 'not'], lineAt) }),
  };
}

type Defined<T> = { [K in keyof T]: Exclude<T[K], undefined> };

export function withoutUndefined<T extends object>(written: T): Defined<T> {
  return Object.fromEntries(Object.entries(written).filter(([, value]) => value !== undefined)) as Defined<T>;
}
