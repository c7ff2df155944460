import { expect, type Page } from 'playwright/test';
import { unit } from './hand';
import { openExample, test } from './page';

const TRAIN = '[data-example="aromatic-condensate.sketch.json"]';
const search = (page: Page) => page.getByRole('combobox', { name: /^Find: tag/ });
const focused = (page: Page) => page.locator(':focus');

test('/ and a tag, typed without a pause, lead to the unit: no letter of it runs an action', async ({
  quiet: page,
}) => {
  await openExample(page, TRAIN);
  const theme = await page.locator('html').getAttribute('data-theme');
  // From far away, where no label can be read.
  for (let k = 0; k < 12; k += 1) await page.keyboard.press('-');
  await page.keyboard.press('/');
  await page.keyboard.type('PV-103');
  await page.keyboard.press('Enter');
  await expect(unit(page, 'PV-103')).toHaveAttribute('data-selected');
  await expect(focused(page)).toHaveAttribute('aria-label', /^PV-103,/);
  await expect(page.getByRole('complementary', { name: 'Unit drawer' })).toContainText('PV-103');
  await expect(page.locator('[data-stream="15"] .label').first()).toBeVisible();
  expect(await page.locator('html').getAttribute('data-theme')).toBe(theme);
  // In the middle of what is seen of the sheet, give or take its drawer.
  const [sheet, box] = [
    await page.locator('.sheet-flow').boundingBox(),
    await unit(page, 'PV-103').boundingBox(),
  ];
  expect(Math.abs(box!.x + box!.width / 2 - sheet!.x - sheet!.width / 2)).toBeLessThan(60);

  // A stream by its description, chosen with the arrows; a chemical to its row; Esc back to where one was.
  await page.keyboard.press('Control+f');
  await page.keyboard.type('overhead vapour');
  await expect(page.getByRole('option').first()).toContainText('Stream 12');
  await page.keyboard.press('Enter');
  await expect(focused(page)).toHaveAttribute('aria-label', /^Stream 12,/);
  await page.keyboard.press('/');
  await page.keyboard.type('toluene');
  await expect(page.getByRole('search').getByRole('status')).toHaveText('1 found');
  await page.keyboard.press('Enter');
  await expect(focused(page)).toHaveAttribute('data-chemical', 'toluene');
  await page.keyboard.press('Escape');
  await expect(focused(page)).toHaveAttribute('aria-label', /^Stream 12,/);
  await page.keyboard.press('/');
  await expect(search(page)).toBeFocused();
  await page.keyboard.press('Escape');
  await expect(search(page)).toHaveCount(0);
  await expect(focused(page)).toHaveAttribute('aria-label', /^Stream 12,/);
});

test('single keys are turned off and on by Shift+F1, stay so when the page is loaded again, and F1 lists all actions', async ({
  quiet: page,
}) => {
  await openExample(page);
  const drawer = page.getByRole('complementary');
  await page.keyboard.press('l');
  await expect(drawer).toHaveAttribute('aria-label', 'Limits drawer');
  await page.keyboard.press('l');
  await expect(drawer).toHaveCount(0);
  await page.keyboard.press('Shift+F1');
  await expect(page.getByRole('alert')).toContainText('Single keys are off.');
  await page.reload();
  await expect(page.locator('[data-unit]').first()).toBeVisible();
  for (const key of ['l', 'b', 'Shift+A', '?', '/']) await page.keyboard.press(key);
  await expect(page.getByRole('dialog')).toHaveCount(0);
  await expect(search(page)).toHaveCount(0);
  await expect(drawer).toHaveCount(0);
  await expect(page.getByRole('button', { name: 'Chemicals', exact: true })).toHaveAttribute(
    'title',
    'Chemicals and thermodynamic model',
  );
  // What has a modifier or no letter goes on.
  await page.keyboard.press('Control+f');
  await expect(search(page)).toBeFocused();
  await page.keyboard.press('Escape');
  await page.keyboard.press('F1');
  const list = page.getByRole('dialog', { name: 'All actions and their keys' });
  await expect(list).toContainText('L: off');
  await list.getByRole('radio', { name: 'on' }).check({ force: true });
  await list.getByRole('button', { name: 'Close' }).click();
  await page.keyboard.press('l');
  await expect(drawer).toHaveAttribute('aria-label', 'Limits drawer');
});
