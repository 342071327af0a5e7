import { harmless } from '../summary/layout.ts';

/** Text that is HTML already. */
export class Markup {
  readonly text: string;

  constructor(text: string) {
    this.text = text;
  }
}

export type Part = Markup | string | number | null | readonly Part[];

/** HTML in which all that is put in is escaped and made harmless, unless it is Markup itself; null is nothing. */
export function html(texts: TemplateStringsArray, ...parts: readonly Part[]): Markup {
  return new Markup(texts.map((text, k) => (k === 0 ? text : markupOf(parts[k - 1] ?? null) + text)).join(''));
}

export const NOTHING = new Markup('');

function markupOf(part: Part): string {
  if (part === null) return '';
  if (part instanceof Markup) return part.text;
  if (typeof part === 'object') return part.map(markupOf).join('');
  return escaped(String(part));
}

export const escaped = (words: string): string => harmless(words).replace(/[&<>"']/g, (mark) => ENTITIES[mark] ?? mark);

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
