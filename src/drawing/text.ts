/** Widths of text without a font at hand, so that labels can be kept apart in a drawing that names only font families. */

/** What the drawings ask for: these share one set of widths on all systems that have any of them. */
export const FONT_FAMILIES = "Arimo, Arial, Helvetica, 'Liberation Sans', sans-serif";

/** Height of capitals, in ems. */
export const CAP_HEIGHT = 0.72;

/**
 * Advance widths of the characters from blank to tilde in thousandths of an em: those that Helvetica and the families made
 * to match it share (from memory; a test compares them with a font).
 */
const ASCII_WIDTHS = [
  278, 278, 355, 556, 556, 889, 667, 191, 333, 333, 389, 584, 278, 333, 278, 278, 556, 556, 556, 556, 556, 556, 556,
  556, 556, 556, 278, 278, 584, 584, 584, 556, 1015, 667, 667, 722, 722, 667, 611, 778, 722, 278, 500, 667, 556, 833,
  722, 778, 667, 778, 722, 667, 611, 722, 667, 944, 667, 667, 611, 278, 278, 278, 469, 556, 333, 556, 556, 500, 556,
  556, 278, 556, 556, 222, 222, 500, 222, 833, 556, 556, 556, 556, 333, 500, 278, 556, 500, 722, 500, 500, 500, 334,
  260, 334, 584,
];
const FIRST = 0x20;

/** Bold letters are about this much wider. */
const BOLD = 1.09;
/** In ems: other alphabets, and writing whose characters fill a square. */
const OTHER = 0.72;
const SQUARE = 1;

/** Width of a line of text in the unit of `size`. */
export function textWidth(text: string, size: number, isBold = false): number {
  let ems = 0;
  for (const character of text) {
    const code = character.codePointAt(0) ?? 0;
    const known = ASCII_WIDTHS[code - FIRST];
    ems += known === undefined ? (code >= 0x2e80 ? SQUARE : OTHER) : known / 1000;
  }
  return ems * size * (isBold ? BOLD : 1);
}

/** `text` cut to `width`, with an ellipsis where something had to go. */
export function fitted(text: string, size: number, width: number, isBold = false): string {
  if (textWidth(text, size, isBold) <= width) return text;
  const characters = [...text];
  while (characters.length > 0 && textWidth(`${characters.join('').trimEnd()}…`, size, isBold) > width)
    characters.pop();
  return characters.length === 0 ? '' : `${characters.join('').trimEnd()}…`;
}

/** Lines of at most `width`, broken between words; the last of `most` lines is cut where there is more. */
export function wrappedText(text: string, size: number, width: number, most = Number.POSITIVE_INFINITY): string[] {
  const lines: string[] = [];
  let line = '';
  const words = text.split(/\s+/).filter((word) => word !== '');
  for (const [k, word] of words.entries()) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (textWidth(longer, size) <= width) {
      line = longer;
    } else if (lines.length === most - 1) {
      return [...lines, fitted(`${longer} ${words.slice(k + 1).join(' ')}`, size, width)];
    } else {
      if (line !== '') lines.push(line);
      line = fitted(word, size, width);
    }
  }
  return line === '' ? lines : [...lines, line];
}

/** Without control characters and marks that turn the reading direction, which a model's names may carry. */
export function plain(text: string): string {
  return text
    .replace(/[\p{Cc}\p{Cs}\u2028\u2029\ufffe\uffff]+/gu, ' ')
    .replace(/[\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]/g, '')
    .trim();
}
