import { strFromU8, unzipSync } from 'fflate';
import { beforeAll, describe, expect, test } from 'vitest';
import { printed } from '../../src/report/cells';
import type { ReportInput } from '../../src/report/input';
import { buildReport } from '../../src/report/model';
import { tablesOf } from '../../src/report/tables';
import type { ReportModel } from '../../src/report/types';
import { writeXlsx } from '../../src/report/xlsx';
import { type ReadSheet, readXlsx } from './readXlsx';
import { solvedExample } from './solved';

const letters = (k: number): string =>
  k < 26 ? String.fromCharCode(65 + k) : letters(Math.floor(k / 26) - 1) + letters(k % 26);

describe('the spreadsheet, read by another reader', () => {
  let input: ReportInput;
  let report: ReportModel;
  let sheets: ReadSheet[];
  let bytes: Uint8Array;
  beforeAll(async () => {
    input = await solvedExample('aromatic-condensate.sketch.json');
    report = buildReport(input);
    bytes = await writeXlsx(report);
    sheets = readXlsx(bytes);
  }, 60_000);

  test('has a sheet for every table, names unlike each other and short enough', () => {
    const names = sheets.map((s) => s.name);
    expect(names.length).toBe(1 + tablesOf(report).length);
    expect(new Set(names.map((n) => n.toLowerCase())).size).toBe(names.length);
    for (const name of names) expect(name).toMatch(/^[^\\/?*[\]:]{1,31}$/);
  });

  test('has sheets of a column named by its tag and by what they hold', () => {
    const names = sheets.map((s) => s.name);
    for (const { tag } of input.sketch.units.filter(({ kind }) => kind === 'column'))
      for (const what of ['settings', 'results', 'stages']) expect(names).toContain(`${tag} ${what}`);
  });

  test('keeps what a sheet holds in its name, however long and alike the tags are', async () => {
    const long = await solvedExample('aromatic-condensate.sketch.json', (sketch) => ({
      ...sketch,
      units: sketch.units.map((unit) =>
        unit.kind === 'column' ? { ...unit, tag: `'A [very] long/tag: of a column ${unit.tag}` } : unit,
      ),
    }));
    const names = readXlsx(await writeXlsx(buildReport(long))).map((s) => s.name);
    expect(new Set(names.map((n) => n.toLowerCase())).size).toBe(names.length);
    // Allowed by the format: at most 31 letters, none of \\ / ? * [ ] :, no apostrophe at an end.
    for (const name of names) expect(name).toMatch(/^(?!')[^\\/?*[\]:]{1,31}(?<!')$/);
    const columns = long.sketch.units.filter(({ kind }) => kind === 'column').length;
    expect(columns).toBeGreaterThan(1);
    for (const what of ['settings', 'results', 'stages'])
      expect(names.filter((name) => new RegExp(`^A very .* ${what}( \\d)?$`).test(name))).toHaveLength(
        columns,
      );
  });

  test('holds the same numbers, every digit, with the decimals of the printed row as format', () => {
    let compared = 0;
    for (const [k, [table]] of tablesOf(report).entries()) {
      const sheet = sheets[k + 1]!;
      const front = table.rows.some((row) => row.unit) ? 2 : 1;
      const heads = sheet.frozen?.rows ?? 0;
      for (const [r, row] of table.rows.entries())
        for (const [c, cell] of row.cells.entries()) {
          if (cell.is !== 'number' || row.style === 'group') continue;
          const read = sheet.cells.get(`${letters(front + c)}${heads + r + 1}`);
          expect([table.key, row.key, c, read?.value]).toEqual([table.key, row.key, c, cell.value]);
          compared += 1;
          if (cell.power) {
            expect(read?.format).toBe('0E+0');
            continue;
          }
          expect(read?.format).toMatch(/^#,##0/);
          expect(/\.(0+)$/.exec(read?.format ?? '')?.[1]?.length ?? 0).toBe(cell.decimals);
        }
    }
    expect(compared).toBeGreaterThan(2000);
  });

  test('holds how exactly each balance closes as a number, though it is printed by its size', () => {
    for (const { cells } of report.closure.rows)
      expect(printed(cells.at(-1)!)).toMatch(/^(0|\d × 10⁻?[⁰¹²³⁴⁵⁶⁷⁸⁹]+)$/);
    const sheet = sheets.find((s) => s.name === 'Overall balance and closure')!;
    const relative = [...sheet.cells].filter(
      ([address, { format }]) => /^F\d+$/.test(address) && format === '0E+0',
    );
    expect(relative).toHaveLength(report.closure.rows.length);
    for (const [, { value }] of relative) expect(value).toBeLessThanOrEqual(1e-9);
  });

  test('agrees with the results in SI: mass flow of every stream', () => {
    const sheet = sheets.find((s) => s.name === 'Stream summary')!;
    const at = [...sheet.cells]
      .find(([address, c]) => address.startsWith('A') && c.value === 'Mass flow')![0]
      .slice(1);
    for (const stream of input.sketch.streams) {
      const head = [...sheet.cells].find(
        ([address, c]) => /^[A-Z]+2$/.test(address) && c.value === stream.number,
      )!;
      const result = input.streams.get(stream.id);
      const column = head[0].replace(/\d/g, '');
      expect(sheet.cells.get(`${column}${at}`)?.value).toBeCloseTo(
        result?.state === 'solved' ? result.m_kg_s * 3600 : Number.NaN,
        6,
      );
    }
    expect(sheet.cells.get(`B${at}`)?.value).toBe('kg/h');
  });

  test('keeps heads, names and units in view', () => {
    expect(sheets.find((s) => s.name === 'Stream summary')?.frozen).toEqual({ rows: 3, columns: 2 });
    expect(sheets.find((s) => s.name === 'Assumption register')?.frozen).toEqual({ rows: 2, columns: 1 });
  });

  test('prints its tables across the long side of the paper', async () => {
    const files = unzipSync(await writeXlsx(report));
    const pages = Object.keys(files).filter((name) => /worksheets\/sheet\d+\.xml$/.test(name));
    const wide = pages.filter((name) =>
      /<pageSetup[^>]*orientation="landscape"/.test(strFromU8(files[name]!)),
    );
    expect(wide).toHaveLength(pages.length - 1);
  });

  test('comes out the same byte for byte', async () => {
    expect(Buffer.from(await writeXlsx(buildReport(input))).equals(Buffer.from(bytes))).toBe(true);
  });

  test('holds no formula, whatever the names are', async () => {
    const sly = await solvedExample('let-down.sketch.json', (sketch) => ({
      ...sketch,
      title: { title: '=HYPERLINK("x")', project: '@sum(A1)' },
      streams: sketch.streams.map((s, k) => (k === 0 ? { ...s, name: '+1 & <"quoted">' } : s)),
      units: sketch.units.map((u) => (u.kind === 'valve' ? { ...u, name: '-2+3' } : u)),
      holds: [{ no: '1', what: '=cmd' }],
    }));
    const read = readXlsx(await writeXlsx(buildReport(sly)));
    const cells = read.flatMap((sheet) => [...sheet.cells.values()]);
    const texts = cells.map((c) => c.value).filter((v) => typeof v === 'string');
    expect(cells.filter((c) => c.formula)).toEqual([]);
    expect(texts.filter((t) => /^[=+\-@\t\r]/.test(t))).toEqual([]);
    for (const text of [`'=HYPERLINK("x")`, `'@sum(A1)`, `'+1 & <"quoted">`, `'-2+3`, `'=cmd`])
      expect(texts).toContain(text);
  });
});
