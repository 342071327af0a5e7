import {
  APOSTROPHE,
  CLOSE,
  COMMA,
  DIGIT_0,
  DOLLAR,
  HASH,
  IN_KEYWORD,
  latin1,
  OPEN,
  POINT,
  SPACE,
  UPPER_IN_KEYWORD,
} from './bytes.ts';
import type { InstanceTable } from './instance-table.ts';
import type { Keywords } from './keywords.ts';
import { IS_PLAIN } from './plain-list.ts';
import { NumberScanner, plainNumbers } from './plain-values.ts';

/** What `ref` gives for `$`. */
export const NO_ID = -1;

/**
 * Reads the parameters of one instance after another from left to right, where they are what the caller expects in the plainest
 * writing: no marks, no values and no lists are made of them, which is most of what the general way costs. Whatever else
 * stands there makes `isPlain` false, until the next instance, and the caller has to go the general way.
 */
export class Cursor {
  isPlain = false;
  private p = 0;
  /** Of the text last passed over. */
  private lastEnd = 0;
  /** The enumeration name met last. */
  private name = '';
  private readonly bytes: Uint8Array;
  private readonly table: InstanceTable;
  private readonly keywords: Keywords;
  private readonly numbers = new NumberScanner();

  constructor(bytes: Uint8Array, table: InstanceTable, keywords: Keywords) {
    this.bytes = bytes;
    this.table = table;
    this.keywords = keywords;
  }

  /** The code of a type, for `enter`; 0 where the file has none. */
  codeOf(type: string): number {
    return Math.max(0, this.keywords.names.indexOf(type));
  }

  /** Goes to the first parameter of `id`, which has to be of the type `code` where that is given. */
  enter(id: number, code = -1): void {
    const row = this.table.rowOf(id);
    this.isPlain = row >= 0 && (code < 0 || this.table.codeOf(row) === code);
    if (!this.isPlain) return;
    this.p = this.afterBlank(this.table.offsetOf(row) + 1);
  }

  /** The id referred to, or NO_ID. */
  ref(): number {
    const { bytes } = this;
    let p = this.p;
    let id = NO_ID;
    if (bytes[p] === HASH) {
      let digit = bytes[++p] - DIGIT_0;
      this.isPlain &&= digit >= 0 && digit <= 9;
      for (id = 0; digit >= 0 && digit <= 9; digit = bytes[++p] - DIGIT_0) id = id * 10 + digit;
    } else if (bytes[p] === DOLLAR) p++;
    else this.isPlain = false;
    this.pass(p);
    return id;
  }

  number(): number {
    const { numbers } = this;
    const end = numbers.scan(this.bytes, this.p);
    if (end < 0) this.isPlain = false;
    else this.pass(end);
    return numbers.value[0];
  }

  /** Passes over a text or `$`. */
  text(): void {
    const { bytes } = this;
    let p = this.p;
    if (bytes[p] === APOSTROPHE) {
      do p++;
      while (IS_PLAIN[bytes[p]] === 1);
      this.isPlain &&= bytes[p] === APOSTROPHE && bytes[p + 1] !== APOSTROPHE;
    } else this.isPlain &&= bytes[p] === DOLLAR;
    this.lastEnd = p;
    this.pass(p + 1);
  }

  /** The text; '' for `$`. */
  string(): string {
    const from = this.p + 1;
    const isText = this.bytes[this.p] === APOSTROPHE;
    this.text();
    return isText && this.isPlain ? latin1(this.bytes, from, this.lastEnd) : '';
  }

  /** The enumeration's name; null for `$`. Neighbours mostly have the same, which then is the same string. */
  enumeration(): string | null {
    const { bytes } = this;
    if (bytes[this.p] === DOLLAR) {
      this.pass(this.p + 1);
      return null;
    }
    const from = this.p + 1;
    let p = from;
    while (IN_KEYWORD[bytes[p]] === 1 && UPPER_IN_KEYWORD[bytes[p]] === bytes[p]) p++;
    // One letter is a truth value.
    this.isPlain &&= bytes[from - 1] === POINT && bytes[p] === POINT && p > from + 1;
    if (!this.isPlain) return null;
    if (!this.isName(from, p)) this.name = latin1(bytes, from, p);
    this.pass(p + 1);
    return this.name;
  }

  private isName(from: number, to: number): boolean {
    const { bytes, name } = this;
    if (to - from !== name.length) return false;
    for (let i = 0; i < name.length; i++) if (bytes[from + i] !== name.charCodeAt(i)) return false;
    return true;
  }

  /** The text in parameter `index` of `id`; null where that is none, or what stands before it is not plain. */
  stringAt(id: number, index: number): string | null {
    this.enter(id);
    for (let i = 0; i < index; i++) this.skip();
    const isText = this.bytes[this.p] === APOSTROPHE;
    const text = this.string();
    return isText && this.isPlain ? text : null;
  }

  private skip(): void {
    const { bytes } = this;
    let p = this.p;
    if (bytes[p] === APOSTROPHE) {
      this.text();
      return;
    }
    while (bytes[p] !== COMMA && bytes[p] !== CLOSE && bytes[p] !== OPEN && p < bytes.length) p++;
    this.isPlain &&= bytes[p] === COMMA;
    this.pass(p);
  }

  /** Passes over the text `word`, if that stands here. */
  isText(word: string): boolean {
    const { bytes } = this;
    const from = this.p + 1;
    const { length } = word;
    for (let i = 0; i < length; i++) if (bytes[from + i] !== word.charCodeAt(i)) return false;
    const end = from + length;
    if (bytes[from - 1] !== APOSTROPHE || bytes[end] !== APOSTROPHE || bytes[end + 1] === APOSTROPHE) return false;
    this.pass(end + 1);
    return true;
  }

  openList(): void {
    this.isPlain &&= this.bytes[this.p] === OPEN;
    this.p = this.afterBlank(this.p + 1);
  }

  /** Whether the list ends here. */
  get isAtEnd(): boolean {
    return this.bytes[this.p] === CLOSE;
  }

  closeList(): void {
    this.isPlain &&= this.isAtEnd;
    this.pass(this.p + 1);
  }

  /** Whether all parameters were as expected, and there are no more of them. */
  leave(): boolean {
    return this.isPlain && this.isAtEnd;
  }

  /** Fills `into` with the three numbers of a point or a direction in space; false where `id` is anything else. */
  triple(id: number, into: Float64Array): boolean {
    const row = this.table.rowOf(id);
    return row >= 0 && plainNumbers(this.bytes, this.table.offsetOf(row) + 1, into, true) === 3;
  }

  private pass(at: number): void {
    if (this.bytes[at] === COMMA) this.p = this.afterBlank(at + 1);
    else {
      this.p = at;
      this.isPlain &&= this.isAtEnd;
    }
  }

  private afterBlank(at: number): number {
    let p = at;
    while (this.bytes[p] <= SPACE) p++;
    return p;
  }
}
