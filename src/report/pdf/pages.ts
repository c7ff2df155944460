import type { Row, Table } from '../types';

/** A page's share of the stream table: some columns, some rows. */
export interface TablePage {
  readonly columns: readonly number[];
  readonly rows: readonly Row[];
}

export interface PageRoom {
  /** Most columns side by side. */
  readonly columns: number;
  /** Height for rows under the head of a page, and of the very last page, where notes follow. */
  readonly room: number;
  readonly last: number;
  /** What a row takes, in the same measure. */
  readonly height: (row: Row) => number;
}

/** A group is not begun with fewer rows than this below its heading, nor ended with fewer alone on a page. */
const LEAST_ROWS = 3;

/**
 * Cuts a wide, long table into pages: columns in groups, rows where the page ends, never right under a group's heading; a
 * group that goes on repeats its heading with "(continued)".
 */
export function tablePages(table: Table, at: PageRoom): TablePage[] {
  const count = Math.max(1, table.columns.length);
  const pages: TablePage[] = [];
  for (let first = 0; first < count; first += at.columns) {
    const columns = Array.from(
      { length: Math.min(at.columns, table.columns.length - first) },
      (_, k) => first + k,
    );
    const isLast = first + at.columns >= count;
    for (const rows of rowPages(table.rows, at, isLast ? at.last : at.room)) pages.push({ columns, rows });
  }
  return pages;
}

function rowPages(rows: readonly Row[], { room, height }: PageRoom, last: number): Row[][] {
  const pages: Row[][] = [];
  let page: Row[] = [];
  let used = 0;
  let heading: Row | undefined;
  const put = (row: Row): void => {
    page.push(row);
    used += height(row);
  };
  const turn = (repeat: boolean): void => {
    pages.push(page);
    page = [];
    used = 0;
    if (repeat && heading) put({ ...heading, label: `${heading.label} (continued)` });
  };
  rows.forEach((row, k) => {
    const isGroup = row.style === 'group';
    const ahead = isGroup ? rows.slice(k, k + 1 + LEAST_ROWS) : [row];
    // What is left must fit above the notes, else the page ends early enough to leave some rows for the next one.
    const isTail = rows.length - k <= LEAST_ROWS;
    const most = isTail ? last : room;
    const needed = (isTail ? rows.slice(k) : ahead).reduce((sum, r) => sum + height(r), 0);
    if (page.length > 0 && used + needed > most) turn(!isGroup);
    if (isGroup) heading = row;
    put(row);
  });
  if (page.length > 0) pages.push(page);
  return pages;
}
