/** What a user waits for, in the built page: until it stands, until the first numbers, from an edit to changed numbers. */
import { cpus, loadavg } from 'node:os';
import { type Browser, type CDPSession, chromium, type Locator, type Page } from 'playwright';
import { findBrowser, LAUNCH_ARGS, NO_BROWSER } from '../setup/browser.mjs';
import { firstScripts_kB, served } from './served';

const EDITS = Number(process.env.BENCH_EDITS ?? 60);
const SLIDE_MS = 3000;

/** What is edited and slid in which example: the unit's tag, and its field. */
interface Case {
  readonly example: string;
  readonly tag: string;
  readonly field: string;
  readonly text: (k: number) => string;
}
const bar = (k: number): string => `${(7 + 0.05 * (k % 20)).toFixed(2)} bar`;
const reflux = (k: number): string => (2.2 + 0.02 * (k % 20)).toFixed(2);
const CASES: readonly Case[] = [
  { example: 'let-down', tag: 'PV-1', field: 'p.P', text: bar },
  { example: 'condensate-flash', tag: 'PV-1', field: 'p.P', text: bar },
  { example: 'aromatic-condensate', tag: 'C-101', field: 'fixedBy.0.value', text: reflux },
];

const percentile = (values: readonly number[], share: number): number => {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)] ?? Number.NaN;
};
const spread = (what: string, values: readonly number[]): object => ({
  [`${what}, median ms`]: percentile(values, 0.5),
  [`${what}, 95 % ms`]: percentile(values, 0.95),
});

/** Edits with their times and those of the first frame painted with their numbers, as far as the page marked both [ms]. */
const shownEdits = (page: Page): Promise<readonly { readonly edit: number; readonly shown: number }[]> =>
  page.evaluate(() => {
    const at = new Map(performance.getEntriesByType('mark').map((m) => [m.name, m.startTime]));
    return [...at].flatMap(([name, edit]) => {
      const shown = name.startsWith('edit:') ? at.get(`shown:${name.slice(5)}`) : undefined;
      return shown === undefined ? [] : [{ edit, shown }];
    });
  });

const markOf = (page: Page, name: string): Promise<number> =>
  page.evaluate((mark) => performance.getEntriesByName(mark)[0]?.startTime ?? Number.NaN, name);

const solved = (page: Page): Promise<unknown> =>
  page.waitForFunction(() => performance.getEntriesByName('first-solved').length > 0);

/** Processor seconds of the page's main thread, which a busy machine does not change: on anything, and in scripts. */
async function worked(cdp: CDPSession): Promise<{ readonly all: number; readonly scripts: number }> {
  const { metrics } = await cdp.send('Performance.getMetrics');
  const of = (name: string): number => metrics.find((metric) => metric.name === name)?.value ?? Number.NaN;
  return { all: of('TaskDuration'), scripts: of('ScriptDuration') };
}

/** Types into a field again and again, waiting for each answer. */
async function timeEdits(page: Page, cdp: CDPSession, field: Locator, { text }: Case): Promise<object> {
  const before = await worked(cdp);
  for (let k = 0; k < EDITS; k += 1) {
    await field.fill(text(k));
    await field.press('Enter');
    await page.waitForTimeout(120);
  }
  const after = await worked(cdp);
  const times = (await shownEdits(page)).slice(-EDITS).map(({ edit, shown }) => shown - edit);
  return {
    edits: times.length,
    ...spread('edit to shown', times),
    'main thread per edit ms': (1e3 * (after.all - before.all)) / EDITS,
    'scripts per edit ms': (1e3 * (after.scripts - before.scripts)) / EDITS,
  };
}

