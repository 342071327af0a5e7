import { lstat, open } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { tried } from './failure.ts';
import type { Files } from './files.ts';
import { temporaryName } from './temporary.ts';

export interface Replacement {
  readonly given: string;
  readonly target: string;
  /** A finished file in the target's folder that is to take its name. */
  readonly temporary: string;
}

interface Done extends Replacement {
  /** A second name for what stood at the target; null where nothing did. */
  readonly kept: string | null;
}

/**
 * Gives the finished files their names, one after another. If one fails, what was replaced before is put back. At any
 * moment each target is the old file or the new one, never a part: what is replaced keeps a second name meanwhile.
 */
export async function replaceAll(replacements: readonly Replacement[], files: Files): Promise<void> {
  const done: Done[] = [];
  const kept: string[] = [];
  try {
    for (const replacement of replacements) {
      const { given, target, temporary } = replacement;
      const second = (await exists(target)) ? join(dirname(target), temporaryName()) : null;
      if (second !== null) {
        kept.push(second);
        await tried(given, () => keep(target, second, files));
      }
      await tried(given, () => files.rename(temporary, target));
      done.push({ ...replacement, kept: second });
    }
  } catch (error) {
    for (const { target, kept: old } of done.reverse()) {
      await (old === null ? files.rm(target, { force: true }) : files.rename(old, target)).catch(() => undefined);
    }
    throw error;
  } finally {
    for (const old of kept) await files.rm(old, { force: true }).catch(() => undefined);
  }
  for (const folder of new Set(replacements.map(({ target }) => dirname(target)))) await syncFolder(folder);
}

async function exists(target: string): Promise<boolean> {
  return (await lstat(target).catch(() => null)) !== null;
}

/** Not every disk knows hard links. */
async function keep(target: string, second: string, files: Files): Promise<void> {
  await files.link(target, second).catch(() => files.copyFile(target, second));
}

/** Renames reach the disk with their folder; some systems cannot sync a folder, and there is nothing to do about it. */
async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r').catch(() => null);
  await handle?.sync().catch(() => undefined);
  await handle?.close();
}
