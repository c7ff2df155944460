import { unzipSync, type Zippable, zipSync } from 'fflate';
import writeXlsxFile, { type CellObject, type Sheet, type Row as SheetRow } from 'write-excel-file/universal';
import { guarded } from './guard';
import { tablesOf } from './tables';
import type { Cell, ReportModel, Row, Table } from './types';

type Book = Sheet<Blob>[];
type Line = SheetRow;

const words = (value: string, more: Partial<CellObject> = {}): CellObject => ({
  value: guarded(value),
  type: String,
  ...more,
});
const HEAD: Partial<CellObject> = {
  fontWeight: 'bold',
  bottomBorderStyle: 'thin',
  wrap: true,
  alignVertical: 'top',
};
const SUB: Partial<CellObject> = { bottomBorderStyle: 'thin', wrap: true, alignVertical: 'top' };
const NOTE: Partial<CellObject> = { textColor: '#5F686D' };

/** "0.00": as many decimals as the printed row has; the cell holds every digit. */
const format = (decimals: number): string => (decimals > 0 ? `#,##0.${'0'.repeat(decimals)}` : '#,##0');

function figureOf(cell: Cell | undefined, row: Row): CellObject | null {
  const bold: Partial<CellObject> =
    row.style === 'total' || (cell && cell.is !== 'absent' && cell.bold) ? { fontWeight: 'bold' } : {};
  if (!cell || cell.is === 'absent') return null;
  if (cell.is === 'text')
    return cell.text === ''
      ? null
      : words(cell.text, { ...bold, alignVertical: 'top', ...(cell.text.length > 60 ? { wrap: true } : {}) });
  return { value: cell.value, type: Number, format: cell.power ? '0E+0' : format(cell.decimals), ...bold };
}

const LONGEST = 31;
const plain = (name: string): string =>
  name
    .replace(/[\\/?*[\]:]/g, ' ')
    .replace(/\s+/g, ' ')
    .replace(/^[' ]+|[' ]+$/g, '');

/**
 * A sheet's name: at most 31 letters, none that the format forbids, no two alike. What is too long is cut before its ending,
 * which says what the sheet holds.
 */
function sheetName(whole: string, ending: string, taken: Set<string>): string {
  for (let k = 1; ; k += 1) {
    const end = [plain(ending), k === 1 ? '' : String(k)].filter(Boolean).join(' ');
    const stem = plain(plain(whole).slice(0, LONGEST - (end === '' ? 0 : end.length + 1)));
    const name = [stem, end].filter(Boolean).join(' ') || 'Sheet';
    if (taken.has(name.toLowerCase())) continue;
    taken.add(name.toLowerCase());
    return name;
  }
}

const width = (texts: readonly string[], least: number, most: number): number =>
  Math.min(
    most,
    texts.reduce((w, text) => Math.max(w, text.length + 2), least),
  );

/** One table: title, heads with units, rows of figures; heads and row names stay in view. */
function tableSheet(table: Table, rowHead: string, taken: Set<string>): Book[number] {
  const hasSub = table.columns.some((c) => c.sub);
  const hasUnit = table.rows.some((row) => row.unit);
  const front = (first: CellObject | null, unit: CellObject | null): Line =>
    hasUnit ? [first, unit] : [first];
  const align = (k: number) => ({ align: table.columns[k]?.align ?? 'left' }) as const;
  const heads: Line[] = [
    [words(table.title, { fontWeight: 'bold', fontSize: 13 })],
    [
      ...front(words(rowHead, HEAD), words('Unit', HEAD)),
      ...table.columns.map((c, k) => words(c.head, { ...HEAD, ...align(k) })),
    ],
    ...(hasSub
      ? [
          [
            ...front(words('Description', HEAD), words('', HEAD)),
            ...table.columns.map((c, k) => words(c.sub ?? '', { ...SUB, ...align(k) })),
          ],
        ]
      : []),
  ];
  const rows = table.rows.map(
    (row): Line => [
      ...front(
        words(row.label, { fontWeight: row.style ? 'bold' : undefined, alignVertical: 'top' } as CellObject),
        row.unit ? words(row.unit, NOTE) : null,
      ),
      ...table.columns.map((_, k) => figureOf(row.cells[k], row)),
    ],
  );
  const notes = table.notes.map((note): Line => [words(note, NOTE)]);
  return {
    sheet: sheetName(...(table.short ?? [table.title.replace(/ \(.*\)$/, ''), '']), taken),
    data: [...heads, ...rows, ...(notes.length > 0 ? [[], ...notes] : [])],
    stickyRowsCount: heads.length,
    stickyColumnsCount: hasUnit ? 2 : 1,
    orientation: 'landscape',
    columns: [
      { width: width([rowHead, ...table.rows.map((row) => row.label)], 10, 40) },
      ...(hasUnit ? [{ width: 10 }] : []),
      ...table.columns.map((c, k) => ({
        width:
          c.align === 'right'
            ? width([c.head], 13, 24)
            : width([c.head, ...table.rows.map((row) => textIn(row.cells[k]))], 12, 70),
      })),
    ],
  };
}

const textIn = (cell: Cell | undefined): string => (cell?.is === 'text' ? cell.text : '');

function frontSheet(report: ReportModel, taken: Set<string>): Book[number] {
  const { strip } = report;
  const lines: (readonly [string, string])[] = [
    ...report.title.map(({ label, text }) => [label, text] as const),
    ['State', report.state.text],
    ['Fingerprint of the file', strip.fingerprint],
    ['Measures', strip.measures.replace(/^Measures: /, '')],
    ['Program', strip.version],
  ];
  return {
    sheet: sheetName('Title', '', taken),
    data: [
      [words('Stream summary (heat and material balance)', { fontWeight: 'bold', fontSize: 14 })],
      ...[strip.warning, strip.purpose, strip.margin]
        .filter(Boolean)
        .map((text): Line => [words(text, { fontWeight: 'bold' })]),
      [],
      ...lines.map(([label, text]): Line => [words(label, NOTE), words(text)]),
      [],
      ...report.cautions.map((text): Line => [words(text)]),
      ...report.sources.map((text): Line => [words(text, NOTE)]),
    ],
    columns: [{ width: 26 }, { width: 60 }],
  };
}

/** A moment before which no ZIP file can be dated, in whatever time zone: two runs give the same bytes. */
const NO_TIME = new Date(1980, 0, 1);

/**
 * The tables of the report as a spreadsheet: numbers with every digit and a number format, units and heads that stay in
 * view, no formulas. The same report gives the same bytes.
 */
export async function writeXlsx(report: ReportModel): Promise<Uint8Array> {
  const taken = new Set<string>();
  const sheets: Book = [
    frontSheet(report, taken),
    ...tablesOf(report).map(([table, rowHead]) => tableSheet(table, rowHead, taken)),
  ];
  const blob = await writeXlsxFile(sheets).toBlob();
  const files = unzipSync(new Uint8Array(await blob.arrayBuffer()));
  const still: Zippable = Object.fromEntries(
    Object.keys(files)
      .sort(
        (a, b) =>
          Number(b === '[Content_Types].xml') - Number(a === '[Content_Types].xml') || (a < b ? -1 : 1),
      )
      .map((name) => [name, [files[name]!, { mtime: NO_TIME, level: 6 }]]),
  );
  return zipSync(still);
}
