import { createRequire } from 'node:module';
import { expect, type Page } from 'playwright/test';
import { field, unit } from './hand';
import { openExample, solved, test } from './page';

/** The checker itself, put into the page once: a builder would put it there for every look. */
const ofTools = createRequire(createRequire(import.meta.url).resolve('@axe-core/playwright'));
const AXE = ofTools.resolve('axe-core/axe.min.js');
const TRAIN = '[data-example="aromatic-condensate.sketch.json"]';

interface Options {
  readonly runOnly?: readonly string[];
}
interface Violation {
  readonly id: string;
  readonly impact: string | null;
  readonly nodes: readonly { readonly target: readonly string[] }[];
}
interface Checker {
  run(root: string, options: object): Promise<{ readonly violations: readonly Violation[] }>;
}

/** Serious faults of what is on the page, as readable lines. */
async function faultsOf(page: Page, root: string, options: Options): Promise<readonly string[]> {
  const violations = await page.evaluate(
    async ([within, given]) => {
      const { axe } = window as unknown as { readonly axe: Checker };
      const result = await axe.run(within, { ...given, resultTypes: ['violations'] });
      return result.violations.map(({ id, impact, nodes }) => ({
        id,
        impact,
        at: nodes.map((node) => node.target.join(' ')),
      }));
    },
    [root, options] as const,
  );
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, at }) => `${id}: ${at.join(' | ')}`);
}

/** Everything once in light; what depends on colours once more in dark, on the same page. `root`: what is new there. */
async function scan(page: Page, where: string, root = 'html'): Promise<void> {
  await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
  expect([where, 'light', ...(await faultsOf(page, root, {}))]).toEqual([where, 'light']);
  await page.emulateMedia({ colorScheme: 'dark', reducedMotion: 'reduce' });
  const dark = await faultsOf(page, root, { runOnly: ['color-contrast'] });
  expect([where, 'dark', ...dark]).toEqual([where, 'dark']);
}

// The page’s own policy refuses a script that is put into it, the checker too.
test.use({ bypassCSP: true });

test('no screen and no drawer has a serious fault of access, in light and in dark', async ({
  quiet: page,
}) => {
  await expect(page.locator('.card').first()).toBeVisible();
  await page.addScriptTag({ path: AXE });
  await scan(page, 'start');
  await openExample(page, TRAIN);
  await scan(page, 'sheet');
  for (const tag of ['C-101', 'FEED-1', 'F-101']) {
    await page.keyboard.press('Escape');
    await unit(page, tag).click();
    await expect(page.locator('.drawer [data-field="tag"]')).toHaveValue(tag);
    await scan(page, tag, '.drawer');
  }
  await page.locator('[data-stream="2"] .stream-body').click();
  await scan(page, 'stream drawer', '.drawer');
  for (const [key, name] of [
    ['l', 'Limits drawer'],
    ['a', 'Assumption register'],
    ['h', 'Chemicals drawer'],
    ['t', 'Sketch drawer'],
  ] as const) {
    await page.keyboard.press('Escape');
    await page.keyboard.press(key);
    await expect(page.getByRole('complementary', { name })).toBeVisible();
    await scan(page, name, '.drawer');
  }
  const dialogue = page.getByRole('dialog');
  const look = async (name: string): Promise<void> => {
    await expect(dialogue).toBeVisible();
    await scan(page, name, 'dialog');
    await dialogue.getByRole('button', { name: 'Close' }).click();
    await expect(dialogue).toHaveCount(0);
  };
  for (const [key, name] of [
    ['?', 'actions and keys'],
    ['k', 'pair parameters'],
    ['g', 'scaling all feeds'],
    ['Control+Shift+o', 'sketches on this computer'],
    ['Control+Shift+l', 'share as a link'],
  ] as const) {
    // Out of the drawer's fields, where keys are typed text.
    await page.keyboard.press('Escape');
    await page.keyboard.press(key);
    await look(name);
  }
  await page.keyboard.press('/');
  await page.keyboard.type('c-10');
  await expect(page.getByRole('option').first()).toBeVisible();
  await scan(page, 'finding', '.find');
  await page.keyboard.press('Escape');
  await page.locator('.bar').getByRole('button', { name: 'Stream summary' }).click();
  await expect(page.locator('[data-table="streams"]')).toBeVisible();
  await look('stream summary');
});

test('the list of actions opens by its key, is searched, and runs what is chosen', async ({
  quiet: page,
}) => {
  await openExample(page);
  await page.keyboard.press('?');
  const list = page.getByRole('dialog', { name: 'All actions and their keys' });
  await expect(list.getByRole('searchbox')).toBeFocused();
  await page.keyboard.type('assumption');
  await expect(list.locator('li')).toHaveCount(1);
  await page.keyboard.press('Enter');
  await expect(list).toHaveCount(0);
  await expect(page.getByRole('complementary', { name: 'Assumption register' })).toBeVisible();
});

