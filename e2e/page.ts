import { test as base, expect, type Page } from 'playwright/test';

/** A page whose console must stay free of errors until the test has ended. */
export const test = base.extend<{ quiet: Page }>({
  quiet: async ({ page }, use) => {
    const errors: string[] = [];
    page.on('console', (message) => {
      if (message.type() === 'error') errors.push(message.text());
    });
    page.on('pageerror', (error) => errors.push(error.message));
    // From here on the browser hands file dialogues over; asked for only when a key is pressed, it would come too late at times.
    page.on('filechooser', () => undefined);
    await page.goto('./');
    await use(page);
    expect(errors).toEqual([]);
  },
});

export const LET_DOWN = '[data-example="let-down.sketch.json"]';

/** Opens an example from the start screen and waits for its numbers. */
export async function openExample(page: Page, card = LET_DOWN): Promise<void> {
  await page.locator(card).click();
  await solved(page);
}

/** Waits until the numbers on the screen belong to the newest edit and every unit is solved. */
export async function solved(page: Page): Promise<void> {
  await expect(page.locator('[data-unit]').first()).toBeVisible();
  await expect(page.locator('[data-unit]:not([data-state="solved"])')).toHaveCount(0);
}
