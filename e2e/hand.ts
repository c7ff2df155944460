import { expect, type Locator, type Page } from 'playwright/test';

export type Place = readonly [number, number];

/** Middle of what is seen of an element. */
export async function middleOf(target: Locator): Promise<Place> {
  const box = await target.boundingBox();
  if (!box) throw new Error('nothing to be seen there');
  return [box.x + box.width / 2, box.y + box.height / 2];
}

export async function drag(page: Page, from: Place, to: Place): Promise<void> {
  await page.mouse.move(...from);
  await page.mouse.down();
  await page.mouse.move((from[0] + to[0]) / 2, (from[1] + to[1]) / 2, { steps: 4 });
  await page.mouse.move(...to, { steps: 4 });
  await page.mouse.up();
}

export const unit = (page: Page, tag: string): Locator => page.locator(`[data-unit="${tag}"]`);
export const stream = (page: Page, number: string): Locator => page.locator(`[data-stream="${number}"]`);

/** A field of the open drawer by its path in the sketch. */
export const field = (page: Page, path: string): Locator =>
  page.locator(`.drawer [data-field="${path}"]`).first();

/** The label of a stream on the sheet, its rows joined. */
export const labelText = async (page: Page, number: string): Promise<string> =>
  (await page.locator(`[data-stream="${number}"] .label`).first().textContent()) ?? '';

/** A kind from the shelf to a place, counted from the sheet's upper left corner. */
export async function put(page: Page, kind: string, x: number, y: number): Promise<void> {
  const sheet = await page.locator('.sheet-flow').boundingBox();
  if (!sheet) throw new Error('there is no sheet');
  await drag(page, await middleOf(page.locator(`[data-shelf="${kind}"]`)), [sheet.x + x, sheet.y + y]);
}

export async function portAt(page: Page, tag: string, port: string): Promise<Place> {
  await unit(page, tag).hover();
  return middleOf(page.locator(`[data-unit="${tag}"] [data-port="${port}"]`));
}

/** Pulls a stream from a unit's port to a place. */
export async function pull(page: Page, tag: string, port: string, to: Place): Promise<void> {
  await drag(page, await portAt(page, tag, port), to);
}

/** Pulls a stream from one unit's port to another's. */
export async function join(
  page: Page,
  [from, outlet]: readonly [string, string],
  [to, inlet]: readonly [string, string],
): Promise<void> {
  const target = await portAt(page, to, inlet);
  await pull(page, from, outlet, target);
  await expect(
    page.getByRole('button', { name: new RegExp(`^Stream \\d+, ${from} to ${to}`) }),
  ).toBeAttached();
}
