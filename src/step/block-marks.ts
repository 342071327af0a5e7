import { latin1 } from './bytes.ts';

/** What is added to a model stands between these two comments and is not read back as part of it. */
export const BLOCK_BEGIN = '/* Pinwright results: begin */';
export const BLOCK_END = '/* Pinwright results: end */';

/** Which of the two, if any, the comment between `from` and `to` is; other programs may have laid its spaces anew. */
export function blockMark(bytes: Uint8Array, from: number, to: number): 'begin' | 'end' | null {
  if (to - from > 2 * BLOCK_BEGIN.length) return null;
  const text = latin1(bytes, from + 2, to - 2).trim();
  if (text === 'Pinwright results: begin') return 'begin';
  return text === 'Pinwright results: end' ? 'end' : null;
}
