import type { Content, ContentTable, TableCell } from 'pdfmake/interfaces';
import { PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { Cell, Row, Table } from '../types';
import { marked } from './contents';
import { LINE, type Paper } from './paper';
import { keptTogether, type Layout, type Lined, PADDING, rowHeight, setRows } from './together';
import { linesOf, wrapped } from './wrap';

/** Where links may lead: destinations that the document has. */
export type Destinations = ReadonlySet<string>;

/** Rules under the heads and the last row, hairlines between; none under notes. */
export const ruled = (heads: number, rows: number, pad: number, first = heads): Layout => ({
  hLineWidth: (i) => (i === heads || i === heads + rows ? 0.9 : i >= first && i < heads + rows ? 0.35 : 0),
  vLineWidth: () => 0,
  hLineColor: (i) => (i === heads || i === heads + rows ? PRINT.ink : PRINT.rule),
  paddingTop: () => pad,
  paddingBottom: () => pad,
  paddingLeft: () => PADDING,
  paddingRight: () => PADDING,
});

/** A value in lines, and how it looks. */
function lined(of: Cell, row: Row, width: number, size: number, align: 'left' | 'right'): Lined {
  const bold = row.style === 'total' || (of.is !== 'absent' && of.bold === true);
  const muted = of.is === 'absent' || (of.is === 'text' && of.muted === true);
  return {
    lines: of.is === 'text' ? linesOf(of.text, width, size, bold ? 600 : 400) : [printed(of)],
    look: {
      alignment: align,
      // The thin space that groups digits must not become a line break.
      ...(of.is === 'number' ? { noWrap: true } : {}),
      ...(bold ? { bold } : {}),
      ...(muted ? { color: PRINT.ink3 } : {}),
    },
  };
}

export function valueCell(...of: Parameters<typeof lined>): TableCell {
  const { lines, look } = lined(...of);
  return { ...look, text: lines.join('\n') };
}

/** Widths that fill the room: numbers are points, `share` takes its part of what they leave. */
export type Width = number | { readonly share: number };

export function resolved(widths: readonly Width[], room: number): number[] {
  const fixed = widths.reduce<number>((sum, w) => sum + (typeof w === 'number' ? w : 0), 0);
  const shares = widths.reduce<number>((sum, w) => sum + (typeof w === 'number' ? 0 : w.share), 0);
  const left = room - fixed - widths.length * 2 * PADDING;
  return widths.map((w) => (typeof w === 'number' ? w : (left * w.share) / shares));
}

export interface TableStyle {
  readonly paper: Paper;
  readonly rowHead: string;
  /** The first is the row's own. */
  readonly widths: readonly Width[];
  readonly room?: number;
  readonly links?: Destinations;
  readonly pageBreak?: true;
}

function cellsOf(table: Table, row: Row, widths: readonly number[], { paper, links }: TableStyle): Lined[] {
  const size = paper.text;
  const label = (text: string): string[] => linesOf(text, widths[0] ?? 0, size, 600);
  return [
    {
      lines: label(row.unit ? `${row.label}, ${row.unit}` : row.label),
      again: label(`${row.label} (continued)`),
      look: {
        bold: true,
        ...(row.link && links?.has(row.link) ? { linkToDestination: row.link } : {}),
      },
    },
    ...table.columns.map((c, k) =>
      lined(row.cells[k] ?? { is: 'absent' }, row, widths[k + 1] ?? 0, size, c.align),
    ),
  ];
}

/** Room between a table and what stands above it [pt]. */
export const GAP = 16;

/** A row may take this share of a page; what is higher goes on in a row of its own. */
const HIGHEST = 0.6;
export const highestRow = (paper: Paper): number => HIGHEST * paper.inner.h;

/**
 * A table with its heading and notes inside its head: they stand with its first rows, are repeated where the table goes
 * on, and the contents lead to the first.
 */
export function titledTable(table: Table, style: TableStyle): Content {
  const { paper, rowHead } = style;
  const size = paper.text;
  const widths = resolved(style.widths, style.room ?? paper.inner.w);
  const whole = widths.reduce((sum, w) => sum + w, 0) + (widths.length - 1) * 2 * PADDING;
  const around: Pick<ContentTable, 'margin' | 'fontSize' | 'pageBreak'> = {
    margin: [0, style.pageBreak ? 0 : GAP, 0, 0],
    fontSize: size,
    ...(style.pageBreak ? { pageBreak: 'before' } : {}),
  };
  const heading: TableCell[] = [
    {
      colSpan: widths.length,
      margin: [-PADDING, 0, 0, 2],
      stack: [
        {
          text: table.title,
          bold: true,
          fontSize: paper.heading,
          ...(table.rows.length === 0 ? marked(table) : {}),
        },
        ...table.notes.map((note) => ({
          text: wrapped(note, whole, size),
          color: PRINT.ink2,
          margin: [0, 1, 0, 0],
        })),
      ],
    } as TableCell,
    ...widths.slice(1).map((): TableCell => ''),
  ];
  const rows = table.rows.flatMap((row) =>
    setRows(cellsOf(table, row, widths, style), size, highestRow(paper)),
  );
  if (rows.length === 0) {
    return { ...around, table: { dontBreakRows: true, widths, body: [heading] }, layout: ruled(1, 0, 2) };
  }
  const heads = [rowHead, ...table.columns.map((c) => c.head)].map((text, k) => ({
    lines: linesOf(text, widths[k] ?? 0, size, 600),
    look: { bold: true, alignment: k === 0 ? 'left' : (table.columns[k - 1]?.align ?? 'left') },
  }));
  const above =
    rowHeight(1, paper.heading) +
    2 +
    table.notes.reduce((sum, note) => sum + 1 + linesOf(note, whole, size).length * size * LINE, 0);
  const [head] = setRows(heads, size, Number.POSITIVE_INFINITY);
  return {
    ...around,
    ...keptTogether([heading, [...(head?.cells ?? [])]], rows, widths, {
      page: paper.inner.h,
      head: above + (head?.height ?? 0),
      entries: [table],
    }),
  };
}

/** A heading with paragraphs below it, one a row, so that it never stands alone. */
export function titledList(key: string, title: string, texts: readonly string[], paper: Paper): Content {
  const size = paper.text;
  const width = paper.inner.w - 2 * PADDING;
  const heading: TableCell = {
    text: title,
    bold: true,
    fontSize: paper.heading,
    margin: [-PADDING, 0, 0, 2],
    ...(texts.length === 0 ? marked({ key, title }) : {}),
  };
  const rows = texts.flatMap((text) =>
    setRows([{ lines: linesOf(text, width, size) }], size, highestRow(paper)),
  );
  return {
    margin: [0, GAP, 0, 0],
    fontSize: size,
    ...keptTogether([[heading]], rows, [width], {
      page: paper.inner.h,
      head: rowHeight(1, paper.heading) + 2,
      entries: [{ key, title }],
    }),
  };
}
