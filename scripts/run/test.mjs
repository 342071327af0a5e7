// `npm test`: installs, builds, lints and runs every test; the last line counts what passed and what failed.
import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import { build, install, root, run, tool } from './steps.mjs';

const report = `${root}/out/test-report.json`;
mkdirSync(`${root}/out`, { recursive: true });
rmSync(report, { force: true });

const steps = [
  ['install', install],
  ['build', build],
  ['types', () => tool('tsc', ['-p', '.'])],
  ['lint', () => run('npm', ['run', '--silent', 'lint'])],
];
const failedSteps = [];
for (const [name, step] of steps) {
  console.log(`\n== ${name}`);
  if (step()) continue;
  failedSteps.push(name);
  if (name === 'install') break;
}
if (!failedSteps.includes('install')) {
  console.log('\n== tests');
  tool('vitest', ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`]);
}

const { passed, failed, skipped } = counts();
if (failedSteps.length > 0) console.log(`\nFailed before the tests: ${failedSteps.join(', ')}`);
console.log(`\n${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`);
process.exit(failed === 0 ? 0 : 1);

function counts() {
  const before = { passed: steps.length - failedSteps.length, failed: failedSteps.length, skipped: 0 };
  try {
    const found = JSON.parse(readFileSync(report, 'utf8'));
    for (const { name, assertionResults } of found.testResults) {
      for (const { status, fullName } of assertionResults) {
        if (status === 'pending') console.log(`skipped: ${fullName} (${name.replace(root, '')})`);
      }
    }
    return {
      passed: before.passed + found.numPassedTests,
      failed: before.failed + found.numFailedTests + (found.success || found.numFailedTests > 0 ? 0 : 1),
      skipped: found.numPendingTests,
    };
  } catch {
    return { ...before, failed: before.failed + 1 };
  }
}
