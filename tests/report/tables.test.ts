import { beforeAll, describe, expect, test } from 'vitest';
import { decimalsFor, printed } from '../../src/report/cells';
import { tableCsv, writeCsv } from '../../src/report/csv';
import type { ReportInput } from '../../src/report/input';
import { buildReport } from '../../src/report/model';
import { tablePages } from '../../src/report/pdf/pages';
import { roundingDifference } from '../../src/report/streamNotes';
import type { ReportModel, Row, Table } from '../../src/report/types';
import { solvedExample } from './solved';

let input: ReportInput;
let report: ReportModel;
beforeAll(async () => {
  input = await solvedExample('condensate-flash.sketch.json');
  report = buildReport(input);
});

const row = (key: string): Row => {
  const found = report.streams.rows.find((r) => r.key === key);
  if (!found) throw new Error(`no row ${key}`);
  return found;
};
const column = (number: string): number => report.streams.columns.findIndex((c) => c.head === number);

describe('the stream summary', () => {
  test('lists every stream once, in the order of the numbers', () => {
    expect(report.streams.columns.map((c) => c.head)).toEqual(
      Array.from({ length: 12 }, (_, k) => String(k + 1)),
    );
  });

  test('gives the feed as it was typed: 220 kmol/h, 35 degC, 60 bar', () => {
    const k = column('1');
    expect(row('n').cells[k]).toMatchObject({ value: expect.closeTo(220, 9) });
    expect(row('T').cells[k]).toMatchObject({ value: expect.closeTo(35, 9) });
    expect(row('P').cells[k]).toMatchObject({ value: expect.closeTo(60, 9) });
    // Derived: 60 bar(a) less the standard atmosphere, 1.01325 bar.
    expect(row('Pg').cells[k]).toMatchObject({ value: expect.closeTo(58.98675, 9) });
    expect(row('Pg').unit).toBe('bar(g)');
    expect(row('P').unit).toBe('bar(a)');
  });

  test('takes totals from unrounded values and says by how much the printed figures differ', () => {
    const k = column('9');
    const total = row('m.total').cells[k];
    const parts = report.streams.rows.filter((r) => r.key.startsWith('m.') && r.key !== 'm.total');
    const exact = parts.reduce((sum, r) => sum + (r.cells[k]?.is === 'number' ? r.cells[k].value : 0), 0);
    expect(total?.is === 'number' ? total.value : 0).toBeCloseTo(exact, 6);
    const { value, decimals } = roundingDifference(report.streams.rows, 'm');
    // Each of the 12 figures and the total is off by half its last place at most.
    expect(value).toBeLessThanOrEqual(6.5 * 10 ** -decimals + 1e-12);
    expect(report.streams.notes[0]).toContain(`${value.toFixed(decimals)} kg/h`);
  });

  test('prints a trace as smaller than the last place, an absent chemical as a dash', () => {
    expect(printed(row('z.nitrogen').cells[column('9')] ?? { is: 'absent' })).toBe('<0.01');
    expect(printed({ is: 'absent' })).toBe('–');
  });

  test('keeps one number of decimals along a row', () => {
    for (const { cells, key } of report.streams.rows) {
      const places = new Set(cells.flatMap((c) => (c.is === 'number' ? [c.decimals] : [])));
      expect([key, places.size <= 1]).toEqual([key, true]);
    }
  });

  test('adds up the phases: vapour and liquid mass make the stream', () => {
    const k = column('6');
    const of = (key: string): number => {
      const cell = row(key).cells[k];
      return cell?.is === 'number' ? cell.value : 0;
    };
    expect(of('vapour.m') + of('liquid.m')).toBeCloseTo(of('m'), 6);
  });

  test('shows what is not solved in words and prints no figures for it', async () => {
    const open = buildReport(
      await solvedExample('let-down.sketch.json', (sketch) => ({
        ...sketch,
        units: sketch.units.map((u) => (u.kind === 'valve' ? { ...u, settings: {} } : u)),
      })),
    );
    expect(open.state.solved).toBe(false);
    expect(open.state.text).toContain('PV-1 needs a value');
    expect(open.closure.rows).toEqual([]);
    const n = open.streams.rows.find((r) => r.key === 'n');
    expect(n?.cells[open.streams.columns.findIndex((c) => c.head === '2')]).toEqual({ is: 'absent' });
  });
});

describe('decimals of a printed row', () => {
  test.each([
    [[220, 116.8], 6, 2, 6, 3],
    [[11640.67], 7, 2, 6, 2],
    [[0.0021], 5, 2, 6, 6],
    [[undefined, 0], 5, 2, 6, 2],
  ])('for %j at %d figures between %d and %d are %d', (values, figures, least, most, wanted) => {
    expect(decimalsFor(values as (number | undefined)[], figures, least, most)).toBe(wanted);
  });
});

