import { pushTo } from '../domain/group.ts';
import type { Result, ResultFinding } from '../domain/result.ts';
import { distance } from '../domain/vector.ts';
import type { Comparison } from './comparison.ts';
import type { Matching } from './match-members.ts';

/** m within which two findings of one code about the same members are one. */
const SAME_SPOT = 0.5;

/**
 * Findings that are new, gone, and still there (as they are told now). A finding stands where one of its code names some
 * of the same members, or none at all, and no other is more alike.
 */
export function findingChanges(old: Result, now: Result, { pairs }: Matching): Comparison['findings'] {
  const newOf = new Map(pairs.map((pair) => [old.members[pair.old].globalId, now.members[pair.now].globalId]));
  const left = new Map<string, ResultFinding[]>();
  for (const one of old.findings) pushTo(left, one.code, one);
  const standing: ResultFinding[] = [];
  const fresh: ResultFinding[] = [];
  for (const finding of now.findings) {
    const candidates = left.get(finding.code) ?? [];
    const best = mostAlike(finding, candidates, newOf);
    if (best === null) fresh.push(finding);
    else {
      standing.push(finding);
      candidates.splice(candidates.indexOf(best), 1);
    }
  }
  const remaining = new Set([...left.values()].flat());
  return { new: fresh, gone: old.findings.filter((one) => remaining.has(one)), standing };
}

function mostAlike(
  finding: ResultFinding,
  candidates: readonly ResultFinding[],
  newOf: ReadonlyMap<string, string>,
): ResultFinding | null {
  let best: ResultFinding | null = null;
  let most = 0;
  for (const candidate of candidates) {
    const likeness = likenessOf(finding, candidate, newOf);
    if (likeness > most) [best, most] = [candidate, likeness];
  }
  return best;
}

/** 0: another finding; up to 2: the same members at the same spot. */
function likenessOf(finding: ResultFinding, before: ResultFinding, newOf: ReadonlyMap<string, string>): number {
  const isNear = finding.at !== null && before.at !== null && distance(finding.at, before.at) <= SAME_SPOT;
  if (finding.members.length === 0 && before.members.length === 0) {
    if (finding.at === null && before.at === null) return wordsOf(finding) === wordsOf(before) ? 2 : 1;
    return isNear ? 2 : 0;
  }
  const then = new Set(before.members.map((one) => newOf.get(one)));
  const shared = finding.members.filter((one) => then.has(one)).length;
  const share = shared / Math.max(1, finding.members.length, before.members.length);
  // A note sums up what is many times in the model: it is the same note about other members.
  if (share === 0) return finding.severity === 'note' ? 0.01 : 0;
  return share + (isNear ? 1 : 0);
}

/** The message without its numbers, which change from revision to revision. */
const wordsOf = ({ message }: ResultFinding): string => message.replace(/[\d.,]+/g, '#');
