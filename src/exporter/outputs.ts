import { accessSync, constants, lstatSync, realpathSync, rmSync, type Stats, statSync, writeFileSync } from 'node:fs';
import { basename, dirname, join, resolve } from 'node:path';
import { RequestError } from '../domain/errors.ts';
import { asRequestError, errorCode } from './outputs/failure.ts';
import { type Content, contentByEnding, type Formats, RESULT_FORMATS } from './outputs/formats.ts';
import { temporaryName } from './outputs/temporary.ts';

export interface PlannedFile<C = Content> {
  /** The path as the user gave it, for messages. */
  readonly given: string;
  /** Absolute, links resolved. */
  readonly target: string;
  readonly content: C;
}

export interface OutputPlan<C = Content> {
  readonly files: readonly PlannedFile<C>[];
  /** Folders to be made if they are not there; their parents are. */
  readonly folders: readonly string[];
  /** The JSON goes to standard output as well. */
  readonly stdout: boolean;
  readonly json: C;
}

/** An output that an option of its own asks for, whatever its ending. */
export type OtherOutput<C = Content> = Pick<PlannedFile<C>, 'given' | 'content'>;

/** The plan for the outputs of a result. */
export function planOutputs(outputs: readonly (string | OtherOutput)[], ...inputPaths: readonly string[]): OutputPlan {
  return planFor(RESULT_FORMATS, outputs, ...inputPaths);
}

/**
 * Finds what each output path asks for and whether it can be written, before any work is done. The endings pick the
 * formats; `-` is the JSON on standard output, a path ending in `.csv/` a folder with every table.
 *
 * Throws a RequestError for a path that cannot be written, stands twice or names an input.
 */
export function planFor<C>(
  formats: Formats<C>,
  outputs: readonly (string | OtherOutput<C>)[],
  ...inputPaths: readonly string[]
): OutputPlan<C> {
  const files: PlannedFile<C>[] = [];
  const folders: string[] = [];
  for (const output of outputs) {
    if (typeof output !== 'string') {
      files.push({ ...output, target: triedFile(output.given, resolve(output.given), null) });
      continue;
    }
    const given = output;
    if (given === '-') continue;
    if (given.toLowerCase().endsWith('.csv/')) {
      const folder = triedFolder(given);
      folders.push(folder);
      for (const { name, content } of formats.tables) {
        files.push({ given, target: triedFile(given, join(folder, `${name}.csv`), folder), content });
      }
    } else {
      const content = contentByEnding(given, formats);
      files.push({ given, target: triedFile(given, resolve(given), null), content });
    }
  }
  forbidDoubles(outputs, files, folders);
  for (const inputPath of inputPaths) forbidInput(files, inputPath);
  return { files, folders, stdout: outputs.includes('-'), json: formats.json };
}

/** The folder's real path, if it is one or can be made. */
function triedFolder(given: string): string {
  const path = resolve(given);
  const there = statOrNull(path);
  if (there !== null && !there.isDirectory()) {
    throw new RequestError(`${given}: a folder is due, but a file of this name is there`);
  }
  if (there !== null) return tryWritingInto(given, realpathSync(path));
  return join(tryWritingInto(given, parentFolder(given, path)), basename(path));
}

/** The file's real path, if it can be written; `newFolder` is the folder planned for it, which may not be there yet. */
function triedFile(given: string, path: string, newFolder: string | null): string {
  if (newFolder !== null && statOrNull(newFolder) === null) return path;
  const there = lstatOrNull(path);
  if (there === null) return join(tryWritingInto(given, parentFolder(given, path)), basename(path));

  const behind = statOrNull(path);
  if (behind === null) throw new RequestError(`${given}: is a link to nothing; remove it or name another file`);
  if (behind.isDirectory()) throw new RequestError(`${given}: a folder of this name is there; name a file`);
  if (!behind.isFile()) throw new RequestError(`${given}: is not a plain file`);
  const target = realpathSync(path);
  try {
    accessSync(target, constants.W_OK);
  } catch (error) {
    throw asRequestError(given, error);
  }
  tryWritingInto(given, dirname(target));
  return target;
}

function parentFolder(given: string, path: string): string {
  const parent = dirname(path);
  const there = statOrNull(parent);
  if (there === null) throw new RequestError(`${given}: the folder ${parent} does not exist; make it first`);
  if (!there.isDirectory()) throw new RequestError(`${given}: ${parent} is not a folder`);
  return realpathSync(parent);
}

/** Permissions do not tell the whole truth (read-only disks, quotas), so a file is made and removed again. */
function tryWritingInto(given: string, folder: string): string {
  const probe = join(folder, temporaryName());
  try {
    writeFileSync(probe, '', { flag: 'wx' });
    rmSync(probe);
  } catch (error) {
    throw asRequestError(given, error);
  }
  return folder;
}

function forbidDoubles(
  outputs: readonly unknown[],
  files: readonly Pick<PlannedFile, 'given' | 'target'>[],
  folders: readonly string[],
): void {
  if (outputs.filter((output) => output === '-').length > 1)
    throw new RequestError('-: stands twice among the outputs');
  const taken = new Set<string>();
  const claim = (given: string, path: string) => {
    for (const name of namesOf(path)) {
      if (taken.has(name)) throw new RequestError(`${given}: two outputs would be written to ${path}`);
    }
    for (const name of namesOf(path)) taken.add(name);
  };
  for (const folder of folders) claim(folder, folder);
  for (const { given, target } of files) claim(given, target);
}

function forbidInput(files: readonly Pick<PlannedFile, 'given' | 'target'>[], inputPath: string): void {
  const input = new Set(namesOf(resolve(inputPath)));
  for (const { given, target } of files) {
    if (namesOf(target).some((name) => input.has(name))) {
      throw new RequestError(`${given}: is the input itself; name another output, what is read is never overwritten`);
    }
  }
}

/** All that two paths of one file have in common: the path with its links resolved, and the file's own number. */
function namesOf(path: string): string[] {
  const there = statOrNull(path);
  return there === null ? [path] : [realpathSync(path), `${there.dev}:${there.ino}`];
}

function statOrNull(path: string): Stats | null {
  return orNull(path, () => statSync(path));
}

function lstatOrNull(path: string): Stats | null {
  return orNull(path, () => lstatSync(path));
}

/** Null where nothing is there; any other failure is said now, before the work. */
function orNull(path: string, look: () => Stats): Stats | null {
  try {
    return look();
  } catch (error) {
    if (['ENOENT', 'ENOTDIR'].includes(errorCode(error))) return null;
    throw asRequestError(path, error);
  }
}
