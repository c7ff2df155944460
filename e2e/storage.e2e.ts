import { readFileSync } from 'node:fs';
import { test as bare, expect, type Page } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { openExample, solved, test } from './page';

const saved = (page: Page) => page.locator('.bar .saved');
const asFile = (page: Page) => page.locator('.bar').getByRole('button', { name: 'Save as a file' });
const row = (page: Page, name: string) => page.locator('.sketch-list li').filter({ hasText: name });

async function setPressure(page: Page, text: string, shown: string): Promise<void> {
  await unit(page, 'PV-1').click();
  await field(page, 'p.P').fill(text);
  await field(page, 'p.P').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain(shown);
}

test('a full store is said at once, the edit stays, and saving goes on when there is room', async ({
  quiet: page,
}) => {
  await openExample(page);
  await expect(saved(page)).toHaveAttribute('data-state', 'saved');
  await page.evaluate(() => {
    const put = IDBObjectStore.prototype.put;
    Object.assign(window, { room: false });
    IDBObjectStore.prototype.put = function (this: IDBObjectStore, ...given: Parameters<typeof put>) {
      if ((window as unknown as { room: boolean }).room) return put.apply(this, given);
      throw new DOMException('no room left on the disk', 'QuotaExceededError');
    };
  });
  await setPressure(page, '7.5 bar', '7.500');
  await expect(saved(page)).toHaveAttribute('data-state', 'failed');
  await expect(saved(page)).toHaveText('Not saved');
  await expect(page.locator('.notice')).toContainText('no room left');
  // The next step is at hand, and what it gives is the sketch as it stands.
  const download = page.waitForEvent('download');
  await asFile(page).click();
  const file = JSON.parse(readFileSync(await (await download).path(), 'utf8'));
  expect(file.units.find((u: { tag: string }) => u.tag === 'PV-1').settings.p.P).toBe('7.5 bar');
  // Another edit is kept nowhere: no other sketch takes its place unasked.
  await setPressure(page, '6.5 bar', '6.500');
  await page.keyboard.press('Escape');
  await page.keyboard.press('Control+Alt+n');
  await expect(page.locator('.notice')).toContainText('It would be lost');
  await expect(unit(page, 'PV-1')).toBeVisible();
  await page.locator('.notice').getByRole('button', { name: 'Close' }).click();
  // Nor is the page closed without a question.
  const asked = page.waitForEvent('dialog');
  await page.evaluate(() => setTimeout(() => location.reload(), 0));
  const question = await asked;
  expect(question.type()).toBe('beforeunload');
  await question.dismiss();
  await expect(unit(page, 'PV-1')).toBeVisible();
  // Room again: the next edit is saved with all before it.
  await page.evaluate(() => Object.assign(window, { room: true }));
  await setPressure(page, '5.5 bar', '5.500');
  await expect(saved(page)).toHaveAttribute('data-state', 'saved');
  await expect(asFile(page)).toHaveCount(0);
  await page.reload();
  await solved(page);
  expect(await labelText(page, '2')).toContain('5.500');
});

bare('denied storage is said at once, and the page works and saves files', async ({ page }) => {
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(error.message));
  await page.addInitScript(() => {
    IDBFactory.prototype.open = () => {
      throw new DOMException('the user said no', 'SecurityError');
    };
    const denied = {
      get: () => {
        throw new DOMException('the user said no', 'SecurityError');
      },
    };
    Object.defineProperty(window, 'localStorage', denied);
    Object.defineProperty(window, 'sessionStorage', denied);
  });
  await page.goto('./');
  await expect(saved(page)).toHaveText('Not saved');
  await expect(page.locator('.notice')).toContainText('Nothing is kept on this computer');
  await page.locator('.notice').getByRole('button', { name: 'Close' }).click();
  await openExample(page);
  await setPressure(page, '7.5 bar', '7.500');
  const download = page.waitForEvent('download');
  await asFile(page).click();
  expect((await download).suggestedFilename()).toBe('let-down.sketch.json');
  expect(errors).toEqual([]);
});

