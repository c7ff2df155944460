import { expect } from 'playwright/test';
import { unit } from './hand';
import { test } from './page';

test('units added one after the other by keys stand in sight beside their drawer, and F6 and Esc go in and out of it', async ({
  quiet: page,
}) => {
  await expect(page.getByText('F6 goes from part to part of the screen')).toBeVisible();
  await page.locator('[data-shelf="feed"]').focus();
  await page.keyboard.press('Enter');
  const chain = ['FEED-1', 'PV-101', 'PV-102', 'PV-103', 'PV-104', 'PV-105', 'PV-106'];
  for (const [k, tag] of chain.entries()) {
    const body = unit(page, tag).locator('[data-focus-unit]');
    await expect(body).toBeFocused();
    const [sheet, at] = [await page.locator('.sheet-flow').boundingBox(), await body.boundingBox()];
    if (!sheet || !at) throw new Error('nothing to be seen there');
    expect(at.x).toBeGreaterThanOrEqual(sheet.x);
    expect(at.x + at.width).toBeLessThanOrEqual(sheet.x + sheet.width);
    if (k === chain.length - 1) break;
    await page.keyboard.press('c');
    await expect(page.locator('[data-strip="state"]')).toContainText('arrows choose a port');
    await page.keyboard.press('Enter');
    await page.keyboard.press('v');
    await page.keyboard.press('Enter');
  }
  // The drawer is entered at what can be done in it, not at its edge.
  await page.keyboard.press('F6');
  const drawer = page.locator('.drawer');
  await expect(drawer.locator('button:focus, input:focus, select:focus')).toHaveCount(1);
  await page.keyboard.press('Escape');
  await expect(drawer).toHaveCount(0);
  // A drawer that was opened from the sheet is closed from there, after the selection.
  await page.keyboard.press('l');
  await expect(drawer).toBeVisible();
  await page.keyboard.press('Escape');
  await page.keyboard.press('Escape');
  await expect(drawer).toHaveCount(0);
});
