import type { Finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import { findEmptyMemberSelectors } from './selector-empty.ts';
import { memberTest } from './selectors/select-members.ts';
import type { Brief, LengthRule } from './types.ts';

/** Lengths in m: one for all members, or one each in their order; null where the sections decide. */
type Lengths = number | null | readonly (number | null)[];

/** How far the brief lets each member be carried along its axis, and aside. */
export function jointLimits(
  members: readonly Member[],
  { reach, offset }: Pick<Brief['joints'], 'reach' | 'offset'>,
): { reach: Lengths; offset: Lengths; findings: Finding[] } {
  const selectors = [reach, offset].flatMap((limit) => (isRules(limit) ? limit.flatMap(({ on }) => on) : []));
  return {
    reach: lengthsOf(members, reach),
    offset: lengthsOf(members, offset),
    findings: findEmptyMemberSelectors(members, selectors),
  };
}

type Limit = Brief['joints']['reach'];

const isRules = (limit: Limit): limit is readonly LengthRule[] => typeof limit === 'object' && limit !== null;

function lengthsOf(members: readonly Member[], limit: Limit): Lengths {
  if (!isRules(limit)) return limit;
  const rules = limit.map(({ on, use }) => ({ use, tests: on.map(memberTest) })).reverse();
  return members.map((member) => rules.find(({ tests }) => tests.some((holds) => holds(member)))?.use ?? null);
}
