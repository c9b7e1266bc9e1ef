// `npm test`: everything that is tested, from a fresh clone. Installs what is missing, then one step after the other; a step that
// fails does not hide the next. The last line counts: `N passed, N failed`, where lint, types and build count as one each.
//
// Not here: the tests themselves, the speed figures (npm run bench).

import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build, install, root, run } from '../src/cli/setup.mjs';

const began = Date.now();
const results = [];
const seconds = (since) => `${((Date.now() - since) / 1000).toFixed(1)} s`;

if (!install()) {
  console.error('The packages could not be installed: see above.');
  console.log('0 passed, 1 failed');
  process.exit(1);
}

const bin = (path) => join(root, 'node_modules', path);
const node = (...args) => run(process.execPath, args);

function step(name, work) {
  console.log(`\n── ${name} ──`);
  const since = Date.now();
  let counts;
  try {
    counts = work();
  } catch (fault) {
    console.error(fault.message);
    counts = false;
  }
  const { passed, failed } = typeof counts === 'boolean' ? { passed: counts ? 1 : 0, failed: counts ? 0 : 1 } : counts;
  results.push({ name, passed, failed, time: seconds(since) });
}

/** Runs one project of tests. A file that does not load, a run that dies and a project without tests are failures too. */
function tests(project, exclude = []) {
  const folder = mkdtempSync(join(tmpdir(), 'tightside-test-'));
  try {
    const file = join(folder, 'report.json');
    const ended = spawnSync(
      process.execPath,
      [
        bin('vitest/vitest.mjs'),
        'run',
        '--project',
        project,
        '--reporter=default',
        '--reporter=json',
        `--outputFile.json=${file}`,
        ...exclude.map((one) => `--exclude=${one}`),
      ],
      { cwd: root, stdio: 'inherit' },
    );
    const report = JSON.parse(readFileSync(file, 'utf8'));
    const files = report.testResults.filter((one) => one.status === 'failed' && one.assertionResults.length === 0).length;
    // Tests that were left out are counted as failed: nothing here may be skipped in silence.
    let failed = report.numFailedTests + files + report.numPendingTests + report.numTodoTests;
    if (failed === 0 && (ended.status !== 0 || report.numPassedTests === 0)) failed = 1;
    return { passed: report.numPassedTests, failed };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

const left = [];
const exclude = [];
if (spawnSync('units', ['--version'], { encoding: 'utf8' }).status !== 0) {
  exclude.push('test/quantity/gnu-units.test.ts');
  left.push('the comparison of every unit with the program `units`, which is not installed here (Debian package: units)');
}

step('lint', () => node(bin('@biomejs/biome/bin/biome'), 'check', '.'));
step('rooms', () => node('test/rooms.mjs'));
step('types', () => node(bin('typescript/bin/tsc'), '--noEmit'));
step('tests in Node', () => tests('node', exclude));
step('build', build);
step('tests in a browser', () => tests('browser'));

const width = Math.max(...results.map(({ name }) => name.length));
console.log('');
for (const { name, passed, failed, time } of results) {
  console.log(
    `${name.padEnd(width)}  ${String(passed).padStart(5)} passed  ${String(failed).padStart(3)} failed  ${time.padStart(8)}`,
  );
}
for (const what of left) console.log(`left out: ${what}`);
const passed = results.reduce((sum, one) => sum + one.passed, 0);
const failed = results.reduce((sum, one) => sum + one.failed, 0);
console.log(`${seconds(began)} in all\n`);
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
