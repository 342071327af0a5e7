import { BLOCK_BEGIN, BLOCK_END } from './block-marks.ts';
import type { StepFile } from './step-file.ts';

/** Where a block of ours goes or stands; a StepFile is one. */
export type SplicePlace = Pick<StepFile, 'bytes' | 'insertAt' | 'lineEnding'> & {
  readonly block: { readonly begin: number; readonly end: number } | null;
};

/** Lines are gathered to chunks of about this many characters. */
const CHUNK = 1 << 16;

/**
 * The file with a block of these lines (ASCII, one instance each, without line endings) right before the ENDSEC of its last DATA
 * section, in place of a block it may have. All other bytes stand as they were; they are views into `file.bytes`.
 *
 * Each line of the block, its two comments included, brings its own line ending, so that taking it out again leaves not a byte behind
 * wherever ENDSEC stands. Throws RangeError for a line that is not printable ASCII.
 */
export function* withBlock(file: SplicePlace, lines: Iterable<string>): Generator<Uint8Array, void> {
  yield* model(file, 0, file.insertAt);
  yield* blockOf(lines, file.lineEnding);
  yield* model(file, file.insertAt, file.bytes.length);
}

/** The bytes as they were before `withBlock`; the whole file where there is no block. */
export function* withoutBlock(file: SplicePlace): Generator<Uint8Array, void> {
  yield* model(file, 0, file.bytes.length);
}

/** What lies between two offsets, the block left out. */
function* model(file: SplicePlace, from: number, to: number): Generator<Uint8Array, void> {
  const { bytes, block } = file;
  const hole = block === null ? { begin: to, end: to } : block;
  const before = bytes.subarray(from, Math.max(from, Math.min(to, hole.begin)));
  const after = bytes.subarray(Math.min(to, Math.max(from, hole.end)), to);
  if (before.length > 0) yield before;
  if (after.length > 0) yield after;
}

function* blockOf(lines: Iterable<string>, lineEnding: string): Generator<Uint8Array, void> {
  let text = BLOCK_BEGIN + lineEnding;
  for (const line of lines) {
    if (!/^[\x20-\x7e]*$/.test(line)) throw new RangeError('a line of the block is not printable ASCII');
    text += line + lineEnding;
    if (text.length < CHUNK) continue;
    yield Buffer.from(text, 'latin1');
    text = '';
  }
  yield Buffer.from(text + BLOCK_END + lineEnding, 'latin1');
}
