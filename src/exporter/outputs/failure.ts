import { RequestError } from '../../domain/errors.ts';

const WORDS: ReadonlyMap<string, string> = new Map([
  ['ENOSPC', 'the disk is full; make room or name another place'],
  ['EDQUOT', 'the disk quota is used up; make room or name another place'],
  ['EFBIG', 'the file would be larger than is allowed here'],
  ['EACCES', 'no permission to write here'],
  ['EPERM', 'no permission to write here'],
  ['EROFS', 'the disk is read-only'],
  ['EISDIR', 'a folder of this name is there; name a file'],
  ['ENOTDIR', 'a part of the path is not a folder'],
  ['ENOENT', 'the folder does not exist any more'],
  ['ENAMETOOLONG', 'the name is too long'],
]);

/** A failure of the file system as the user's to mend, naming the path. */
export function asRequestError(path: string, error: unknown): RequestError {
  if (error instanceof RequestError) return error;
  const code = errorCode(error);
  return new RequestError(`${path}: ${WORDS.get(code) ?? `cannot be written (${code})`}`);
}

/** `attempt`, its failure told with the path. */
export async function tried<T>(path: string, attempt: () => Promise<T>): Promise<T> {
  try {
    return await attempt();
  } catch (error) {
    throw asRequestError(path, error);
  }
}

export function errorCode(error: unknown): string {
  return error instanceof Error && 'code' in error ? String(error.code) : String(error);
}
