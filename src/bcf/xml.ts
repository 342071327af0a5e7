import { XMLBuilder } from 'fast-xml-parser';

/** XML as plain objects: `@name` is an attribute, `#text` the text, an array repeats its element, undefined is left out. */
export type XmlNode = { readonly [name: string]: XmlValue };
export type XmlValue = string | number | boolean | undefined | XmlNode | readonly XmlNode[] | readonly string[];

const builder = new XMLBuilder({
  ignoreAttributes: false,
  attributeNamePrefix: '@',
  textNodeName: '#text',
  format: true,
  indentBy: '  ',
  suppressBooleanAttributes: false,
  suppressEmptyNode: true,
});

/** A document with the declaration that readers of the format expect. */
export function xmlDocument(root: XmlNode): string {
  return `<?xml version="1.0" encoding="UTF-8"?>\n${builder.build(root)}`;
}

/** Without what XML 1.0 cannot hold and marks that turn the reading direction; line feeds stay. */
export function xmlText(words: string): string {
  return words
    .replace(/\r\n?/g, '\n')
    .replace(/[^\t\n\u{20}-\u{d7ff}\u{e000}-\u{fffd}\u{10000}-\u{10ffff}]/gu, ' ')
    .replace(/[\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]/g, '')
    .trim();
}

/** Text that may not be empty: undefined where it is. */
export function xmlTextOrNone(words: string | null): string | undefined {
  const text = words === null ? '' : xmlText(words);
  return text === '' ? undefined : text;
}
