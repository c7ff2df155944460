import { expect, test } from 'playwright/test';
import { drag, middleOf, portAt, pull, put, stream, unit } from './hand';

test.beforeEach(async ({ page }) => {
  await page.goto('./');
  await expect(page.locator('[data-shelf="feed"]')).toBeVisible();
  // The framed example takes the focus when it appears.
  await expect(page.locator('[data-example]').first()).toBeVisible();
});

test('units are dragged from the shelf, connected by pulling, and a line opens for another', async ({
  page,
}) => {
  await put(page, 'feed', 120, 300);
  await put(page, 'drum', 480, 300);
  await expect(unit(page, 'FEED-1')).toBeVisible();
  await expect(unit(page, 'V-101')).toBeVisible();

  const inlet = await portAt(page, 'V-101', 'in1');
  await pull(page, 'FEED-1', 'out', inlet);
  await expect(page.getByRole('button', { name: /^Stream 1, FEED-1 to V-101/ })).toBeAttached();

  const [x, y] = await middleOf(stream(page, '1'));
  await drag(page, await middleOf(page.locator('[data-shelf="valve"]')), [x + 4, y + 5]);
  await expect(unit(page, 'PV-101')).toBeVisible();
  await expect(page.getByRole('button', { name: /^Stream 1, FEED-1 to PV-101/ })).toBeAttached();
  await expect(page.getByRole('button', { name: /^Stream \d+, PV-101 to V-101/ })).toBeAttached();

  // Each of these was one step.
  await page.keyboard.press('Control+z');
  await expect(unit(page, 'PV-101')).toHaveCount(0);
  await page.keyboard.press('Control+z');
  await expect(page.getByRole('button', { name: /^Stream 1, FEED-1 to nowhere yet/ })).toBeAttached();
});

test('a port that does not fit says why and changes nothing', async ({ page }) => {
  await put(page, 'feed', 120, 300);
  await put(page, 'feed', 120, 420);
  const other = await portAt(page, 'FEED-2', 'out');
  await pull(page, 'FEED-1', 'out', other);
  await expect(page.locator('.notice')).toContainText(/outlet/);
  await expect(page.getByRole('button', { name: /^Stream 1, FEED-1 to nowhere yet/ })).toBeAttached();
});

test('a stream let go on empty sheet offers what it can lead to', async ({ page }) => {
  await put(page, 'feed', 120, 300);
  const [x, y] = await portAt(page, 'FEED-1', 'out');
  await pull(page, 'FEED-1', 'out', [x + 200, y]);
  await page.getByRole('menuitem', { name: 'Product' }).click();
  await expect(page.getByRole('button', { name: /^Stream 1, FEED-1 to PROD-1/ })).toBeAttached();
});

test('a sheet is drawn by keys alone', async ({ page }) => {
  await page.locator('[data-shelf="feed"]').focus();
  await page.keyboard.press('Enter');
  await expect(unit(page, 'FEED-1')).toHaveAttribute('data-selected', 'true');
  await page.locator('[data-shelf="product"]').focus();
  await page.keyboard.press('Enter');
  await expect(unit(page, 'PROD-1')).toHaveAttribute('data-selected', 'true');
  // The keyboard follows to the new unit; until then its keys belong to the shelf.
  await expect(unit(page, 'PROD-1').locator('[data-focus-unit]')).toBeFocused();
  await page.keyboard.press('c');
  await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Enter');
  await expect(stream(page, '1')).toHaveAttribute('data-selected', 'true');
  await page.keyboard.press('ArrowLeft');
  await expect(unit(page, 'FEED-1')).toHaveAttribute('data-selected', 'true');
  const before = await middleOf(unit(page, 'FEED-1'));
  await page.keyboard.press('m');
  await page.keyboard.press('ArrowUp');
  await page.keyboard.press('ArrowUp');
  await page.keyboard.press('Enter');
  const after = await middleOf(unit(page, 'FEED-1'));
  expect(after[1]).toBeLessThan(before[1] - 8);
  await page.keyboard.press('Delete');
  await expect(unit(page, 'FEED-1')).toHaveCount(0);
});

test('a dragged unit moves in one step and Esc puts it back', async ({ page }) => {
  await put(page, 'drum', 300, 300);
  const start = await middleOf(unit(page, 'V-101'));
  await drag(page, start, [start[0] + 80, start[1] + 40]);
  const moved = await middleOf(unit(page, 'V-101'));
  // By whole steps of the grid; the first few pixels only tell a drag from a click.
  const by = Math.round(moved[0] - start[0]);
  expect(by).toBeGreaterThanOrEqual(64);
  expect(by % 8).toBe(0);
  await page.mouse.move(...moved);
  await page.mouse.down();
  await page.mouse.move(moved[0] + 100, moved[1], { steps: 5 });
  await page.keyboard.press('Escape');
  await page.mouse.up();
  expect((await middleOf(unit(page, 'V-101')))[0]).toBeCloseTo(moved[0], 0);
  await page.keyboard.press('Control+z');
  expect((await middleOf(unit(page, 'V-101')))[0]).toBeCloseTo(start[0], 0);
});
