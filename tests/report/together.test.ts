import { readdirSync } from 'node:fs';
import pdfmake from 'pdfmake';
import { beforeAll, describe, expect, test } from 'vitest';
import { text } from '../../src/report/cells';
import type { ReportInput } from '../../src/report/input';
import { buildReport } from '../../src/report/model';
import { pdfDocument } from '../../src/report/pdf/document';
import { PAPERS } from '../../src/report/pdf/paper';
import { endsOf, rowHeight, setRows } from '../../src/report/pdf/together';
import { writePdf } from '../../src/report/pdf/write';
import { SECTIONS } from '../../src/report/sections';
import type { ReportModel } from '../../src/report/types';
import type { SketchUnit } from '../../src/sketch/types';
import { solvedGenerated } from './generated';
import { FONTS, linesOf, type Placed, type ReadPage, readPdf, wordsOf } from './readPdf';
import { EXAMPLES, solvedExample } from './solved';

type PaperName = 'A3' | 'A4';

/** The strip at the foot of a page lies below this [pt]. */
const STRIP = 48;
const bare = (text: string): string => text.replace(/\s/g, '');
const textOf = (line: readonly Placed[]): string => bare(line.map((t) => t.text).join(''));

/** Headings of a page, each with the lines below it down to the next one. */
function partsOf(page: ReadPage, paper: PaperName): { readonly title: string; readonly lines: Placed[][] }[] {
  const { heading } = PAPERS[paper];
  const parts: { readonly title: string; readonly lines: Placed[][] }[] = [];
  for (const line of linesOf({ ...page, texts: page.texts.filter((t) => t.y > STRIP) })) {
    if (Math.abs((line[0]?.size ?? 0) - heading) < 0.2) parts.push({ title: textOf(line), lines: [] });
    else parts.at(-1)?.lines.push(line);
  }
  return parts;
}

/** Whether a line begins with this label, or with as much of it as stands on one line. */
function begins(line: readonly Placed[], label: string, left: number): boolean {
  const [first] = line;
  if (!first || Math.abs(first.x - left) > 1) return false;
  const [said, wanted] = [bare(first.text), bare(label)];
  return wanted.startsWith(said) || said.startsWith(wanted);
}

/** Rows of a table on each page where it stands, found one after the other by their labels. */
function rowsOnPages(
  pages: readonly ReadPage[],
  { title, labels }: { readonly title: string; readonly labels: readonly string[] },
  paper: PaperName,
): number[] {
  let next = 0;
  return pages.flatMap((page) => {
    const part = partsOf(page, paper).find((p) => p.title === bare(title));
    if (!part) return [];
    const before = next;
    for (const line of part.lines)
      if (next < labels.length && begins(line, labels[next] ?? '', PAPERS[paper].margin.left + 4)) next += 1;
    return [next - before];
  });
}

/** Every flowing table of the document with the labels of its rows. */
const tablesOf = (
  report: ReportModel,
): readonly { readonly title: string; readonly labels: readonly string[] }[] => [
  ...(
    [
      'revisions',
      'basis',
      'utilities',
      'duties',
      'powers',
      'units',
      'closure',
      'requirements',
      'limits',
      'assumptions',
      'holds',
      'pairs',
    ] as const
  ).map((key) => ({
    title: report[key].title,
    labels: report[key].rows.map((row) => (row.unit ? `${row.label}, ${row.unit}` : row.label)),
  })),
  { title: 'Sources', labels: report.sources },
  { title: 'Cautions', labels: report.cautions },
];

/** Tables whose rows are lost, or of which a page holds fewer than three where more would have been possible. */
function faultsOf(pages: readonly ReadPage[], report: ReportModel, paper: PaperName): unknown[] {
  return tablesOf(report).flatMap((table) => {
    const counts = rowsOnPages(pages, table, paper);
    const all = counts.reduce((sum, n) => sum + n, 0);
    const least = Math.min(3, table.labels.length);
    return all === table.labels.length && counts.every((n) => n >= least) ? [] : [[table.title, counts]];
  });
}

/** Headings with nothing below them; pages with nothing on them. Heads of a table are counted with its rows. */
function lonely(pages: readonly ReadPage[], paper: PaperName): unknown[] {
  return pages.slice(1).flatMap((page, k) => {
    const parts = partsOf(page, paper);
    const alone = parts.filter((part) => part.lines.length === 0);
    const said = linesOf({ ...page, texts: page.texts.filter((t) => t.y > STRIP) }).length;
    return [...alone.map((part) => [k + 2, part.title]), ...(said < 3 ? [[k + 2, 'an empty page']] : [])];
  });
}

