import { createHash, randomBytes } from 'node:crypto';
import { lstat, readdir, rm } from 'node:fs/promises';
import { hostname } from 'node:os';
import { join } from 'node:path';

const NAME = /^\.pinwright-([0-9a-f]{8})-(\d+)-[0-9a-f]+$/;

/** A process on another machine that shares the folder cannot be asked whether it lives; after a day it is not waited for. */
const FOREIGN_AGE_MS = 24 * 3600 * 1000;

/** Clocks of a disk and of a process differ a little. */
const CLOCK_MARGIN_MS = 5000;

/** A name for a file that is not yet what it is to be; it tells which process is at work on it. */
export function temporaryName(): string {
  return `.pinwright-${machine()}-${process.pid}-${randomBytes(6).toString('hex')}`;
}

/** Removes what runs that are dead have left behind in a folder. */
export async function sweepStrays(folder: string): Promise<void> {
  for (const name of await readdir(folder)) {
    const path = join(folder, name);
    if (NAME.test(name) && (await isStray(path, name))) await rm(path, { force: true }).catch(() => undefined);
  }
}

async function isStray(path: string, name: string): Promise<boolean> {
  const [, itsMachine, pid] = NAME.exec(name) ?? [];
  const there = await lstat(path).catch(() => null);
  if (there === null || !there.isFile()) return false;
  if (itsMachine !== machine()) return there.ctimeMs < Date.now() - FOREIGN_AGE_MS;
  if (Number(pid) !== process.pid) return !isAlive(Number(pid));
  // Process numbers come again, in containers at every start: a file older than this process is not its own.
  return there.ctimeMs < Date.now() - process.uptime() * 1000 - CLOCK_MARGIN_MS;
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM';
  }
}

function machine(): string {
  return createHash('sha1').update(hostname()).digest('hex').slice(0, 8);
}
