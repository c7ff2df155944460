import { readFileSync } from 'node:fs';
import { expect, type Page } from 'playwright/test';
import type { Json, Sketch } from '../src/sketch/types';
import { field, join, labelText, put, unit } from './hand';
import { LET_DOWN_FILE, labelsByCommand } from './headless';
import { solved, test } from './page';

const example: Sketch = JSON.parse(readFileSync(LET_DOWN_FILE, 'utf8'));
const settingsOf = (id: string): Sketch['units'][number]['settings'] =>
  example.units.find((known) => known.id === id)?.settings ?? {};
/** Each chemical of the feed with its share as typed. */
const PARTS = Object.entries(
  (settingsOf('u1').composition as { readonly parts: Readonly<Record<string, string>> }).parts,
);

// Long journeys: a busy machine needs more than the usual time.
test.slow();

let expected: Promise<ReadonlyMap<string, string>>;
test.beforeAll(() => {
  expected = labelsByCommand(LET_DOWN_FILE);
});

/** Every stream reads what the headless command gives for the shipped example. */
async function sameLabels(page: Page): Promise<void> {
  await solved(page);
  for (const [number, label] of await expected)
    await expect.poll(() => labelText(page, number), `stream ${number}`).toBe(label);
}

/** A plain number is the same quantity as its text. */
const asTexts = (settings: Json): Json =>
  JSON.parse(JSON.stringify(settings), (_key, value) => (typeof value === 'number' ? String(value) : value));

/** What a sketch says, whatever its ids, tags, names and places are. */
const gist = ({ chemicals, units, streams }: Sketch) => {
  const at = (end: Sketch['streams'][number]['from']) =>
    end && [units.findIndex((known) => known.id === end[0]), end[1]];
  return {
    chemicals,
    units: units.map(({ kind, settings }) => ({ kind, settings: asTexts(settings) })),
    streams: streams.map(({ number, from, to }) => ({ number, from: at(from), to: at(to) })),
  };
};

/** The file that is saved says the same as the example. */
async function sameFile(page: Page, save: () => Promise<void>): Promise<void> {
  const download = page.waitForEvent('download');
  await save();
  const saved: Sketch = JSON.parse(readFileSync(await (await download).path(), 'utf8'));
  expect(gist(saved)).toEqual(gist(example));
}

const barButton = (page: Page, name: RegExp) => page.locator('.bar').getByRole('button', { name });

/** Undoes everything, to the empty sheet of the start, then makes it all again. Answers the number of steps. */
async function backAndForth(
  page: Page,
  undo: () => Promise<void>,
  redo: () => Promise<void>,
): Promise<number> {
  const [undoWord, redoWord] = [barButton(page, /^Undo/), barButton(page, /^Redo/)];
  const labelsBack: (string | null)[] = [];
  while (await undoWord.isEnabled()) {
    const label = await undoWord.textContent();
    await undo();
    await expect(undoWord).not.toHaveText(label ?? '');
    labelsBack.push(label);
    expect(labelsBack.length).toBeLessThan(100);
  }
  await expect(page.locator('[data-unit]')).toHaveCount(0);
  await expect(page.getByRole('region', { name: 'Start' })).toBeVisible();
  for (const label of labelsBack.reverse()) {
    await redo();
    await expect(undoWord).toHaveText(label ?? '');
  }
  await expect(redoWord).toBeDisabled();
  await sameLabels(page);
  return labelsBack.length;
}

test('the let-down is drawn by the pointer, undone to the empty sheet and made again', async ({
  quiet: page,
}) => {
  // The empty sheet is a whole page.
  const zones = (side: string) => page.locator(`.zones[data-side="${side}"] span`).allTextContents();
  await expect.poll(() => zones('top')).toEqual(['1', '2', '3', '4', '5', '6', '7', '8']);
  await expect.poll(() => zones('left')).toEqual(['A', 'B', 'C', 'D', 'E', 'F']);

  await barButton(page, /^Chemicals/).click();
  for (const [id] of PARTS) {
    await field(page, 'chemicals.add').fill(id);
    await page.locator(`.answers [data-chemical="${id}"]`).click();
    await expect(page.locator(`.chemicals [data-chemical="${id}"]`)).toBeVisible();
  }
  await put(page, 'feed', 100, 300);
  await put(page, 'valve', 280, 300);
  await put(page, 'drum', 460, 300);
  await put(page, 'product', 640, 160);
  await put(page, 'product', 640, 440);
  await join(page, ['FEED-1', 'out'], ['PV-101', 'in']);
  await join(page, ['PV-101', 'out'], ['V-101', 'in1']);
  await join(page, ['V-101', 'vapour'], ['PROD-1', 'in']);
  await join(page, ['V-101', 'liquid'], ['PROD-2', 'in']);

  await unit(page, 'FEED-1').click();
  await page.getByLabel(/second: which$/).selectOption('vapourFraction');
  const typed = [
    ['state.vapourFraction', '0'],
    ['state.T', '52 degC'],
    ['flow', '150 kmol/h'],
    ...PARTS.map(([id, share]) => [`composition.parts.${id}`, share] as const),
  ] as const;
  for (const [path, text] of typed) {
    await field(page, path).fill(text);
    await field(page, path).press('Enter');
  }
  await unit(page, 'PV-101').click();
  await field(page, 'p.P').fill('7.0 bar');
  await field(page, 'p.P').press('Enter');
  for (const [tag, to] of [
    ['PROD-1', 'process'],
    ['PROD-2', 'storage'],
  ] as const) {
    await unit(page, tag).click();
    await field(page, 'to').selectOption(to);
  }
  await sameLabels(page);
  await sameFile(page, async () => {
    await barButton(page, /^File and view/).click();
    await page.getByRole('menuitem', { name: /^Save as a file/ }).click();
  });
  const steps = await backAndForth(
    page,
    () => barButton(page, /^Undo/).click(),
    () => barButton(page, /^Redo/).click(),
  );
  // 7 chemicals, 5 units, 4 streams, 10 settings of the feed, 1 of the valve, 2 of the products.
  expect(steps).toBe(29);
});

