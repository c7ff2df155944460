import { full } from './cells';
import { guarded } from './guard';
import { tablesOf } from './tables';
import type { Cell, ReportModel, Table } from './types';

const quoted = (value: string): string =>
  /[",\r\n;]/.test(value) ? `"${value.replaceAll('"', '""')}"` : value;
const cellText = (cell: Cell): string => (cell.is === 'text' ? quoted(guarded(cell.text)) : full(cell));
const textOf = (value: string): string => quoted(guarded(value));

/** One table: a title line, a head, then rows of label, unit and every digit of each figure. */
export function tableCsv(table: Table): string[] {
  const heads = [['', '', ...table.columns.map((c) => textOf(c.head))].join(',')];
  if (table.columns.some((c) => c.sub))
    heads.push(['', '', ...table.columns.map((c) => textOf(c.sub ?? ''))].join(','));
  return [
    textOf(table.title),
    ...heads,
    ...table.rows.map((row) =>
      [textOf(row.label), textOf(row.unit ?? ''), ...row.cells.map(cellText)].join(','),
    ),
    ...table.notes.map(textOf),
  ];
}

/** The whole stream summary as CSV: UTF-8 with a byte-order mark, CRLF line ends, guarded text. */
export function writeCsv(report: ReportModel): string {
  const lines = [
    'Splitwright stream summary',
    ...report.title.map((entry) => `${textOf(entry.label)},${textOf(entry.text)}`),
    ...[report.strip.warning, report.strip.purpose].filter(Boolean).map(textOf),
    `State,${textOf(report.state.text)}`,
    `Fingerprint,${textOf(report.strip.fingerprint)}`,
  ];
  for (const [table] of tablesOf(report)) lines.push('', ...tableCsv(table));
  lines.push('', ...report.cautions.map(textOf));
  return `\ufeff${lines.join('\r\n')}\r\n`;
}
