// Runs everything that is checked: types, lint, unit tests, both builds, browser tests.
// The last line is `N passed, N failed`: tests of both runners, and one failure for each other step that fails.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';

const top = resolve(import.meta.dirname, '..');
const reports = join(top, 'e2e/.out/reports');
rmSync(reports, { recursive: true, force: true });
mkdirSync(reports, { recursive: true });

let passed = 0;
let failed = 0;

function run(title, script, args, env = {}) {
  console.log(`\n== ${title}`);
  const { status } = spawnSync(process.execPath, [join(top, script), ...args], {
    cwd: top,
    stdio: 'inherit',
    env: { ...process.env, ...env },
  });
  return status === 0;
}

function step(title, script, ...args) {
  const good = run(title, script, args);
  if (!good) failed += 1;
  return good;
}

/** Adds a runner's tests. A runner that failed without naming a failed test, or ran none, is a failure too. */
function count(good, report, read) {
  const sum = existsSync(report) ? read(JSON.parse(readFileSync(report, 'utf8'))) : { passed: 0, failed: 0 };
  passed += sum.passed;
  failed += sum.failed;
  if (sum.failed === 0 && (!good || sum.passed === 0)) failed += 1;
}

const vite = 'node_modules/vite/bin/vite.js';
const tsc = 'node_modules/typescript/bin/tsc';

step('types', tsc, '-p', '.');
step('types of the engine, without a page', tsc, '-p', 'engine');
step('lint', 'node_modules/@biomejs/biome/bin/biome', 'check');

const unitReport = join(reports, 'unit.json');
const units = run('unit tests', 'node_modules/vitest/vitest.mjs', [
  'run',
  '--reporter=default',
  '--reporter=json',
  `--outputFile.json=${unitReport}`,
]);
count(units, unitReport, ({ numPassedTests, numFailedTests, testResults }) => ({
  passed: numPassedTests,
  // A file that does not load has failed and names no test.
  failed:
    numFailedTests + testResults.filter((file) => file.status === 'failed' && !file.assertionResults.length).length,
}));

const built = [
  step('build of the page', vite, 'build', '--logLevel', 'warn'),
  step('build of the batch command', vite, 'build', '--mode', 'batch', '--logLevel', 'warn'),
].every(Boolean);

if (built) {
  const browserReport = join(reports, 'browser.json');
  const good = run('browser tests', 'e2e/run.mjs', [], { E2E_REPORT: browserReport });
  count(good, browserReport, ({ stats, errors }) => ({
    passed: stats.expected,
    failed: stats.unexpected + stats.flaky + errors.length,
  }));
} else {
  console.log('\n== browser tests: not run, for want of a build');
  failed += 1;
}

console.log(`\n${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
