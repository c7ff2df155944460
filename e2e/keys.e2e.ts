import { readFileSync } from 'node:fs';
import { expect, type Page } from 'playwright/test';
import type { Json, Sketch } from '../src/sketch/types';
import { field, labelText, unit } from './hand';
import { labelsByCommand } from './headless';
import { solved, test } from './page';

const FILE = new URL('../public/examples/aromatic-condensate.sketch.json', import.meta.url).pathname;
const example: Sketch = JSON.parse(readFileSync(FILE, 'utf8'));
const settingsOf = (tag: string) => example.units.find((known) => known.tag === tag)!.settings;
const parts = (settingsOf('FEED-1').composition as { readonly parts: Readonly<Record<string, string>> })
  .parts;

/** A plain number is the same quantity as its text. */
const asTexts = (settings: Json): Json =>
  JSON.parse(JSON.stringify(settings), (_key, value) => (typeof value === 'number' ? String(value) : value));

test('the condensate train, 21 units with all settings, is drawn by keys alone and ends solved with the example’s figures', async ({
  quiet: page,
}) => {
  test.setTimeout(300_000);
  const expected = labelsByCommand(FILE);
  const keys = keysOf(page);
  const { press, type, add, walkTo, drawer, set, choose, connectTo } = keys;
  /** The example's tag of each unit, with the one it gets here. */
  const tags = new Map<string, string>();
  const made = (theirs: string, ours: string): void => void tags.set(theirs, ours);

  await expect(page.locator('.card').first()).toBeFocused();
  await press('h');
  await expect(field(page, 'chemicals.add')).toBeFocused();
  for (const id of example.chemicals as readonly string[]) {
    await type(id);
    await press('Enter');
    await expect(page.locator(`.chemicals [data-chemical="${id}"]`)).toBeVisible();
  }
  await press('Escape');

  const shelf = async (word: string, tag: string): Promise<void> => {
    await press('Shift+F6');
    await expect(page.getByRole('searchbox', { name: 'Find a unit on the shelf' })).toBeFocused();
    await type(word);
    await press('Enter');
    await expect(unit(page, tag).getByRole('button').first()).toBeFocused();
  };

  await shelf('feed', 'FEED-1');
  made('FEED-1', 'FEED-1');
  await drawer(async () => {
    await set('state.T', '121 degC');
    await set('state.P', '7.8 bar');
    await set('flow', '185 kmol/h');
    for (const [id, share] of Object.entries(parts)) await set(`composition.parts.${id}`, share);
  });
  made('E-101', await add('cooler', 'E-101'));
  await drawer(async () => {
    await set('T', '38 degC');
    await set('p.drop', '0.3 bar');
  });
  made('V-101', await add('flash', 'V-101'));

  // Vapour: let down, burnt, cooled.
  made('PV-101', await add('valve', 'PV-101'));
  await drawer(() => set('p.P', '1.15 bar'));
  made('F-101', await add('combustion', 'F-101'));
  await drawer(() => set('heat.duty', '0 kW'));
  made('E-106', await add('cooler', 'E-102'));
  await drawer(async () => {
    await set('T', '185 degC');
    await choose('Outlet pressure: which', 'outlet pressure');
    await set('p.P', '1.10 bar');
  });
  made('PROD-1', await add('product', 'PROD-1'));
  await drawer(() => choose('to', 'atmosphere'));

  // Liquid: let down, warmed, light ends off, benzene cut.
  await walkTo('V-101');
  made('PV-102', await add('valve', 'PV-102'));
  await drawer(() => set('p.P', '3.5 bar'));
  made('E-102', await add('heater', 'E-103'));
  await drawer(async () => {
    await set('T', '82 degC');
    await set('p.drop', '0.3 bar');
  });
  made('C-101', await add('column', 'C-101'));
  await drawer(async () => {
    await set('stages', '26');
    await choose('top.distillate', 'vapour');
    await set('pressure.condenser', '2.60 bar');
    await set('pressure.top', '2.75 bar');
    await set('pressure.bottom', '3.05 bar');
    await set('feeds.feed1.stage', '11');
    await choose('fixing', 'reflux ratio');
    await set('fixedBy.0.value', '2.4');
    await choose('fixing', 'vapour distillate');
    await choose('what it counts from', 'share of stream 1');
    await set('fixedBy.1.value', '14 %');
  });
  made('K-101', await add('compressor', 'K-101'));
  await drawer(async () => {
    await set('p.P', '6.2 bar');
    await set('efficiency.isentropic', '74 %');
  });
  made('PROD-2', await add('product', 'PROD-2'));
  await drawer(() => choose('to', 'process'));
  await walkTo('C-101');
  made('PV-103', await add('valve', 'PV-103'));
  await drawer(() => set('p.P', '1.75 bar'));
  made('C-102', await add('column', 'C-102'));
  await drawer(async () => {
    await set('stages', '31');
    await choose('top.distillate', 'liquid');
    await set('pressure.condenser', '1.20 bar');
    await set('pressure.top', '1.30 bar');
    await set('pressure.bottom', '1.62 bar');
    await set('feeds.feed1.stage', '15');
    await choose('fixing', 'reflux ratio');
    await set('fixedBy.0.value', '2.3');
    await choose('fixing', 'liquid distillate');
    await choose('what it counts from', 'share of all its feeds');
    await set('fixedBy.1.value', '45 %');
  });
  made('E-104', await add('cooler', 'E-104'));
  await drawer(() => set('T', '38 degC'));
  made('PROD-3', await add('product', 'PROD-3'));
  await drawer(() => choose('to', 'storage'));
  await walkTo('C-102');
  made('P-101', await add('pump', 'P-101'));
  await drawer(async () => {
    await set('p.P', '6.0 bar');
    await set('efficiency', '69 %');
  });
  made('E-105', await add('cooler', 'E-105'));
  await drawer(() => set('T', '45 degC'));
  made('PROD-4', await add('product', 'PROD-4'));
  await drawer(() => choose('to', 'storage'));

  // Air by a fan.
  await shelf('feed', 'FEED-2');
  made('FEED-2', 'FEED-2');
  await drawer(async () => {
    await set('state.T', '24 degC');
    await set('state.P', '1.013 bar');
    await set('flow', '597 kmol/h');
    await choose('composition.basis', 'air');
    await choose('composition.preset', 'humid');
    await set('composition.relativeHumidity', '55 %');
  });
  made('K-102', await add('compressor', 'K-102'));
  await drawer(async () => {
    await set('p.P', '1.15 bar');
    await set('efficiency.isentropic', '70 %');
    await choose('service', 'fan');
  });
  await connectTo(/^F-101 air/);
  await solved(page);

  const download = page.waitForEvent('download');
  await press('Control+s');
  const saved: Sketch = JSON.parse(readFileSync(await (await download).path(), 'utf8'));
  const ours = (id: string): string => tags.get(example.units.find((known) => known.id === id)!.tag)!;
  const tagOf = (id: string): string => saved.units.find((known) => known.id === id)!.tag;
  // Every stream runs where the example's does, and reads what the headless command gives for it.
  for (const { number, from } of example.streams) {
    const same = saved.streams.find((s) => tagOf(s.from![0]) === ours(from![0]) && s.from![1] === from![1]);
    expect(same, `stream ${number}`).toBeDefined();
    const label = (await expected).get(number);
    await expect.poll(() => labelText(page, same!.number), `stream ${number}`).toBe(label);
  }
  expect(saved.streams).toHaveLength(example.streams.length);
  // The file says the same, but for names: settings that name a stream name the same one.
  const numberOne = saved.streams.find((s) => s.number === '1')!.id;
  for (const { tag, settings } of example.units) {
    const mine = saved.units.find((known) => known.tag === tags.get(tag))!.settings;
    const renamed = JSON.parse(JSON.stringify(mine).replaceAll(`"stream":"${numberOne}"`, '"stream":"s1"'));
    expect(asTexts(renamed), tag).toEqual(asTexts(settings));
  }
});

