import type { FileHandle } from 'node:fs/promises';
import * as nodeFiles from 'node:fs/promises';
import { dirname, join } from 'node:path';
import type { Writable } from 'node:stream';
import pLimit from 'p-limit';
import { RequestError } from '../domain/errors.ts';
import type { Output } from './chunks.ts';
import { asRequestError, errorCode, tried } from './outputs/failure.ts';
import type { Files } from './outputs/files.ts';
import { type Replacement, replaceAll } from './outputs/replace.ts';
import { sweepStrays, temporaryName } from './outputs/temporary.ts';
import type { OutputPlan, PlannedFile } from './outputs.ts';

export interface WriteOptions {
  /** How many files are written at once: each holds a generator's state and an open file. */
  readonly filesAtOnce: number;
  readonly stdout: Writable;
  readonly files: Files;
}

export const WRITE_DEFAULTS: WriteOptions = { filesAtOnce: 4, stdout: process.stdout, files: nodeFiles };

/**
 * Writes every planned output or none. The files are written whole beside their targets and brought to the disk, then
 * take their names one after another; what could not be replaced is as it was. Standard output comes last.
 *
 * Throws a RequestError naming the path where the disk is full or refuses; what `contentOf` throws is thrown on.
 */
export async function writeOutputs<C>(
  plan: OutputPlan<C>,
  contentOf: (content: C) => Output,
  options: Partial<WriteOptions> = {},
): Promise<void> {
  const { filesAtOnce, stdout, files } = { ...WRITE_DEFAULTS, ...options };
  const made = await makeFolders(plan);
  const replacements: Replacement[] = plan.files.map(({ given, target }) => ({
    given,
    target,
    temporary: join(dirname(target), temporaryName()),
  }));
  try {
    for (const folder of new Set(plan.files.map(({ target }) => dirname(target)))) await sweepStrays(folder);
    await writeAll(plan.files, replacements, contentOf, filesAtOnce, files);
    await replaceAll(replacements, files);
  } catch (error) {
    for (const { temporary } of replacements) await nodeFiles.rm(temporary, { force: true }).catch(() => undefined);
    for (const folder of made) await nodeFiles.rmdir(folder).catch(() => undefined);
    throw error;
  }
  if (plan.stdout) await writeToStream(stdout, contentOf(plan.json));
}

/** The folders that were not there before. */
async function makeFolders({ folders }: Pick<OutputPlan, 'folders'>): Promise<string[]> {
  const made: string[] = [];
  for (const folder of folders) {
    try {
      await nodeFiles.mkdir(folder);
      made.push(folder);
    } catch (error) {
      if (errorCode(error) !== 'EEXIST') throw asRequestError(folder, error);
    }
  }
  return made;
}

/** Writes all temporary files; the first failure stops the others, and is thrown when all have come to rest. */
async function writeAll<C>(
  planned: readonly PlannedFile<C>[],
  replacements: readonly Replacement[],
  contentOf: (content: C) => Output,
  filesAtOnce: number,
  files: Files,
): Promise<void> {
  const limit = pLimit(filesAtOnce);
  const failures: unknown[] = [];
  await Promise.all(
    planned.map((file, k) =>
      limit(async () => {
        if (failures.length > 0) return;
        try {
          await writeOne(replacements[k]!, contentOf(file.content), files, () => failures.length > 0);
        } catch (error) {
          failures.push(error);
        }
      }),
    ),
  );
  if (failures.length > 0) throw failures[0];
}

async function writeOne(
  { given, target, temporary }: Replacement,
  chunks: Output,
  files: Files,
  isGivenUp: () => boolean,
): Promise<void> {
  const handle = await tried(given, async () => files.open(temporary, 'wx'));
  try {
    for await (const chunk of chunks) {
      if (isGivenUp()) return;
      await tried(given, () => handle.writeFile(chunk));
    }
    await tried(given, async () => {
      await keepPermissions(handle, target);
      await handle.sync();
    });
  } finally {
    await handle.close();
  }
}

/** Who may read the file that is replaced may read the new one, and nobody else. */
async function keepPermissions(handle: FileHandle, target: string): Promise<void> {
  const before = await nodeFiles.stat(target).catch(() => null);
  if (before !== null) await handle.chmod(before.mode & 0o777).catch(() => undefined);
}

/** A reader that has left (`| head`) wants no more and is no failure. */
async function writeToStream(stream: Writable, chunks: Output): Promise<void> {
  let failure: unknown = null;
  const note = (error: unknown) => {
    failure ??= error;
  };
  stream.on('error', note);
  try {
    for await (const chunk of chunks) {
      await new Promise<void>((done) => {
        stream.write(chunk, (error) => {
          if (error) note(error);
          done();
        });
      });
      if (failure !== null) break;
    }
  } finally {
    // A stream that failed says so once more, later: with nobody listening that would end the process.
    if (failure === null) stream.off('error', note);
  }
  if (failure !== null && errorCode(failure) !== 'EPIPE') {
    throw new RequestError(`standard output cannot be written (${errorCode(failure)})`);
  }
}
