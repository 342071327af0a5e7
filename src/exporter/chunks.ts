/** The bytes of one output, piece by piece, so that no output has to fit into one string or one array. */
export type Chunks = Iterable<Uint8Array>;

/** What a file is written from: bytes that are there, or that have to be waited for. */
export type Output = Chunks | AsyncIterable<Uint8Array>;

const BATCH_CHARACTERS = 1 << 16;

/** The UTF-8 bytes of many small pieces of text, gathered into pieces worth writing. */
export function* encodeText(pieces: Iterable<string>): Generator<Uint8Array> {
  const encoder = new TextEncoder();
  let batch: string[] = [];
  let characters = 0;
  for (const piece of pieces) {
    batch.push(piece);
    characters += piece.length;
    if (characters >= BATCH_CHARACTERS) {
      yield encoder.encode(batch.join(''));
      batch = [];
      characters = 0;
    }
  }
  if (characters > 0) yield encoder.encode(batch.join(''));
}

/** All pieces in one array; for small outputs and tests. */
export function joinChunks(chunks: Chunks): Uint8Array {
  return Buffer.concat([...chunks]);
}
