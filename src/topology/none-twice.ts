import type { Finding } from '../domain/finding.ts';
import { distance } from '../domain/vector.ts';

/** Rounding between two ways of measuring one gap, m. */
const SAME = 0.001;

/**
 * The findings of joining without those that say again what another says: a near miss of an end of a lone member, or at it; of
 * two ends that miss each other the second; a miss of two members that overlap; a crowded joint of two members whose miss is
 * said; a loose end at the very node where its part lies nearest to the rest.
 */
export function noneTwice(findings: readonly Finding[]): Finding[] {
  const lone = findings.filter(({ code }) => code === 'lone-member');
  const overlapping = new Set(findings.filter(({ code }) => code === 'overlap').map(pairOf));
  const nearestOfParts = new Set(findings.filter(({ code }) => code === 'separate-part').map(({ nodes }) => nodes[0]));
  const told: Finding[] = [];
  for (const found of findings) {
    if (found.code !== 'near-miss' || overlapping.has(pairOf(found))) continue;
    if (lone.some((one) => isOf(found, one)) || told.some((one) => isMutual(found, one))) continue;
    told.push(found);
  }
  const misses = new Set(told);
  return findings.filter((found) => {
    if (found.code === 'near-miss') return misses.has(found);
    if (found.code === 'loose-end') return !found.nodes.some((node) => nearestOfParts.has(node));
    return found.code !== 'crowded-joint' || ![...told, ...lone].some((one) => isAboutSame(found, one));
  });
}

const pairOf = ({ members }: Finding): string => [...members].sort().join(' ');

/** Whether a near miss is one of a lone member's own ends, or of another's end at the place where the lone one lies nearest. */
function isOf(miss: Finding, lone: Finding): boolean {
  const [own] = lone.members;
  if (miss.members[0] === own) return true;
  return miss.members[1] === own && apart(miss, lone) <= Math.max(miss.gap ?? 0, lone.gap ?? 0) + SAME;
}

const isMutual = (p: Finding, q: Finding): boolean =>
  p.members[0] === q.members[1] &&
  p.members[1] === q.members[0] &&
  apart(p, q) <= Math.max(p.gap ?? 0, q.gap ?? 0) + SAME;

/** Whether all that a finding names is near the place of another and one of its members is named there. */
const isAboutSame = (crowded: Finding, other: Finding): boolean =>
  other.members.every((member) => crowded.members.includes(member)) &&
  apart(crowded, other) <= (crowded.gap ?? 0) + (other.gap ?? 0) + SAME;

const apart = (p: Finding, q: Finding): number =>
  p.at === null || q.at === null ? Number.POSITIVE_INFINITY : distance(p.at, q.at);
