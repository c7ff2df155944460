// Makes a bare checkout ready: installs the packages when they do not match the lock file and, with
// --browser, finds or installs a Chromium. Only Node's own modules: nothing is installed before this ran.
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync, realpathSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { findBrowser, NO_BROWSER } from './browser.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

/**
 * Runs a command line in the project's root with its output shown.
 * @param {string} line
 * @param {NodeJS.ProcessEnv} [extra]
 * @returns {boolean} whether it ended well
 */
function run(line, extra = {}) {
  console.log(`> ${line}`);
  const env = { ...process.env, ...extra };
  return (
    spawnSync(line, { cwd: root, env, shell: true, stdio: ['ignore', 'inherit', 'inherit'] }).status === 0
  );
}

/**
 * @typedef {{ version?: string, integrity?: string, optional?: boolean, devOptional?: boolean }} Entry
 * @param {string} file
 * @returns {Record<string, Entry>}
 */
const entries = (file) => JSON.parse(readFileSync(file, 'utf8')).packages;

/**
 * Whether what npm last installed is what the lock file asks for. Compared by content, since a checkout
 * or a branch switch gives files new times. Optional packages of other platforms may be absent.
 */
export function packagesMatchLock(folder = root) {
  const record = join(folder, 'node_modules', '.package-lock.json');
  if (!existsSync(record)) return false;
  const wanted = entries(join(folder, 'package-lock.json'));
  const there = entries(record);
  for (const [name, entry] of Object.entries(wanted)) {
    if (name === '') continue;
    const found = there[name];
    if (!found) {
      if (entry.optional || entry.devOptional) continue;
      return false;
    }
    if (found.version !== entry.version || found.integrity !== entry.integrity) return false;
  }
  return Object.keys(there).every((name) => name in wanted);
}

function installBrowser() {
  if (process.getuid?.() === 0 && spawnSync('apt-get', ['--version'], { stdio: 'ignore' }).status === 0) {
    const install = 'apt-get install -y --no-install-recommends chromium';
    const quiet = { DEBIAN_FRONTEND: 'noninteractive' };
    if (run(install, quiet) || (run('apt-get update', quiet) && run(install, quiet))) return;
  }
  run('npx playwright install chromium');
}

function main() {
  if (!packagesMatchLock() && !run('npm ci --no-audit --no-fund')) {
    console.error('The packages could not be installed (npm ci failed).');
    return 1;
  }
  if (!process.argv.includes('--browser')) return 0;
  if (!findBrowser()) installBrowser();
  const browser = findBrowser();
  if (!browser) {
    console.error(NO_BROWSER);
    return 1;
  }
  console.log(`Browser: ${browser.executablePath ?? "Playwright's own"} (found by ${browser.foundBy})`);
  return 0;
}

// Real paths are compared: through a linked folder the two differ, and nothing would run.
const started = process.argv[1] && realpathSync(process.argv[1]);
if (started === realpathSync(fileURLToPath(import.meta.url))) process.exitCode = main();
