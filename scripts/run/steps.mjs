// Steps that the demo and the tests share. Plain JavaScript with nothing but Node: it runs before anything is installed.
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

export const root = fileURLToPath(new URL('../..', import.meta.url));

/** Runs a command in the project's folder; true where it ended with 0. */
export function run(command, args, options = {}) {
  return spawnSync(command, args, { cwd: root, stdio: 'inherit', ...options }).status === 0;
}

/** A tool of node_modules by its bin name. */
export function tool(name, args, options) {
  return run(process.execPath, [`${root}/node_modules/.bin/${name}`, ...args], options);
}

/** Installs what the lockfile names, where that has not been done since it changed. */
export function install() {
  const mark = `${root}/node_modules/.package-lock.json`;
  if (existsSync(mark) && sameVersions(mark)) return true;
  console.log('Installing what is missing…');
  return run('npm', ['ci', '--no-audit', '--no-fund']);
}

function sameVersions(mark) {
  const wanted = JSON.parse(readFileSync(`${root}/package-lock.json`, 'utf8')).packages;
  const there = JSON.parse(readFileSync(mark, 'utf8')).packages;
  return Object.entries(wanted).every(
    ([path, { version, optional }]) => path === '' || optional === true || there[path]?.version === version,
  );
}

export function build() {
  return run('npm', ['run', '--silent', 'build']);
}
