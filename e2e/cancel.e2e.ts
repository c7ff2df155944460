import { readFileSync } from 'node:fs';
import type { Download, Page } from 'playwright/test';
import { expect } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { test } from './page';
import { openText, trainOf } from './sketches';

/** Files that the page has handed to the browser's downloads. */
function downloadsOf(page: Page): Download[] {
  const all: Download[] = [];
  page.on('download', (download) => all.push(download));
  return all;
}

/** Lets the makers of pages wait for the shipped font: nothing is ready before the test says so. */
async function holdFonts(page: Page): Promise<() => void> {
  let release = (): void => undefined;
  const free = new Promise<void>((go) => {
    release = go;
  });
  await page.route('**/fonts/*.ttf', async (route) => {
    await free;
    await route.continue();
  });
  return release;
}

const pages = (path: string): number => readFileSync(path, 'latin1').match(/\/Type \/Page\b/g)?.length ?? 0;

/** Longer than what is handed to the downloads takes to be told. */
const A_WHILE = 600;

test('a stream summary that is being made is cancelled by button and by key, and made when asked once more', async ({
  quiet: page,
}) => {
  test.slow();
  const release = await holdFonts(page);
  const downloads = downloadsOf(page);
  await openText(page, trainOf(80));
  const line = page.locator('.sheet .under-way');
  await expect(line).toHaveCount(0);

  // By the button, with the keyboard: the focus comes back to where it was.
  const exportPdf = page.locator('.bar').getByRole('button', { name: 'Export PDF' });
  await exportPdf.focus();
  await page.keyboard.press('Enter');
  await expect(line).toContainText('PDF of the stream summary: Laying out the pages', { timeout: 30_000 });
  await expect(line.getByRole('progressbar')).toHaveAttribute('value', '0.15');
  await line.getByRole('button', { name: 'Cancel' }).press('Enter');
  await expect(line).toHaveCount(0);
  await expect(exportPdf).toBeFocused();

  // By the key.
  await page.keyboard.press('Control+p');
  await expect(line).toContainText('Laying out the pages', { timeout: 30_000 });
  await page.keyboard.press('Escape');
  await expect(line).toHaveCount(0);
  await expect(page.getByRole('alert')).toHaveCount(0);

  // The sheet goes on as if nothing had been asked for.
  await unit(page, 'E-101').click();
  await field(page, 'T').fill('35 degC');
  await field(page, 'T').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain('35.0');
  await page.keyboard.press('Escape');
  await expect(page.locator('.drawer')).toHaveCount(0);
  release();
  await page.waitForTimeout(A_WHILE);
  expect(downloads.length).toBe(0);

  await page.keyboard.press('Control+p');
  await expect.poll(() => downloads.length, { timeout: 60_000 }).toBe(1);
  await expect(line).toHaveCount(0);
  expect(pages((await downloads[0]?.path()) ?? '')).toBeGreaterThan(10);
});

test('in the documents’ dialogue Esc gives up what is being made first, then leaves; a spreadsheet goes on beside it', async ({
  quiet: page,
}) => {
  test.slow();
  const release = await holdFonts(page);
  const downloads = downloadsOf(page);
  await openText(page, trainOf(80));
  await page.keyboard.press('p');
  const dialogue = page.getByRole('dialog', { name: 'Documents' });
  const shown = dialogue.locator('.documents-pages');
  await expect(shown).toHaveAttribute('data-state', 'making', { timeout: 30_000 });
  await shown.getByRole('button', { name: 'Cancel' }).click();
  await expect(shown).toHaveAttribute('data-state', 'cancelled');

  const line = dialogue.locator('.under-way');
  await dialogue.locator('[data-export="png"]').click();
  await expect(line.locator('[data-making="Drawing as PNG"]')).toContainText('Collecting the figures');
  await dialogue.locator('[data-export="sheet-pdf"]').click();
  await expect(line.locator('[data-making="PDF of the drawing"]')).toContainText('Laying out the pages');
  await page.keyboard.press('Escape');
  await expect(line.locator('[data-making="PDF of the drawing"]')).toHaveCount(0);
  await expect(line.locator('[data-making="Drawing as PNG"]')).toBeVisible();

  // What needs no font is not held up, and what was cancelled beside it did not take the other along.
  await dialogue.locator('[data-export="xlsx"]').click();
  await expect.poll(() => downloads.map((d) => d.suggestedFilename())).toEqual(['train-of-80-streams.xlsx']);
  await line.locator('[data-making="Drawing as PNG"]').getByRole('button', { name: 'Cancel' }).click();
  await expect(line).toHaveCount(0);

  await shown.getByRole('button', { name: 'Make them' }).click();
  await expect(shown).toHaveAttribute('data-state', 'making');
  await page.keyboard.press('Escape');
  await expect(dialogue).toHaveCount(0);
  release();
  await page.waitForTimeout(A_WHILE);
  expect(downloads.length).toBe(1);

  await page.keyboard.press('p');
  await dialogue.locator('[data-export="png"]').click({ timeout: 30_000 });
  await expect.poll(() => downloads.length, { timeout: 60_000 }).toBe(2);
  await expect(shown).toHaveAttribute('data-state', 'made', { timeout: 60_000 });
});
