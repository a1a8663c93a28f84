// Runs all tests and ends with `N passed, N failed` from the runner's own counts. Arguments are the names of steps that
// failed before: each counts as one failure. A test file that can not be loaded counts as one too.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'rimflow-tests-'));
const report = join(folder, 'report.json');
const failedSteps = process.argv.slice(2);

let passed = 0;
let failed = failedSteps.length;
let skipped = 0;
try {
  const runner = join(root, 'node_modules/vitest/vitest.mjs');
  const options = ['run', '--config', 'test/vitest.config.ts', '--reporter=default', '--reporter=json'];
  const run = spawnSync(process.execPath, [runner, ...options, `--outputFile.json=${report}`], {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  const result = JSON.parse(readFileSync(report, 'utf8'));
  passed = result.numPassedTests;
  failed += result.numFailedTests;
  skipped = result.numPendingTests + result.numTodoTests;
  const unread = result.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  );
  failed += unread.length;
  // an error outside of any test, such as a promise nobody waited for
  if (run.status !== 0 && failed === failedSteps.length) failed++;
  if (passed === 0 && failed === 0) failed++;
} catch (error) {
  process.stderr.write(`the tests could not be run: ${error.message}\n`);
  failed++;
} finally {
  rmSync(folder, { recursive: true, force: true });
}
if (skipped > 0) process.stdout.write(`${skipped} skipped\n`);
if (failedSteps.length > 0) process.stdout.write(`failed steps: ${failedSteps.join(', ')}\n`);
process.stdout.write(`${passed} passed, ${failed} failed\n`);
process.exitCode = failed === 0 ? 0 : 1;
