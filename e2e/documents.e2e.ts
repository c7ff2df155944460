import { readFileSync } from 'node:fs';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { expect } from 'playwright/test';
import { field, labelText } from './hand';
import { openExample, solved, test } from './page';

test('a pressure typed in another unit changes the numbers downstream, and undo brings them back', async ({
  quiet: page,
}) => {
  await openExample(page);
  const before = await labelText(page, '2');
  expect(before).toContain('7.000');
  await page.locator('[data-unit="PV-1"]').click();
  await field(page, 'p.P').fill('174.0452853 psi');
  await field(page, 'p.P').press('Enter');
  // 174.0452853 psi is 12.00 bar (NIST SP 811: 1 psi = 6.894757 kPa).
  await expect.poll(() => labelText(page, '2')).toContain('12.00');
  await expect(field(page, 'p.P')).toHaveValue(/174\.0452853/);
  await page.keyboard.press('Escape');
  await page.locator('.bar').getByRole('button', { name: /^Undo/ }).click();
  await expect.poll(() => labelText(page, '2')).toBe(before);
});

test('text that is no pressure is kept, refused with a reason, and changes nothing', async ({
  quiet: page,
}) => {
  await openExample(page);
  const before = await labelText(page, '2');
  await page.locator('[data-unit="PV-1"]').click();
  await field(page, 'p.P').fill('12 kg/h');
  await field(page, 'p.P').press('Enter');
  await expect(page.locator('.drawer')).toContainText(/measures something else|bar/);
  await expect(field(page, 'p.P')).toHaveValue(/12 kg\/h/);
  expect(await labelText(page, '2')).toBe(before);
});

test('a reload finds the sketch as it was left', async ({ quiet: page }) => {
  await openExample(page);
  await page.locator('[data-unit="PV-1"]').click();
  await field(page, 'p.P').fill('9 bar');
  await field(page, 'p.P').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain('9.000');
  await expect(page.locator('.bar .saved')).toHaveAttribute('data-state', 'saved');
  await page.reload();
  await solved(page);
  await expect.poll(() => labelText(page, '2')).toContain('9.000');
});

test('a damaged file is refused with place and reason, and the open sketch stays', async ({
  quiet: page,
}) => {
  await openExample(page);
  const chooser = page.waitForEvent('filechooser');
  await page.keyboard.press('Control+o');
  await (await chooser).setFiles({
    name: 'broken.sketch.json',
    mimeType: 'application/json',
    buffer: Buffer.from('{ "format": "splitwright.sketch", "version": 1, }'),
  });
  const notice = page.getByRole('alert');
  await expect(notice).toContainText('broken.sketch.json was not opened');
  await expect(notice).toContainText(/line 1/i);
  await expect(page.locator('[data-unit="V-1"]')).toBeVisible();
});

test('a saved file opens again as the same sketch', async ({ quiet: page }) => {
  await openExample(page);
  const download = page.waitForEvent('download');
  await page.keyboard.press('Control+s');
  const path = await (await download).path();
  const saved = JSON.parse(readFileSync(path, 'utf8'));
  expect(saved).toMatchObject({ format: 'splitwright.sketch', version: 1 });
  const chooser = page.waitForEvent('filechooser');
  await page.keyboard.press('Control+o');
  await (await chooser).setFiles({
    name: 'again.sketch.json',
    mimeType: 'application/json',
    buffer: readFileSync(path),
  });
  await solved(page);
  await expect(page.locator('.bar .name')).toContainText(saved.title.title);
});

/** All words of a PDF, read by an independent reader. */
async function pdfWords(path: string): Promise<string> {
  const document = await getDocument({ data: new Uint8Array(readFileSync(path)), verbosity: 0 }).promise;
  const words: string[] = [];
  for (let k = 1; k <= document.numPages; k += 1) {
    const { items } = await (await document.getPage(k)).getTextContent();
    words.push(...items.map((item) => ('str' in item ? item.str : '')));
  }
  return words.join('').replace(/\s+/g, '');
}