/** What a hand that has only a keyboard does. */
function keysOf(page: Page) {
  const press = async (...names: readonly string[]): Promise<void> => {
    for (const name of names) await page.keyboard.press(name);
  };
  const type = (text: string): Promise<void> => page.keyboard.type(text);
  /** What the focus is on: a field by its path, else what it is called. */
  const at = (): Promise<{ readonly path: string; readonly name: string; readonly list: boolean }> =>
    page.evaluate(() => {
      const focused = document.activeElement as HTMLElement | null;
      const group = focused?.closest<HTMLElement>('[role=radiogroup]');
      return {
        path: (group ?? focused)?.dataset.field ?? '',
        name: focused?.getAttribute('aria-label') ?? focused?.textContent?.trim() ?? '',
        list: focused?.tagName === 'SELECT',
      };
    });
  /** Tab, or back with Shift, until the focus is on what is wanted. */
  const goTo = async (
    wanted: string,
    isIt: (here: Awaited<ReturnType<typeof at>>) => boolean,
  ): Promise<void> => {
    // Who looks at the screen knows whether it is further up or down.
    const isAbove = await page.evaluate((name) => {
      const target = [
        ...document.querySelectorAll<HTMLElement>('.drawer [data-field], .drawer [aria-label]'),
      ].find(
        (element) => element.dataset.field === name || element.getAttribute('aria-label')?.endsWith(name),
      );
      const focused = document.activeElement;
      return !!target && !!focused && (focused.compareDocumentPosition(target) & 2) !== 0;
    }, wanted);
    for (let k = 0; k < 40; k += 1) {
      if (isIt(await at())) return;
      await press(isAbove ? 'Shift+Tab' : 'Tab');
    }
    throw new Error(`no way by Tab to ${wanted}`);
  };

  return {
    press,
    type,
    /** C, Enter, a few letters, Enter: the next unit stands, connected and selected. */
    async add(word: string, tag: string): Promise<string> {
      await press('c', 'Enter');
      await expect(page.getByRole('menu', { name: 'Where the stream leads' })).toBeVisible();
      await type(word.slice(0, 6));
      await press('Enter');
      await expect(unit(page, tag).getByRole('button').first()).toBeFocused();
      return tag;
    },
    /** Against the flow until the unit is selected. */
    async walkTo(tag: string): Promise<void> {
      for (let k = 0; k < 24; k += 1) {
        if ((await unit(page, tag).getAttribute('data-selected')) === 'true') return;
        await press('ArrowLeft');
      }
      throw new Error(`no way to ${tag}`);
    },
    /** Enter leads into the drawer, Esc out of it. */
    async drawer(fill: () => Promise<void>): Promise<void> {
      await press('Enter');
      await expect(page.locator('.drawer :focus')).toHaveCount(1);
      await fill();
      await press('Escape');
      await expect(page.locator('.drawer :focus')).toHaveCount(0);
    },
    async set(path: string, text: string): Promise<void> {
      await goTo(path, (here) => here.path === path && !here.list);
      await press('Control+a');
      await type(text);
      await press('Enter');
    },
    /** A list opened and chosen from by arrows, a row of choices by arrows, a link by Enter. */
    async choose(name: string, word: string): Promise<void> {
      if (name === 'fixing') {
        await goTo(word, (here) => here.name.toLowerCase().startsWith(word));
        await press('Enter');
        await expect.poll(async () => (await at()).path).toMatch(/^fixedBy/);
        return;
      }
      await goTo(name, (here) => here.path === name || here.name.endsWith(name));
      if ((await at()).list) {
        // Opened first, so that only the one that is wanted is chosen.
        const steps = await page.evaluate((wanted) => {
          const list = document.activeElement as HTMLSelectElement;
          const open = [...list.options].filter((option) => !option.disabled);
          const to = open.findIndex((option) => option.text.toLowerCase().includes(wanted));
          return to < 0 ? null : to - open.findIndex((option) => option.selected);
        }, word);
        if (steps === null) throw new Error(`${name} has no ${word}`);
        await press(
          'Space',
          ...Array<string>(Math.abs(steps)).fill(steps < 0 ? 'ArrowUp' : 'ArrowDown'),
          'Enter',
        );
        return;
      }
      const now = (): Promise<string> =>
        page.evaluate(() => document.activeElement?.closest('label')?.textContent ?? '');
      for (let k = 0; k < 6; k += 1) {
        if ((await now()).toLowerCase().includes(word)) return;
        await press('ArrowRight');
      }
      throw new Error(`${name} has no ${word}`);
    },
    /** C, arrows until the port that is read out is the wanted one, Enter. */
    async connectTo(port: RegExp): Promise<void> {
      await press('c');
      for (let k = 0; k < 40; k += 1) {
        const said = (await page.getByRole('status').last().textContent()) ?? '';
        if (port.test(said.trim())) {
          await press('Enter');
          return;
        }
        await press((['ArrowLeft', 'ArrowUp', 'ArrowRight', 'ArrowUp'] as const)[k % 4]!);
      }
      throw new Error(`no way to ${port}`);
    },
  };
}
