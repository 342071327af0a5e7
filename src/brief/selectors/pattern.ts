/**
 * A test for texts by a pattern in which `*` stands for any run of characters, none included. The whole text must fit; upper
 * and lower case are the same, since models mix `Purlin` and `PURLIN` for one thing. A missing text fits no pattern.
 * Runs in time linear in the text for every pattern.
 */
export function textTest(pattern: string): (text: string | null) => boolean {
  return fitTest(fold(pattern), fold);
}

/** As `textTest` for identifiers in which case counts: two GlobalIds may differ by the case of one letter. */
export function exactTest(pattern: string): (text: string | null) => boolean {
  return fitTest(pattern, (text) => text);
}

const fold = (text: string): string => text.normalize('NFC').toLowerCase();

function fitTest(pattern: string, prepare: (text: string) => string): (text: string | null) => boolean {
  const pieces = pattern.split('*');
  return (raw) => {
    if (raw === null) return false;
    const text = prepare(raw);
    if (pieces.length === 1) return text === pattern;
    const first = pieces[0];
    const last = pieces.at(-1)!;
    if (text.length < first.length + last.length || !text.startsWith(first) || !text.endsWith(last)) return false;
    let from = first.length;
    const end = text.length - last.length;
    for (const piece of pieces.slice(1, -1)) {
      const found = text.indexOf(piece, from);
      if (found < 0 || found + piece.length > end) return false;
      from = found + piece.length;
    }
    return true;
  };
}
