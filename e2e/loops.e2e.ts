import type { Page } from 'playwright/test';
import { expect } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { solved, test } from './page';
import { columnLoops, given } from './sketches';

/** Many short steps, seconds in all: long enough to be told of on a fast machine, never silent for long on a slow one. */
const SLOW = columnLoops(8, 100);
const FINISHED = { timeout: 120_000 };

/**
 * Keeps in the page what the line over the foot and the title strip say, change by change, and does once what is asked for when
 * the line comes: a test that looked from outside could be too late.
 */
async function watch(page: Page): Promise<void> {
  await page.evaluate(() => {
    const told = { line: [] as string[], strip: [] as string[] };
    const seen = window as unknown as { told: typeof told; onLine?: ((line: Element) => void) | undefined };
    seen.told = told;
    const keep = (list: string[], text: string | null | undefined): void => {
      if (text && list.at(-1) !== text) list.push(text);
    };
    new MutationObserver(() => {
      const line = document.querySelector('[aria-label="Solving"]');
      keep(told.line, line?.textContent);
      keep(told.strip, document.querySelector('[data-strip="state"]')?.textContent);
      if (!line || !/pass \d+, off by/.test(line.textContent ?? '')) return;
      const doIt = seen.onLine;
      seen.onLine = undefined;
      doIt?.(line);
    }).observe(document.body, { subtree: true, childList: true, characterData: true });
  });
}
const told = (page: Page): Promise<{ line: string[]; strip: string[] }> =>
  page.evaluate(() => (window as unknown as { told: { line: string[]; strip: string[] } }).told);
const strip = (page: Page) => page.locator('[data-strip="state"]');

test('a slow loop says which it is, where it is torn, in which pass it is and how far it is off', async ({
  quiet: page,
}) => {
  test.slow();
  await watch(page);
  await given(page, SLOW);
  await expect(strip(page)).toContainText('Solved in', FINISHED);
  await expect(page.locator('[aria-label="Solving"]')).toHaveCount(0);
  const { line, strip: states } = await told(page);
  const passes = line.flatMap((text) => {
    const found = /torn at stream (\d+): pass (\d+), off by (\S+)(?: × 10⁻(\S+))?, solved at 10⁻⁹/.exec(text);
    return found ? [Number(found[2])] : [];
  });
  expect(passes.length).toBeGreaterThan(0);
  expect(passes).toEqual([...passes].sort((a, b) => a - b));
  expect(line.join('\n')).toContain('Solving the loop of C-101, C-102, C-103 and ');
  expect(states.join('\n')).toMatch(/Solving, at \S+, loop torn at stream \d+, pass \d+, off by/);
});

test('a slow solve is stopped by its button, shows no number of before as new, and goes on when asked or edited', async ({
  quiet: page,
}) => {
  test.slow();
  await watch(page);
  await page.evaluate(() => {
    Object.assign(window, {
      onLine: (line: Element) =>
        [...line.querySelectorAll('button')].find((button) => button.textContent === 'Stop')?.click(),
    });
  });
  await given(page, SLOW);
  await expect(strip(page)).toHaveText(/^Stopped, edit \d+ is not solved$/, FINISHED);
  await expect(unit(page, 'C-108')).not.toHaveAttribute('data-state', 'solved');
  const line = page.locator('[aria-label="Solving"]');
  await expect(line).toContainText('Stopped.');

  // On again by key, from within a field; an edit that comes in the middle of the solve is the one that is answered.
  await unit(page, 'FEED-1').click();
  const flow = field(page, 'flow');
  await flow.fill('110 kmol/h');
  await page.evaluate(() => {
    Object.assign(window, {
      onLine: () =>
        document.activeElement?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true })),
    });
  });
  await page.keyboard.press('Control+.');
  await expect(strip(page)).toContainText('Solved in', FINISHED);
  await solved(page);
  const { strip: states } = await told(page);
  const answered = states.filter((text) => text.startsWith('Solved in'));
  expect(new Set(answered.map((text) => /edit (\d+)/.exec(text)?.[1])).size).toBe(1);
  await expect.poll(() => labelText(page, '1')).toContain('110.0');
  // What goes in comes out: the answer is the edit's.
  await expect(page.locator('.balance')).toHaveAttribute('data-closed', 'yes');
});
