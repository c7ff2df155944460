import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { columnResults } from '../../src/drawing/columnProfiles';
import { writeCsv } from '../../src/report/csv';
import type { ReportInput } from '../../src/report/input';
import { buildReport } from '../../src/report/model';
import { profilesSvg } from '../../src/report/pdf/columns';
import { pdfDocument } from '../../src/report/pdf/document';
import { writePdf } from '../../src/report/pdf/write';
import type { ColumnReport, ReportModel, Table } from '../../src/report/types';
import { openSketch } from '../../src/sketch/read';
import { columnSettings, columnSketch } from '../drawers/columnSketch';

async function solvedWith(settings: object): Promise<ReportInput> {
  const opened = openSketch(structuredClone(columnSketch(settings)));
  if (!opened.ok) throw new Error('the sketch does not open');
  const { input } = await solveSketch(opened.sketch);
  return { ...input, day: '2026-01-15' };
}

let input: ReportInput;
let report: ReportModel;
let column: ColumnReport;
beforeAll(async () => {
  input = await solvedWith(columnSettings);
  report = buildReport(input);
  const [only] = report.columns;
  if (!only) throw new Error('no column in the report');
  column = only;
});

const words = (table: Table | undefined): readonly (readonly [string, string])[] =>
  (table?.rows ?? []).map((row) => [row.label, row.cells[0]?.is === 'text' ? row.cells[0].text : '']);
const figure = (label: string): number => {
  const cell = column.figures?.rows.find((row) => row.label === label)?.cells[0];
  return cell?.is === 'number' ? cell.value : Number.NaN;
};

