/**
 * How fluently a unit is dragged in a sheet of 200 units, against the bare canvas library with as many plain nodes, in the
 * same run, in turns. On a busy machine both get slower: only their ratio counts.
 */
import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { loadavg, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type Browser, chromium, type Page } from 'playwright';
import { copyPart, pasteFragment } from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import { writeSketch } from '../../src/sketch/write';
import { findBrowser, LAUNCH_ARGS, NO_BROWSER } from '../setup/browser.mjs';
import { served } from './served';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const VITE = join(ROOT, 'node_modules/vite/bin/vite.js');
const BARE_PORT = Number(process.env.BENCH_BARE_PORT ?? 4189);
const UNITS = 200;
const ROUNDS = Number(process.env.BENCH_ROUNDS ?? 5);
const LASTS_MS = 2500;
/** As much of the bare library's frame rate as is asked for. */
export const WANTED = 0.9;

/** The small example as often as it takes, ten in a row. */
export function manyUnits(count: number): Sketch {
  const opened = openSketch(readFileSync(join(ROOT, 'public/examples/let-down.sketch.json'), 'utf8'));
  if (!opened.ok) throw new Error('the example does not open');
  const part = copyPart(opened.sketch, new Set(opened.sketch.units.map((unit) => unit.id)));
  if (!part) throw new Error('the example is empty');
  let sketch: Sketch = { ...opened.sketch, id: 'many-units' };
  for (let k = 1; sketch.units.length < count; k += 1) {
    const edit = pasteFragment(sketch, part, [720 * (k % 8), 400 * Math.floor(k / 8)]);
    if (!edit.ok) throw new Error(edit.code);
    sketch = edit.sketch;
  }
  return sketch;
}

