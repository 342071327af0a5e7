import { developedLength, type Member } from '../domain/member.ts';

/** Members that a scope would name alike. */
export interface MemberKind {
  readonly class: string;
  readonly section: string | null;
  readonly material: string;
  readonly count: number;
  /** How many of them the brief's scope takes. */
  readonly inScope: number;
  /** m, of all their axes. */
  readonly length: number;
}

/** The members that were read by class, section and material: what is in scope first, then the most in number. */
export function memberKinds(read: readonly Member[], inScope: readonly Member[]): MemberKind[] {
  const taken = new Set(inScope);
  const kinds = new Map<string, MemberKind>();
  for (const member of read) {
    const section = member.section?.name ?? null;
    const key = JSON.stringify([member.class, section, member.material.name]);
    const so = kinds.get(key);
    kinds.set(key, {
      class: member.class,
      section,
      material: member.material.name,
      count: (so?.count ?? 0) + 1,
      inScope: (so?.inScope ?? 0) + (taken.has(member) ? 1 : 0),
      length: (so?.length ?? 0) + developedLength(member),
    });
  }
  return [...kinds]
    .sort(([a, m], [b, n]) => n.inScope - m.inScope || n.count - m.count || (a < b ? -1 : 1))
    .map(([, kind]) => kind);
}