describe('a column in the report', () => {
  test('says in words what was set and what fixed it', () => {
    expect(column.title).toBe('C-101 Benzene column');
    expect(words(column.settings)).toEqual([
      ['Stages', '12 stages + partial condenser + reboiler'],
      ['Feed 1, stream 1', 'to stage 6'],
      ['Fixed by', 'reflux ratio 2.4'],
      ['', 'vapour distillate 38 % of stream 1, mol'],
      ['Murphree efficiency', 'not set: equilibrium stages'],
      ['Real trays', 'stages / overall efficiency (not set)'],
    ]);
  });

  test('gives the figures of the results, duties by size and direction', () => {
    const results = columnResults([...input.units.values()].find((u) => u.kind === 'column')?.results);
    expect(results?.condenserDuty_W).toBeLessThan(0);
    expect(figure('Condenser duty, removed')).toBeCloseTo(-(results?.condenserDuty_W ?? 0) / 1000, 9);
    expect(figure('Reboiler duty, added')).toBeCloseTo((results?.reboilerDuty_W ?? 0) / 1000, 9);
    // As typed: 2.4, and 1.10, 1.15, 1.30 bar.
    expect(figure('Reflux ratio')).toBeCloseTo(2.4, 9);
    expect(figure('Condenser pressure')).toBeCloseTo(1.1, 12);
    expect(figure('Pressure of stage 1')).toBeCloseTo(1.15, 12);
    expect(figure('Pressure of stage 12')).toBeCloseTo(1.3, 12);
    expect(column.figures?.rows.find((row) => row.label === 'Condenser pressure')?.unit).toBe('bar(a)');
  });

  test('has every place from the top with fractions that sum to one', () => {
    expect(column.stages?.rows.map((row) => row.label)).toEqual([
      'condenser',
      ...Array.from({ length: 12 }, (_, k) => String(k + 1)),
      'reboiler',
    ]);
    const heads = column.stages?.columns.map((c) => c.head) ?? [];
    for (const phase of ['x ', 'y '])
      for (const row of column.stages?.rows ?? []) {
        const sum = row.cells.reduce(
          (so, cell, k) => so + (heads[k]?.startsWith(phase) && cell.is === 'number' ? cell.value : 0),
          0,
        );
        expect(sum).toBeCloseTo(1, 9);
      }
  });

  test('closes over the whole column by the flows in its own stage table', () => {
    // Derived: distillate vapour and bottoms, from the ends' rows, make the feed of 60 kmol/h.
    const cell = (place: string, head: string): number => {
      const k = column.stages?.columns.findIndex((c) => c.head === head) ?? -1;
      const found = column.stages?.rows.find((row) => row.label === place)?.cells[k];
      return found?.is === 'number' ? found.value : Number.NaN;
    };
    expect(cell('condenser', 'V') + cell('reboiler', 'L')).toBeCloseTo(60, 7);
    expect(cell('condenser', 'V')).toBeCloseTo(0.38 * 60, 7);
  });

  test('writes every digit of every stage to CSV', () => {
    const lines = writeCsv(report).split('\r\n');
    const at = lines.indexOf('Column C-101 Benzene column: stages');
    expect(at).toBeGreaterThan(0);
    const first = lines[at + 4]?.split(',') ?? [];
    expect(first[0]).toBe('1');
    const results = columnResults([...input.units.values()].find((u) => u.kind === 'column')?.results);
    expect(Number(first[2])).toBeCloseTo((results?.stages.T_K[0] ?? 0) - 273.15, 11);
    expect(Number(first[6])).toBe(results?.stages.x.benzene?.[0]);
  });

  test('without an answer prints what was set and its state, no figure and no profile', async () => {
    const open = buildReport(await solvedWith({ ...columnSettings, fixedBy: [columnSettings.fixedBy[0]] }));
    expect(words(open.columns[0]?.settings)).toContainEqual(['State', 'needs a value']);
    expect(open.columns[0]?.figures).toBeUndefined();
    expect(open.columns[0]?.stages).toBeUndefined();
    expect(open.columns[0]?.profiles).toBeUndefined();
    expect(writeCsv(open)).not.toContain('Benzene column: stages');
  });

  test('names draws and efficiencies with their places', async () => {
    const drawn = columnSketch({
      ...columnSettings,
      sides: { side1: { stage: 9, phase: 'liquid', flow: { share: '10 %', of: 'feed', basis: 'mass' } } },
      murphree: [{ from: 2, to: 8, value: '70 %' }],
    });
    const opened = openSketch({
      ...drawn,
      streams: [...drawn.streams, { id: 's4', number: '4', from: ['c', 'side1'] }],
    });
    if (!opened.ok) throw new Error('the sketch does not open');
    const { input: with4 } = await solveSketch(opened.sketch);
    const [entry] = buildReport({ ...with4, day: '2026-01-15' }).columns;
    expect(words(entry?.settings)).toContainEqual([
      'Side draw 1, stream 4',
      'liquid from stage 9, 10 % of all feeds, mass',
    ]);
    expect(words(entry?.settings)).toContainEqual([
      'Murphree efficiency',
      '70 % on stages 2 to 8; elsewhere 100 %',
    ]);
    expect(entry?.profiles?.marks).toEqual([
      { at: 6, text: 'feed' },
      { at: 9, text: 'side draw' },
    ]);
  });
});

describe('a column in the PDF', () => {
  test('stands with its words, figures and the drawing of its profiles', () => {
    const content = JSON.stringify(pdfDocument(report, input).content);
    expect(content).toContain('vapour distillate 38 % of stream 1, mol');
    expect(content).toContain('Condenser duty, removed');
    if (!column.profiles) throw new Error('no profiles');
    const svg = profilesSvg(column.profiles);
    expect(content).toContain(JSON.stringify(svg).slice(1, -1));
    expect(svg).toContain('>Benzene</text>');
    expect(svg).not.toMatch(/NaN|undefined/);
  });

  test('is written the same twice, and a sketch without columns has no such section', async () => {
    const font = (name: string): string => join(import.meta.dirname, '../../public/fonts', name);
    const fonts = {
      normal: font('SourceSans3-Regular.ttf'),
      bold: font('SourceSans3-SemiBold.ttf'),
      italics: font('SourceSans3-Italic.ttf'),
    };
    const [one, two] = [await writePdf(input, fonts), await writePdf(input, fonts)];
    expect(Buffer.from(one).equals(Buffer.from(two))).toBe(true);
    const bare = { ...input, sketch: { ...input.sketch, units: [], streams: [] } };
    expect(JSON.stringify(pdfDocument(buildReport(bare), bare).content)).not.toContain('"Columns"');
  });
});
