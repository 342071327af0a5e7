import { constants, crc32, inflateRawSync } from 'node:zlib';
import { type Entry, fromBufferPromise, getFileNameLowLevel, type ZipFile } from 'yauzl';
import { ModelError } from '../../domain/errors.ts';
import { asBuffer } from '../../step/bytes.ts';
import { looksLikeModel } from './content-kind.ts';
import type { OpenOptions } from './options.ts';

// yauzl reads the directory (zip64, data descriptors, broken headers; well kept, and made for hostile files); node's zlib
// unpacks, since it stops at a bound.

export interface ZippedModel {
  /** Without folders and control characters. */
  readonly name: string;
  readonly content: Uint8Array;
}

export type ZipLimits = Pick<OpenOptions, 'largest' | 'ratio' | 'mostEntries'>;

/** A file in a zip, not yet unpacked. */
export interface Packed {
  readonly entry: Entry;
  /** As it stands in the zip, printable. */
  readonly path: string;
  readonly bytes: Uint8Array;
}

/**
 * The one IFC model in a zip, told by content. All of it stays in memory, so what its names point to does not matter.
 * @throws ModelError where there is none or several, it is damaged, encrypted, packed by a method that is not read or beyond the limits.
 */
export async function modelInZip(bytes: Uint8Array, options: OpenOptions): Promise<ZippedModel> {
  const files = await packedFiles(asBuffer(bytes), options);
  const models = files.filter(isModel);
  const [model, another] = models;
  if (model === undefined) throw new ModelError(`The zip holds no IFC model${contents(files)}. Put one into it.`);
  if (another !== undefined) {
    throw new ModelError(
      `The zip holds ${models.length} IFC models (${listed(models)}); leave one in it, or unpack it and name one.`,
    );
  }
  return { name: model.path.slice(model.path.lastIndexOf('/') + 1), content: unpack(model, options) };
}

/** All files of a zip. Throws ModelError where it is damaged or holds too many. */
export async function packedFiles(bytes: Buffer, options: ZipLimits): Promise<Packed[]> {
  const files: Packed[] = [];
  try {
    const zip = await fromBufferPromise(bytes, { decodeStrings: false });
    for await (const entry of zip.eachEntry()) {
      const path = pathOf(entry);
      if (isBeside(path)) continue;
      if (files.length === options.mostEntries) {
        throw new ModelError(`The zip holds more than ${options.mostEntries} files; put the model alone into one.`);
      }
      files.push({ entry, path, bytes: await packedBytes(zip, entry, bytes) });
    }
  } catch (problem) {
    if (problem instanceof ModelError) throw problem;
    throw new ModelError(`The zip is damaged or cut off (${reasonOf(problem)}). Pack it or fetch it again.`);
  }
  return files;
}

async function packedBytes(zip: ZipFile, entry: Entry, bytes: Buffer): Promise<Uint8Array> {
  const { fileDataStart } = await zip.readLocalFileHeaderPromise(entry, { minimal: true });
  const end = fileDataStart + entry.compressedSize;
  if (end > bytes.length) throw new Error('an entry ends beyond the file');
  return bytes.subarray(fileDataStart, end);
}

function pathOf({ generalPurposeBitFlag, fileNameRaw, extraFields }: Entry): string {
  return printable(getFileNameLowLevel(generalPurposeBitFlag, fileNameRaw, extraFields, false));
}

/** Folders, and what file managers put beside the files. */
function isBeside(path: string): boolean {
  return path.endsWith('/') || /(?:^|\/)(?:__MACOSX\/|\._|\.DS_Store$|Thumbs\.db$|desktop\.ini$)/i.test(path);
}

const STORED = 0;
const DEFLATE = 8;

/** By content; by its ending only where the content cannot be seen, so that this can be said of it. */
function isModel({ entry, path, bytes }: Packed): boolean {
  return isReadable(entry) ? looksLikeModel(beginningOf(entry, bytes)) : /\.ifc(?:xml)?$/i.test(path);
}

function isReadable(entry: Entry): boolean {
  return !entry.isEncrypted() && [STORED, DEFLATE].includes(entry.compressionMethod);
}

/** Deflate makes at most 1032 bytes of one, so this many packed bytes stay small. */
const PEEK = 1024;
/** Of large models fewer, larger pieces. */
const CHUNK = 1 << 20;

function beginningOf({ compressionMethod }: Entry, packed: Uint8Array): Uint8Array {
  if (compressionMethod === STORED) return packed;
  try {
    return inflateRawSync(packed.subarray(0, PEEK), { finishFlush: constants.Z_SYNC_FLUSH });
  } catch {
    return new Uint8Array(0);
  }
}

/** The content of a file in a zip, within the limits. Throws ModelError beyond them, and where it is damaged or encrypted. */
export function unpack({ entry, path, bytes }: Packed, { largest, ratio }: ZipLimits): Uint8Array {
  if (entry.isEncrypted()) throw new ModelError(`${path} in the zip is encrypted; pack it again without a password.`);
  if (!isReadable(entry)) {
    const method = METHODS[entry.compressionMethod] ?? `method ${entry.compressionMethod}`;
    throw new ModelError(`${path} in the zip is packed by ${method}, which is not read; pack it again by Deflate.`);
  }
  const size = entry.uncompressedSize;
  if (size > largest) throw new ModelError(`${path} in the zip unpacks to more than the limit of ${inMiB(largest)}.`);
  if (size > ratio * bytes.length) {
    throw new ModelError(
      `${path} in the zip unpacks to more than ${ratio} times its packed size, which no model does; unpack it yourself if you trust it.`,
    );
  }
  const content = entry.compressionMethod === STORED ? bytes : inflated(path, bytes, size);
  if (content.length !== size || crc32(content) !== entry.crc32) throw damaged(path);
  return content;
}

/** At most `size` bytes, whatever the packed ones would grow to. */
function inflated(path: string, packed: Uint8Array, size: number): Uint8Array {
  try {
    return inflateRawSync(packed, { maxOutputLength: Math.max(size, 1), chunkSize: CHUNK });
  } catch {
    throw damaged(path);
  }
}

const damaged = (path: string): ModelError =>
  new ModelError(
    `${path} in the zip is damaged: it does not unpack to what the zip says of it. Pack or fetch it again.`,
  );

/** By their numbers in the ZIP application note, 4.4.5. */
const METHODS: Readonly<Record<number, string>> = {
  1: 'Shrink',
  6: 'Implode',
  9: 'Deflate64',
  12: 'BZIP2',
  14: 'LZMA',
  93: 'Zstandard',
  95: 'XZ',
  98: 'PPMd',
};

const printable = (text: string): string => text.replace(/\p{C}/gu, '?');

function contents(files: readonly Packed[]): string {
  return files.length === 0 ? '' : ` (it holds ${listed(files)})`;
}

function listed(files: readonly Packed[]): string {
  const names = files.slice(0, 5).map(({ path }) => (path.length > 60 ? `...${path.slice(-57)}` : path));
  return `${names.join(', ')}${files.length > 5 ? ', ...' : ''}`;
}

const inMiB = (bytes: number): string => `${Math.round(bytes / 1024 ** 2)} MiB`;

const reasonOf = (problem: unknown): string =>
  printable(problem instanceof Error ? problem.message : String(problem)).slice(0, 120);
