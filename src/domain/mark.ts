/** A tag that a program made up for itself: hexadecimal digits and strokes. */
const OWN_NUMBER = /^[0-9a-f-]{30,}$/i;

const LONGEST = 60;

/** What people call an element: its mark, else its name, in one short line; null where it has neither. */
export function markOf({ tag, name }: { readonly tag: string | null; readonly name: string | null }): string | null {
  const mark = oneLine(tag);
  return (mark !== '' && !OWN_NUMBER.test(mark) ? mark : oneLine(name)) || null;
}

function oneLine(text: string | null): string {
  const line = (text ?? '').replace(/\s+/g, ' ').trim();
  return line.length > LONGEST ? `${line.slice(0, LONGEST - 1)}…` : line;
}
