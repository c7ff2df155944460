// Runs every stage of `npm test`, shows its output, and ends with one line "N passed, N failed".
// All stages run even after one failed, so that one run tells everything. A stage that fails without a
// failed test (a lint or type error, a build, a crash, an empty run) counts as one failure.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, realpathSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { delimiter, dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** @typedef {{ passed: number, failed: number, skipped: number }} Count */

/**
 * @param {any} report what vitest's JSON reporter wrote
 * @returns {Count}
 */
export function countVitest(report) {
  const skipped = report.numPendingTests + report.numTodoTests;
  return { passed: report.numPassedTests, failed: report.numFailedTests, skipped };
}

/**
 * @param {any} report what Playwright's JSON reporter wrote; a test that passed only on a retry is no pass
 * @returns {Count}
 */
export function countPlaywright(report) {
  const { expected, unexpected, flaky, skipped } = report.stats;
  return { passed: expected, failed: unexpected + flaky, skipped };
}

/**
 * The count a stage adds to the last line.
 * @param {boolean} ok whether its command ended well
 * @param {Count | undefined} count from its report; undefined when it wrote none
 * @param {boolean} hasTests whether the stage is a test runner
 * @returns {Count}
 */
export function tally(ok, count, hasTests) {
  const { passed, failed, skipped } = count ?? { passed: 0, failed: 0, skipped: 0 };
  const empty = hasTests && passed + failed === 0;
  return { passed, failed: failed === 0 && (!ok || empty) ? 1 : failed, skipped };
}

function main() {
  const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
  const reports = mkdtempSync(join(tmpdir(), 'splitwright-tests-'));
  const unit = join(reports, 'unit.json');
  const e2e = join(reports, 'e2e.json');
  const env = {
    ...process.env,
    PATH: join(root, 'node_modules', '.bin') + delimiter + (process.env.PATH ?? ''),
    PLAYWRIGHT_JSON_OUTPUT_FILE: e2e,
  };
  /** @type {{ name: string, line: string, report?: string, count?: (report: any) => Count }[]} */
  const stages = [
    { name: 'lint and format', line: `biome ci . --colors=${process.stdout.isTTY ? 'force' : 'off'}` },
    { name: 'types', line: 'tsc --noEmit' },
    {
      name: 'unit tests',
      line: `vitest run --reporter=default --reporter=json --outputFile.json="${unit}"`,
      report: unit,
      count: countVitest,
    },
    { name: 'build', line: 'vite build' },
    {
      name: 'browser tests',
      line: 'playwright test -c e2e --reporter=list,json',
      report: e2e,
      count: countPlaywright,
    },
  ];

  // Logs kept in a file carry no colour codes; Playwright sees to that itself and complains when told.
  const plain = process.stdout.isTTY ? {} : { NO_COLOR: '1' };

  const total = { passed: 0, failed: 0, skipped: 0 };
  const summary = [];
  for (const { name, line, report, count } of stages) {
    console.log(`\n== ${name}: ${line.split(' --')[0]}`);
    const start = performance.now();
    const ok =
      spawnSync(line, {
        cwd: root,
        env: name === 'browser tests' ? env : { ...env, ...plain },
        shell: true,
        stdio: ['ignore', 'inherit', 'inherit'],
      }).status === 0;
    const seconds = ((performance.now() - start) / 1000).toFixed(1);
    const counted =
      report && count && existsSync(report) ? count(JSON.parse(readFileSync(report, 'utf8'))) : undefined;
    const got = tally(ok, counted, report !== undefined);
    total.passed += got.passed;
    total.failed += got.failed;
    total.skipped += got.skipped;
    const tests = report ? `, ${got.passed} passed, ${got.failed} failed, ${got.skipped} skipped` : '';
    summary.push(`${got.failed === 0 ? 'ok    ' : 'FAILED'} ${name} (${seconds} s${tests})`);
  }
  rmSync(reports, { recursive: true, force: true });

  console.log(`\n${summary.join('\n')}\n`);
  console.log(`${total.passed} passed, ${total.failed} failed`);
  return total.failed === 0 ? 0 : 1;
}

// Real paths are compared: through a linked folder the two differ, and nothing would run.
const started = process.argv[1] && realpathSync(process.argv[1]);
if (started === realpathSync(fileURLToPath(import.meta.url))) process.exitCode = main();