test('the PDF carries the figures of the sheet', async ({ quiet: page }) => {
  await openExample(page);
  await page.locator('[data-stream="3"] .stream-body').click();
  const label = await labelText(page, '3');
  const download = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Export PDF' }).click();
  const words = await pdfWords(await (await download).path());
  expect(words).toContain('PRELIMINARY–NOTFORCONSTRUCTION');
  expect(words).toContain('Streamsummary(heatandmaterialbalance)');
  for (const figure of label.match(/\d+\.\d+/g) ?? []) expect(words).toContain(figure);
});

test('documents are chosen, looked at and saved in every form', async ({ quiet: page }) => {
  test.slow();
  await openExample(page);
  await page.locator('.sheet-flow').click({ position: { x: 8, y: 8 } });
  await page.keyboard.press('p');
  const dialogue = page.getByRole('dialog', { name: 'Documents' });
  const pages = dialogue.locator('.documents-pages');
  await expect(pages).toHaveAttribute('data-state', 'made', { timeout: 30_000 });
  const whole = Number(await pages.locator('[data-pages]').getAttribute('data-pages'));
  expect(whole).toBeGreaterThan(3);

  await dialogue.getByRole('button', { name: 'Sections' }).click();
  await dialogue.getByLabel('Model, pairs and sources').uncheck();
  await dialogue.getByLabel('Limits', { exact: true }).uncheck();
  await dialogue.getByRole('button', { name: 'Rows of the stream summary' }).click();
  await dialogue.getByLabel('Vapour as ideal gas').uncheck();
  await expect
    .poll(async () => Number(await pages.locator('[data-pages]').getAttribute('data-pages')), {
      timeout: 30_000,
    })
    .toBeLessThan(whole);

  const saved = async (what: string): Promise<Buffer> => {
    const download = page.waitForEvent('download');
    await dialogue.locator(`[data-export="${what}"]`).click();
    return readFileSync(await (await download).path());
  };
  const pdf = page.waitForEvent('download');
  await dialogue.locator('[data-export="summary-pdf"]').click();
  const words = await pdfWords(await (await pdf).path());
  expect(words).toContain('Massflow');
  expect(words).not.toContain('Normalgasflow');
  expect(words).not.toContain('Pairparametersinforce');
  expect((await saved('sheet-pdf')).subarray(0, 5).toString()).toBe('%PDF-');
  expect((await saved('xlsx')).subarray(0, 2).toString()).toBe('PK');
  expect((await saved('csv')).toString('utf8')).toContain('Mass flow,kg/h');
  expect(JSON.parse((await saved('json')).toString('utf8'))).toMatchObject({ solved: true });
  expect((await saved('svg')).toString('utf8')).toContain('>V-1</text>');
  await dialogue.locator('[data-field="documents.pictureWidth"]').fill('900');
  await dialogue.locator('[data-field="documents.pictureWidth"]').press('Enter');
  await expect(pages).toHaveAttribute('data-state', 'made', { timeout: 30_000 });
  const png = await saved('png');
  // Width in the header of a PNG file: bytes 16 to 19.
  expect(png.readUInt32BE(16)).toBe(900);

  await dialogue.getByRole('button', { name: 'Close' }).click();
  await page.keyboard.press('Control+z');
  await page.keyboard.press('Control+z');
  await page.keyboard.press('p');
  await dialogue.getByRole('button', { name: 'Rows of the stream summary' }).click();
  await expect(dialogue.getByLabel('Vapour as ideal gas')).toBeChecked();
  await dialogue.getByRole('button', { name: 'Sections' }).click();
  await expect(dialogue.getByLabel('Limits', { exact: true })).not.toBeChecked();
});

test('the stream summary shows the same table on the screen', async ({ quiet: page }) => {
  await openExample(page);
  await page.locator('.bar').getByRole('button', { name: 'Stream summary' }).click();
  const table = page.locator('[data-table="streams"]');
  await expect(table.locator('[data-row="n"]')).toContainText('150.00');
  await expect(table.locator('[data-row="P"]')).toContainText('bar(a)');
  await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click();
  await expect(page.getByRole('dialog')).toHaveCount(0);
});
