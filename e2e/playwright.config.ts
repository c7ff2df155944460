import { fileURLToPath } from 'node:url';
import { defineConfig } from 'playwright/test';
import { findBrowser, LAUNCH_ARGS, NO_BROWSER } from '../tests/setup/browser.mjs';

const browser = findBrowser();
if (!browser) throw new Error(NO_BROWSER);

// E2E_PORT lets two checkouts run their tests on one machine.
const port = Number(process.env.E2E_PORT ?? 4173);
const root = fileURLToPath(new URL('..', import.meta.url));

export default defineConfig({
  testDir: '.',
  testMatch: '**/*.e2e.ts',
  outputDir: '../test-results',
  forbidOnly: Boolean(process.env.CI),
  fullyParallel: false,
  workers: 1,
  retries: 0,
  timeout: 90_000,
  expect: { timeout: 15_000 },
  reporter: 'list',
  use: {
    baseURL: `http://localhost:${port}/`,
    viewport: { width: 1440, height: 900 },
    screenshot: 'only-on-failure',
    // Every test begins as a first visit; only the journeys without a network keep the page's files.
    serviceWorkers: 'block',
    launchOptions: {
      args: LAUNCH_ARGS,
      ...(browser.executablePath ? { executablePath: browser.executablePath } : {}),
    },
  },
  webServer: {
    command: `npx vite preview --port ${port} --strictPort${process.env.E2E_DIST ? ` --outDir ${process.env.E2E_DIST}` : ''}`,
    cwd: root,
    url: `http://localhost:${port}/`,
    reuseExistingServer: false,
    stdout: 'ignore',
    stderr: 'pipe',
  },
});
