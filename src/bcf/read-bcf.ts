import { ModelError, RequestError } from '../domain/errors.ts';
import { contentKind } from '../importer/files/content-kind.ts';
import { decodeXml } from '../importer/files/ifcxml/decode-xml.ts';
import { parseXml } from '../importer/files/ifcxml/parse-xml.ts';
import type { XmlElement } from '../importer/files/ifcxml/xml-element.ts';
import { type Packed, packedFiles, unpack, type ZipLimits } from '../importer/files/zip.ts';
import { asBuffer } from '../step/bytes.ts';
import { readMarkup } from './read-markup.ts';
import type { ReturnedBcf, ReturnedTopic } from './types.ts';

export interface ReadBcfOptions extends ZipLimits {
  /** Most bytes of all XML together, once unpacked. */
  readonly largestTogether: number;
  /** Most XML elements inside one another. */
  readonly depth: number;
}

export const READ_BCF_DEFAULTS: ReadBcfOptions = {
  largest: 16 * 1024 ** 2,
  ratio: 200,
  mostEntries: 50_000,
  largestTogether: 256 * 1024 ** 2,
  depth: 64,
};

/**
 * The topics of a BCF file of version 2.0, 2.1 or 3.0, whoever wrote it. A topic that cannot be read is counted and passed
 * over; pictures are not unpacked, nothing is written to the disk and no entity is expanded.
 * @throws RequestError where the bytes are no zip, damaged, beyond the limits, or hold no topic at all.
 */
export async function readBcf(bytes: Uint8Array, chosen: Partial<ReadBcfOptions> = {}): Promise<ReturnedBcf> {
  const options = { ...READ_BCF_DEFAULTS, ...chosen };
  const files = await asRequest(async () => {
    if (contentKind(bytes) !== 'zip') throw new ModelError('This is no BCF file: a BCF file is a zip of topics.');
    return packedFiles(asBuffer(bytes), options);
  });
  const unpackXml = boundedUnpacker(options);
  const version = files.find(({ path }) => path === 'bcf.version');
  const markups = files.filter(({ path }) => /^[^/]+\/markup\.bcf$/i.test(path));
  if (version === undefined && markups.length === 0) {
    throw new RequestError('This is no BCF file: there are no topics in the zip.');
  }
  const views = byFolder(files.filter(({ path }) => /^[^/]+\/[^/]+\.bcfv$/i.test(path)));
  const topics: ReturnedTopic[] = [];
  let unreadable = 0;
  for (const markup of markups) {
    const folder = folderOf(markup.path);
    const root = unpackXml(markup);
    const roots = (views.get(folder) ?? []).map(unpackXml).filter((view) => view !== null);
    const topic = root === null ? null : readMarkup(root, roots, folder);
    if (topic === null) unreadable++;
    else topics.push(topic);
  }
  const versionRoot = version === undefined ? null : unpackXml(version);
  return {
    version: versionRoot?.data.find(([name]) => name === 'VersionId')?.[1] ?? null,
    topics: topics.sort((a, b) => (a.guid < b.guid ? -1 : 1)),
    unreadable,
  };
}

/** The root of an XML file in the zip, null where it cannot be read; stops where all together have grown too large. */
function boundedUnpacker(options: ReadBcfOptions): (file: Packed) => XmlElement | null {
  let left = options.largestTogether;
  return (file) => {
    left -= file.entry.uncompressedSize;
    if (left < 0) throw new RequestError('The BCF file unpacks to more than the limit; leave fewer topics in it.');
    try {
      return parseXml(decodeXml(unpack(file, options)).text, options.depth);
    } catch (problem) {
      if (problem instanceof ModelError) return null;
      throw problem;
    }
  };
}

async function asRequest<T>(attempt: () => Promise<T>): Promise<T> {
  try {
    return await attempt();
  } catch (problem) {
    throw problem instanceof ModelError ? new RequestError(problem.message) : problem;
  }
}

const folderOf = (path: string): string => path.slice(0, path.indexOf('/'));

function byFolder(files: readonly Packed[]): Map<string, Packed[]> {
  const folders = new Map<string, Packed[]>();
  for (const file of files) folders.set(folderOf(file.path), [...(folders.get(folderOf(file.path)) ?? []), file]);
  return folders;
}
