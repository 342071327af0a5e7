import { pushTo } from '../domain/group.ts';
import type { Result, ResultFinding, ResultMember } from '../domain/result.ts';
import { NAMESPACE, uuidText, uuidVersion5 } from '../domain/uuid.ts';
import { distance, type Vec3 } from '../domain/vector.ts';

/** Findings that make one topic: one, or several of one cause. */
export interface FindingGroup {
  readonly guid: string;
  readonly findings: readonly ResultFinding[];
}

/** Alike findings at so many places are one cause that repeats. */
const REPEATED = 3;

/** Findings about one end of a member, which may have the same fault at its other end. */
const ABOUT_AN_END: ReadonlySet<string> = new Set(['near-miss', 'loose-end']);

/**
 * One topic a finding; one for all that speak of the same members (a mechanism that several load cases meet), and one for
 * three and more that are alike: the same code, sections and gap. Their ids hold from revision to revision, since they
 * come of the code and the GlobalIds, of a repeated cause of what is alike in it; never of node numbers or order.
 */
export function groupFindings(result: Result): FindingGroup[] {
  const members = new Map(result.members.map((member) => [member.globalId, member]));
  const sets = new Map<string, ResultFinding[]>();
  for (const finding of result.findings) pushTo(sets, sameMembers(finding, members), finding);
  const alike = new Map<string, (readonly [string, ResultFinding[]])[]>();
  for (const [key, findings] of sets) pushTo(alike, likeness(findings[0]!, members), [key, findings]);

  const groups: { key: string; findings: ResultFinding[] }[] = [];
  for (const [key, found] of alike) {
    if (found.length < REPEATED) groups.push(...found.map(([own, findings]) => ({ key: own, findings })));
    else groups.push({ key: `alike\n${key}`, findings: found.flatMap(([, findings]) => findings) });
  }
  const order = new Map(result.findings.map((finding, k) => [finding, k]));
  return groups
    .sort((a, b) => order.get(a.findings[0]!)! - order.get(b.findings[0]!)!)
    .map(({ key, findings }) => ({ guid: uuidText(uuidVersion5(NAMESPACE, `topic\n${key}`)), findings }));
}

function sameMembers(finding: ResultFinding, members: ReadonlyMap<string, ResultMember>): string {
  const { code } = finding;
  const concerned = [...finding.members].sort();
  if (concerned.length === 0) return [code, finding.place ?? finding.message].join('\n');
  return [code, ...concerned, endOf(finding, members)].join('\n');
}

/** Which end of the first member a finding is about, told by where the ends lie and not by how the member is drawn. */
function endOf({ code, at, members: [first] }: ResultFinding, members: ReadonlyMap<string, ResultMember>): string {
  const member = first === undefined ? undefined : members.get(first);
  if (at === null || member === undefined || !ABOUT_AN_END.has(code)) return '';
  const [low, high] = [...member.axis].sort(byPlace);
  return distance(at, low!) <= distance(at, high!) ? 'low' : 'high';
}

function byPlace(a: Vec3, b: Vec3): number {
  const k = [0, 1, 2].find((i) => Math.abs(a[i]! - b[i]!) > 1e-2) ?? 0;
  return a[k]! - b[k]!;
}

/** What findings of one cause share; the gap to the centimetre. What moves or is loaded is never alike: each has its own mend. */
function likeness(finding: ResultFinding, members: ReadonlyMap<string, ResultMember>): string {
  const { code, severity, gap } = finding;
  const concerned = finding.members.map((globalId) => members.get(globalId));
  if (finding.at === null || concerned.length === 0 || concerned.length > 2 || code === 'moves-freely') {
    return ['alone', sameMembers(finding, members)].join('\n');
  }
  const looks = concerned.map((member) => [member?.class, member?.type, member?.section?.name].join('|'));
  return [code, severity, ...looks, gap === null ? '' : gap.toFixed(2)].join('\n');
}