describe('the CSV', () => {
  test('carries every digit: the text reads back as the same double', () => {
    const line = tableCsv(report.streams).find((l) => l.startsWith('Mass flow,'));
    const numbers = line?.split(',').slice(2).map(Number);
    const cells = row('m').cells.map((c) => (c.is === 'number' ? c.value : Number.NaN));
    expect(numbers).toEqual(cells);
  });

  test('guards text that a spreadsheet would take for a formula', async () => {
    const sly = await solvedExample('let-down.sketch.json', (sketch) => ({
      ...sketch,
      title: { title: '=HYPERLINK("x")', project: '@sum' },
      streams: sketch.streams.map((s, k) => (k === 0 ? { ...s, name: '+1, "quoted"' } : s)),
    }));
    const text = writeCsv(buildReport(sly));
    expect(text).toContain(`"'=HYPERLINK(""x"")"`);
    expect(text).toContain(`Project,'@sum`);
    expect(text).toContain(`"'+1, ""quoted"""`);
    expect(text.startsWith('\ufeff')).toBe(true);
    expect(text.split('\r\n').every((l) => !/^[=@]/.test(l))).toBe(true);
  });
});

describe('pages of a wide, long table', () => {
  const table = (columns: number, groups: readonly number[]): Table => ({
    key: 't',
    title: 't',
    notes: [],
    columns: Array.from({ length: columns }, (_, k) => ({ key: `${k}`, head: `${k}`, align: 'right' })),
    rows: groups.flatMap((length, g): Row[] => [
      { key: `g${g}`, label: `Group ${g}`, cells: [], style: 'group' },
      ...Array.from({ length }, (_, k): Row => ({ key: `${g}.${k}`, label: `${g}.${k}`, cells: [] })),
    ]),
  });

  test.each([
    [80, [40, 40]],
    [6, [3]],
    [17, [48, 3, 60]],
    [1, [49, 1, 1, 49]],
  ])(
    'with %d columns and groups of %j hold every row and column once and orphan no heading',
    (columns, groups) => {
      const whole = table(columns, groups);
      const pages = tablePages(whole, { columns: 16, room: 50, last: 47, height: () => 1 });
      const bands = new Map<number, Row[]>();
      for (const page of pages) {
        expect(page.columns.length).toBeLessThanOrEqual(16);
        expect(page.rows.length).toBeLessThanOrEqual(50);
        expect(page.rows.at(-1)?.style).not.toBe('group');
        const first = page.columns[0] ?? -1;
        bands.set(first, [
          ...(bands.get(first) ?? []),
          ...page.rows.filter((r) => !r.label.endsWith('(continued)')),
        ]);
      }
      expect([...bands.keys()]).toEqual(Array.from({ length: Math.ceil(columns / 16) }, (_, k) => k * 16));
      for (const rows of bands.values()) expect(rows).toEqual(whole.rows);
      // Notes follow on the very last page.
      expect(pages.at(-1)?.rows.length).toBeLessThanOrEqual(47);
    },
  );

  test('groups stay in one piece where that takes no more pages, and only there', () => {
    const parts = (groups: readonly number[]): string[] =>
      tablePages(table(3, groups), { columns: 16, room: 50, last: 47, height: () => 1 }).map(({ rows }) =>
        rows.flatMap((row) => (row.style === 'group' ? [row.label.slice(6)] : [])).join(', '),
      );
    // Derived: 21 and 21 rows of 50, then 21; in one run 50 and 13, no page less.
    expect(parts([20, 20, 20])).toEqual(['0, 1', '2']);
    // 31 and 31 and 31 rows are three pages in one piece each, but two pages hold them with a cut.
    expect(parts([30, 30, 30])).toEqual(['0, 1', '1 (continued), 2']);
  });

  test('no page begins or ends with fewer than three rows of a group that goes on', () => {
    for (let before = 0; before <= 46; before += 1)
      for (let length = 1; length <= 60; length += 1) {
        const whole = table(3, [before, length, 7]);
        for (const { rows } of tablePages(whole, { columns: 16, room: 50, last: 47, height: () => 1 })) {
          const heads = rows.flatMap((row, k) => (row.style === 'group' ? [k] : []));
          heads.forEach((at, k) => {
            const shown = (heads[k + 1] ?? rows.length) - at - 1;
            const all = [before, length, 7][Number(/\d/.exec(rows[at]?.label ?? '')?.[0])] ?? 0;
            expect([before, length, shown >= Math.min(3, all)]).toEqual([before, length, true]);
          });
        }
      }
  });
});

test('pressures of the table keep the unit of one’s own, absolute and gauge', () => {
  const own = { ...input.sketch, display: { ...input.sketch.display, units: { pressure: 'psi' } } };
  const csv = writeCsv(buildReport({ ...input, sketch: own }));
  const units = csv.split('\r\n').filter((line) => line.startsWith('Pressure,'));
  expect(units.map((line) => line.split(',')[1])).toEqual(['psi(a)', 'psi(g)']);
});

test('pairs stand under the model that they belong to', async () => {
  expect(report.pairs.notes).toEqual([
    'Peng–Robinson, 1976 alpha; liquid volumes corrected, for density only. Attraction of a pair: √(a₁ a₂) (1 − k).',
  ]);
  const changed = async (model: object): Promise<readonly string[]> =>
    buildReport(
      await solvedExample('let-down.sketch.json', (s) => ({ ...s, model: { ...s.model, ...model } })),
    ).pairs.notes;
  expect(await changed({ alpha: '1978', liquidVolume: 'cubic' })).toEqual([
    'Peng–Robinson, 1978 alpha; liquid volumes those of the equation. Attraction of a pair: √(a₁ a₂) (1 − k).',
  ]);
  const [raoult] = await changed({ kind: 'raoult', pairs: [] });
  expect(raoult).toMatch(/: no pair parameters\.$/);
});
