import { html, type Markup, NOTHING, type Part } from './html.ts';

export interface Head {
  readonly word: string;
  /** Numbers stand right, so that their decimals line up. */
  readonly isNumber?: boolean;
}

export const words = (...heads: readonly string[]): Head[] => heads.map((word) => ({ word }));
export const numbers = (...heads: readonly string[]): Head[] => heads.map((word) => ({ word, isNumber: true }));

/** Rows beyond which a table is folded on screen; in print it is whole. */
const FOLDED = 15;

/** A table with its caption; its first rows stand open, the others fold. Nothing where there are no rows. */
export function table(caption: Part, heads: readonly Head[], rows: readonly (readonly Part[])[]): Markup {
  if (rows.length === 0) return NOTHING;
  const body = (some: readonly (readonly Part[])[]) =>
    some.map((row) => html`<tr>${row.map((cell, k) => cellOf(cell, heads[k]))}</tr>\n`);
  const head = heads.map(({ word, isNumber }) => html`<th${isNumber ? CLASS : ''}>${word}</th>`);
  const isLong = rows.length > FOLDED;
  const folded = isLong ? html`<tbody class="folded">\n${body(rows.slice(FOLDED))}</tbody>` : null;
  const unfold = isLong ? html`<label><input type="checkbox"> Show all ${rows.length} rows</label>` : null;
  return html`<div class="table"><table><caption>${caption}</caption><thead><tr>${head}</tr></thead><tbody>
${body(rows.slice(0, FOLDED))}</tbody>${folded}</table>${unfold}</div>
`;
}

const CLASS = html` class="n"`;

const cellOf = (cell: Part, head: Head | undefined): Markup => html`<td${head?.isNumber ? CLASS : ''}>${cell}</td>`;
