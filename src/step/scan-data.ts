import { ModelError } from '../domain/errors.ts';
import { BLOCK_BEGIN, blockMark } from './block-marks.ts';
import {
  APOSTROPHE,
  ASTERISK,
  afterComment,
  afterLineEnding,
  afterString,
  CLOSE,
  DIGIT_0,
  EQUALS,
  excerpt,
  HASH,
  isDigit,
  isWordAt,
  LineCounter,
  lineOf,
  OPEN,
  SEMICOLON,
  SLASH,
  SPACE,
  STARTS_KEYWORD,
  skipBlank,
} from './bytes.ts';
import { InstanceTable } from './instance-table.ts';
import type { IndexedInstances } from './instances.ts';
import { Keywords } from './keywords.ts';
import { ParameterReader } from './parameters.ts';
import type { PlainIndex } from './plain-index.ts';
import { StepProblems } from './problems.ts';
import { unclosedString } from './unclosed.ts';

/** Ids are kept in 32 bits. */
const ID_LIMIT = 2 ** 32;
/** 1 for the bytes at which counting brackets has to look closer. */
const STOPS = new Uint8Array(256);
for (const byte of [APOSTROPHE, OPEN, CLOSE, SLASH, SEMICOLON, EQUALS]) STOPS[byte] = 1;

/** Indexes the instances of a file's DATA sections in one pass, and apart from them those inside our own block. */
export class DataScanner {
  readonly model: IndexedInstances;
  blockContent: IndexedInstances | null = null;
  blockBegin = -1;
  /** After the block's last comment and the line ending that belongs to it; -1 while it is open. */
  blockEnd = -1;
  private readonly bytes: Uint8Array;
  private current: IndexedInstances;
  private lastId: number | null = null;
  private readonly lines: LineCounter;
  private readonly plain: PlainIndex | null;

  /** @param plain goes over what is plain; null to read all of the file here */
  constructor(bytes: Uint8Array, plain: PlainIndex | null) {
    this.bytes = bytes;
    this.plain = plain;
    plain?.begin(bytes);
    this.lines = new LineCounter(bytes);
    this.model = emptyIndex(bytes);
    this.current = this.model;
  }

  /** Reads the section whose content begins at `at`, up to its ENDSEC, whose offset is given back. */
  scan(at: number): number {
    const { bytes } = this;
    let p = at;
    for (;;) {
      p = this.skipBetween(this.skipPlain(p));
      if (p >= bytes.length) throw this.cutOff();
      if (bytes[p] === HASH) p = this.instance(p);
      else if (isWordAt(bytes, p, 'ENDSEC')) break;
      else p = this.foreignText(p);
    }
    if (this.blockBegin >= 0 && this.blockEnd < 0) {
      throw new ModelError(
        `The file is damaged: the comment ${BLOCK_BEGIN} on line ${lineOf(bytes, this.blockBegin)} has no counterpart.`,
      );
    }
    return p;
  }

  /** Makes the instances findable, once all sections are read. */
  close(): void {
    for (const index of [this.model, this.blockContent]) {
      index?.table.close((id) =>
        index.problems.add('doubled-id', id, `#${id} stands more than once in the file; the first is used.`),
      );
    }
  }

  /** Indexes the instances from `at` on that are as plain as can be, as `instance` would; the offset after them. */
  private skipPlain(at: number): number {
    const { plain, model } = this;
    if (plain === null || this.current !== model) return at;
    const { count } = model.table;
    const end = plain.index(at, model.table);
    if (model.table.count > count) this.lastId = model.table.lastId;
    return end;
  }

  /** White space and comments between statements; the two comments of our block switch from one index to the other. */
  private skipBetween(at: number): number {
    const { bytes } = this;
    let p = at;
    for (;;) {
      while (bytes[p] <= SPACE) p++;
      if (bytes[p] !== SLASH || bytes[p + 1] !== ASTERISK) return p;
      const end = afterComment(bytes, p);
      const mark = blockMark(bytes, p, end);
      if (mark === 'begin') this.openBlock(p);
      p = mark === 'end' && this.blockContent !== null && this.blockEnd < 0 ? this.closeBlock(end) : end;
    }
  }

