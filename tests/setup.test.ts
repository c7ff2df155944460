import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { countPlaywright, countVitest, tally } from './setup/all.mjs';
import { findBrowser } from './setup/browser.mjs';
import { packagesMatchLock } from './setup/ready.mjs';

describe('the count at the end of npm test', () => {
  const clean = { passed: 5, failed: 0, skipped: 0 };

  test('takes a clean stage as it is', () => {
    expect(tally(true, clean, true)).toEqual(clean);
  });

  test('counts failed tests once, though the command failed too', () => {
    expect(tally(false, { passed: 5, failed: 2, skipped: 0 }, true)).toEqual({
      passed: 5,
      failed: 2,
      skipped: 0,
    });
  });

  test('counts a stage that fails without a failed test as one failure', () => {
    expect(tally(false, clean, true).failed).toBe(1);
    expect(tally(false, undefined, false).failed).toBe(1);
  });

  test('counts a test runner that ran nothing as one failure, and a linter that ran well as none', () => {
    expect(tally(true, undefined, true).failed).toBe(1);
    expect(tally(true, { passed: 0, failed: 0, skipped: 3 }, true).failed).toBe(1);
    expect(tally(true, undefined, false).failed).toBe(0);
  });

  test('reads both reports, and calls a test that passed only on a retry failed', () => {
    const unit = { numPassedTests: 7, numFailedTests: 1, numPendingTests: 2, numTodoTests: 1 };
    expect(countVitest(unit)).toEqual({ passed: 7, failed: 1, skipped: 3 });
    const stats = { expected: 4, unexpected: 1, flaky: 1, skipped: 2 };
    expect(countPlaywright({ stats })).toEqual({ passed: 4, failed: 2, skipped: 2 });
  });
});

describe('installed packages', () => {
  const folders: string[] = [];
  afterEach(() => {
    for (const folder of folders.splice(0)) rmSync(folder, { recursive: true });
  });

  type Packages = Record<string, { version?: string; integrity?: string; optional?: boolean }>;
  function project(lock: Packages, installed?: Packages): string {
    const folder = mkdtempSync(join(tmpdir(), 'splitwright-lock-'));
    folders.push(folder);
    writeFileSync(join(folder, 'package-lock.json'), JSON.stringify({ packages: lock }));
    if (installed) {
      mkdirSync(join(folder, 'node_modules'));
      writeFileSync(join(folder, 'node_modules/.package-lock.json'), JSON.stringify({ packages: installed }));
    }
    return folder;
  }
  const one = { 'node_modules/a': { version: '1.0.0', integrity: 'sha512-a' } };
  const lock: Packages = { '': {}, ...one, 'node_modules/b': { version: '2.0.0', optional: true } };

  test('match the lock when the same, with or without an optional one', () => {
    expect(packagesMatchLock(project(lock, one))).toBe(true);
    expect(packagesMatchLock(project(lock, { ...one, 'node_modules/b': { version: '2.0.0' } }))).toBe(true);
  });

  test('do not match when absent, missing one, of another version, or with one too many', () => {
    expect(packagesMatchLock(project(lock))).toBe(false);
    expect(packagesMatchLock(project(lock, {}))).toBe(false);
    expect(packagesMatchLock(project(lock, { 'node_modules/a': { version: '1.0.1' } }))).toBe(false);
    expect(packagesMatchLock(project(lock, { ...one, 'node_modules/c': { version: '3.0.0' } }))).toBe(false);
  });
});

describe('finding the browser', () => {
  afterEach(() => {
    vi.unstubAllEnvs();
  });

  test('stops with a clear error when CHROMIUM_PATH names something that does not run', () => {
    vi.stubEnv('CHROMIUM_PATH', join(tmpdir(), 'no-such-browser'));
    expect(() => findBrowser()).toThrow(/CHROMIUM_PATH.*no-such-browser/);
  });

  test('finds none on an empty PATH unless it is Playwright’s own', () => {
    vi.stubEnv('CHROMIUM_PATH', '');
    vi.stubEnv('PATH', '');
    expect(findBrowser()?.executablePath).toBeUndefined();
  });
});
