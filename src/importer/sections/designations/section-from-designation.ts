import type { Section } from '../../../domain/member.ts';
import { sectionOf } from '../profile-shape.ts';
import { pairFromDesignation } from './pair.ts';
import { shapeFromDesignation } from './shape-from-designation.ts';

/**
 * The section that `text` as a whole calls by its designation ('HEA 200', 'W12X26', '150*100*6.3 RHS', '2L 80x80x8'), its properties
 * computed from the dimensions of the standard; null where it is none that is known.
 */
export function sectionFromDesignation(text: string): Section | null {
  const shape = shapeFromDesignation(text);
  const section = shape === null ? pairFromDesignation(text) : sectionOf(shape);
  return section === null ? null : { ...section, from: 'name' };
}

/** Longest run of words that is tried as one designation: 'HE 200 A', 'L 3 1/2 x 3 x 1/4'. */
const MOST_WORDS = 8;

/** In a longer text a letter and a number alone mean anything: 'T 100', 'U 200', 'I 300' must stand by themselves. */
const TOO_SHORT = /^[A-Z]\s?\d+$/i;

/** No word of a designation is longer than 'ROUND' or 'HFRHS'; only to look no further, since models have many names. */
const LONG_WORD = /(?<![A-Z])[A-Z]{6,}/i;

const isNoDesignation = (run: string): boolean => !/\d/.test(run) || LONG_WORD.test(run) || TOO_SHORT.test(run);

/** The designation in a text that says more, the longest first: 'UB:305x165x40UB:310', 'Column HEA 200'. */
export function sectionNamedIn(text: string): Section | null {
  const whole = sectionFromDesignation(text.trim());
  if (whole !== null) return whole;
  const parts = text.slice(0, 200).split(/[:;|()[\]]|\s[-–]\s|_/);
  for (const part of parts) {
    if (!/\d/.test(part)) continue;
    const words = part.split(/\s+/).filter((word) => word !== '');
    for (let count = Math.min(MOST_WORDS, words.length); count > 0; count--) {
      for (let from = 0; from + count <= words.length; from++) {
        const run = words.slice(from, from + count).join(' ');
        const found = isNoDesignation(run) ? null : sectionFromDesignation(run);
        if (found !== null) return found;
      }
    }
  }
  return null;
}
