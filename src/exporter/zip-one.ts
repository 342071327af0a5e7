import { Zip, ZipDeflate } from 'fflate';
import type { Chunks } from './chunks.ts';

/** The first moment that a zip can tell: the same content gives the same bytes at any hour. */
export const NO_TIME = new Date(1980, 0, 1);

/** A zip with one file in it, piece by piece. */
export function* zipOne(name: string, content: Chunks): Generator<Uint8Array, void> {
  let ready: Uint8Array[] = [];
  const zip = new Zip((error, piece) => {
    if (error) throw error;
    ready.push(piece);
  });
  const entry = new ZipDeflate(name, { level: 6 });
  entry.mtime = NO_TIME;
  zip.add(entry);
  const taken = () => {
    const pieces = ready.filter((piece) => piece.length > 0);
    ready = [];
    return pieces;
  };
  for (const chunk of content) {
    entry.push(chunk);
    yield* taken();
  }
  entry.push(new Uint8Array(0), true);
  zip.end();
  yield* taken();
}
