import { readFileSync, statSync } from 'node:fs';
import { readBcf } from '../bcf/read-bcf.ts';
import type { ReturnedBcf } from '../bcf/types.ts';
import { parseBrief } from '../brief/parse-brief.ts';
import type { Brief } from '../brief/types.ts';
import { ModelError, RequestError } from '../domain/errors.ts';

const LARGEST_MODEL = 2 * 1024 ** 3;

/** The model's bytes. Throws ModelError where there is nothing that can be read. */
export function readModelBytes(path: string): Uint8Array {
  try {
    const { size } = statSync(path);
    if (size > LARGEST_MODEL) throw new ModelError(`${path}: larger than the limit of 2 GiB`);
    return readFileSync(path);
  } catch (error) {
    if (error instanceof ModelError) throw error;
    throw new ModelError(`${path}: ${reasonOf(error)}`);
  }
}

const LARGEST_BCF = 1024 ** 3;

/** The topics of a BCF file. Throws RequestError where it cannot be read. */
export async function readReplies(path: string): Promise<ReturnedBcf> {
  try {
    if (statSync(path).size > LARGEST_BCF) throw new RequestError('larger than the limit of 1 GiB');
    return await readBcf(readFileSync(path));
  } catch (error) {
    throw new RequestError(`${path}: ${error instanceof RequestError ? error.message : reasonOf(error)}`);
  }
}

/** The brief of a file. Throws RequestError where it cannot be read or is wrong. */
export function readBrief(path: string): Brief {
  let bytes: Uint8Array;
  try {
    bytes = readFileSync(path);
  } catch (error) {
    throw new RequestError(`${path}: ${reasonOf(error)}`);
  }
  return parseBrief(bytes, path);
}

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'no such file; check the path',
  EISDIR: 'is a folder; name a file',
  EACCES: 'may not be read; check its permissions',
  EPERM: 'may not be read; check its permissions',
  ENAMETOOLONG: 'the path is too long',
};

function reasonOf(error: unknown): string {
  const code = (error as NodeJS.ErrnoException).code ?? '';
  return REASONS[code] ?? `cannot be read (${code || String(error)})`;
}
