import { expect, type Page } from 'playwright/test';
import { drag, middleOf, type Place, stream, unit } from './hand';
import { openExample, solved, test } from './page';

const TRAIN = '[data-example="aromatic-condensate.sketch.json"]';
const undoWord = (page: Page) => page.locator('.bar').getByRole('button', { name: /^Undo/ });
const edit = async (page: Page, word: string): Promise<void> => {
  await page.locator('.bar').getByRole('button', { name: 'Edit', exact: true }).click();
  await page.getByRole('menuitem', { name: word }).click();
};
/** Where everything is drawn: node by node and line by line. */
const drawing = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const units = [...document.querySelectorAll<HTMLElement>('.react-flow__node')].map(
      (node) => node.style.transform,
    );
    const lines = [...document.querySelectorAll('.line-drawn')].map((line) => line.getAttribute('d'));
    return JSON.stringify([units.sort(), lines.sort()]);
  });

test.slow();

test('the train is arranged, a unit turned and mirrored, units lined up, a bend moved, and all of it undone', async ({
  quiet: page,
}) => {
  await openExample(page, TRAIN);
  const before = await drawing(page);
  await edit(page, 'Arrange all');
  await expect(undoWord(page)).toHaveText('Undo arrange all', { timeout: 40_000 });
  // All of it is in view.
  const area = (await page.locator('.sheet-flow').boundingBox())!;
  for (const unit of await page.locator('[data-unit]').all()) {
    const box = (await unit.boundingBox())!;
    expect(box.x).toBeGreaterThan(area.x - 1);
    expect(box.y).toBeGreaterThan(area.y - 1);
    expect(box.x + box.width).toBeLessThan(area.x + area.width + 1);
    expect(box.y + box.height).toBeLessThan(area.y + area.height + 1);
  }
  expect(await drawing(page)).not.toBe(before);

  // What is put elsewhere by hand stays there, the others find their places around it.
  const drum = page.locator('.react-flow__node', { has: unit(page, 'V-101') });
  const [x, y] = await middleOf(unit(page, 'V-101'));
  await drag(page, [x, y], [x + 40, y + 80]);
  await expect(undoWord(page)).toHaveText('Undo move V-101');
  const [byHand, others] = [await drum.getAttribute('style'), await drawing(page)];
  await page.keyboard.press('Shift+K');
  await expect(undoWord(page)).toHaveText('Undo arrange, 1 unit kept', { timeout: 40_000 });
  expect(await drum.getAttribute('style')).toBe(byHand);
  expect(await drawing(page)).not.toBe(others);

  await unit(page, 'E-101').click();
  await page.keyboard.press('r');
  await expect(undoWord(page)).toHaveText('Undo turn E-101');
  await page.keyboard.press('x');
  await expect(undoWord(page)).toHaveText('Undo mirror E-101');
  await unit(page, 'PV-101').click();
  await unit(page, 'E-104').click({ modifiers: ['Shift'] });
  await edit(page, 'Align on a level line');
  await expect(undoWord(page)).toHaveText('Undo align 2 units, middle');

  await page.keyboard.press('Escape');
  await page.keyboard.press('f');
  await stream(page, '14').getByRole('button').click();
  const straight = await page.locator('[data-line="14"] .line-drawn').getAttribute('d');
  const piece = page.locator('[data-bend]').last();
  const axis = await piece.getAttribute('data-axis');
  const box = (await piece.boundingBox())!;
  // Off the middle, where the diamond may stand.
  const from: Place = [box.x + box.width / 4, box.y + box.height / 4];
  await drag(page, from, axis === '0' ? [from[0] + 48, from[1]] : [from[0], from[1] + 48]);
  await expect(undoWord(page)).toHaveText('Undo bend stream 14');
  const bent = await page.locator('[data-line="14"] .line-drawn').getAttribute('d');
  expect(bent).not.toBe(straight);
  // By keys another step on, and the bends off again.
  await page.keyboard.press('j');
  await page.keyboard.press(axis === '0' ? 'ArrowRight' : 'ArrowDown');
  await page.keyboard.press('Enter');
  await edit(page, 'Take the bends off a line');
  await expect(undoWord(page)).toHaveText('Undo straighten stream 14');
  await solved(page);

  let steps = 0;
  while (await undoWord(page).isEnabled()) {
    const label = await undoWord(page).textContent();
    await page.keyboard.press('Control+z');
    await expect(undoWord(page)).not.toHaveText(label ?? '');
    steps += 1;
    expect(steps).toBeLessThan(20);
  }
  expect(steps).toBeGreaterThanOrEqual(6);
  expect(await drawing(page)).toBe(before);
  await solved(page);
});

test('units are copied into another sketch through the clipboard, with their streams and chemicals', async ({
  quiet: page,
}) => {
  await openExample(page);
  const count = await page.locator('[data-unit]').count();
  await unit(page, 'V-1').click();
  await page.keyboard.press('Control+d');
  await expect(undoWord(page)).toHaveText(/^Undo duplicate/);
  await expect(page.locator('[data-unit]')).toHaveCount(count + 1);
  await page.keyboard.press('Control+z');

  await page.keyboard.press('Escape');
  await page.keyboard.press('Control+a');
  await page.keyboard.press('Control+c');
  await page.keyboard.press('Control+Alt+n');
  await expect(page.locator('[data-unit]')).toHaveCount(0);
  await page.locator('.sheet-view').click({ position: { x: 60, y: 60 } });
  await page.keyboard.press('Control+v');
  await expect(page.locator('[data-unit]')).toHaveCount(count);
  await expect(undoWord(page)).toHaveText(`Undo paste ${count} units`);
  // All it needs came along: it solves.
  await solved(page);
  await page.keyboard.press('Control+x');
  await expect(page.locator('[data-unit]')).toHaveCount(0);
  await expect(undoWord(page)).toHaveText(`Undo cut ${count} units`);
  await page.keyboard.press('Control+z');
  await expect(page.locator('[data-unit]')).toHaveCount(count);
});

test('a note and an area are put on the sheet, moved, written anew and deleted', async ({ quiet: page }) => {
  await openExample(page);
  await page.keyboard.press('n');
  await page.keyboard.type('Check the level here');
  await page.keyboard.press('Control+Enter');
  await expect(undoWord(page)).toHaveText('Undo add a note');
  const note = page.getByRole('button', { name: 'Note: Check the level here' });
  await expect(note).toBeFocused();
  const was = await middleOf(note);
  await page.keyboard.press('m');
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.press('Enter');
  await expect(undoWord(page)).toHaveText('Undo move a note');
  expect((await middleOf(note))[1]).toBeGreaterThan(was[1] + 8);
  await page.keyboard.press('Enter');
  await page.keyboard.type('Level checked');
  await page.keyboard.press('Control+Enter');
  await expect(page.getByRole('button', { name: 'Note: Level checked' })).toBeFocused();
  await page.keyboard.press('Delete');
  await expect(page.locator('[data-note]')).toHaveCount(0);

  await unit(page, 'V-1').click();
  await page.keyboard.press('Shift+n');
  await page.keyboard.press('Enter');
  const area = page.getByRole('button', { name: 'Area: Battery limit' });
  await expect(area).toBeVisible();
  // It lies behind: what stands in it stays free for the hand.
  await unit(page, 'V-1').click();
  await expect(unit(page, 'V-1')).toHaveAttribute('data-selected', 'true');
});