/** What a screen of 1440 x 900 leaves of itself at 200 %. */
test('at 200 % everything is still there: it scrolls, and nothing hangs over the edge', async ({
  quiet: page,
}) => {
  await page.setViewportSize({ width: 720, height: 450 });
  await openExample(page);
  const overhang = (): Promise<readonly string[]> =>
    page.evaluate(() =>
      [
        ...document.querySelectorAll<HTMLElement>(
          '.bar button, .balance select, .drawer .button, .menu button',
        ),
      ]
        .filter((element) => element.getClientRects().length > 0)
        .filter((element) => {
          const { left, right, top, bottom } = element.getBoundingClientRect();
          const isOut = left < -1 || right > innerWidth + 1 || top < -1 || bottom > innerHeight + 1;
          const scrolls = (of: HTMLElement | null): boolean =>
            of !== null && (/(auto|scroll)/.test(getComputedStyle(of).overflow) || scrolls(of.parentElement));
          return isOut && !scrolls(element.parentElement);
        })
        .map((element) => element.textContent ?? ''),
    );
  expect(await overhang()).toEqual([]);
  await page.getByRole('button', { name: 'File and view' }).click();
  expect(await overhang()).toEqual([]);
  await page.keyboard.press('Escape');
  await unit(page, 'PV-1').click();
  await expect(field(page, 'p.P')).toBeVisible();
  await field(page, 'p.P').fill('9 bar');
  await field(page, 'p.P').press('Enter');
  await solved(page);
  expect(await overhang()).toEqual([]);
  const last = page.locator('.drawer-body .section').last();
  await last.scrollIntoViewIfNeeded();
  await expect(last).toBeInViewport();
});

test('at 200 % beside a drawer the strip says to the end what stops the train; parts without room are left out whole', async ({
  quiet: page,
}) => {
  await page.setViewportSize({ width: 720, height: 450 });
  await openExample(page, TRAIN);
  /** Parts of the strip that are seen, and how much of each is cut off [px]. */
  const strip = (): Promise<
    readonly { readonly text: string; readonly cut: number; readonly px: number }[]
  > =>
    page.locator('.strip-parts > span, .strip-state').evaluateAll((parts) =>
      parts
        .filter((part) => {
          const [own, strip] = [part, part.closest('.title-strip')!].map((e) => e.getBoundingClientRect());
          return own!.top < strip!.bottom - 4;
        })
        .map((part) => ({
          text: part.textContent ?? '',
          cut: part.scrollWidth - part.clientWidth,
          px: part.clientWidth,
        })),
    );
  for (const tag of ['PV-101', 'PV-102']) {
    await unit(page, tag).getByRole('button').first().click();
    await field(page, 'p.P').fill('');
    await field(page, 'p.P').press('Enter');
  }
  const state = page.locator('.strip-state');
  await expect(state).toHaveText('Not solved yet: PV-101 needs a value, PV-102 needs a value');
  const narrow = await strip();
  expect(narrow.at(-1)).toMatchObject({ text: await state.textContent(), cut: 0 });
  // Nothing is left of a part but a letter or two.
  expect(narrow.filter(({ px }) => px < 60)).toEqual([]);
  await page.keyboard.press('Escape');
  await page.keyboard.press('Escape');
  await expect(page.locator('.drawer')).toHaveCount(0);
  await page.setViewportSize({ width: 1440, height: 900 });
  await expect.poll(async () => (await strip()).length).toBeGreaterThan(4);
  expect((await strip()).filter(({ cut }) => cut > 1)).toEqual([]);
});

test('the lines over the foot of the sheet have no serious fault of access', async ({ quiet: page }) => {
  let release = (): void => undefined;
  const free = new Promise<void>((go) => {
    release = go;
  });
  await openExample(page);
  await page.addScriptTag({ path: AXE });
  await page.route('**/fonts/*.ttf', async (route) => {
    await free;
    await route.continue();
  });
  await page.keyboard.press('Control+p');
  const foot = page.locator('.at-foot');
  await expect(foot).toContainText('Laying out the pages');
  await page.evaluate(() => window.dispatchEvent(new Event('vite:preloadError')));
  await expect(foot).toContainText('needs to be loaded again');
  await scan(page, 'lines over the foot', '.at-foot');
  await page.keyboard.press('Escape');
  await expect(foot).not.toContainText('Laying out');
  release();
});
