import type { Member } from '../../domain/member.ts';
import { distance } from '../../domain/vector.ts';
import type { MemberRole } from './roles.ts';

/** Members alike: one section, one role, one length as drawn. */
export interface Family {
  readonly role: MemberRole;
  readonly section: string | null;
  /** m as drawn, of the middle one. */
  readonly length: number;
  /** Indices into the members, in their order. */
  readonly members: readonly number[];
  /** The far larger family of nearly this length beside which these few look like a slip; null for a regular family. */
  readonly oddBeside: { readonly length: number; readonly count: number } | null;
}

/** Members cut to one length differ by less, m: half a millimetre of rounding at each end and what a drawing leaves. */
const SAME_LENGTH = 0.002;
/** A slip is a few members beside at least so many times more that are right. */
const TIMES_MORE = 8;
/** A slip is nearly as long as its right siblings: within this share of their length, or within this, m. */
const NEARLY = 0.1;
const NEARLY_LENGTH = 0.3;

/** A kind is regular, and an odd length in it odd, where this share of it comes in families of so many: no free-form grid. */
const REGULAR_SHARE = 0.75;
const FEW = 4;

interface Cut {
  readonly length: number;
  readonly members: readonly number[];
}

/** The families, odd ones first (the more siblings they differ from, the earlier), then the largest. */
export function findFamilies(members: readonly Member[], roles: readonly (MemberRole | null)[]): Family[] {
  const kinds = new Map<string, { role: MemberRole; section: string | null; own: number[] }>();
  members.forEach((member, index) => {
    const role = roles[index];
    if (role === null) return;
    const section = member.section?.name ?? null;
    const key = `${role} ${section ?? ''}`;
    const kind = kinds.get(key) ?? { role, section, own: [] };
    kinds.set(key, kind);
    kind.own.push(index);
  });
  const lengths = members.map(({ axis }) => distance(axis[0], axis[1]));
  const families = [...kinds.values()].flatMap(({ role, section, own }) => {
    const cuts = byLength(own, lengths);
    const inFamilies = cuts.reduce((sum, cut) => sum + (cut.members.length >= FEW ? cut.members.length : 0), 0);
    const isRegular = inFamilies >= REGULAR_SHARE * own.length;
    return cuts.map(
      (cut): Family => ({ role, section, ...cut, oddBeside: isRegular ? besideLarger(cut, cuts) : null }),
    );
  });
  return families.sort(compareFamilies);
}

/** The members that do one thing, by index. */
export function membersInRole(families: readonly Family[], role: MemberRole): ReadonlySet<number> {
  return new Set(families.flatMap((family) => (family.role === role ? family.members : [])));
}

/** Groups of one length, shortest first; a group does not stretch by chaining. */
function byLength(own: readonly number[], lengths: readonly number[]): Cut[] {
  const sorted = [...own].sort((a, b) => lengths[a] - lengths[b] || a - b);
  const groups: number[][] = [];
  for (const member of sorted) {
    const group = groups[groups.length - 1];
    if (group !== undefined && lengths[member] - lengths[group[0]] <= SAME_LENGTH) group.push(member);
    else groups.push([member]);
  }
  return groups.map((group) => ({
    length: lengths[group[group.length >> 1]],
    members: group.sort((a, b) => a - b),
  }));
}

function besideLarger(cut: Cut, cuts: readonly Cut[]): Family['oddBeside'] {
  let best: Cut | null = null;
  for (const other of cuts) {
    const apart = Math.abs(other.length - cut.length);
    const isNear = apart <= Math.max(NEARLY * other.length, NEARLY_LENGTH);
    if (!isNear || other.members.length < TIMES_MORE * cut.members.length) continue;
    if (best === null || other.members.length > best.members.length) best = other;
  }
  return best && { length: best.length, count: best.members.length };
}

const oddness = ({ oddBeside, members }: Family): number => (oddBeside === null ? 0 : oddBeside.count / members.length);

function compareFamilies(a: Family, b: Family): number {
  return (
    oddness(b) - oddness(a) ||
    b.members.length - a.members.length ||
    `${a.role} ${a.section}`.localeCompare(`${b.role} ${b.section}`, 'en') ||
    a.length - b.length
  );
}
