import type { Page } from 'playwright/test';
import { expect } from 'playwright/test';
import { drag, field, labelText, middleOf, type Place, pull, stream, unit } from './hand';
import { solved, test } from './page';
import { closedLoop, columnLoops, given, withoutPurge } from './sketches';

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

async function type(page: Page, path: string, text: string): Promise<void> {
  await field(page, path).fill(text);
  await field(page, path).press('Enter');
}
/** A place on the sheet, counted from its upper left corner. */
async function onSheet(page: Page, x: number, y: number): Promise<Place> {
  const sheet = await page.locator('.sheet-flow').boundingBox();
  if (!sheet) throw new Error('there is no sheet');
  return [sheet.x + x, sheet.y + y];
}

test('a loop that nothing enters is named with what to do, and what it says to do gives its answer', async ({
  quiet: page,
}) => {
  await given(page, closedLoop());
  await expect(strip(page)).toHaveText(
    'Not solved yet: nothing enters the loop of E-101, E-102, K-101 and PV-101',
  );
  await unit(page, 'K-101').click();
  await expect(page.locator('.drawer')).toContainText('delete one of its streams');
  await page.keyboard.press('Escape');

  await stream(page, '4').locator('.stream-body').click();
  await page.keyboard.press('Delete');
  await pull(page, 'K-101', 'in', await onSheet(page, 120, 220));
  await page.getByRole('menuitem', { name: 'Feed' }).click();
  await pull(page, 'E-102', 'out', await onSheet(page, 120, 560));
  await page.getByRole('menuitem', { name: 'Product' }).click();
  await unit(page, 'FEED-1').click();
  await type(page, 'state.T', '-10 degC');
  await type(page, 'state.P', '2.4 bar');
  await type(page, 'flow', '100 kmol/h');
  await type(page, 'composition.parts.propane', '100 %');
  await solved(page);
  await page.keyboard.press('Escape');
  // It comes out as it goes in: flow, temperature, pressure and enthalpy, hence the state.
  const numbers = async (number: string): Promise<readonly string[]> =>
    (await labelText(page, number)).match(/-?−?\d[\d.]*/g) ?? [];
  const entering = await numbers('5');
  expect(entering).toEqual(['100.0', '−10.00', '2.400']);
  expect(await numbers('4')).toEqual(entering);
});

test('a chemical without a way out is named with its loop and stream, and the purge that is advised lets it out', async ({
  quiet: page,
}) => {
  await given(page, withoutPurge());
  await expect(strip(page)).toHaveText(
    'Not solved yet: Nitrogen has no way out of the loop of E-101, K-101, V-101 and J-1',
  );
  await expect(page.locator('.balance')).toContainText('Nitrogen has no way out of the loop');
  await unit(page, 'K-101').click();
  await expect(page.locator('.drawer')).toContainText('drop a divide from the shelf onto stream 4');
  await page.keyboard.press('Escape');

  const shelf = await middleOf(page.locator('[data-shelf="divide"]'));
  await drag(page, shelf, await middleOf(stream(page, '4').locator('.stream-body')));
  await expect(unit(page, 'D-1')).toBeAttached();
  await pull(page, 'D-1', 'out2', await onSheet(page, 1080, 160));
  await page.getByRole('menuitem', { name: 'Product' }).click();
  await unit(page, 'D-1').click();
  await type(page, 'shares.out2', '2 %');
  await solved(page);
  await expect(page.locator('.balance')).toHaveAttribute('data-closed', 'yes');
});
