import { expect, type Page, test } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { openExample, solved } from './page';

/** Parts of the page that an update, accepted in another tab, has taken away. */
async function takeAway(page: Page, what: string): Promise<void> {
  await page.route(`**/assets/${what}`, (route) => route.fulfill({ status: 404, body: 'gone' }));
}

test.beforeEach(async ({ page }) => {
  await page.goto('./');
  await openExample(page);
  await unit(page, 'PV-1').click();
  await field(page, 'p.P').fill('9 bar');
  await field(page, 'p.P').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain('9.000');
  await expect(page.locator('.bar .saved')).toHaveAttribute('data-state', 'saved');
  await page.keyboard.press('Escape');
});

for (const [what, part, ask] of [
  ['arranging', 'elk-api-*.js', 'Shift+A'],
  ['the arranging worker', 'elk-worker*.js', 'Shift+A'],
  ['the documents’ worker', 'documents.worker-*.js', 'Control+p'],
  ['the PDF writer within that worker', 'pdfmake-*.js', 'Control+p'],
  ['the solver for what leaves the app', 'solver.worker-*.js', 'Control+p'],
] as const)
  test(`when ${what} cannot be loaded the page says that it needs to be loaded again, and nothing is lost`, async ({
    page,
  }) => {
    await takeAway(page, part);
    await page.locator('.sheet-flow').click({ position: { x: 8, y: 8 } });
    await page.keyboard.press(ask);
    const line = page.locator('[aria-label="Reload needed"]');
    await expect(line).toContainText('What you drew is kept.');
    // What was asked for is told as well: it did not come.
    await expect(page.locator('.notice')).toContainText(/Not arranged|was not made/);
    await page.unrouteAll();
    await line.getByRole('button', { name: 'Reload' }).click();
    await expect(line).toHaveCount(0);
    await solved(page);
    await expect.poll(() => labelText(page, '2')).toContain('9.000');
  });
