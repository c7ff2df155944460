import { expect, type Page } from 'playwright/test';
import { field, labelText, middleOf, unit } from './hand';
import { openExample, test } from './page';

const undo = (page: Page) => page.locator('.bar').getByRole('button', { name: /^Undo/ });
const ruler = (page: Page) => page.locator('.drawer .slide-ruler');

/** The valve's outlet pressure, 7.0 bar: the middle of its digits on the screen. */
async function digitsOf(page: Page) {
  await openExample(page);
  await unit(page, 'PV-1').click();
  const digits = page.locator('.drawer .quantity-field:has([data-field="p.P"]) .digits');
  await expect(digits).toHaveText('7.0');
  return middleOf(digits);
}

test('a number dragged sideways takes the sheet along before it is let go, and is one step', async ({
  quiet: page,
}) => {
  const [x, y] = await digitsOf(page);
  const before = await labelText(page, '2');
  await page.mouse.move(x, y);
  await page.mouse.down();
  // Two pixels of the hand for one step, which is 0.01 bar from 7.0 bar.
  await page.mouse.move(x + 20, y, { steps: 5 });
  await expect.poll(() => labelText(page, '2')).toContain('7.100');
  await expect(ruler(page)).toBeVisible();
  await page.mouse.move(x + 40, y, { steps: 5 });
  await expect.poll(() => labelText(page, '2')).toContain('7.200');
  await expect.poll(() => labelText(page, '3')).toContain('7.200');
  await expect(undo(page)).toBeDisabled();
  await page.mouse.up();
  await expect(undo(page)).toBeEnabled();
  await expect(ruler(page)).toHaveCount(0);
  await undo(page).click();
  await expect.poll(() => labelText(page, '2')).toBe(before);
  await expect(undo(page)).toBeDisabled();
});

test('Esc under the hand brings the number and the sheet back', async ({ quiet: page }) => {
  const [x, y] = await digitsOf(page);
  const before = await labelText(page, '2');
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + 30, y, { steps: 5 });
  await expect.poll(() => labelText(page, '2')).toContain('7.150');
  await page.keyboard.press('Escape');
  await expect.poll(() => labelText(page, '2')).toBe(before);
  await page.mouse.move(x + 50, y, { steps: 3 });
  await page.mouse.up();
  expect(await labelText(page, '2')).toBe(before);
  await expect(field(page, 'p.P')).toHaveValue('7.0 bar');
  await expect(undo(page)).toBeDisabled();
});

test('Alt and the arrows slide a number: Shift ten steps, Ctrl a tenth, Esc back, letting go one step', async ({
  quiet: page,
}) => {
  await digitsOf(page);
  const before = await labelText(page, '2');
  const keys = page.keyboard;
  await field(page, 'p.P').focus();
  await keys.down('Alt');
  await keys.press('Shift+ArrowUp');
  await keys.press('Shift+ArrowUp');
  await expect.poll(() => labelText(page, '2')).toContain('7.200');
  await keys.press('Escape');
  await expect.poll(() => labelText(page, '2')).toBe(before);
  await keys.up('Alt');
  await expect(undo(page)).toBeDisabled();

  await field(page, 'p.P').focus();
  await keys.down('Alt');
  await keys.press('ArrowDown');
  await keys.press('ArrowDown');
  await keys.press('Control+ArrowDown');
  await expect.poll(() => labelText(page, '2')).toContain('6.979');
  await expect(undo(page)).toBeDisabled();
  await keys.up('Alt');
  await expect(field(page, 'p.P')).toHaveValue('6.979 bar');
  await undo(page).click();
  await expect.poll(() => labelText(page, '2')).toBe(before);
});
