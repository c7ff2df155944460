import { expect, test } from 'playwright/test';

test('the page opens under its name and the console stays free of errors', async ({ page }) => {
  const errors: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  page.on('pageerror', (error) => errors.push(error.message));

  await page.goto('./');

  await expect(page).toHaveTitle(/Splitwright/);
  await expect(page.locator('#root > *').first()).toBeVisible();
  expect(errors).toEqual([]);
});
