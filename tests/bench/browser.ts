import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { chromium, type Page } from 'playwright';
import { findBrowser, LAUNCH_ARGS, NO_BROWSER } from '../setup/browser.mjs';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const PORT = Number(process.env.BENCH_PORT ?? 4188);
const EDITS = 60;

const percentile = (sorted: readonly number[], share: number): number =>
  sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)] ?? Number.NaN;

async function served<T>(use: (address: string) => Promise<T>): Promise<T> {
  const run = async (args: readonly string[]): Promise<void> => {
    const [code] = await once(spawn('npx', [...args], { cwd: ROOT, stdio: 'ignore' }), 'exit');
    if (code !== 0) throw new Error(`npx ${args.join(' ')} ended with ${code}`);
  };
  await run(['vite', 'build']);
  const vite = fileURLToPath(new URL('../../node_modules/vite/bin/vite.js', import.meta.url));
  const server: ChildProcess = spawn(
    process.execPath,
    [vite, 'preview', '--port', String(PORT), '--strictPort'],
    {
      cwd: ROOT,
      stdio: 'ignore',
    },
  );
  const address = `http://localhost:${PORT}/`;
  try {
    for (let k = 0; k < 100; k += 1) {
      if (
        await fetch(address).then(
          (r) => r.ok,
          () => false,
        )
      )
        return await use(address);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new Error('the built page is not served');
  } finally {
    server.kill();
  }
}

/** Time from the input event of each edit to the first frame painted with its numbers [ms]. */
const shownAfter = (page: Page): Promise<number[]> =>
  page.evaluate(() => {
    const at = new Map(performance.getEntriesByType('mark').map((m) => [m.name, m.startTime]));
    return [...at].flatMap(([name, time]) => {
      const shown = name.startsWith('edit:') ? at.get(`shown:${name.slice(5)}`) : undefined;
      return shown === undefined ? [] : [shown - time];
    });
  });

/** Edits a pressure in the built page again and again: edit to changed number, and the first solve of a fresh tab. */
export async function timeBrowser(): Promise<readonly object[]> {
  const found = findBrowser();
  if (!found) throw new Error(NO_BROWSER);
  return served(async (address) => {
    const browser = await chromium.launch({
      args: LAUNCH_ARGS,
      ...(found.executablePath ? { executablePath: found.executablePath } : {}),
    });
    try {
      const rows: object[] = [];
      for (const example of ['let-down', 'condensate-flash']) {
        const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
        await page.goto(address);
        await page.locator(`[data-example="${example}.sketch.json"]`).click();
        await page.waitForFunction(() => performance.getEntriesByName('first-solved').length > 0);
        const [ready, solved] = await page.evaluate(() =>
          ['app-ready', 'first-solved'].map((name) => performance.getEntriesByName(name)[0]?.startTime),
        );
        await page.locator('[data-unit^="PV-1"]').first().click();
        const field = page.locator('[data-field="p.P"]').first();
        await field.waitFor();
        for (let k = 0; k < EDITS; k += 1) {
          await field.fill(`${(7 + 0.05 * (k % 20)).toFixed(2)} bar`);
          await field.press('Enter');
          await page.waitForTimeout(120);
        }
        const times = (await shownAfter(page)).slice(-EDITS).sort((a, b) => a - b);
        rows.push({
          example,
          edits: times.length,
          'edit to shown, median ms': percentile(times, 0.5),
          'edit to shown, 95 % ms': percentile(times, 0.95),
          'app ready ms': ready,
          'first solved ms': solved,
        });
        await page.close();
      }
      return rows;
    } finally {
      await browser.close();
    }
  });
}
