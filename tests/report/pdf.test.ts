import { createHash } from 'node:crypto';
import { readdirSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import type { ReportInput } from '../../src/report/input';
import { PRELIMINARY, warningOf } from '../../src/report/model';
import { writePdf } from '../../src/report/pdf/write';
import { resultsJson } from '../../src/report/resultsJson';
import { FONTS, type ReadPage, readPdf, streamFigures, wordsOf } from './readPdf';
import { EXAMPLES, solvedExample } from './solved';

const FILES = readdirSync(EXAMPLES).filter((name) => name.endsWith('.sketch.json'));

interface PhaseJson {
  readonly kind: string;
  readonly fraction: number;
  readonly MW_g_mol: number;
  readonly density_kg_m3: number;
  readonly Z: number;
  readonly cp_J_molK: number;
  readonly cpOverCv?: number;
  readonly viscosity_Pa_s?: number;
}
interface StreamJson {
  readonly T_K: number;
  readonly P_Pa: number;
  readonly n_mol_s: number;
  readonly m_kg_s: number;
  readonly MW_g_mol: number;
  readonly H_W: number;
  readonly HfromIdeal_W: number;
  readonly vapourFraction: number;
  readonly vapourMassFraction: number;
  readonly standardLiquid_m3_s?: number;
  readonly z: Readonly<Record<string, number>>;
  readonly phases: readonly PhaseJson[];
}
interface ResultsJson {
  readonly streams: Readonly<Record<string, StreamJson>>;
  readonly basis: {
    readonly chemicals: readonly { readonly id: string; readonly name: string; readonly MW_g_mol: number }[];
  };
}

/** What the printed rows must show, straight from the results file, in the metric measures. */
function expected(stream: StreamJson, { chemicals }: ResultsJson['basis']): [string, number | undefined][] {
  const flow = (p: PhaseJson): number => (p.fraction * stream.n_mol_s * p.MW_g_mol) / 1000;
  const block = (name: string, p: PhaseJson | undefined): [string, number | undefined][] =>
    p
      ? [
          [`${name}/Molar flow kmol/h`, p.fraction * stream.n_mol_s * 3.6],
          [`${name}/Mass flow kg/h`, flow(p) * 3600],
          [`${name}/Actual flow m³/h`, (flow(p) / p.density_kg_m3) * 3600],
          [`${name}/Density kg/m³`, p.density_kg_m3],
          [`${name}/Molar mass kg/kmol`, p.MW_g_mol],
          [`${name}/Z`, p.Z],
          [`${name}/Heat capacity kJ/(kg K)`, p.cp_J_molK / p.MW_g_mol],
          ...(name === 'Vapour' ? [[`${name}/Cp/Cv`, p.cpOverCv] as [string, number | undefined]] : []),
          [`${name}/Viscosity mPa s`, p.viscosity_Pa_s === undefined ? undefined : p.viscosity_Pa_s * 1000],
        ]
      : [];
  const phase = (...kinds: readonly string[]): PhaseJson | undefined =>
    stream.phases.find((p) => p.fraction > 0 && kinds.includes(p.kind));
  const vapour = phase('vapour', 'dense');
  return [
    ['/Temperature °C', stream.T_K - 273.15],
    ['/Pressure bar(a)', stream.P_Pa / 1e5],
    ['/Pressure bar(g)', (stream.P_Pa - 101325) / 1e5],
    ['/Vapour fraction, molar mol/mol', stream.vapourFraction],
    ['/Vapour fraction, mass kg/kg', stream.vapourMassFraction],
    ['Flows/Molar flow kmol/h', stream.n_mol_s * 3.6],
    ['Flows/Mass flow kg/h', stream.m_kg_s * 3600],
    // Derived: ideal gas at 0 °C and 101325 Pa, 0.0224139695 m³/mol.
    [
      'Flows/Vapour as ideal gas, 0 °C, 1.01325 bar Nm³/h',
      vapour && vapour.fraction * stream.n_mol_s * ((8.314462618 * 273.15) / 101325) * 3600,
    ],
    [
      'Flows/Standard liquid, 15 °C m³/h',
      stream.standardLiquid_m3_s === undefined ? undefined : stream.standardLiquid_m3_s * 3600,
    ],
    ['Flows/Molar mass kg/kmol', stream.MW_g_mol],
    ['Flows/Enthalpy flow, elements kW', stream.H_W / 1000],
    ['Flows/Enthalpy flow, ideal gas 25 °C kW', stream.HfromIdeal_W / 1000],
    ...block('Vapour', vapour),
    ...block('Liquid', phase('liquid')),
    ...chemicals.flatMap(({ id, name, MW_g_mol }): [string, number | undefined][] => [
      [`Composition/${name} mol %`, 100 * (stream.z[id] ?? 0)],
      [`Flow by component/${name} kg/h`, (stream.z[id] ?? 0) * stream.n_mol_s * MW_g_mol * 3.6],
    ]),
    ['Composition/Total mol %', 100],
    ['Flow by component/Total kg/h', stream.m_kg_s * 3600],
  ];
}

/** Whether a printed figure says the number to its last printed place. */
function says(printed: string | undefined, value: number | undefined): boolean {
  if (printed === undefined) return false;
  if (value === undefined) return printed === '–';
  const trace = /^<(0\.0*1|1)$/.exec(printed);
  if (trace) return value > 0 && value < Number(trace[1]);
  if (printed === '–' || printed === '0') return value === 0;
  const decimals = /\.(\d+)$/.exec(printed)?.[1]?.length ?? 0;
  const off = Math.abs(Number(printed.replace('−', '-')) - value);
  return off <= 0.5 * 10 ** -decimals + 1e-9 * Math.abs(value);
}

describe.each(FILES)('the stream summary of %s as PDF', (file) => {
  let input: ReportInput;
  let bytes: Uint8Array;
  let pages: readonly ReadPage[];
  let read: Awaited<ReturnType<typeof readPdf>>;
  beforeAll(async () => {
    input = await solvedExample(file);
    bytes = await writePdf(input, FONTS);
    read = await readPdf(bytes);
    pages = read.pages;
  }, 60_000);

  test('reads back as the results file to the printed digits, for every stream and every row', () => {
    const json = resultsJson(input, 0) as unknown as ResultsJson;
    const printed = streamFigures(pages);
    expect([...printed.keys()].sort()).toEqual(Object.keys(json.streams).sort());
    const wrong: unknown[] = [];
    for (const [number, stream] of Object.entries(json.streams))
      for (const [row, value] of expected(stream, json.basis)) {
        const text = printed.get(number)?.get(row);
        if (!says(text, value)) wrong.push([number, row, text, value]);
      }
    expect(wrong).toEqual([]);
  });

  test('carries purpose, margin, fingerprint, measures and page number on every page', () => {
    pages.forEach((page, k) => {
      const all = wordsOf(page);
      for (const part of [
        PRELIMINARY,
        'No design margin included',
        input.fingerprint,
        'Measures: metric',
        `Page ${k + 1} of ${pages.length}`,
      ])
        expect([k, part, all.includes(part)]).toEqual([k, part, true]);
    });
  });

  test('links contents to pages, and every link has its destination', () => {
    const contents = pages.find((page) => wordsOf(page).includes('Contents'));
    expect(contents?.links.length).toBeGreaterThan(8);
    for (const { links } of pages)
      for (const link of links) if (link !== 'page') expect(read.destinations).toContain(link);
  });

  test('has the same headings as bookmarks, columns inside their section', () => {
    const titles = read.bookmarks.map((b) => b.title);
    expect(titles[0]).toBe('Process flow diagram');
    expect(titles.at(-1)).toBe('Cautions');
    expect(new Set(titles).size).toBe(titles.length);
    const columns = input.sketch.units.filter((u) => u.kind === 'column').length;
    expect(read.bookmarks.flatMap((b) => b.inside)).toHaveLength(columns);
  });

  test('comes out the same byte for byte', async () => {
    const digest = (data: Uint8Array): string => createHash('sha256').update(data).digest('hex');
    expect(digest(await writePdf(input, FONTS))).toBe(digest(bytes));
  });
});

describe('the document of one example', () => {
  let input: ReportInput;
  let words: string;
  let read: Awaited<ReturnType<typeof readPdf>>;
  const written = async (change: object, title: object = {}) => {
    const changed = {
      ...input,
      sketch: { ...input.sketch, ...change, title: { ...input.sketch.title, ...title } },
    };
    return readPdf(await writePdf(changed as ReportInput, FONTS));
  };
  beforeAll(async () => {
    input = await solvedExample('aromatic-condensate.sketch.json');
    read = await readPdf(await writePdf(input, FONTS));
    words = read.pages.map(wordsOf).join(' ');
  }, 60_000);

  test('draws the sheet in vectors with its tags and a key of all links', () => {
    const first = wordsOf(read.pages[0] ?? { width: 0, height: 0, texts: [], links: [] });
    for (const text of ['V-101', 'C-102', 'heat link', 'shaft link', 'Sheet number', 'Checked'])
      expect(first).toContain(text);
    expect(first).toContain('Closure shows arithmetic, not that the model is right.');
  });

  test('names heat by size and direction, and says in words what fixes the columns', () => {
    expect(words).toMatch(/condenser duty, removed \d/);
    expect(words).toMatch(/duty, added \d/);
    expect(words).toContain('fixed by reflux ratio 2.4; vapour distillate 14 % of stream 1, mol');
    expect(words).toContain('26 stages + partial condenser + reboiler');
    expect(words).not.toMatch(/duty\s[−-]\d/);
  });

  test('says by how much printed sums differ, and that no figure is adjusted', () => {
    expect(words).toMatch(
      /Sum of printed figures differs by [\d.]+ mol % at most.* and by [\d.]+ kg\/h at most.*: rounding/,
    );
    expect(words).toContain('no figure is adjusted');
    expect(words).toContain('only differences mean something');
  });

  test('shows units as they are read, never as they are typed, and pressures with their reference', () => {
    expect(words).toContain('C-101 reboiler pressure 3.05 bar(a)');
    expect(words).toContain('cooling water 28 °C');
    expect(words).toContain('V-101 pressure drop 0 bar No');
    expect(words).not.toMatch(/deg[CF]|\d ?m3|\d ?bar[ag]\b/);
  });

  test('has metadata of the title block', () => {
    expect(read.info).toMatchObject({
      Title: `${input.sketch.title.title} – stream summary (heat and material balance)`,
      Language: 'en-GB',
      Creator: expect.stringContaining('Splitwright'),
      Keywords: expect.stringContaining(input.fingerprint),
    });
  });

  test('leaves out rows, streams and sections that were not chosen', async () => {
    const less = await written({
      documents: {
        paper: 'A4',
        withoutRows: ['normal', 'vapour', 'Pg'],
        withoutStreams: [input.sketch.streams[0]!.id],
        withoutSections: ['limits', 'model', 'sheet'],
      },
    });
    const figures = streamFigures(less.pages);
    expect(figures.has(input.sketch.streams[0]!.number)).toBe(false);
    const rows = [...(figures.get('2')?.keys() ?? [])];
    expect(rows).toContain('Liquid/Density kg/m³');
    expect(rows.filter((row) => /Vapour\/|Normal|bar\(g\)/.test(row))).toEqual([]);
    const all = less.pages.map(wordsOf).join(' ');
    expect(all).not.toContain('Pair parameters in force');
    expect(all).not.toContain('Process flow diagram');
    expect(less.pages[0]?.width).toBeCloseTo(841.89, 1);
  });

  test('prints requirements, utility levels, HOLDs, revisions and feed cases', async () => {
    const stream = input.sketch.streams.find((s) => s.number === '17')!;
    const full = (
      await written(
        {
          revisions: [{ mark: 'B', date: '2026-02-01', what: 'Feed raised', by: 'N. N.' }],
          holds: [{ no: '1', what: 'Feed pressure to be confirmed', owner: 'Process', date: '2026-03-01' }],
          designBasis: {
            cases: [{ name: 'Winter', text: 'feed at 5 °C' }],
            requirements: [
              { stream: stream.id, of: 'temperature', max: '40 degC' },
              { stream: stream.id, of: 'fraction', chemical: 'benzene', min: '99 %' },
            ],
            utilities: [
              { name: 'Hot oil', use: 'heating', supply: '280 degC', back: '230 degC' },
              { name: 'Chilled water', use: 'cooling', supply: '7 degC', back: '12 degC' },
            ],
          },
        },
        { purpose: 'For review' },
      )
    ).pages.map(wordsOf);
    const all = full.join(' ');
    for (const part of [
      'Feed raised',
      'HOLD 1',
      'Feed pressure to be confirmed',
      'What is not settled Owner Due Assumption',
      'What changed By Checked Approved',
      'Feed case: Winter',
      'met',
      'missed by',
      'Hot oil',
      'Chilled water',
      'Product requirements: 1 met, 1 missed',
    ])
      expect([part, all.includes(part)]).toEqual([part, true]);
    for (const page of full) expect(page).toContain(`${PRELIMINARY} For review`);
  });
});

describe('a document of what is not solved', () => {
  test('prints no figure for it, says what is open, and leaves the closure open', async () => {
    const open = await solvedExample('let-down.sketch.json', (sketch) => ({
      ...sketch,
      units: sketch.units.map((u) => (u.kind === 'valve' ? { ...u, settings: {} } : u)),
    }));
    const { pages } = await readPdf(await writePdf(open, FONTS));
    const words = pages.map(wordsOf).join(' ');
    expect(words).toContain('Not solved: PV-1 needs a value');
    expect(words).toContain('open: not every unit is solved');
    const figures = streamFigures(pages);
    expect(figures.get('2')?.get('/Temperature °C')).toBe('–');
    expect(figures.get('2')?.get('/Phase')).toBe('waiting');
    expect(figures.get('1')?.get('Flows/Molar flow kmol/h')).toBe('150.000');
    expect(words).not.toMatch(/NaN|undefined|Infinity/);
  });

  test('an empty sketch makes a document too', async () => {
    const bare = await solvedExample('let-down.sketch.json', (sketch) => ({
      ...sketch,
      units: [],
      streams: [],
    }));
    const { pages } = await readPdf(await writePdf(bare, FONTS));
    const words = pages.map(wordsOf).join(' ');
    expect(words).toContain('Nothing to solve yet');
    expect(words).not.toMatch(/NaN|undefined|Infinity/);
  });
});

test.each([
  [undefined, PRELIMINARY],
  ['  ', PRELIMINARY],
  ['For review', PRELIMINARY],
  ['Not for construction', PRELIMINARY],
  ['Issued for construction', ''],
  ['Issued for detailed design', ''],
])('with the purpose %j pages are headed %j', (purpose, warning) => {
  expect(warningOf(purpose)).toBe(warning);
});