test('the let-down is drawn by keys alone, undone to the empty sheet and made again', async ({
  quiet: page,
}) => {
  const keys = page.keyboard;
  const press = async (...names: readonly string[]): Promise<void> => {
    for (const name of names) await keys.press(name);
  };
  const focusedField = (): Promise<string | undefined> =>
    page.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset.field);
  /** Tab until the field has the focus. */
  const tabTo = async (path: string): Promise<void> => {
    for (let k = 0; k < 12 && (await focusedField()) !== path; k += 1) await press('Tab');
    expect(await focusedField()).toBe(path);
  };
  const type = async (path: string, text: string): Promise<void> => {
    await tabTo(path);
    await keys.type(text);
    await press('Enter');
  };
  const onShelf = page.getByRole('searchbox', { name: 'Find a unit on the shelf' });
  const place = async (word: string, tag: string): Promise<void> => {
    await press('Shift+F6');
    await expect(onShelf).toBeFocused();
    await keys.type(word);
    await press('Enter');
    await expect(unit(page, tag).getByRole('button').first()).toBeFocused();
  };
  /** From a port of what is selected: `nth` C, an arrow to the other port, Enter. */
  const connect = async (nth: number, arrow: string, between: string): Promise<void> => {
    await press(...Array<string>(nth).fill('c'), arrow, 'Enter');
    await expect(page.getByRole('button', { name: new RegExp(`^Stream \\d+, ${between}`) })).toBeAttached();
  };
  const selected = (tag: string) => expect(unit(page, tag)).toHaveAttribute('data-selected', 'true');
  /** Enter goes into the drawer, to what needs a value. */
  const intoDrawer = async (path: string): Promise<void> => {
    await press('Enter');
    await expect.poll(focusedField).toBe(path);
  };

  // The framed example has the focus; H opens the drawer of chemicals with the search ready.
  await expect(page.locator('.card').first()).toBeFocused();
  await press('h');
  await expect(field(page, 'chemicals.add')).toBeFocused();
  for (const [id] of PARTS) {
    await keys.type(id);
    await press('Enter');
    await expect(page.locator(`.chemicals [data-chemical="${id}"]`)).toBeVisible();
  }
  await press('Escape');
  await expect(page.locator('.card').first()).toBeFocused();

  await place('feed', 'FEED-1');
  await place('valve', 'PV-101');
  await connect(2, 'ArrowLeft', 'FEED-1 to PV-101');
  await place('drum', 'V-101');
  await connect(3, 'ArrowLeft', 'PV-101 to V-101');
  await place('product', 'PROD-1');
  await connect(1, 'ArrowUp', 'V-101 to PROD-1');
  await place('product', 'PROD-2');
  await connect(1, 'ArrowLeft', 'V-101 to PROD-2');

  // Back along the streams to the feed.
  await press(...Array<string>(6).fill('ArrowLeft'));
  await selected('FEED-1');
  await intoDrawer('state.T');
  await keys.type('52 degC');
  await press('Enter', 'Tab');
  // The second condition's list of which: a letter chooses the vapour fraction.
  await press('v');
  await type('state.vapourFraction', '0');
  await type('flow', '150 kmol/h');
  for (const [id, share] of PARTS) await type(`composition.parts.${id}`, share);
  await press('Escape');
  await expect(unit(page, 'FEED-1').getByRole('button').first()).toBeFocused();

  await press('ArrowRight', 'ArrowRight');
  await selected('PV-101');
  await intoDrawer('p.P');
  await keys.type('7.0 bar');
  await press('Enter', 'Escape', 'ArrowRight', 'ArrowRight');
  await selected('V-101');
  for (const [branch, tag, first] of [
    ['ArrowUp', 'PROD-1', 'ArrowDown'],
    ['ArrowDown', 'PROD-2', 's'],
  ] as const) {
    await press('ArrowRight', branch, 'ArrowRight');
    await selected(tag);
    await intoDrawer('to');
    await press(first, 'Escape', 'ArrowLeft', 'ArrowLeft');
    await selected('V-101');
  }
  await sameLabels(page);
  await sameFile(page, () => press('Control+s'));
  const steps = await backAndForth(
    page,
    () => press('Control+z'),
    () => press('Control+Shift+z'),
  );
  expect(steps).toBe(29);
});
