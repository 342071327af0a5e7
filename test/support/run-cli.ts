import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const program = fileURLToPath(new URL('../../dist/cli/main.js', import.meta.url));

export interface CliRun {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** Runs the built command as a user does. */
export function pinwright(args: readonly string[], cwd?: string): CliRun {
  if (!existsSync(program)) throw new Error('dist/ is missing: run `npm run build` first');
  const { status, stdout, stderr } = spawnSync(process.execPath, [program, ...args], {
    encoding: 'utf8',
    maxBuffer: 1 << 28,
    ...(cwd === undefined ? {} : { cwd }),
  });
  return { code: status, stdout, stderr };
}

/** Runs an independent checker (a Python program); its exit code and what it printed. */
export function runChecker(path: string, args: readonly string[]): { code: number | null; output: string } {
  const { status, stdout, stderr } = spawnSync('python3', [path, ...args], { encoding: 'utf8', maxBuffer: 1 << 28 });
  return { code: status, output: stdout + stderr };
}
