import { expect, type Page } from 'playwright/test';
import { field, labelText, unit } from './hand';
import { openExample, solved, test } from './page';

const bar = (page: Page) => page.getByRole('status', { name: 'Read only' });
const undo = (page: Page) => page.locator('.bar').getByRole('button', { name: /^Undo/ });
const saved = (page: Page) => page.locator('.bar .saved');

async function setPressure(page: Page, text: string, shown: string): Promise<void> {
  await unit(page, 'PV-1').click();
  await field(page, 'p.P').fill(text);
  await field(page, 'p.P').press('Enter');
  await expect.poll(() => labelText(page, '2')).toContain(shown);
}

test('a second tab may read the sketch, take it over, or go on with a copy', async ({
  quiet: first,
  context,
}) => {
  await openExample(first);
  await setPressure(first, '9 bar', '9.000');
  await expect(saved(first)).toHaveAttribute('data-state', 'saved');

  const second = await context.newPage();
  const errors: string[] = [];
  second.on('pageerror', (error) => errors.push(error.message));
  await second.goto('./');
  await solved(second);
  await expect(bar(second)).toBeVisible();
  await expect(saved(second)).toHaveAttribute('data-state', 'read-only');
  await expect(second.locator('[data-shelf="valve"]')).toBeDisabled();
  await unit(second, 'PV-1').click();
  await expect(field(second, 'p.P')).toBeDisabled();

  // What was done in the first tab since the second one read it comes along.
  await setPressure(first, '8 bar', '8.000');
  await bar(second).getByRole('button', { name: 'Take over' }).click();
  await expect(bar(second)).toHaveCount(0);
  await expect.poll(() => labelText(second, '2')).toContain('8.000');
  await expect(bar(first)).toBeVisible();
  await expect(undo(first)).toBeDisabled();
  await first.keyboard.press('Control+z');
  expect(await labelText(first, '2')).toContain('8.000');
  await setPressure(second, '6 bar', '6.000');
  await expect(saved(second)).toHaveAttribute('data-state', 'saved');

  // A copy is a sketch of its own: both tabs write, neither disturbs the other.
  await bar(first).getByRole('button', { name: 'Edit a copy' }).click();
  await expect(bar(first)).toHaveCount(0);
  await expect(first.locator('.bar .name')).toContainText('Let-down, copy');
  await setPressure(first, '5 bar', '5.000');
  await expect(saved(first)).toHaveAttribute('data-state', 'saved');
  await setPressure(second, '4 bar', '4.000');
  await expect(saved(second)).toHaveAttribute('data-state', 'saved');
  await expect(bar(second)).toHaveCount(0);
  expect(errors).toEqual([]);
});
