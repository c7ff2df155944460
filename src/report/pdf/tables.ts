import type { Content, ContentTable, TableCell } from 'pdfmake/interfaces';
import { PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { Cell, Row, Table } from '../types';
import type { Paper } from './paper';
import { wrapped } from './wrap';

/** Where links may lead: destinations that the document has. */
export type Destinations = ReadonlySet<string>;

type Layout = NonNullable<Exclude<ContentTable['layout'], string>>;
const PADDING = 4;

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

export function valueCell(
  of: Cell,
  row: Row,
  width: number,
  size: number,
  align: 'left' | 'right',
): TableCell {
  const bold = row.style === 'total' || (of.is !== 'absent' && of.bold === true);
  const muted = of.is === 'absent' || (of.is === 'text' && of.muted === true);
  return {
    text: of.is === 'text' ? wrapped(of.text, width, size, bold ? 600 : 400) : printed(of),
    alignment: align,
    // The thin space that groups digits must not become a line break.
    ...(of.is === 'number' ? { noWrap: true } : {}),
    ...(bold ? { bold } : {}),
    ...(muted ? { color: PRINT.ink3 } : {}),
  };
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

/** A row longer than this many letters may break over pages; one of ordinary length never does. */
const VERY_LONG = 1500;

/**
 * A table with its heading and notes inside its head: they stand with at least one row, are repeated where the table goes
 * on, and the heading is in the contents once.
 */
export function titledTable(table: Table, style: TableStyle): Content {
  const { paper, rowHead, links } = style;
  const size = paper.text;
  const widths = resolved(style.widths, style.room ?? paper.inner.w);
  const span = (content: object): TableCell[] => [
    { ...content, colSpan: widths.length } as TableCell,
    ...widths.slice(1).map((): TableCell => ''),
  ];
  const whole = widths.reduce((sum, w) => sum + w, 0) + (widths.length - 1) * 2 * PADDING;
  const heading = span({
    margin: [-PADDING, 0, 0, 2],
    stack: [
      { text: table.title, bold: true, fontSize: paper.heading, id: table.key, tocItem: true },
      ...table.notes.map((note) => ({
        text: wrapped(note, whole, size),
        color: PRINT.ink2,
        margin: [0, 1, 0, 0],
      })),
    ],
  });
  const heads: TableCell[] = [rowHead, ...table.columns.map((c) => c.head)].map(
    (text, k): TableCell => ({
      text: wrapped(text, widths[k] ?? 0, size, 600),
      bold: true,
      alignment: k === 0 ? 'left' : (table.columns[k - 1]?.align ?? 'left'),
    }),
  );
  const rows = table.rows.map((row): TableCell[] => [
    {
      text: wrapped(row.unit ? `${row.label}, ${row.unit}` : row.label, widths[0] ?? 0, size, 600),
      bold: true,
      ...(row.link && links?.has(row.link) ? { linkToDestination: row.link } : {}),
    },
    ...table.columns.map((c, k) =>
      valueCell(row.cells[k] ?? { is: 'absent' }, row, widths[k + 1] ?? 0, size, c.align),
    ),
  ]);
  const isLong = table.rows.some((row) =>
    row.cells.some((c) => c.is === 'text' && c.text.length > VERY_LONG),
  );
  const hasRows = rows.length > 0;
  return {
    margin: [0, 0, 0, 16],
    fontSize: size,
    ...(style.pageBreak ? { pageBreak: 'before' } : {}),
    table: {
      headerRows: hasRows ? 2 : 0,
      keepWithHeaderRows: 1,
      dontBreakRows: !isLong,
      widths,
      body: [heading, ...(hasRows ? [heads, ...rows] : [])],
    },
    layout: hasRows ? ruled(2, rows.length, 2) : ruled(1, 0, 2),
  };
}

/** A heading with paragraphs below it, one a row, so that it never stands alone. */
export function titledList(key: string, title: string, texts: readonly string[], paper: Paper): Content {
  const size = paper.text;
  const width = paper.inner.w - 2 * PADDING;
  return {
    margin: [0, 0, 0, 16],
    fontSize: size,
    table: {
      headerRows: 1,
      keepWithHeaderRows: 1,
      dontBreakRows: true,
      widths: [width],
      body: [
        [
          {
            text: title,
            bold: true,
            fontSize: paper.heading,
            id: key,
            tocItem: true,
            margin: [-PADDING, 0, 0, 2],
          },
        ],
        ...texts.map((text): TableCell[] => [{ text: wrapped(text, width, size) }]),
      ],
    },
    layout: ruled(1, texts.length, 2),
  };
}