test('sketches are renamed, duplicated, deleted and brought back from the list; a past state comes back as an edit', async ({
  quiet: page,
}) => {
  await openExample(page);
  await setPressure(page, '9 bar', '9.000');
  await setPressure(page, '8 bar', '8.000');
  await expect(saved(page)).toHaveAttribute('data-state', 'saved');
  await page.keyboard.press('Escape');
  await page.keyboard.press('Control+Shift+o');
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('button', { name: 'Duplicate: Let-down' }).click();
  await expect(row(page, 'Let-down, copy')).toHaveCount(1);
  await dialog.getByRole('button', { name: 'Rename: Let-down, copy' }).click();
  await dialog.getByRole('textbox', { name: 'New name of Let-down, copy' }).fill('Second try');
  await page.keyboard.press('Enter');
  await expect(row(page, 'Second try')).toHaveCount(1);
  await dialog.getByRole('button', { name: 'Rename: Let-down' }).click();
  await dialog.getByRole('textbox', { name: 'New name of Let-down' }).fill('First try');
  await page.keyboard.press('Enter');
  await expect(page.locator('.bar .name')).toContainText('First try');
  await expect(row(page, 'First try')).toContainText('open now');

  // Deleted by mistake, also the one that is open, and back again.
  await dialog.getByRole('button', { name: 'Delete: Second try' }).click();
  await expect(page.locator('[data-deleted]')).toHaveCount(1);
  await dialog.getByRole('button', { name: 'Undo: Second try' }).click();
  await expect(page.locator('[data-deleted]')).toHaveCount(0);
  await expect(row(page, 'Second try')).toHaveCount(1);
  await dialog.getByRole('button', { name: 'Delete: First try' }).click();
  await expect(page.locator('[data-deleted]')).toHaveCount(1);
  await expect(page.locator('[data-unit]')).toHaveCount(0);
  await dialog.getByRole('button', { name: 'Undo: First try' }).click();
  await row(page, 'First try').getByRole('button').first().click();
  await solved(page);
  expect(await labelText(page, '2')).toContain('8.000');

  // History: a state from before, by name of what was done; undone like any edit.
  await page.keyboard.press('Control+Shift+o');
  const states = page.locator('.sketch-list').last().locator('li');
  await expect(states.first()).toBeVisible();
  await states.last().getByRole('button').click();
  await solved(page);
  await expect.poll(() => labelText(page, '2')).not.toContain('8.000');
  await page.keyboard.press('Control+z');
  await expect.poll(() => labelText(page, '2')).toContain('8.000');
});

test('a file dragged onto the page opens; a damaged one is refused with its place, and the sketch stays', async ({
  quiet: page,
}) => {
  const drop = (name: string, text: string, times = 1): Promise<void> =>
    page.evaluate(
      ([n, t, k]) => {
        const data = new DataTransfer();
        for (let j = 0; j < k; j += 1) data.items.add(new File([t], n, { type: 'application/json' }));
        const target = document.querySelector('.sheet') ?? document.body;
        const fire = (type: string): boolean =>
          target.dispatchEvent(new DragEvent(type, { bubbles: true, cancelable: true, dataTransfer: data }));
        fire('dragover');
        fire('drop');
      },
      [name, text, times] as const,
    );
  const example = await (await page.request.get('./examples/let-down.sketch.json')).text();
  // The page takes files once it stands.
  await expect(page.getByText('Or open an example')).toBeVisible();
  await drop('mine.sketch.json', example);
  await solved(page);
  await expect(unit(page, 'PV-1')).toBeVisible();
  await expect(saved(page)).toHaveAttribute('data-state', 'saved');
  const notice = page.locator('.notice');

  await drop('broken.sketch.json', example.replace('"tag": "PV-1"', '"tag": 7'));
  await expect(notice).toContainText('broken.sketch.json was not opened; your sketch is untouched.');
  await expect(notice).toContainText('units.1.tag');
  await expect(unit(page, 'PV-1')).toBeVisible();
  await drop('twice.sketch.json', example, 2);
  await expect(notice).toContainText('One sketch at a time');

  // The same sketch in another state becomes one of its own; the first keeps its place on the list.
  await drop('older.sketch.json', example.replace('"Let-down"', '"Let-down as it was"'));
  await expect(notice).toContainText('opened as a sketch of its own');
  await expect
    .poll(async () => {
      // The list is read when it opens; the new sketch may be on its way there.
      await page.keyboard.press('Control+Shift+o');
      await expect(page.locator('[data-sketch]').first()).toBeVisible();
      const count = await page.locator('[data-sketch]').count();
      await page.keyboard.press('Escape');
      return count;
    })
    .toBe(2);
});
