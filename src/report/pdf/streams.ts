import type { Content, TableCell } from 'pdfmake/interfaces';
import { measureText } from '../../drawing/metrics';
import { FONT, PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { Row, Table } from '../types';
import { marked } from './contents';
import { tablePages } from './pages';
import { LINE, type Paper } from './paper';
import { ruled, valueCell } from './tables';
import { linesOf, wrapped } from './wrap';

/** Most streams side by side, whatever the paper. */
const MOST_STREAMS = 16;
const PAD = 1;
/** Room beside a cell's text, left and right together. */
const SIDES = 6;
const DIAMOND = 22;
/** What the heavier rules of a page take beyond hairlines, generously. */
const HEAVIER = 10;
/** Rows that begin a block without a heading of its own. */
const BLOCKS: readonly string[] = ['T', 'MW', 'liquid2'];

interface Measures {
  readonly size: number;
  readonly label: number;
  readonly unit: number;
  readonly column: number;
  readonly columns: number;
  /** Head of a page: heading, diamonds, descriptions [pt]. */
  readonly head: number;
}

const widest = (texts: readonly string[], size: number, weight: 400 | 600 = 400): number =>
  texts.reduce((most, text) => Math.max(most, measureText(text, size, weight)), 0);

/** Column widths from what stands in them: no figure runs into its neighbour, names wrap. */
function measured(table: Table, paper: Paper): Measures {
  const size = paper.streams;
  const clamp = (value: number, least: number, most: number): number =>
    Math.min(most, Math.max(least, value));
  const widestLabel = 0.17 * paper.inner.w;
  const label = clamp(
    widest(
      table.rows.map((row) => row.label),
      size,
      600,
    ) + 2,
    70,
    widestLabel,
  );
  const unit = clamp(
    widest(
      table.rows.map((row) => row.unit ?? ''),
      size,
    ) + 2,
    30,
    70,
  );
  const figures = table.rows.flatMap((row) =>
    row.cells.map((cell) => (cell.is === 'number' ? measureText(printed(cell), size, 600) : 0)),
  );
  const room = paper.inner.w - label - unit - 2 * SIDES;
  const least = Math.max(44, figures.reduce((a, b) => Math.max(a, b), 0) + 1);
  const most = Math.max(1, Math.min(MOST_STREAMS, Math.floor(room / (least + SIDES))));
  // As many on each page, rather than full pages and a rest.
  const columns = Math.ceil(table.columns.length / Math.ceil(table.columns.length / most)) || 1;
  const shown = Math.min(columns, Math.max(1, table.columns.length));
  const column = Math.min(84, room / shown - SIDES);
  const lines = table.columns.reduce((n, c) => Math.max(n, linesOf(c.sub ?? '', column, size).length), 1);
  const head = paper.heading * LINE + 6 + DIAMOND + 2 * PAD + lines * size * LINE + 2 * PAD + HEAVIER;
  return { size, label, unit, column, columns, head };
}

const lineCount = (text: string, width: number, size: number, weight: 400 | 600): number =>
  linesOf(text, width, size, weight).length;

/** What a row takes on the page [pt]. */
function heightOf(row: Row, { size, label, unit, column }: Measures): number {
  const lines = [
    lineCount(row.label, label, row.style === 'group' ? size + 1 : size, 600),
    lineCount(row.unit ?? '', unit, size, 400),
    ...row.cells.map((cell) => (cell.is === 'text' ? lineCount(cell.text, column, size, 400) : 1)),
  ];
  const most = lines.reduce((a, b) => Math.max(a, b), 1);
  return most * (row.style === 'group' ? size + 1 : size) * LINE + 2 * PAD + 0.35;
}

/** Number in a diamond, drawn; the number itself stays text. */
const diamond = (number: string): TableCell => ({
  svg: `<svg xmlns="http://www.w3.org/2000/svg" width="22" height="22" viewBox="0 0 22 22"><path d="M11 0.8L21.2 11L11 21.2L0.8 11Z" fill="#FFFFFF" stroke="${PRINT.ink}" stroke-width="0.9"/><text x="11" y="${number.length > 2 ? 13.6 : 14.2}" font-family="${FONT}" font-weight="600" font-size="${number.length > 3 ? Math.min(6, 22 / number.length) : number.length > 2 ? 7.5 : 9}" text-anchor="middle" fill="${PRINT.ink}">${number.replace(/[&<>"]/g, '')}</text></svg>`,
  width: DIAMOND,
  alignment: 'right',
});

const notesHeight = (table: Table, paper: Paper): number =>
  table.notes.reduce((sum, note) => sum + 5 + linesOf(note, paper.inner.w, 8).length * 8 * LINE, 0);

/** The stream table in pages: streams in groups with their heads, rows cut where a page ends, never right under a group's head. */
export function streamPages(table: Table, paper: Paper): Content[] {
  const at = measured(table, paper);
  const room = paper.inner.h - at.head;
  const heights = new Map(table.rows.map((row) => [row, heightOf(row, at)]));
  const pages = tablePages(table, {
    columns: at.columns,
    room,
    last: room - notesHeight(table, paper),
    height: (row) => heights.get(row) ?? heightOf(row, at),
  });
  const seen = new Set<number>();
  return [
    ...pages.map((page, k): Content => {
      const body = [
        ...headRows(table, page.columns, at, seen),
        ...page.rows.map((row) => rowCells(row, page.columns, at)),
      ];
      return {
        stack: [
          {
            text: k === 0 ? table.title : `${table.title} (continued)`,
            bold: true,
            fontSize: paper.heading,
            margin: [0, 0, 0, 6],
            ...(k === 0 ? marked(table) : {}),
          },
          {
            table: {
              headerRows: 2,
              widths: [at.label, at.unit, ...page.columns.map(() => at.column)],
              body,
              dontBreakRows: true,
            },
            layout: blocked(page.rows),
            fontSize: at.size,
          },
        ],
        pageBreak: 'before',
      } as Content;
    }),
    ...table.notes.map(
      (note): Content => ({
        text: wrapped(note, paper.inner.w, 8),
        fontSize: 8,
        color: PRINT.ink2,
        margin: [0, 5, 0, 0],
      }),
    ),
  ];
}

/** Blocks of rows are told apart by a heavier rule above them. */
function blocked(rows: readonly Row[]): ReturnType<typeof ruled> {
  const plain = ruled(2, rows.length, PAD, 1);
  const begins = (i: number): boolean => {
    const row = rows[i - 2];
    return row?.style === 'group' || row?.style === 'total' || BLOCKS.includes(row?.key ?? '');
  };
  return {
    ...plain,
    paddingLeft: () => SIDES / 2,
    paddingRight: () => SIDES / 2,
    hLineColor: (i) => (i === 2 || i === 2 + rows.length ? PRINT.ink : begins(i) ? PRINT.hair : PRINT.rule),
    hLineWidth: (i) => (i === 2 || i === 2 + rows.length ? 0.9 : i === 0 ? 0 : begins(i) ? 0.6 : 0.35),
  };
}

function headRows(table: Table, columns: readonly number[], at: Measures, seen: Set<number>): TableCell[][] {
  const { size, column } = at;
  const description = (c: number): TableCell => {
    const first = !seen.has(c);
    seen.add(c);
    return {
      text: wrapped(table.columns[c]?.sub ?? '', column, size) || ' ',
      alignment: 'right',
      color: PRINT.ink2,
      ...(first ? { id: `stream.${table.columns[c]?.key}` } : {}),
    };
  };
  return [
    [
      { text: 'Stream', bold: true, fontSize: size + 2 },
      '',
      ...columns.map((c) => diamond(table.columns[c]?.head ?? '')),
    ],
    [{ text: 'Description', color: PRINT.ink2 }, '', ...columns.map(description)],
  ];
}

function rowCells(
  row: Row,
  columns: readonly number[],
  { size, label, unit, column }: Measures,
): TableCell[] {
  if (row.style === 'group')
    return [
      { text: wrapped(row.label, label, size + 1, 600), bold: true, fontSize: size + 1 },
      { text: row.unit ?? '', color: PRINT.ink3, alignment: 'right' },
      ...columns.map((): TableCell => ''),
    ];
  const isTotal = row.style === 'total';
  return [
    { text: wrapped(row.label, label, size, isTotal ? 600 : 400), ...(isTotal ? { bold: true } : {}) },
    { text: wrapped(row.unit ?? '', unit, size), color: PRINT.ink3, alignment: 'right' },
    ...columns.map((c) => valueCell(row.cells[c] ?? { is: 'absent' }, row, column, size, 'right')),
  ];
}
