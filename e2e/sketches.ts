import { expect, type Page } from 'playwright/test';
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

/** Hands a sketch's text over as a file, on the start screen. */
export async function given(page: Page, text: string): Promise<void> {
  // Keys are heard once the page stands: the framed example takes the focus then.
  await expect(page.locator('.card').first()).toBeFocused();
  const chooser = page.waitForEvent('filechooser');
  await page.keyboard.press('Control+o');
  await (await chooser).setFiles({
    name: 'made-by-test.sketch.json',
    mimeType: 'application/json',
    buffer: Buffer.from(text),
  });
}

const MANY = [
  'propane',
  'n-butane',
  'n-pentane',
  'n-hexane',
  'cyclohexane',
  'benzene',
  'n-heptane',
  'toluene',
  'n-octane',
  'ethylbenzene',
  'm-xylene',
  'n-nonane',
];

/**
 * So many columns one after the other, of so many stages each, on twelve chemicals: most of each distillate goes back to the
 * column before, so that every loop overlaps the next. A solve that takes its time, in many short steps.
 */
export function columnLoops(columns: number, stages: number): string {
  const units: object[] = [];
  const streams: { id: string; number: string; from: readonly string[]; to?: readonly string[] }[] = [];
  const put = (tag: string, kind: string, x: number, y: number, settings: object = {}): void => {
    units.push({ id: tag, tag, kind, at: [x, y], settings });
  };
  const lead = (from: readonly string[], to?: readonly string[]): void => {
    const number = String(streams.length + 1);
    streams.push({ id: `s${number}`, number, from, ...(to ? { to } : {}) });
  };
  const parts = Object.fromEntries(MANY.map((id, k) => [id, k === 0 ? '12 %' : '8 %']));
  const state = { T: '90 degC', P: '4 bar' };
  put('FEED-1', 'feed', 0, 360, { state, flow: '100 kmol/h', composition: { basis: 'mole', parts } });
  lead(['FEED-1', 'out'], ['J-1', 'in1']);
  for (let k = 1; k <= columns; k += 1) {
    const [x, column] = [280 * k, `C-${100 + k}`];
    put(`J-${k}`, 'join', x - 120, 360 + 16 * k);
    put(column, 'column', x, 300, {
      stages,
      top: { distillate: 'liquid' },
      bottom: { reboiler: true },
      feeds: { feed1: { stage: Math.round(stages / 2) } },
      pressure: { condenser: '2 bar', top: '2 bar', bottom: '2.4 bar' },
      fixedBy: [
        { fix: 'refluxRatio', value: 2 },
        { fix: 'flow', product: 'liquidDistillate', value: { share: '30 %', of: 'feed', basis: 'mole' } },
      ],
    });
    lead([`J-${k}`, 'out'], [column, 'feed1']);
    lead([column, 'bottoms'], k < columns ? [`J-${k + 1}`, 'in1'] : undefined);
    if (k === 1) {
      lead([column, 'liquidDistillate']);
      continue;
    }
    put(`D-${k}`, 'divide', x + 160, 240, { shares: { out2: { share: '80 %', of: 'feed', basis: 'mole' } } });
    put(`P-${100 + k}`, 'pump', x + 40, 80, { p: { P: '4 bar' }, efficiency: '70 %' });
    lead([column, 'liquidDistillate'], [`D-${k}`, 'in']);
    lead([`D-${k}`, 'out1']);
    lead([`D-${k}`, 'out2'], [`P-${100 + k}`, 'in']);
    lead([`P-${100 + k}`, 'out'], [`J-${k - 1}`, 'in2']);
  }
  return JSON.stringify({
    format: 'splitwright.sketch',
    version: 1,
    title: { title: 'Loops around columns' },
    chemicals: MANY,
    model: { kind: 'peng-robinson', alpha: '1976', bankPairs: true, pairs: [] },
    units,
    streams,
  });
}

const sketchOf = (
  title: string,
  chemicals: readonly string[],
  units: readonly object[],
  ends: readonly string[],
) =>
  JSON.stringify({
    format: 'splitwright.sketch',
    version: 1,
    title: { title },
    chemicals,
    model: { kind: 'peng-robinson', alpha: '1976', bankPairs: true, pairs: [] },
    units,
    streams: ends.map((text, k) => {
      const [from = '', to = ''] = text.split(' > ');
      return { id: `s${k + 1}`, number: String(k + 1), from: from.split(' '), to: to.split(' ') };
    }),
  });
const unitOf = (tag: string, kind: string, at: readonly [number, number], settings: object = {}) => ({
  id: tag,
  tag,
  kind,
  at,
  settings,
});

/** Propane goes round by a compressor; nothing enters, so nothing says how much. */
export const closedLoop = (): string =>
  sketchOf(
    'Refrigeration',
    ['propane'],
    [
      unitOf('K-101', 'compressor', [300, 100], { p: { P: '14 bar' }, efficiency: { isentropic: '75 %' } }),
      unitOf('E-101', 'cooler', [500, 100], { T: '38 degC', p: { drop: '0.3 bar' } }),
      unitOf('PV-101', 'valve', [500, 300], { p: { P: '2.5 bar' } }),
      unitOf('E-102', 'heater', [300, 300], { T: '-10 degC', p: { drop: '0.1 bar' } }),
    ],
    ['K-101 out > E-101 in', 'E-101 out > PV-101 in', 'PV-101 out > E-102 in', 'E-102 out > K-101 in'],
  );

/** Hexane is condensed out of nitrogen, which goes round and has no way out. */
export const withoutPurge = (): string =>
  sketchOf(
    'Gas loop without a purge',
    ['nitrogen', 'n-hexane'],
    [
      unitOf('FEED-1', 'feed', [0, 200], {
        state: { T: '57 degC', P: '2 bar' },
        flow: '18 kmol/h',
        composition: { basis: 'mole', parts: { nitrogen: '10 %', 'n-hexane': '90 %' } },
      }),
      unitOf('J-1', 'join', [200, 200]),
      unitOf('E-101', 'cooler', [300, 200], { T: '-8 degC', p: { drop: '0.1 bar' } }),
      unitOf('V-101', 'drum', [450, 200]),
      unitOf('K-101', 'compressor', [300, 40], { p: { P: '2 bar' }, efficiency: { isentropic: '70 %' } }),
      unitOf('PROD-1', 'product', [700, 300]),
    ],
    [
      'FEED-1 out > J-1 in1',
      'J-1 out > E-101 in',
      'E-101 out > V-101 in1',
      'V-101 vapour > K-101 in',
      'K-101 out > J-1 in2',
      'V-101 liquid > PROD-1 in',
    ],
  );
