import { type Finding, type FindingCode, finding, type Severity } from '../domain/finding.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Vec3 } from '../domain/vector.ts';

/** What is gathered of a remark over all it is met at. */
export interface Met {
  /** m; the greatest of the gaps, 0 where there are none. */
  readonly gap: number;
  /** The distinct texts, in the order of the alphabet. */
  readonly texts: readonly string[];
}

/** What one finding says, whichever members it is met at. */
export interface Remark {
  readonly code: FindingCode;
  /** Findings with the same code and key are one. */
  readonly key: string;
  /** The sentence, told of so many members, the first by what people call it. */
  readonly say: (count: number, first: string, met: Met) => string;
  readonly advice: string;
  readonly severity?: Severity;
  /** m; the finding has the greatest of those it is met with. */
  readonly gap?: number;
  /** A text of the file that the sentence speaks of, one of many. */
  readonly text?: string;
  /** Most GlobalIds to name; all where it is left out. */
  readonly most?: number;
}

interface Entry {
  readonly remark: Remark;
  /** Where each member was met. */
  readonly members: Map<string, Vec3 | null>;
  /** Where it was met outside any member. */
  at: Vec3 | null;
  gap: number | null;
  readonly texts: Set<string>;
}

/** Gathers what is met element by element, so that one cause is one finding with all the members it touches. */
export class FindingsLog {
  private readonly entries = new Map<string, Entry>();

  add(remark: Remark, globalId: string | null, at: Vec3 | null): void {
    const key = `${remark.code} ${remark.key}`;
    let entry = this.entries.get(key);
    if (entry === undefined) {
      entry = { remark, members: new Map(), at: null, gap: null, texts: new Set() };
      this.entries.set(key, entry);
    }
    if (remark.gap !== undefined) entry.gap = Math.max(entry.gap ?? 0, remark.gap);
    if (remark.text !== undefined) entry.texts.add(remark.text);
    if (globalId === null) entry.at ??= at;
    else entry.members.set(globalId, lower(entry.members.get(globalId) ?? null, at));
  }

  /** In an order that does not depend on the file's. `markOf`: what people call the element of a GlobalId. */
  findings(placeOf: PlaceNamer, markOf: (globalId: string) => string): Finding[] {
    const keys = [...this.entries.keys()].sort();
    return keys.map((key) => {
      const { remark, members, at: elsewhere, gap, texts } = this.entries.get(key)!;
      const named = [...members.keys()].sort();
      const at = (named[0] === undefined ? null : members.get(named[0])) ?? elsewhere;
      const first = named[0] === undefined ? '' : markOf(named[0]);
      const met = { gap: gap ?? 0, texts: [...texts].sort() };
      return finding(remark.code, remark.say(named.length, first, met), remark.advice, {
        ...(remark.severity === undefined ? {} : { severity: remark.severity }),
        members: named.slice(0, remark.most ?? named.length),
        at,
        place: at === null ? null : placeOf(at),
        gap,
      });
    });
  }
}

/** Of two places of one GlobalId the one that does not depend on which was met first. */
function lower(a: Vec3 | null, b: Vec3 | null): Vec3 | null {
  if (a === null || b === null) return a ?? b;
  return (a[0] - b[0] || a[1] - b[1] || a[2] - b[2]) <= 0 ? a : b;
}

/** 'Member B-12 has' or '42 members have': the beginning of many findings. */
export function whose(count: number, first: string, have: string, has: string): string {
  return count === 1 ? `Member ${first} ${has}` : `${count} members ${have}`;
}
