/**
 * `npm test`: from a bare checkout to one last line `N passed, N failed`. Every check counts as one, every test as one;
 * nothing is skipped: where a tool is missing that cannot be installed, that is a failure and says so.
 */
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { bin, build, install, ROOT, requireNode, run } from './toolbox.mjs';

requireNode();
let passed = 0;
let failed = 0;
const log = (text) => console.error(`\n== ${text}`);

function check(name, work) {
  log(name);
  const ok = work();
  if (ok) passed += 1;
  else {
    failed += 1;
    console.error(`FAILED: ${name}`);
  }
  return ok;
}

function finish() {
  console.log(`${passed} passed, ${failed} failed`);
  process.exit(failed > 0 || passed === 0 ? 1 : 0);
}

const onPath = (name) => spawnSync('sh', ['-c', `command -v ${name}`]).status === 0;

/** Chromium and pdftotext from the system, or from Debian where this may install them. */
function tools() {
  const wanted = [
    ['chromium', 'chromium'],
    ['pdftotext', 'poppler-utils'],
  ].filter(([command]) => !onPath(command));
  if (wanted.length === 0) return true;
  if (process.getuid?.() === 0 && onPath('apt-get')) {
    run('apt-get', ['update', '-qq']);
    run(
      'apt-get',
      ['install', '-y', '-qq', '--no-install-recommends', ...wanted.map(([, pkg]) => pkg), 'fonts-dejavu-core'],
      { env: { DEBIAN_FRONTEND: 'noninteractive' } },
    );
  }
  const missing = wanted.filter(([command]) => !onPath(command));
  for (const [command, pkg] of missing)
    console.error(
      `${command} is not on the PATH. Install it (Debian: apt-get install ${pkg}) and run the tests again.`,
    );
  return missing.length === 0;
}

/** Runs one ring of tests and adds its counts; a ring that ran nothing has failed. */
function ring(project) {
  log(`Tests: ${project}`);
  const folder = mkdtempSync(join(tmpdir(), 'skyberth-test-'));
  const report = join(folder, 'report.json');
  const code = run(bin('vitest'), [
    'run',
    '--project',
    project,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ]);
  if (!existsSync(report)) {
    failed += 1;
    console.error(`FAILED: the tests of ${project} did not run.`);
  } else {
    const result = JSON.parse(readFileSync(report, 'utf8'));
    passed += result.numPassedTests;
    failed += result.numFailedTests;
    const brokenFiles = result.testResults.filter(
      (file) => file.status === 'failed' && file.assertionResults.length === 0,
    ).length;
    failed += brokenFiles;
    if (result.numPendingTests + result.numTodoTests > 0) failed += result.numPendingTests + result.numTodoTests;
    if (result.numTotalTests === 0 || (code !== 0 && result.numFailedTests + brokenFiles === 0)) failed += 1;
  }
  rmSync(folder, { recursive: true, force: true });
}

if (!check('Packages', () => install(log))) finish();
const toolsFound = check('Tools', tools);
const built = check('Type-check and build', () => build(log));
check('Type-check the tests', () => run(bin('tsc'), ['-p', 'tests']) === 0);
check('Format and lint', () => run(bin('biome'), ['check', '--config-path=.config', '--error-on-warnings', '.']) === 0);
check('Import directions', () => run(process.execPath, [join(ROOT, 'infra/run/check-imports.mjs')]) === 0);
for (const project of ['unit', 'reference', 'api']) ring(project);
if (built && toolsFound) ring('browser');
else {
  failed += 1;
  console.error('FAILED: the browser tests need the built page and Chromium.');
}
finish();
