import type { Page } from 'playwright/test';
import { solved } from './page';

const CHEMICALS = ['methane', 'propane', 'n-butane', 'n-pentane', 'benzene', 'toluene', 'n-decane', 'water'];

/** A train of heaters and valves in rows of ten, as many streams as asked for. */
export function trainOf(streams: number): string {
  const place = (k: number): readonly [number, number] => [192 * (k % 10), 240 * Math.floor(k / 10)];
  const units = Array.from({ length: streams - 1 }, (_, k) => {
    const isValve = k % 3 === 2;
    return {
      id: `u${k + 1}`,
      tag: isValve ? `PV-${101 + k}` : `E-${101 + k}`,
      kind: isValve ? 'valve' : 'heater',
      at: place(k + 1),
      settings: isValve
        ? { p: { ratio: '97 %' } }
        : { T: `${30 + ((k * 7) % 60)} degC`, p: { drop: '0.01 bar' } },
    };
  });
  const parts = Object.fromEntries(CHEMICALS.map((id) => [id, `${100 / CHEMICALS.length} %`]));
  const feed = {
    id: 'u0',
    tag: 'FEED-1',
    kind: 'feed',
    at: place(0),
    settings: {
      state: { T: '60 degC', P: '20 bar' },
      flow: '100 kmol/h',
      composition: { basis: 'mole', parts },
    },
  };
  return JSON.stringify({
    format: 'splitwright.sketch',
    version: 1,
    title: { title: `Train of ${streams} streams` },
    chemicals: CHEMICALS,
    model: { kind: 'peng-robinson', alpha: '1976', bankPairs: true, pairs: [] },
    units: [feed, ...units],
    streams: Array.from({ length: streams }, (_, k) => ({
      id: `s${k}`,
      number: String(k + 1),
      from: [`u${k}`, 'out'],
      ...(k + 1 < streams ? { to: [`u${k + 1}`, 'in'] } : {}),
    })),
  });
}

/** Opens a sketch's text as a file and waits until every unit is solved. */
export async function openText(page: Page, text: string): Promise<void> {
  await given(page, text);
  await solved(page);
}

/** Hands a sketch's text over as a file. */
export async function given(page: Page, text: string): Promise<void> {
  // Keys are heard once the page stands.
  await page.waitForFunction(() => performance.getEntriesByName('app-ready').length > 0);
  const chooser = page.waitForEvent('filechooser');
  await page.keyboard.press('Control+o');
  await (await chooser).setFiles({
    name: 'made-by-test.sketch.json',
    mimeType: 'application/json',
    buffer: Buffer.from(text),
  });
}
