import { plain } from './text.ts';

/** SVG (1.1, W3C) as text. Every attribute and every text goes through here, so that no name can break out of it. */

export type Attributes = Readonly<Record<string, string | number | undefined>>;

/** An element; `inside` is SVG already. Numbers are written with three decimals, which is a micrometre on paper. */
export function element(name: string, attributes: Attributes, inside: string | readonly string[] = ''): string {
  const content = typeof inside === 'string' ? inside : inside.join('');
  const head = `<${name}${Object.entries(attributes).map(attribute).join('')}`;
  return content === '' ? `${head}/>` : `${head}>${content}</${name}>`;
}

function attribute([name, value]: readonly [string, string | number | undefined]): string {
  if (value === undefined) return '';
  return ` ${name}="${typeof value === 'number' ? decimal(value) : escaped(value)}"`;
}

/** A text element; what it says is made plain and escaped. */
export function text(words: string, attributes: Attributes): string {
  return element('text', attributes, escaped(plain(words)));
}

/** A word that a reader sees when the pointer rests on what holds it. */
export function tooltip(words: string): string {
  return element('title', {}, escaped(plain(words)));
}

/** Up to three decimals, without trailing zeros and without a minus before a zero. */
export function decimal(value: number): string {
  if (!Number.isFinite(value)) throw new Error(`${value} cannot be drawn`);
  const rounded = Math.round(value * 1e3) / 1e3;
  return String(rounded === 0 ? 0 : rounded);
}

export function escaped(words: string): string {
  return words.replace(/[&<>"']/g, (mark) => ENTITIES[mark] ?? mark);
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** `M x y L x y ...`, closed with `Z` where asked for. */
export function pathOf(points: readonly (readonly [number, number])[], isClosed = false): string {
  return `M${points.map(([x, y]) => `${decimal(x)} ${decimal(y)}`).join('L')}${isClosed ? 'Z' : ''}`;
}
