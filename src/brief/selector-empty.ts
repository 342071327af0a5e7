import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { Truss } from '../domain/truss.ts';
import { describeSelector } from './selectors/describe-selector.ts';
import { selectMembers } from './selectors/select-members.ts';
import { selectNodes } from './selectors/select-nodes.ts';
import type { MemberSelector, NodeSelector } from './types.ts';

/** A `selector-empty` for each of the selectors that catches no member. */
export function findEmptyMemberSelectors(members: readonly Member[], selectors: readonly MemberSelector[]): Finding[] {
  return selectors
    .filter((selector) => selectMembers(members, [selector]).length === 0)
    .map((selector) => say(selector, 'member'));
}

/** A `selector-empty` for each of the selectors that catches no node. */
export function findEmptyNodeSelectors(
  truss: Truss,
  members: readonly Member[],
  selectors: readonly NodeSelector[],
): Finding[] {
  return selectors
    .filter((selector) => selectNodes(truss, members, [selector]).length === 0)
    .map((selector) => say(selector, 'node'));
}

function say(selector: MemberSelector | NodeSelector, what: 'member' | 'node'): Finding {
  return finding(
    'selector-empty',
    `Line ${selector.line} of the brief: no ${what} is caught by ${describeSelector(selector)}.`,
    `See whether names, levels and places in the brief still fit the model, or take the rule out.`,
  );
}
