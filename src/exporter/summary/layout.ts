/** Plain text for a terminal: words from a model are made harmless, columns aligned, sentences wrapped. */

export interface Column {
  readonly head: string;
  readonly align: 'left' | 'right';
  /** Characters beyond which a cell is shortened; none for numbers, which are never cut. */
  readonly most?: number;
}

/** Without control characters and marks that turn the reading direction, which a model's names may carry. */
export function harmless(text: string): string {
  return text
    .replace(/[\p{Cc}\u2028\u2029]+/gu, ' ')
    .replace(/[\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]/g, '')
    .trim();
}

/** At most `most` characters, with an ellipsis where something had to go. */
export function shortened(text: string, most: number): string {
  const characters = [...text];
  return characters.length <= most ? text : `${characters.slice(0, Math.max(0, most - 1)).join('')}…`;
}

/** Lines of at most `width` characters, broken between words; every line but the first begins with `hang`. */
export function wrapped(text: string, width: number, first = '', hang = first): string[] {
  const lines: string[] = [];
  let line = first;
  let bare = true;
  for (const word of text.split(' ').filter((part) => part !== '')) {
    if (!bare && line.length + 1 + word.length > width) {
      lines.push(line);
      line = hang;
      bare = true;
    }
    line += bare ? word : ` ${word}`;
    bare = false;
  }
  if (!bare) lines.push(line);
  return lines;
}

/** A table with two blanks between columns, indented by two; heads above, as wide as its widest cells. */
export function columns(heads: readonly Column[], rows: readonly (readonly string[])[]): string[] {
  const cells = rows.map((row) => heads.map(({ most }, k) => (most ? shortened(row[k], most) : row[k])));
  const widths = heads.map(({ head }, k) => Math.max(head.length, ...cells.map((row) => [...row[k]].length)));
  const line = (row: readonly string[]) =>
    `  ${row.map((cell, k) => padded(cell, widths[k], heads[k].align)).join('  ')}`.trimEnd();
  return [line(heads.map(({ head }) => head)), ...cells.map(line)];
}

function padded(cell: string, width: number, align: 'left' | 'right'): string {
  const blanks = ' '.repeat(Math.max(0, width - [...cell].length));
  return align === 'left' ? cell + blanks : blanks + cell;
}

/** Writes forces (N) in kN with as many decimals as the greatest of them deserves; `-` where there is none. */
export function kilonewtons(forces: readonly (number | null)[]): (force: number | null) => string {
  const greatest = Math.max(0, ...forces.map((force) => Math.abs(force ?? 0))) / 1000;
  const decimals = greatest >= 1000 ? 0 : greatest >= 10 ? 1 : greatest >= 1 ? 2 : 3;
  return (force) => (force === null ? '-' : withoutMinusZero((force / 1000).toFixed(decimals)));
}

export function degrees(angle: number): string {
  return `${withoutMinusZero(((angle * 180) / Math.PI).toFixed(2))} deg`;
}

function withoutMinusZero(text: string): string {
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : text;
}
