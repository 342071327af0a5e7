import type { Finding, FindingCode } from '../domain/finding.ts';
import { type Member, recordOf } from '../domain/member.ts';
import { strengthened } from '../importer/materials/material-book.ts';
import { findEmptyMemberSelectors } from './selector-empty.ts';
import { memberTest } from './selectors/select-members.ts';
import type { Brief } from './types.ts';

/**
 * The members with the sections that the brief gives them, their strengths by the new thickness. Selectors see the members as
 * the model has them, so that the order of the rules decides only which of two on one member counts: the last.
 */
export function applySections(
  members: readonly Member[],
  rules: Brief['sections'],
): { members: Member[]; findings: Finding[] } {
  const tests = rules.map(({ on, use }) => ({ use, on: on.map(memberTest) })).reverse();
  const changed = members.map((member): Member => {
    const rule = tests.find(({ on }) => on.some((holds) => holds(member)));
    if (rule === undefined) return member;
    return { ...recordOf(member), section: rule.use, material: strengthened(member.material, rule.use) };
  });
  const selectors = rules.flatMap(({ on }) => on);
  return { members: changed, findings: findEmptyMemberSelectors(members, selectors) };
}

const ABOUT_SECTIONS: ReadonlySet<FindingCode> = new Set<FindingCode>([
  'no-section',
  'guessed-section',
  'section-disagrees',
]);

/** The findings but for those about sections that the brief has settled for every member they name. */
export function withoutSettled(findings: readonly Finding[], members: readonly Member[]): Finding[] {
  const settled = new Set(members.filter(({ section }) => section?.from === 'brief').map(({ globalId }) => globalId));
  if (settled.size === 0) return [...findings];
  return findings.filter(
    ({ code, members: named }) =>
      !ABOUT_SECTIONS.has(code) || named.length === 0 || !named.every((globalId) => settled.has(globalId)),
  );
}
