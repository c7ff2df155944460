/** What a user waits for who prints: the stream summary of 22 and of 80 streams, headless and in the built page. */
import { loadavg } from 'node:os';
import { chromium, type Page } from 'playwright';
import { buildReport } from '../../src/report/model';
import { writePdf } from '../../src/report/pdf/write';
import { writeXlsx } from '../../src/report/xlsx';
import { writeSketch } from '../../src/sketch/write';
import { type Generated, generatedSketch, solvedGenerated } from '../report/generated';
import { FONTS } from '../report/readPdf';
import { findBrowser, LAUNCH_ARGS, NO_BROWSER } from '../setup/browser.mjs';
import { served } from './served';

/** What is asked for [ms], and how long a task may hold up the page. */
const CASES: readonly (Generated & { readonly within_ms: number })[] = [
  { streams: 22, chemicals: 8, within_ms: 2000 },
  { streams: 80, chemicals: 8, within_ms: 6000 },
  { streams: 80, chemicals: 40, within_ms: 6000 },
];
const LONGEST_TASK_MS = 100;
const ROUNDS = 3;

async function headless(now: () => number): Promise<object[]> {
  const rows: object[] = [];
  for (const { within_ms, ...what } of CASES) {
    const input = await solvedGenerated(what);
    const times: number[] = [];
    const worked: number[] = [];
    let kB = 0;
    for (let k = 0; k < ROUNDS; k += 1) {
      const [begun, before] = [now(), process.cpuUsage()];
      kB = (await writePdf(input, FONTS)).length / 1024;
      times.push(now() - begun);
      const { user, system } = process.cpuUsage(before);
      worked.push((user + system) / 1000);
    }
    const begun = now();
    await writeXlsx(buildReport(input));
    const first = times[0] ?? Number.NaN;
    rows.push({
      where: 'headless',
      streams: what.streams,
      chemicals: what.chemicals,
      'PDF, first ms': first,
      'PDF, best ms': Math.min(...times),
      // What a busy machine does not change.
      'PDF, first, processor ms': worked[0],
      'asked for ms': within_ms,
      kept: first <= within_ms,
      kB,
      'spreadsheet ms': now() - begun,
      load: loadavg()[0],
    });
  }
  return rows;
}

/** Opens a sketch as a file and waits for its pages; the longest task that the page's own thread had meanwhile. */
async function inPage(
  page: Page,
  what: Generated,
): Promise<{ ms: number; pages: number; longest: number; worked: number }> {
  const text = writeSketch(await generatedSketch(what));
  const chooser = page.waitForEvent('filechooser');
  await page.keyboard.press('Control+o');
  await (await chooser).setFiles({
    name: 'bench.sketch.json',
    mimeType: 'application/json',
    buffer: Buffer.from(text),
  });
  await page.locator(`[data-stream="${what.streams}"]`).first().waitFor({ state: 'attached' });
  await page.waitForFunction(() => document.querySelector('[data-unit]:not([data-state="solved"])') === null);
  await page.waitForTimeout(1500);
  await page.evaluate(() => {
    const seen: number[] = [];
    Object.assign(globalThis, { seen });
    new PerformanceObserver((list) => seen.push(...list.getEntries().map((e) => e.duration))).observe({
      entryTypes: ['longtask'],
    });
  });
  await page.locator('.sheet-flow').click({ position: { x: 4, y: 4 } });
  const cdp = await page.context().newCDPSession(page);
  await cdp.send('Performance.enable', { timeDomain: 'threadTicks' });
  const workedSoFar = async (): Promise<number> => {
    const { metrics } = await cdp.send('Performance.getMetrics');
    return 1000 * (metrics.find((metric) => metric.name === 'TaskDuration')?.value ?? Number.NaN);
  };
  const before = await workedSoFar();
  const begun = await page.evaluate(() => performance.now());
  await page.keyboard.press('p');
  await page.locator('.documents-pages[data-state="made"]').waitFor({ timeout: 60_000 });
  const ended = await page.evaluate(() => performance.now());
  const worked = (await workedSoFar()) - before;
  const longest = await page.evaluate(() =>
    (globalThis as unknown as { seen: number[] }).seen.reduce((most, ms) => Math.max(most, ms), 0),
  );
  const pages = Number(await page.locator('[data-pages]').getAttribute('data-pages'));
  await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click();
  return { ms: ended - begun, pages, longest, worked };
}

async function inBrowser(): Promise<object[]> {
  const found = findBrowser();
  if (!found) throw new Error(NO_BROWSER);
  return served(async (address) => {
    const browser = await chromium.launch({
      args: LAUNCH_ARGS,
      ...(found.executablePath ? { executablePath: found.executablePath } : {}),
    });
    try {
      const rows: object[] = [];
      for (const { within_ms, ...what } of CASES) {
        const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
        page.on('filechooser', () => undefined);
        await page.goto(address);
        await page.locator('.card').first().waitFor();
        const { ms, pages, longest, worked } = await inPage(page, what);
        rows.push({
          where: 'page',
          streams: what.streams,
          chemicals: what.chemicals,
          'key to pages ms': ms,
          'asked for ms': within_ms,
          kept: ms <= within_ms,
          pages,
          'longest task on the page ms': longest,
          // All tasks together, in processor time: what a busy machine does not change.
          'all tasks on the page, processor ms': worked,
          'task kept': longest <= LONGEST_TASK_MS,
          load: loadavg()[0],
        });
        await page.close();
      }
      return rows;
    } finally {
      await browser.close();
    }
  });
}

/** Key to pages counts everything: solving once more from nothing, loading worker and PDF maker, writing. */
export const timeSummary = async (now: () => number): Promise<readonly object[]> => [
  ...(await headless(now)),
  ...(await inBrowser()),
];
