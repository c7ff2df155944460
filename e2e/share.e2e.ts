import { readFileSync } from 'node:fs';
import { expect, type Page } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { openExample, solved, test } from './page';

/** The link as the dialogue shows it. */
async function linkOf(page: Page): Promise<string> {
  await page.keyboard.press('Control+Shift+l');
  const link = page.getByRole('textbox', { name: 'Link' });
  await expect(link).not.toHaveValue('');
  const text = await link.inputValue();
  await expect(page.locator('[data-link-length]')).toHaveAttribute('data-link-length', String(text.length));
  await page.keyboard.press('Escape');
  return text;
}

const saved = (page: Page) => page.locator('.bar .saved');
const sketchFile = async (page: Page): Promise<Record<string, unknown>> => {
  const download = page.waitForEvent('download');
  await page.keyboard.press('Control+s');
  return JSON.parse(readFileSync(await (await download).path(), 'utf8')) as Record<string, unknown>;
};

test('a link holds the whole sketch and sends it nowhere: it opens elsewhere as a new one', async ({
  quiet: page,
  browser,
  baseURL,
}) => {
  await openExample(page);
  await unit(page, 'PV-1').click();
  await field(page, 'p.P').fill('6.5 bar');
  await field(page, 'p.P').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain('6.500');
  const link = await linkOf(page);
  expect(new URL(link).origin).toBe(new URL(baseURL ?? '').origin);

  // Somebody else's browser.
  const other = await browser.newContext({ serviceWorkers: 'block' });
  const theirs = await other.newPage();
  const asked: string[] = [];
  theirs.on('request', (request) => asked.push(request.url() + (request.postData() ?? '')));
  await theirs.goto(link);
  await solved(theirs);
  await expect.poll(() => labelText(theirs, '2')).toContain('6.500');
  const [mine, got] = [await sketchFile(page), await sketchFile(theirs)];
  expect(got.id).not.toBe(mine.id);
  expect({ ...got, id: '' }).toEqual({ ...mine, id: '' });
  const data = link.split('.').at(-1) ?? '';
  expect(data.length).toBeGreaterThan(100);
  expect(asked.filter((text) => text.includes(data.slice(0, 40)))).toEqual([]);
  // Loaded again, the page shows the sketch that was made of it, not one more.
  expect(theirs.url()).not.toContain('#sketch');
  await expect(saved(theirs)).toHaveAttribute('data-state', 'saved');
  await theirs.reload();
  await solved(theirs);
  expect((await sketchFile(theirs)).id).toBe(got.id);
  await other.close();
});

test('a link that was cut or altered is refused with the reason, and the sketch that is open stays', async ({
  quiet: page,
}) => {
  await openExample(page);
  await expect(saved(page)).toHaveAttribute('data-state', 'saved');
  const link = await linkOf(page);
  const follow = (address: string): Promise<void> =>
    page.evaluate((to) => {
      location.hash = new URL(to).hash;
    }, address);
  const notice = page.locator('.notice');

  await follow(link.slice(0, -7));
  await expect(notice).toContainText('The link was cut on its way');
  await expect(unit(page, 'PV-1')).toBeVisible();
  await notice.getByRole('button', { name: 'Close' }).click();

  const at = link.length - 20;
  await follow(link.slice(0, at) + (link[at] === 'A' ? 'B' : 'A') + link.slice(at + 1));
  await expect(notice).toContainText('The link was altered on its way');
  await expect(unit(page, 'PV-1')).toBeVisible();
  await notice.getByRole('button', { name: 'Close' }).click();

  // A whole one, followed in a page that is already open.
  await follow(link);
  await expect(saved(page)).toHaveAttribute('data-state', 'saved');
  await expect(page.getByRole('button', { name: /^Undo/ })).toBeDisabled();
  await solved(page);
});

test('a long link says that mail programs cut it, and offers the file', async ({ quiet: page }) => {
  await openExample(page, '[data-example="aromatic-condensate.sketch.json"]');
  await page.keyboard.press('Control+Shift+l');
  await expect(page.getByRole('textbox', { name: 'Link' })).not.toHaveValue('');
  const length = Number(await page.locator('[data-link-length]').getAttribute('data-link-length'));
  expect(length).toBeGreaterThan(2000);
  await expect(page.locator('.share-long')).toContainText('cut links of more than 2,000 characters');
  const download = page.waitForEvent('download');
  await page.getByRole('dialog').getByRole('button', { name: 'Save as a file' }).click();
  expect((await download).suggestedFilename()).toMatch(/\.sketch\.json$/);
});
