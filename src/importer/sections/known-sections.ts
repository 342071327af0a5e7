import type { Section } from '../../domain/member.ts';
import { sectionNamedIn } from './designations/section-from-designation.ts';

/** The section that the first of `texts` to name one names; else that which the element's fellows show, where there are any. */
export function knownSections(texts: readonly (string | null)[], ofFellows: () => Section | null): readonly Section[] {
  for (const text of texts) {
    const named = text === null ? null : sectionNamedIn(text);
    if (named !== null) return [named];
  }
  const shown = ofFellows();
  return shown === null ? [] : [shown];
}