describe('rows that stay together', () => {
  test.each([
    // Few rows stay whole; more keep three at either end.
    [[10, 10, 10], 100, { first: 3, last: 0 }],
    [[10, 10, 10, 10, 10], 100, { first: 5, last: 0 }],
    [[10, 10, 10, 10, 10, 10], 100, { first: 3, last: 3 }],
    [Array.from({ length: 60 }, () => 10), 100, { first: 3, last: 3 }],
    // Five that are higher than a page are parted three and two, four in the middle.
    [[30, 30, 30, 30, 30], 100, { first: 3, last: 2 }],
    [[30, 30, 30, 30], 100, { first: 2, last: 2 }],
    // Three that are higher than a page cannot stay together.
    [[40, 40, 40, 40, 40, 40], 100, { first: 2, last: 2 }],
    [[60, 60], 100, { first: 1, last: 1 }],
    [[], 100, { first: 0, last: 0 }],
  ])('of heights %j in a room of %d pt are %j', (heights, room, ends) => {
    expect(endsOf(heights, room)).toEqual(ends);
  });

  test('a row higher than its share of a page goes on in rows of equal height, no line lost', () => {
    const lines = Array.from({ length: 47 }, (_, k) => `line ${k + 1}`);
    const rows = setRows([{ lines: ['label'] }, { lines }], 8, rowHeight(20, 8));
    expect(rows.map((row) => row.goesOn)).toEqual([false, true, true]);
    const texts = rows.map((row) => (row.cells[1] as { readonly text: string }).text);
    expect(texts.join('\n').split('\n')).toEqual(lines);
    expect(texts.map((text) => text.split('\n').length)).toEqual([16, 16, 15]);
    expect(rows.map((row) => (row.cells[0] as { readonly text: string }).text)).toEqual(['label', '', '']);
  });
});

describe.each(['A3', 'A4'] as const)('a table of any length on %s', (paper) => {
  let input: ReportInput;
  beforeAll(async () => {
    input = await solvedGenerated({ streams: 61, chemicals: 4 });
  });

  /** The document of the first `count` units, the table of units alone with what always stays. */
  const withUnits = (count: number): ReportInput => {
    const units = input.sketch.units.filter((u) => u.kind !== 'feed').slice(0, count);
    const named = units.map(
      (unit, k): SketchUnit => ({ ...unit, name: 'Heats the train once more '.repeat(1 + ((k * 5) % 7)) }),
    );
    const withoutSections = SECTIONS.map((s) => s.key).filter((key) => key !== 'units');
    return { ...input, sketch: { ...input.sketch, units: named, documents: { paper, withoutSections } } };
  };

  test('never leaves fewer than three rows alone, whatever stands above it and however many there are', async () => {
    const faults: unknown[] = [];
    const seen = new Set<number>();
    // The larger paper cuts tables less often: every third count shows the same.
    for (let count = 1; count <= 60; count += paper === 'A4' ? 1 : 3) {
      const of = withUnits(count);
      const { pages } = await readPdf(await writePdf(of, FONTS));
      const table = { title: 'Units', labels: buildReport(of).units.rows.map((row) => row.label) };
      expect(table.labels).toHaveLength(count);
      if (!wordsOf(pages[0] as ReadPage).includes('Contents')) faults.push([count, 'first page']);
      const counts = rowsOnPages(pages, table, paper);
      seen.add(counts.length);
      if (counts.reduce((sum, n) => sum + n, 0) !== count || counts.some((n) => n < Math.min(3, count)))
        faults.push([count, counts]);
      faults.push(...lonely(pages, paper).map((fault) => [count, fault]));
    }
    expect(faults).toEqual([]);
    // The test would prove nothing if no table had gone over pages.
    expect(seen.size).toBeGreaterThan(1);
  }, 240_000);
});

