import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type BrowserContext, chromium, type Page } from 'playwright';
import { makeRandom } from '../tests/robust/random';
import { findBrowser, LAUNCH_ARGS } from '../tests/setup/browser.mjs';

/** A folder for a browser's own files, that several browsers use one after the other. */
export const profile = (): string => mkdtempSync(join(tmpdir(), 'splitwright-profile-'));

const FIELD = '.drawer [data-field="p.P"]';
/** From one edit to the next [ms]: a fraction of what a quick hand needs to type a value and Enter. */
const PACE_MS = 100;
const WAIT = { timeout: 20_000 } as const;

interface Trial {
  /** Nothing is stored yet. */
  readonly first: boolean;
  readonly seed: number;
  /** The browser’s processes ended at once, or the page loaded anew. */
  readonly by: 'kill' | 'reload';
}

export interface Found {
  readonly fault?: string;
  /** Edits that were finished when the end came, and that of the last one which is there again. */
  readonly made: number;
  readonly kept: number;
}

async function launch(folder: string): Promise<{ readonly context: BrowserContext; readonly page: Page }> {
  const browser = findBrowser();
  const context = await chromium.launchPersistentContext(folder, {
    args: LAUNCH_ARGS,
    serviceWorkers: 'block',
    viewport: { width: 1440, height: 900 },
    ...(browser?.executablePath ? { executablePath: browser.executablePath } : {}),
  });
  return { context, page: context.pages()[0] ?? (await context.newPage()) };
}

/** Ends this browser's processes as a crash would: those that were started on its folder, and no others. */
async function crash(context: BrowserContext): Promise<void> {
  const session = await context.newCDPSession(context.pages()[0]!);
  const closed = new Promise<void>((done) => context.once('close', () => done()));
  // Not answered: the process is gone.
  session.send('Browser.crash').catch(() => undefined);
  await closed;
}

async function open(page: Page, address: string, first: boolean): Promise<void> {
  await page.goto(address);
  if (first) await page.locator('[data-example="let-down.sketch.json"]').click(WAIT);
  await page.locator('[data-unit="PV-1"]').click(WAIT);
  await page.locator(FIELD).first().waitFor(WAIT);
}

const valueShown = async (page: Page): Promise<number> =>
  Number.parseFloat(await page.locator(FIELD).first().inputValue());

/**
 * Opens the sketch, makes edit after edit by keyboard, ends the browser or the page at a random moment in the middle, opens it
 * again and compares: at most the last edit may be missing, and nothing may be there that was not typed.
 */
export async function killed(folder: string, address: string, { first, seed, by }: Trial): Promise<Found> {
  const random = makeRandom(seed);
  let { context, page } = await launch(folder);
  try {
    await open(page, address, first);
    const start = Math.round((await valueShown(page)) * 100) / 100;
    const pressureOf = (edit: number): number => Math.round((start + edit * 0.01) * 100) / 100;
    let begun = 0;
    let made = 0;
    let going = true;
    const field = page.locator(FIELD).first();
    const typing = (async () => {
      while (going) {
        begun += 1;
        await field.fill(`${pressureOf(begun)} bar`, WAIT);
        await field.press('Enter', WAIT);
        made = begun;
        await new Promise((done) => setTimeout(done, PACE_MS));
      }
    })().catch((error: unknown) => {
      // The page goes away under the hand: what this is about.
      if (going) throw error;
    });
    await new Promise((done) => setTimeout(done, random.between(150, 1500)));
    going = false;
    const wanted = made;
    if (by === 'kill') {
      await crash(context);
      ({ context, page } = await launch(folder));
      await typing;
    } else {
      await page.reload();
      await typing;
    }
    await open(page, address, false);
    const state = await page.locator('.bar .saved').getAttribute('data-state');
    const kept = Math.round(((await valueShown(page)) - start) * 100);
    const fault =
      kept < wanted - 1
        ? `of ${wanted} edits the first ${kept} are there`
        : kept > begun
          ? `edit ${kept} was never typed`
          : state === 'read-only'
            ? 'the sketch can only be read'
            : undefined;
    return { made: wanted, kept, ...(fault ? { fault } : {}) };
  } finally {
    await context.close();
  }
}
