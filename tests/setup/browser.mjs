// Finds the Chromium that the browser tests drive. Finding never installs anything: ready.mjs does that.
// Only Node's own modules at the top: this file is read before the packages are installed.
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { delimiter, join } from 'node:path';

/** Names a Chromium goes by on PATH, in the order tried. */
const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable'];

/** What to do when nothing was found: both commands, so that the reader can choose. */
export const NO_BROWSER =
  'No Chromium was found for the browser tests. Install one with\n' +
  '  apt-get install -y --no-install-recommends chromium\n' +
  'or with\n' +
  '  npx playwright install chromium\n' +
  'or set CHROMIUM_PATH to the program of one you have.';

/**
 * Arguments for a quiet browser whose text looks alike on every machine.
 * Chromium refuses its sandbox to root, so only root goes without it.
 */
export const LAUNCH_ARGS = [
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--font-render-hinting=none',
  ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
];

/** @param {string} program */
function runs(program) {
  return spawnSync(program, ['--version'], { stdio: 'ignore', timeout: 30_000 }).status === 0;
}

/**
 * Every file on PATH with one of the names; Playwright wants the file, not the name.
 * @returns {string[]}
 */
function onPath() {
  const folders = (process.env.PATH ?? '').split(delimiter).filter(Boolean);
  return NAMES.flatMap((name) => folders.map((folder) => join(folder, name))).filter((file) =>
    existsSync(file),
  );
}

/** The file of Playwright's own browser, if the package and that file are there. */
function playwrightsOwn() {
  const require = createRequire(import.meta.url);
  let name;
  try {
    name = require.resolve('playwright');
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'MODULE_NOT_FOUND') return undefined;
    throw error;
  }
  const file = require(name).chromium.executablePath();
  return existsSync(file) ? file : undefined;
}

/**
 * Where the browser is: CHROMIUM_PATH, then PATH, then Playwright's own build.
 * @returns {{ executablePath?: string, foundBy: string } | undefined} no executablePath for Playwright's own;
 *   undefined when there is none. Throws when CHROMIUM_PATH is set to something that does not run.
 */
export function findBrowser() {
  const given = process.env.CHROMIUM_PATH;
  if (given) {
    if (!runs(given)) throw new Error(`CHROMIUM_PATH is "${given}", which does not answer --version.`);
    return { executablePath: given, foundBy: 'CHROMIUM_PATH' };
  }
  for (const file of onPath()) if (runs(file)) return { executablePath: file, foundBy: 'PATH' };
  return playwrightsOwn() ? { foundBy: 'playwright' } : undefined;
}
