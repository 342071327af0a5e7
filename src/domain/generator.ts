import { readFileSync } from 'node:fs';

const manifest = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8')) as {
  version: string;
};

/** The program that wrote an output. */
export const GENERATOR = { name: 'pinwright', version: manifest.version } as const;
