const LONGEST_QUOTE = 60;

// Control and format characters could move the cursor or turn the direction of what follows them on a terminal.
const UNPRINTABLE = /[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]+/gu;

/** Text from a file made fit for one line of an error: white space as single spaces, no control characters, cut at `longest`. */
export function oneLine(text: string, longest = 200): string {
  const flat = text
    .slice(0, 4 * longest)
    .replace(/\s+/gu, ' ')
    .replace(UNPRINTABLE, '?')
    .trim();
  const letters = [...flat];
  return letters.length > longest ? `${letters.slice(0, longest - 1).join('')}…` : flat;
}

/** The text an error is about, as `"text": `; in its own quotes where it has them; nothing where there is no text. */
export function quoted(text: string): string {
  const short = oneLine(text, LONGEST_QUOTE);
  if (short === '') return '';
  return /^(["']).*\1$/u.test(short) ? `${short}: ` : `"${short}": `;
}
