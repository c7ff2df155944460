import { readFileSync } from 'node:fs';
import AxeBuilder from '@axe-core/playwright';
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

test('the stream summary shows the same table on the screen', async ({ quiet: page }) => {
  await openExample(page);
  await page.locator('.bar').getByRole('button', { name: 'Stream summary' }).click();
  const table = page.locator('[data-table="streams"]');
  await expect(table.locator('[data-row="n"]')).toContainText('150.00');
  await expect(table.locator('[data-row="P"]')).toContainText('bar(a)');
  await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click();
  await expect(page.getByRole('dialog')).toHaveCount(0);
});

for (const scheme of ['light', 'dark'] as const)
  test(`the main screens have no serious fault of access in ${scheme}`, async ({ quiet: page }) => {
    test.slow();
    await page.emulateMedia({ colorScheme: scheme });
    const faults = async (where: string): Promise<void> => {
      const { violations } = await new AxeBuilder({ page }).analyze();
      const serious = violations.filter((v) => v.impact === 'serious' || v.impact === 'critical');
      expect(
        serious.map((v) => `${where}: ${v.id}: ${v.nodes.map((n) => n.target.join(' ')).join(' | ')}`),
      ).toEqual([]);
    };
    await expect(page.locator('.card').first()).toBeVisible();
    await faults('start');
    await openExample(page);
    await faults('sheet');
    await page.locator('[data-unit="FEED-1"]').click();
    await faults('feed drawer');
    await page.locator('[data-stream="2"] .stream-body').click();
    await faults('stream drawer');
    for (const name of [/^Limits/, 'Assumptions', 'Chemicals']) {
      await page.locator('.bar').getByRole('button', { name }).click();
      await faults(String(name));
    }
    await page.locator('.bar').getByRole('button', { name: 'Stream summary' }).click();
    await expect(page.locator('[data-table="streams"]')).toBeVisible();
    await faults('stream summary');
  });
