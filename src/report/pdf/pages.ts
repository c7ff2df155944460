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
 * Cuts a wide, long table into pages: columns in groups, rows where the page ends, never right under a group's heading nor
 * right before the group's last rows; a group that goes on repeats its heading with "(continued)".
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
    const last = isLast ? at.last : at.room;
    const full = rowPages(table.rows, at, last, false);
    const whole = rowPages(table.rows, at, last, true);
    // Groups in one piece where that takes no more pages.
    for (const rows of whole.length <= full.length ? whole : full) pages.push({ columns, rows });
  }
  return pages;
}

function rowPages(
  rows: readonly Row[],
  { room, height }: PageRoom,
  last: number,
  keepsGroups: boolean,
): Row[][] {
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
    const next = rows.findIndex((r, j) => j > k && r.style === 'group');
    const end = next < 0 ? rows.length : next;
    const inGroup = end - k - (isGroup ? 1 : 0);
    const heightOf = (to: number): number => rows.slice(k, to).reduce((sum, r) => sum + height(r), 0);
    // A short group stays whole, a long one keeps its first rows and its last ones together.
    const isWhole =
      inGroup < (isGroup ? 2 * LEAST_ROWS : LEAST_ROWS + 1) ||
      (keepsGroups && isGroup && heightOf(end) <= (end === rows.length ? last : room));
    const to = isWhole ? end : k + (isGroup ? 1 + LEAST_ROWS : 1);
    // The very last rows must fit above the notes.
    const most = isWhole && end === rows.length ? last : room;
    if (page.length > 0 && used + heightOf(to) > most) turn(!isGroup);
    if (isGroup) heading = row;
    put(row);
  });
  if (page.length > 0) pages.push(page);
  return pages;
}
