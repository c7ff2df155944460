import { expect } from 'playwright/test';
import { labelText } from './hand';
import { openExample, solved, test } from './page';

/** Molar flow on a stream's label. */
const flow = async (page: Parameters<typeof labelText>[0], number: string): Promise<number> =>
  Number.parseFloat((await labelText(page, number)).replace(/\s/g, ''));

test('all feeds scale while the number moves, as one step, or so that a stream becomes what is wanted', async ({
  quiet: page,
}) => {
  await openExample(page);
  const [feed, vapour] = [await flow(page, '1'), await flow(page, '3')];
  await page.keyboard.press('g');
  const dialogue = page.getByRole('dialog', { name: 'Scale all feeds' });
  const factor = dialogue.locator('[data-field="scale.factor"]');
  await factor.fill('1.5');
  await factor.press('Enter');
  await expect.poll(() => flow(page, '3')).toBeCloseTo(1.5 * vapour, 1);
  await page.keyboard.press('Escape');
  await expect(dialogue).toHaveCount(0);
  await expect.poll(() => flow(page, '1')).toBe(feed);
  await expect(page.getByRole('button', { name: /^Undo/ })).toBeDisabled();

  await page.keyboard.press('g');
  await dialogue.getByRole('radio', { name: 'so that a stream becomes' }).click();
  await dialogue.getByRole('combobox', { name: 'Stream' }).selectOption({ label: '3 V-1 vapour' });
  const wanted = dialogue.locator('[data-field="scale.flow"]');
  await wanted.fill('50 kmol/h');
  await wanted.press('Enter');
  await expect(dialogue.locator('[data-field="scale.now"]')).toContainText('Now 50.00 kmol/h');
  await dialogue.getByRole('button', { name: /^Keep/ }).click();
  await expect.poll(() => flow(page, '3')).toBe(50);
  await expect(page.locator('.notice')).toHaveCount(0);
  await page.getByRole('button', { name: /^Undo scale all feeds/ }).click();
  await expect.poll(() => flow(page, '1')).toBe(feed);
});

test('a pair parameter of one’s own moves the results, and clearing it brings them back', async ({
  quiet: page,
}) => {
  await openExample(page);
  const before = await labelText(page, '3');
  await page.keyboard.press('k');
  const first = page.locator('[data-pair]').first();
  await first.locator('input').fill('0.2');
  await first.locator('input').press('Enter');
  await expect(first).toHaveAttribute('data-origin', 'given');
  await expect.poll(() => labelText(page, '3')).not.toBe(before);
  await solved(page);
  await first.getByRole('button', { name: /^Clear/ }).click();
  await expect(first).not.toHaveAttribute('data-origin', 'given');
  await expect.poll(() => labelText(page, '3')).toBe(before);
});

test('what is folded and how wide the drawer is are there again after a reload', async ({ quiet: page }) => {
  await openExample(page);
  await page.keyboard.press('b');
  await page.keyboard.press('l');
  await page.getByRole('separator', { name: 'Width of the drawer' }).press('ArrowLeft');
  await page.reload();
  await solved(page);
  await expect(page.locator('.balance')).toHaveClass(/compact/);
  await page.keyboard.press('l');
  await expect(page.locator('.drawer')).toHaveCSS('width', '384px');
});
