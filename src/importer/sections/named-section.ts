import type { Section } from '../../domain/member.ts';
import type { Remark } from '../findings-log.ts';
import { whose } from '../findings-log.ts';
import { isPair } from './designations/pair.ts';
import { sectionNamedIn } from './designations/section-from-designation.ts';

/** The section of a member as its names tell it. */
export interface NamedSection {
  readonly section: Section;
  readonly remark: Remark | null;
  /** Its z runs along the y of the section that was measured. */
  readonly isTurned: boolean;
}

/** A measured section and the one that is named are the same within this: what facets and left-out fillets make. */
const SAME_AREA = 0.05;

/**
 * What the first of `texts` that names a section tells of a member whose profile is not known: `found` is what was measured
 * of its body, or null. Null where a profile or numbers are known, or no text names a section.
 */
export function namedSection(found: Section | null, texts: () => readonly (string | null)[]): NamedSection | null {
  if (found !== null && found.from !== 'mesh') return null;
  for (const text of texts()) {
    const section = text === null ? null : sectionNamedIn(text);
    if (section === null) continue;
    if (found === null) return { section, remark: guessed(section), isTurned: false };
    // One of the two that a pair is: each is a body of its own.
    if (isPair(section.name) && Math.abs((2 * found.area) / section.area - 1) < SAME_AREA) return null;
    const isSame = Math.abs(found.area / section.area - 1) < SAME_AREA;
    return { section, remark: isSame ? null : differs(section, found), isTurned: liesAcross(found, section) };
  }
  return null;
}

function liesAcross(found: Section, section: Section): boolean {
  const apart = (a: number, b: number) => Math.abs(a - section.depth) + Math.abs(b - section.width);
  return apart(found.width, found.depth) < apart(found.depth, found.width);
}

const guessed = (section: Section): Remark => ({
  code: 'guessed-section',
  key: section.name,
  say: (count, first) =>
    `${whose(count, first, 'have', 'has')} no profile; ${section.name} is taken because ${count === 1 ? 'its name says' : 'their names say'} so.`,
  advice: 'Give the member a profile with true dimensions, or name its section in the brief.',
});

const differs = (section: Section, found: Section): Remark => ({
  code: 'section-disagrees',
  key: `${section.name} mesh`,
  say: (count, first) =>
    `${whose(count, first, 'are', 'is')} named ${section.name}, and ${count === 1 ? 'its body is' : 'bodies are'} ${inSquareMillimetres(found.area)} across instead of ${inSquareMillimetres(section.area)}; the name is taken.`,
  advice: 'Correct the body or the name in the model, or name the section in the brief.',
});

const inSquareMillimetres = (area: number): string => `${Math.round(area * 1e6)} mm2`;