/** Builds and serves the page with plain nodes while `use` lasts. */
async function servedBare<T>(use: (address: string) => Promise<T>): Promise<T> {
  const folder = mkdtempSync(join(tmpdir(), 'plain-page-'));
  const page = join(ROOT, 'tests/bench/bare');
  const options = { cwd: ROOT, stdio: 'ignore' } as const;
  const build = spawn(process.execPath, [VITE, 'build', page, '--outDir', folder, '--emptyOutDir'], options);
  const [code] = await once(build, 'exit');
  if (code !== 0) throw new Error(`the build of the plain page ended with ${code}`);
  const server: ChildProcess = spawn(
    process.execPath,
    [VITE, 'preview', page, '--outDir', folder, '--port', String(BARE_PORT), '--strictPort'],
    options,
  );
  const address = `http://localhost:${BARE_PORT}/`;
  try {
    for (let k = 0; k < 200; k += 1) {
      const answers = await fetch(address).then(
        (r) => r.ok,
        () => false,
      );
      if (answers) return await use(address);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new Error('the plain page is not served');
  } finally {
    server.kill();
    rmSync(folder, { recursive: true, force: true });
  }
}

interface Dragged {
  readonly fps: number;
  /** Processor time of the page's main thread for each frame [ms]. */
  readonly work_ms: number;
}

/** Holds an element and moves it to and fro, one move a frame; every move is handed over in the page itself. */
async function drag(page: Page, selector: string): Promise<Dragged> {
  const box = await page.locator(selector).first().boundingBox();
  if (!box) throw new Error(`${selector} is not to be seen`);
  const cdp = await page.context().newCDPSession(page);
  await cdp.send('Performance.enable', { timeDomain: 'threadTicks' });
  const worked = async (): Promise<number> => {
    const { metrics } = await cdp.send('Performance.getMetrics');
    return metrics.find((metric) => metric.name === 'TaskDuration')?.value ?? Number.NaN;
  };
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + 12, y + 4, { steps: 3 });
  await page.waitForTimeout(300);
  const before = await worked();
  const { frames, ms } = await page.evaluate(
    async ([left, top, lasts]) => {
      const from = performance.now();
      let frames = 0;
      let ms = 0;
      // The last move is the farthest, so that it can be seen afterwards that something was moved.
      for (let last = false; ; ) {
        await new Promise(requestAnimationFrame);
        ms = performance.now() - from;
        if (last) return { frames, ms };
        frames += 1;
        last = ms >= lasts;
        const by = last ? 80 : 2 * Math.min(frames % 80, 80 - (frames % 80));
        const at = { clientX: left + by, clientY: top + by / 2, buttons: 1, bubbles: true, view: window };
        window.dispatchEvent(new MouseEvent('mousemove', at));
      }
    },
    [x, y, LASTS_MS] as const,
  );
  const after = await worked();
  const moved = await page.locator(selector).first().boundingBox();
  if (!moved || Math.hypot(moved.x - box.x, moved.y - box.y) < 8)
    throw new Error(`${selector} was not moved`);
  // Back to where it was, so that the next turn finds it on top again.
  await page.mouse.move(x, y);
  await page.mouse.up();
  await cdp.detach();
  return { fps: (1e3 * frames) / ms, work_ms: (1e3 * (after - before)) / frames };
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

async function openSheet(browser: Browser, address: string, file: string): Promise<Page> {
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
  page.on('filechooser', (chooser) => void chooser.setFiles(file));
  await page.goto(address);
  await page.locator('.card').first().waitFor();
  await page.keyboard.press('Control+o');
  await page.waitForFunction((count) => document.querySelectorAll('[data-unit]').length >= count, UNITS);
  await page.waitForFunction(() => document.querySelector('[data-unit]:not([data-state="solved"])') === null);
  return page;
}

/** In turns, so that what else the machine does falls on both alike. */
async function compare(
  what: string,
  sheet: Page,
  bare: Page,
  [ours, theirs]: readonly [string, string],
): Promise<object> {
  const runs: { readonly sheet: Dragged; readonly bare: Dragged }[] = [];
  for (let k = 0; k < ROUNDS; k += 1) {
    await sheet.bringToFront();
    const one = await drag(sheet, ours);
    await bare.bringToFront();
    runs.push({ sheet: one, bare: await drag(bare, theirs) });
  }
  const of = (pick: (run: (typeof runs)[number]) => number): number => median(runs.map(pick));
  return {
    what,
    units: UNITS,
    'frames a second': of((run) => run.sheet.fps),
    'plain nodes, frames a second': of((run) => run.bare.fps),
    ratio: of((run) => run.sheet.fps / run.bare.fps),
    wanted: WANTED,
    'main thread per frame ms': of((run) => run.sheet.work_ms),
    'plain nodes, main thread per frame ms': of((run) => run.bare.work_ms),
    load: loadavg()[0]!,
  };
}

export async function timeDrag(): Promise<readonly object[]> {
  const found = findBrowser();
  if (!found) throw new Error(NO_BROWSER);
  const folder = mkdtempSync(join(tmpdir(), 'many-units-'));
  const file = join(folder, 'many.sketch.json');
  writeFileSync(file, writeSketch(manyUnits(UNITS)));
  const browser = await chromium.launch({
    args: LAUNCH_ARGS,
    ...(found.executablePath ? { executablePath: found.executablePath } : {}),
  });
  try {
    return await served((address) =>
      servedBare(async (bareAddress) => {
        const sheet = await openSheet(browser, address, file);
        const bare = await browser.newPage({ viewport: { width: 1440, height: 900 } });
        await bare.goto(`${bareAddress}?nodes=${UNITS}`);
        await bare.locator('.react-flow__node').first().waitFor();
        const rows = [
          await compare('whole sheet in view', sheet, bare, ['[data-unit="V-110"]', '[data-id="90"]']),
        ];
        await sheet.bringToFront();
        await sheet.keyboard.press('1');
        const here = await sheet.evaluate(() => {
          const middle = [...document.querySelectorAll<HTMLElement>('[data-kind="drum"]')].find((element) => {
            const { x, y } = element.getBoundingClientRect();
            return x > 300 && x < 1000 && y > 200 && y < 600;
          });
          return middle?.dataset.unit;
        });
        rows.push(
          await compare('at 100 %, with all labels', sheet, bare, [
            `[data-unit="${here}"]`,
            '[data-id="90"]',
          ]),
        );
        return rows;
      }),
    );
  } finally {
    await browser.close();
    rmSync(folder, { recursive: true, force: true });
  }
}