describe.each(['A3', 'A4'] as const)('on %s nothing is lost', (paper) => {
  const words = (stem: string, count: number): string[] =>
    Array.from({ length: count }, (_, k) => `${stem}${k + 1}`);

  test('of texts longer than a page, whether they stand in a value or in a label', async () => {
    const notes = words('note', 4000);
    const name = words('case', 900);
    const input = await solvedExample('let-down.sketch.json', (sketch) => ({
      ...sketch,
      documents: { paper, withoutSections: ['sheet', 'streams', 'duties', 'units'] },
      designBasis: { notes: notes.join(' '), cases: [{ name: name.join(' '), text: 'short' }] },
    }));
    const { pages } = await readPdf(await writePdf(input, FONTS));
    const said = new Set(pages.flatMap((page) => page.texts.flatMap((t) => t.text.split(' '))));
    expect([...notes, ...name].filter((word) => !said.has(word))).toEqual([]);
    expect(pages.map(wordsOf).join(' ')).toContain('Notes (continued)');
    for (const { texts } of pages) for (const t of texts) expect([t.text, t.y > 0]).toEqual([t.text, true]);
    expect(lonely(pages, paper)).toEqual([]);
  }, 60_000);

  test.each([4, 12, 40])(
    'of a column with %d lines of settings',
    async (count) => {
      const input = await solvedExample('aromatic-condensate.sketch.json', (sketch) => ({
        ...sketch,
        documents: { paper, withoutSections: ['sheet', 'streams', 'duties', 'units'] },
      }));
      const report = buildReport(input);
      const columns = report.columns.map((column) => ({
        ...column,
        settings: {
          ...column.settings,
          rows: words('setting', count).map((label) => ({ key: label, label, cells: [text(`as-${label}`)] })),
        },
      }));
      const bytes = await pdfmake.createPdf(pdfDocument({ ...report, columns }, input)).getBuffer();
      const { pages } = await readPdf(bytes);
      const all = pages.map(wordsOf).join(' ');
      const times = (said: string): number => all.split(said).length - 1;
      for (let k = 1; k <= count; k += 1) expect([k, times(`as-setting${k} `)]).toEqual([k, columns.length]);
      const figures = columns.flatMap((column) => column.figures?.rows ?? []);
      expect(figures.length).toBeGreaterThan(20);
      for (const { label } of figures) expect([label, times(label) > 0]).toEqual([label, true]);
      expect(times('Liquid, mol/mol')).toBe(columns.length);
      expect(lonely(pages, paper)).toEqual([]);
    },
    60_000,
  );
});

/** Lines of the contents that name another page than the one where the heading first stands, or that no link leads to. */
function wrongContents({ pages, places }: Awaited<ReturnType<typeof readPdf>>, paper: PaperName): unknown[] {
  const { margin, inner, text } = PAPERS[paper];
  const edge = margin.left + 0.42 * inner.w;
  const isHeading = (line: readonly Placed[]): boolean => (line[0]?.size ?? 0) > text + 1.8;
  const contents = pages.find((page) =>
    linesOf(page).some((l) => isHeading(l) && /^Contents/.test(textOf(l))),
  );
  const listed = linesOf({ ...contents!, texts: contents!.texts.filter((t) => t.right < edge + 1) }).filter(
    (line) => line.length > 1 && /^\d+$/.test(line.at(-1)!.text) && line.at(-1)!.right > edge - 12,
  );
  const wrong = listed.flatMap((line) => {
    const title = textOf(line.slice(0, -1));
    const page = Number(line.at(-1)?.text);
    // The drawing is its own heading.
    if (title === 'Processflowdiagram')
      return page === 1 && places.get('sheet')?.page === 1 ? [] : [[title, page]];
    const standing = pages.flatMap((p, k) =>
      linesOf(p).flatMap((l) =>
        isHeading(l) && textOf(l) === title ? [{ page: k + 1, y: l[0]?.y ?? 0 }] : [],
      ),
    )[0];
    const isLed = [...places.values()].some(
      (place) => place.page === page && standing && place.y > standing.y && place.y < standing.y + 22,
    );
    return standing?.page === page && isLed ? [] : [[title, page, standing]];
  });
  return listed.length > 8 ? wrong : [['too few', listed.length]];
}

const FILES = readdirSync(EXAMPLES).filter((name) => name.endsWith('.sketch.json'));

describe.each(FILES.flatMap((file) => [[file, 'A3'] as const, [file, 'A4'] as const]))(
  'the summary of %s on %s',
  (file, paper) => {
    test('leaves no row, no heading and no page alone, and its contents name the right pages', async () => {
      const input = await solvedExample(file, (sketch) => ({ ...sketch, documents: { paper } }));
      const read = await readPdf(await writePdf(input, FONTS));
      expect(faultsOf(read.pages, buildReport(input), paper)).toEqual([]);
      expect(lonely(read.pages, paper)).toEqual([]);
      expect(wrongContents(read, paper)).toEqual([]);
    }, 60_000);
  },
);

describe.each([
  [{ streams: 22, chemicals: 40 }, 'A4'],
  [{ streams: 80, chemicals: 4, long: true }, 'A3'],
  [{ streams: 80, chemicals: 40 }, 'A4'],
] as const)('the summary of %o on %s', (what, paper) => {
  test('leaves no row, no heading and no page alone, and its contents name the right pages', async () => {
    const solved = await solvedGenerated(what);
    const input = { ...solved, sketch: { ...solved.sketch, documents: { paper } } };
    const read = await readPdf(await writePdf(input, FONTS));
    expect(faultsOf(read.pages, buildReport(input), paper)).toEqual([]);
    expect(lonely(read.pages, paper)).toEqual([]);
    expect(wrongContents(read, paper)).toEqual([]);
  }, 120_000);
});
