import { RequestError } from '../domain/errors.ts';
import type { Finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { Truss } from '../domain/truss.ts';
import { findEmptyMemberSelectors } from './selector-empty.ts';
import { selectMembers } from './selectors/select-members.ts';
import type { Brief, MemberSelector } from './types.ts';

/** Bars whose force has one sign only, by index. */
export interface ResolvedOneWay {
  readonly tensionOnly: readonly number[];
  readonly compressionOnly: readonly number[];
}

/** IfcStructuralCurveMemberTypeEnum. */
const PULLING: ReadonlySet<string | null> = new Set(['CABLE', 'TENSION_MEMBER']);
const PUSHING: ReadonlySet<string | null> = new Set(['COMPRESSION_MEMBER']);

/** What a structural analysis view says by itself. */
function barsOfView(truss: Truss, members: readonly Member[], types: ReadonlySet<string | null>): number[] {
  const acts = ({ axisFrom, predefinedType }: Member) => axisFrom === 'analysis-view' && types.has(predefinedType);
  return truss.bars.flatMap((bar, b) => (bar.members.some((member) => acts(members[member])) ? [b] : []));
}

/**
 * The bars of the members that the brief lets pull only or push only; a spliced or paired bar is one of them as soon as one of its members is.
 * Where the brief names none, a structural analysis view's own cables, ties and struts are.
 * @throws RequestError where a member is caught by both lists
 */
export function resolveOneWay(
  truss: Truss,
  members: readonly Member[],
  brief: Pick<Brief, 'tensionOnly' | 'compressionOnly'>,
): { oneWay: ResolvedOneWay; findings: Finding[] } {
  const barsOf = (selectors: readonly MemberSelector[]): number[] => {
    if (selectors.length === 0) return [];
    const chosen = new Set(selectMembers(members, selectors));
    return truss.bars.flatMap((bar, b) => (bar.members.some((member) => chosen.has(member)) ? [b] : []));
  };
  const saysNothing = brief.tensionOnly.length + brief.compressionOnly.length === 0;
  const oneWay = saysNothing
    ? { tensionOnly: barsOfView(truss, members, PULLING), compressionOnly: barsOfView(truss, members, PUSHING) }
    : { tensionOnly: barsOf(brief.tensionOnly), compressionOnly: barsOf(brief.compressionOnly) };
  const both = oneWay.tensionOnly.find((bar) => oneWay.compressionOnly.includes(bar));
  if (both !== undefined) {
    throw new RequestError(
      `the brief: ${truss.bars[both].name} is caught by tensionOnly (line ${brief.tensionOnly[0].line}) and by compressionOnly ` +
        `(line ${brief.compressionOnly[0].line}): it could carry nothing; leave it in one`,
    );
  }
  const findings = findEmptyMemberSelectors(members, [...brief.tensionOnly, ...brief.compressionOnly]);
  return { oneWay, findings };
}
