/** A tag that a program made up for itself. */
const UUID = /^[0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12}$/i;

/** What people call an element: its mark, else its name; null where it has neither. */
export function markOf({ tag, name }: { readonly tag: string | null; readonly name: string | null }): string | null {
  const mark = tag?.trim() ?? '';
  if (mark !== '' && !UUID.test(mark)) return mark;
  const called = name?.trim() ?? '';
  return called === '' ? null : called;
}
