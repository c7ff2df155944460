import type { Row, Table } from '../types';

/** A page's share of the stream table: some columns, some rows. */
export interface TablePage {
  readonly columns: readonly number[];
  readonly rows: readonly Row[];
}

/** Most streams side by side on an A3 page. */
export const STREAMS_A_PAGE = 16;
/** Rows that fit under the head of an A3 page. */
export const ROWS_A_PAGE = 50;
/** A group is not begun with less room than this below its heading. */
const LEAST_AFTER_HEADING = 3;

/**
 * Cuts a wide, long table into pages: columns in groups of sixteen, rows where the page ends, never right under a group's
 * heading; a group that goes on repeats its heading with "(continued)".
 */
export function tablePages(
  table: Table,
  columnsAPage = STREAMS_A_PAGE,
  rowsAPage = ROWS_A_PAGE,
): TablePage[] {
  const pages: TablePage[] = [];
  for (let first = 0; first < Math.max(1, table.columns.length); first += columnsAPage) {
    const columns = Array.from(
      { length: Math.min(columnsAPage, table.columns.length - first) },
      (_, k) => first + k,
    );
    for (const rows of rowPages(table.rows, rowsAPage)) pages.push({ columns, rows });
  }
  return pages;
}

function rowPages(rows: readonly Row[], most: number): Row[][] {
  const pages: Row[][] = [];
  let page: Row[] = [];
  let heading: Row | undefined;
  rows.forEach((row) => {
    const isGroup = row.style === 'group';
    const room = most - page.length;
    if (room < 1 || (isGroup && room < 1 + LEAST_AFTER_HEADING)) {
      pages.push(page);
      page = !isGroup && heading ? [{ ...heading, label: `${heading.label} (continued)` }] : [];
    }
    if (isGroup) heading = row;
    page.push(row);
  });
  if (page.length > 0) pages.push(page);
  return pages;
}
