import type * as nodeFiles from 'node:fs/promises';

/** The file system as far as it is written to; tests put failures in its place. */
export type Files = Pick<typeof nodeFiles, 'open' | 'rename' | 'link' | 'copyFile' | 'rm'>;
