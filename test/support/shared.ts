import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

const checkout = fileURLToPath(new URL('../..', import.meta.url));

/** Public models, schemas and independent checkers that are not part of the project, where they are at hand. */
const shared = process.env.PINWRIGHT_SHARED ?? resolve(checkout, '..', 'shared');

/** The path of a public model, or null where it is absent. */
export function publicModel(name: string): string | null {
  return present(join(shared, 'data', name));
}

/** The path of an independent checker (a Python program), or null where it is absent. */
export function checker(name: string): string | null {
  return present(join(shared, 'tools', name));
}

/** A demo model or brief of the project's own. */
export function fixture(name: string): string {
  return join(checkout, 'fixtures', name);
}

function present(path: string): string | null {
  return existsSync(path) ? path : null;
}