/** Drags a number to and fro for some seconds, as fast as frames come, and counts the answers that were painted. */
async function timeSlide(page: Page, cdp: CDPSession, field: Locator): Promise<object> {
  await field.blur();
  const digits = page.locator('.box', { has: field }).locator('[data-slides]');
  const box = await digits.boundingBox();
  if (!box) throw new Error('there is no number to drag');
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + 8, y);
  await page.waitForTimeout(300);
  const before = await worked(cdp);
  // One move a frame, made in the page: what the machine takes to hand them over is not the page's.
  const { from, to, asked } = await digits.evaluate(
    async (element, [lasts, left]) => {
      const from = performance.now();
      let asked = 0;
      while (performance.now() - from < lasts) {
        await new Promise(requestAnimationFrame);
        asked += 1;
        const far = asked % 60;
        const clientX = left + 2 * Math.min(far, 60 - far);
        element.dispatchEvent(new PointerEvent('pointermove', { clientX, bubbles: true }));
      }
      return { from, to: performance.now(), asked };
    },
    [SLIDE_MS, x + 8] as const,
  );
  const after = await worked(cdp);
  await page.mouse.up();
  const seen = (await shownEdits(page)).filter(({ shown }) => shown >= from && shown <= to);
  const gaps = seen.slice(1).map(({ shown }, k) => shown - seen[k]!.shown);
  return {
    'slide, frames a second': (1e3 * asked) / (to - from),
    'slide, updates a second': (1e3 * seen.length) / (to - from),
    ...spread(
      'slide, edit to shown',
      seen.map(({ edit, shown }) => shown - edit),
    ),
    'slide, between updates, 95 % ms': percentile(gaps, 0.95),
    'slide, main thread per update ms': (1e3 * (after.all - before.all)) / seen.length,
  };
}

async function timeCase(browser: Browser, address: string, one: Case): Promise<object> {
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
  const cdp = await page.context().newCDPSession(page);
  await cdp.send('Performance.enable', { timeDomain: 'threadTicks' });
  await page.goto(address);
  await page.locator(`[data-example="${one.example}.sketch.json"]`).waitFor();
  const asked = await page.evaluate((name) => {
    const at = performance.now();
    document.querySelector<HTMLElement>(`[data-example="${name}.sketch.json"]`)?.click();
    return at;
  }, one.example);
  await solved(page);
  const opened = (await markOf(page, 'first-solved')) - asked;

  await page.locator(`[data-unit^="${one.tag}"]`).first().click();
  const field = page.locator(`[data-field="${one.field}"]`).first();
  await field.waitFor();
  const edits = await timeEdits(page, cdp, field, one);
  const slide = await timeSlide(page, cdp, field);
  await page.close();
  return { example: one.example, 'opened to solved ms': opened, ...edits, ...slide, load: loadavg()[0]! };
}

const FRESH = 7;

/** A fresh tab: until the page stands, and with a sketch of last time in it until its numbers do. */
async function timeFresh(browser: Browser, address: string, { example }: Case): Promise<object> {
  const ready: number[] = [];
  const first: number[] = [];
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
  const before = await context.newPage();
  await before.goto(address);
  await before.locator(`[data-example="${example}.sketch.json"]`).click();
  await solved(before);
  await before.locator('.saved[data-state="saved"]').waitFor();
  await before.close();
  for (let k = 0; k < FRESH; k += 1) {
    const page = await context.newPage();
    await page.goto(address);
    await solved(page);
    await page.waitForFunction(() => performance.getEntriesByName('app-ready').length > 0);
    const at = await markOf(page, 'app-ready');
    ready.push(at);
    first.push((await markOf(page, 'first-solved')) - at);
    await page.close();
  }
  await context.close();
  return {
    'fresh tab with': example,
    ...spread('app ready', ready),
    ...spread('first solved after app ready', first),
    load: loadavg()[0]!,
  };
}

export async function timeBrowser(): Promise<readonly object[]> {
  const found = findBrowser();
  if (!found) throw new Error(NO_BROWSER);
  return served(async (address, folder) => {
    const browser = await chromium.launch({
      args: LAUNCH_ARGS,
      ...(found.executablePath ? { executablePath: found.executablePath } : {}),
    });
    try {
      const rows: object[] = [{ 'first scripts, packed kB': firstScripts_kB(folder), cores: cpus().length }];
      for (const one of CASES) rows.push(await timeCase(browser, address, one));
      for (const one of CASES.slice(1)) rows.push(await timeFresh(browser, address, one));
      return rows;
    } finally {
      await browser.close();
    }
  });
}