  private openBlock(at: number): void {
    if (this.blockBegin >= 0) {
      throw new ModelError(
        `The file is damaged: the comment ${BLOCK_BEGIN} stands in it twice, on lines ${lineOf(this.bytes, this.blockBegin)} and ${lineOf(this.bytes, at)}.`,
      );
    }
    this.blockBegin = at;
    this.blockContent = emptyIndex(this.bytes);
    this.current = this.blockContent;
  }

  private closeBlock(afterMark: number): number {
    this.blockEnd = afterLineEnding(this.bytes, afterMark);
    this.current = this.model;
    return this.blockEnd;
  }

  /** Indexes the instance that begins at `at`; the offset of what comes after it. */
  private instance(at: number): number {
    const { bytes } = this;
    const { table, keywords } = this.current;
    let p = at + 1;
    let id = 0;
    while (isDigit(bytes[p])) id = id * 10 + (bytes[p++] - DIGIT_0);
    if (p === at + 1) return this.broken(null, at, p, 'has no number');
    this.lastId = id;
    const equals = skipBlank(bytes, p);
    if (bytes[equals] !== EQUALS) return this.broken(id, at, p, 'has no equals sign after its number');
    p = skipBlank(bytes, equals + 1);
    if (bytes[p] === OPEN) return this.complexInstance(id, at, p);
    if (STARTS_KEYWORD[bytes[p]] !== 1) return this.broken(id, at, equals + 1, 'names no type');
    const code = keywords.codeAt(bytes, p);
    if (this.current === this.model) this.plain?.learn(p, keywords.end, code);
    p = keywords.end;
    const open = bytes[p] === OPEN ? p : skipBlank(bytes, p);
    if (bytes[open] !== OPEN) return this.broken(id, at, p, 'has no parameters');
    if (id < ID_LIMIT) table.add(id, open, code);
    else this.tooHigh(id, code);
    return this.afterInstance(id, at, open);
  }

  /** An instance of several types, `#1=(A(...)B(...));`; one of a single type is the same as without the outer brackets. */
  private complexInstance(id: number, at: number, outerOpen: number): number {
    const { keywords, table } = this.current;
    const records = new ParameterReader(this.bytes).readRecords(outerOpen, () => {});
    if (records === null || records.length === 0) return this.broken(id, at, outerOpen, 'names no type');
    let open = outerOpen;
    let code: number;
    if (records.length === 1) {
      code = keywords.codeAt(this.bytes, skipBlank(this.bytes, outerOpen + 1));
      open = skipBlank(this.bytes, keywords.end);
    } else code = keywords.codeOfJoined(records.map((record) => record.type));
    if (id < ID_LIMIT) table.add(id, open, code);
    else this.tooHigh(id, code);
    return this.afterInstance(id, at, outerOpen);
  }

  private tooHigh(id: number, code: number): void {
    const type = this.current.keywords.names[code];
    this.current.problems.add(
      'unreadable-element',
      id,
      `#${id}, an ${type}, was left out: its number is not below 2^32.`,
    );
  }

  /** Counts brackets from the one at `open` to the semicolon that ends the instance. */
  private afterInstance(id: number, at: number, open: number): number {
    const { bytes } = this;
    const end = bytes.length;
    let depth = 0;
    let mark = -1;
    let p = open;
    for (;;) {
      while (p < end && STOPS[bytes[p]] === 0) p++;
      if (p >= end) throw this.cutOff();
      switch (bytes[p]) {
        case APOSTROPHE:
          p = this.afterString(p);
          break;
        case OPEN:
          depth++;
          p++;
          break;
        case CLOSE:
          p++;
          if (--depth === 0) return this.afterLastBracket(id, at, p);
          break;
        case SLASH: {
          const next = bytes[p + 1] === ASTERISK ? afterComment(bytes, p) : p + 1;
          if (mark < 0 && next > p + 1 && blockMark(bytes, p, next) !== null) mark = p;
          p = next;
          break;
        }
        default:
          // An instance that was never finished may stand before our block, whose mark is then no comment inside it.
          return this.broken(id, at, mark < 0 ? p : mark, 'has brackets that do not close', open + 1);
      }
    }
  }

