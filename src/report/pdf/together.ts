import type { Content, ContentTable, TableCell } from 'pdfmake/interfaces';
import { PRINT } from '../../drawing/tokens';
import { anchor, type Entry } from './contents';
import { LINE } from './paper';

export type Layout = NonNullable<Exclude<ContentTable['layout'], string>>;

/** Room beside a cell's text, at either side [pt]. */
export const PADDING = 4;
/** Room above and below it [pt]. */
const PAD = 2;
const RULE = 0.35;
const HEAVY = 0.9;

/** A cell's text in lines, and how it looks. */
export interface Lined {
  readonly lines: readonly string[];
  /** What stands here where the row goes on: its label once more. */
  readonly again?: readonly string[];
  readonly look?: object;
}

/** A row, or a part of a very high one, as it stands on a page. */
export interface SetRow {
  readonly cells: readonly TableCell[];
  /** [pt] */
  readonly height: number;
  /** Goes on with the row before it, so no rule parts the two. */
  readonly goesOn: boolean;
}

/** What a row of so many lines takes on the page [pt]. */
export const rowHeight = (lines: number, size: number, pad = PAD): number =>
  lines * size * LINE + 2 * pad + RULE;

/**
 * A row, cut where it is higher than `most` [pt] into parts of equal height: the PDF maker drops what does not fit on one
 * page of a row that must not break.
 */
export function setRows(cells: readonly Lined[], size: number, most: number): SetRow[] {
  const lines = cells.reduce((n, cell) => Math.max(n, cell.lines.length), 1);
  const fit = Math.max(1, Math.floor((most - rowHeight(0, size)) / (size * LINE)));
  const parts = Math.max(1, Math.ceil(lines / fit));
  const each = Math.ceil(lines / parts);
  return Array.from({ length: parts }, (_, k) => ({
    cells: cells.map(({ lines: all, again, look }): TableCell => {
      const isRepeated = k > 0 && again && Math.max(all.length, again.length) <= each;
      const shown = isRepeated ? again : all.slice(k * each, (k + 1) * each);
      return { ...look, text: shown.join('\n') };
    }),
    height: rowHeight(each, size),
    goesOn: k > 0,
  }));
}

/** Fewest rows of a table that stand on a page by themselves, at its foot or at its top. */
export const TOGETHER = 3;

/** Rows that stay with the head, and rows at the end that stay with each other. */
export interface Ends {
  readonly first: number;
  readonly last: number;
}

/**
 * How many rows of a table must not be parted, so that no page begins or ends with fewer than three of them alone; fewer
 * only where three are higher than a page.
 *
 * @param heights of the rows [pt]
 * @param room    of a page under the table's head [pt]
 */
export function endsOf(heights: readonly number[], room: number): Ends {
  const count = heights.length;
  const sum = (of: readonly number[]): number => of.reduce((all, h) => all + h, 0);
  if (count < 2 * TOGETHER && sum(heights) <= room) return { first: count, last: 0 };
  const fitting = (most: number, part: (k: number) => readonly number[]): number => {
    for (let k = most; k > 1; k -= 1) if (sum(part(k)) <= room) return k;
    return 1;
  };
  const first = fitting(Math.min(TOGETHER, Math.ceil(count / 2)), (k) => heights.slice(0, k));
  const last = fitting(Math.min(TOGETHER, count - first), (k) => heights.slice(count - k));
  return { first, last };
}

/**
 * A table whose first rows stay with its head and whose last rows stay together. The PDF maker knows the former; for the
 * latter the last rows are a table of their own inside one unbreakable row, with the same columns.
 *
 * @param at height of a page and of the table's head [pt], and the entries of the contents that lead to the head
 */
export function keptTogether(
  heads: readonly TableCell[][],
  rows: readonly SetRow[],
  widths: readonly number[],
  at: { readonly page: number; readonly head: number; readonly entries: readonly Entry[] },
): ContentTable {
  const { first, last } = endsOf(
    rows.map((row) => row.height),
    at.page - at.head,
  );
  const cells = rows.map((row) => [...row.cells]);
  const [corner] = cells[0] ?? [];
  if (cells[0] && corner !== undefined)
    cells[0][0] = { stack: [...at.entries.map((entry) => anchor(entry, at.head)), corner as Content] };
  const inner = last > 1 ? last : 0;
  const outer = rows.length - inner;
  const isEnd = (k: number): boolean => k === 0 || k === rows.length;
  /** Rule above row `k`: heavy under the heads and the last row, a hairline between rows, none above the heads. */
  const width = (k: number): number => (isEnd(k) ? HEAVY : k < 0 || rows[k]?.goesOn ? 0 : RULE);
  const ink = (k: number): string => (isEnd(k) ? PRINT.ink : PRINT.rule);
  const sides = { paddingLeft: () => PADDING, paddingRight: () => PADDING, vLineWidth: () => 0 };
  const tail: TableCell = {
    colSpan: widths.length,
    margin: [-PADDING, 0, -PADDING, 0],
    table: { widths: [...widths], body: cells.slice(outer) },
    layout: {
      ...sides,
      hLineWidth: (i) => (i === 0 || i === inner ? 0 : width(outer + i)),
      hLineColor: (i) => ink(outer + i),
      paddingTop: () => PAD,
      paddingBottom: () => PAD,
    },
  };
  /** Boundary between rows of the whole table; all of the tail is one row outside. */
  const boundary = (i: number): number => (i - heads.length > outer ? rows.length : i - heads.length);
  const isTail = (i: number): boolean => inner > 0 && i === heads.length + outer;
  return {
    table: {
      headerRows: heads.length,
      keepWithHeaderRows: first,
      dontBreakRows: true,
      widths: [...widths],
      body: [
        ...heads,
        ...cells.slice(0, outer),
        ...(inner > 0 ? [[tail, ...widths.slice(1).map((): TableCell => '')]] : []),
      ],
    },
    layout: {
      ...sides,
      hLineWidth: (i) => width(boundary(i)),
      hLineColor: (i) => ink(boundary(i)),
      paddingTop: (i) => (isTail(i) ? 0 : PAD),
      paddingBottom: (i) => (isTail(i) ? 0 : PAD),
    },
  };
}
