import { ModelError } from '../domain/errors.ts';
import {
  asBuffer,
  CARRIAGE_RETURN,
  isWordAt,
  LINE_FEED,
  OPEN,
  SEMICOLON,
  SPACE,
  STARTS_KEYWORD,
  skipBlank,
} from './bytes.ts';
import { readHeader, type StepHeader, skipStatement } from './header.ts';
import { StepInstances } from './instances.ts';
import { type PlainIndex, plainIndex } from './plain-index.ts';
import { DataScanner } from './scan-data.ts';
import type { StepValue } from './values.ts';

/** What stands between the comments of our own block, read apart from the model. */
export interface StepBlock {
  /** Offset of the first byte of its first comment. */
  readonly begin: number;
  /** Offset after its last comment and the line ending that was written with it. */
  readonly end: number;
  readonly instances: StepInstances;
}

/** A STEP physical file (ISO 10303-21), indexed; instances are parsed when asked for. */
export class StepFile extends StepInstances {
  /** The first name in FILE_SCHEMA, upper-case: `IFC4X3_ADD2`; '' where there is none. */
  readonly schema: string;
  /** The time stamp in FILE_NAME as written; null where it is empty. */
  readonly timeStamp: string | null;
  readonly fileDescription: readonly StepValue[];
  readonly fileName: readonly StepValue[];
  readonly fileSchema: readonly StepValue[];
  /** Offset of the last DATA section's ENDSEC, before which a block is put. */
  readonly insertAt: number;
  /** How the file ends its lines. */
  readonly lineEnding: '\n' | '\r\n' | '\r';
  /** Where our own block stands, if there is one. Its instances are not among those of the file. */
  readonly block: StepBlock | null;
  /** Whether a SIGNATURE section vouches for the bytes. */
  readonly isSigned: boolean;

  constructor(bytes: Uint8Array, header: StepHeader, scanner: DataScanner, sections: DataSections) {
    super(bytes, scanner.model);
    this.schema = header.schema;
    this.timeStamp = header.timeStamp;
    this.fileDescription = header.entries.get('FILE_DESCRIPTION') ?? [];
    this.fileName = header.entries.get('FILE_NAME') ?? [];
    this.fileSchema = header.entries.get('FILE_SCHEMA') ?? [];
    this.insertAt = sections.lastEndsec;
    this.isSigned = sections.isSigned;
    this.lineEnding = lineEndingOf(bytes);
    this.block =
      scanner.blockContent === null
        ? null
        : {
            begin: scanner.blockBegin,
            end: scanner.blockEnd,
            instances: new StepInstances(bytes, scanner.blockContent),
          };
  }
}

interface DataSections {
  readonly lastEndsec: number;
  readonly isSigned: boolean;
}

/**
 * Indexes a STEP file in one pass over its bytes, which must not change while it is in use.
 * Throws ModelError where the structure is broken: not a STEP file, no DATA section, cut off, a text or comment never closed.
 */
export function openStep(bytes: Uint8Array): StepFile {
  return openStepWith(bytes, bytes.length > WORTHWHILE ? plainIndex() : null);
}

/** bytes; what is shorter is read before the kernel is ready. */
const WORTHWHILE = 1 << 16;

/** The same with a kernel for what is plain, or without. */
export function openStepWith(bytes: Uint8Array, plain: PlainIndex | null): StepFile {
  const buffer = asBuffer(bytes);
  const start = startOfStep(buffer);
  const scanner = new DataScanner(buffer, plain);
  const { header, end } = readHeader(buffer, start, scanner.model.problems);
  try {
    const sections = readSections(buffer, end, scanner);
    scanner.close();
    return new StepFile(bytes, header, scanner, sections);
  } finally {
    plain?.end();
  }
}

/** The offset after `ISO-10303-21;`. */
function startOfStep(bytes: Uint8Array): number {
  if (bytes.length === 0) throw new ModelError('The file is empty.');
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) {
    throw new ModelError(
      'The file is stored as UTF-16; a STEP file has one byte a character, so it must be saved again as plain text.',
    );
  }
  const hasMark = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf;
  const at = skipBlank(bytes, hasMark ? 3 : 0);
  if (at >= bytes.length) throw new ModelError('The file holds nothing but white space.');
  if (!isWordAt(bytes, at, 'ISO-10303-21'))
    throw new ModelError('The file is not a STEP file: it does not begin with ISO-10303-21.');
  const end = skipBlank(bytes, at + 'ISO-10303-21'.length);
  return bytes[end] === SEMICOLON ? end + 1 : end;
}

/** Passes over all sections after the header and indexes those of data. */
function readSections(bytes: Uint8Array, at: number, scanner: DataScanner): DataSections {
  let lastEndsec = -1;
  let isSigned = false;
  let isOver = false;
  for (let p = nextWord(bytes, at, isOver); p >= 0; p = nextWord(bytes, p, isOver)) {
    if (isWordAt(bytes, p, 'SIGNATURE')) {
      isSigned = true;
      p = afterSignature(bytes, p);
    } else if (isOver) break;
    else if (isWordAt(bytes, p, 'DATA')) {
      lastEndsec = scanner.scan(startOfData(bytes, p));
      p = lastEndsec + 'ENDSEC'.length;
    } else if (isWordAt(bytes, p, 'END')) {
      isOver = true;
      p = skipStatement(bytes, p);
    } else p = skipStatement(bytes, p);
  }
  if (lastEndsec < 0) throw new ModelError('The file has no DATA section, so there is no model in it.');
  return { lastEndsec, isSigned };
}

/** The next word after semicolons and the like; -1 where there is none. What follows the end of the file's own text may be anything. */
function nextWord(bytes: Uint8Array, at: number, isOver: boolean): number {
  let p = at;
  if (isOver) {
    while (p < bytes.length && bytes[p] <= SPACE) p++;
    return p < bytes.length ? p : -1;
  }
  for (;;) {
    p = skipBlank(bytes, p);
    if (p >= bytes.length) return -1;
    if (STARTS_KEYWORD[bytes[p]] === 1) return p;
    p = bytes[p] === SEMICOLON ? p + 1 : skipStatement(bytes, p);
  }
}

/** Edition 2 allows a name and schemas in brackets after DATA. */
function startOfData(bytes: Uint8Array, at: number): number {
  const p = skipBlank(bytes, at + 'DATA'.length);
  if (bytes[p] === SEMICOLON) return p + 1;
  return bytes[p] === OPEN ? skipStatement(bytes, p) : p;
}

/** A signature is bare base 64 up to its ENDSEC. */
function afterSignature(bytes: Uint8Array, at: number): number {
  const end = asBuffer(bytes).indexOf('ENDSEC', at, 'latin1');
  return end < 0 ? bytes.length : end + 'ENDSEC'.length;
}

/** By the first line that ends: our own block comes later and is written the same way, so it does not change the answer. */
function lineEndingOf(bytes: Uint8Array): StepFile['lineEnding'] {
  const lineFeed = bytes.indexOf(LINE_FEED);
  if (lineFeed > 0 && bytes[lineFeed - 1] === CARRIAGE_RETURN) return '\r\n';
  if (lineFeed >= 0) return '\n';
  return bytes.indexOf(CARRIAGE_RETURN) >= 0 ? '\r' : '\n';
}
