import { spawnSync } from 'node:child_process';
import { mkdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';
import { temporaryFolder } from '../support/temporary-folder.ts';

const checkout = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
const folder = temporaryFolder();

it("the README's library example type-checks and runs in somebody else's project", () => {
  const [example] = [...readFileSync(join(checkout, 'README.md'), 'utf8').matchAll(/```ts\n(.*?)```/gs)].map(
    ([, code]) => code,
  );
  mkdirSync(join(folder, 'node_modules'));
  symlinkSync(checkout, join(folder, 'node_modules', 'pinwright'));
  symlinkSync(join(checkout, 'fixtures'), join(folder, 'fixtures'));
  writeFileSync(join(folder, 'package.json'), '{"type": "module", "private": true}');
  writeFileSync(join(folder, 'example.ts'), example);
  const types = join(checkout, 'node_modules', '@types');
  const compilerOptions = { module: 'NodeNext', target: 'ES2022', strict: true, types: ['node'], typeRoots: [types] };
  writeFileSync(join(folder, 'tsconfig.json'), JSON.stringify({ compilerOptions, files: ['example.ts'] }));

  const run = (args: string[]) => spawnSync(process.execPath, args, { cwd: folder, encoding: 'utf8' });
  const compiled = run([join(checkout, 'node_modules', 'typescript', 'bin', 'tsc'), '-p', '.']);
  expect(compiled.stdout).toBe('');
  const { stdout, stderr } = run(['example.js']);
  expect(stderr).toBe('');
  expect(stdout).toContain('It stands: no mechanism');
});