  /** A missing semicolon hides nothing where the next instance or the section's end follows. */
  private afterLastBracket(id: number, start: number, at: number): number {
    const { bytes } = this;
    const p = bytes[at] === SEMICOLON ? at : skipBlank(bytes, at);
    if (bytes[p] === SEMICOLON) return p + 1;
    if (bytes[p] === HASH || isWordAt(bytes, p, 'ENDSEC')) return at;
    return this.broken(id, start, at, 'is followed by text that does not belong to it');
  }

  private foreignText(at: number): number {
    if (isWordAt(this.bytes, at, 'DATA') || isWordAt(this.bytes, at, 'END')) throw this.cutOff();
    const end = this.nextStatement(at, at);
    const text = excerpt(this.bytes, at, end).trim();
    this.current.problems.add(
      'unreadable-element',
      null,
      `Line ${this.lines.lineOf(at)} holds "${text}", which is no instance and was left out.`,
    );
    return end;
  }

  /** Notes that the instance which begins at `start` cannot be read beyond `at`; the offset where reading can go on. */
  private broken(id: number | null, start: number, at: number, what: string, floor = at): number {
    const name = id === null ? 'An instance' : `#${id}`;
    this.current.problems.add('unreadable-element', id, `${name} on line ${this.lines.lineOf(start)} ${what}.`);
    return this.nextStatement(at, floor);
  }

  /**
   * After the next semicolon from `at` on, or before what comes earlier and looks like the next instance, the end of the section or
   * the mark of our block. Looking back for where that begins stops at `floor`.
   */
  private nextStatement(at: number, floor: number): number {
    const { bytes } = this;
    for (let p = at; p < bytes.length; p++) {
      switch (bytes[p]) {
        case APOSTROPHE:
          p = this.afterString(p) - 1;
          break;
        case SLASH:
          if (bytes[p + 1] === ASTERISK) {
            const end = afterComment(bytes, p);
            if (blockMark(bytes, p, end) !== null) return p;
            p = end - 1;
          }
          break;
        case EQUALS: {
          const hash = hashBefore(bytes, p, floor);
          if (hash >= 0) return hash;
          break;
        }
        case SEMICOLON: {
          const word = endsecBefore(bytes, p, floor);
          return word >= 0 ? word : p + 1;
        }
      }
    }
    throw this.cutOff();
  }

  private afterString(at: number): number {
    const end = afterString(this.bytes, at + 1);
    if (end === -1) throw unclosedString(this.bytes, this.lastId);
    return end;
  }

  private cutOff(): ModelError {
    const last = this.lastId === null ? '' : ` after #${this.lastId}`;
    return new ModelError(`The file is cut off: its DATA section ends${last} without ENDSEC.`);
  }
}

function emptyIndex(bytes: Uint8Array): IndexedInstances {
  return { table: new InstanceTable(bytes.length), keywords: new Keywords(), problems: new StepProblems() };
}

/** The offset, not before `from`, of the `#` in `#12 =` whose equals sign stands at `equals`; -1 where there is none. */
function hashBefore(bytes: Uint8Array, equals: number, from: number): number {
  let p = equals - 1;
  while (p > from && bytes[p] <= SPACE) p--;
  if (!isDigit(bytes[p])) return -1;
  while (p > from && isDigit(bytes[p])) p--;
  return p >= from && bytes[p] === HASH ? p : -1;
}

/** The offset, not before `from`, of an ENDSEC that the semicolon ends; -1 where there is none. */
function endsecBefore(bytes: Uint8Array, semicolon: number, from: number): number {
  let p = semicolon - 1;
  while (p > from && bytes[p] <= SPACE) p--;
  const word = p - 5;
  return word >= from && isWordAt(bytes, word, 'ENDSEC') && bytes[word - 1] <= SPACE ? word : -1;
}
