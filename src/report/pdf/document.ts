import type { Content, ContentTable, TableCell, TDocumentDefinitions } from 'pdfmake/interfaces';
import { frameOf } from '../../drawing/frame';
import { pathToSvg, sceneToSvg, textToSvg } from '../../drawing/svg';
import { FONT, PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { ReportInput } from '../input';
import { reportScene } from '../sheet';
import type { Cell, ReportModel, Row, Table } from '../types';
import { columnPages } from './columns';
import { tablePages } from './pages';

/** A3 landscape in points. */
const PAGE = { width: 1190.55, height: 841.89 } as const;
const MARGIN = { left: 28, top: 26, right: 28, bottom: 50 } as const;
const INNER = PAGE.width - MARGIN.left - MARGIN.right;
const SHEET_HEIGHT = 616;
/** Limits named under the drawing, worst first; all of them stand in their own table. */
const LIMITS_SHOWN = 6;
const LABEL_WIDTH = 128;
const UNIT_WIDTH = 54;

const RULE = PRINT.rule;

type Layout = NonNullable<Exclude<ContentTable['layout'], string>>;
const ruled = (heads: number, tight: boolean): Layout => ({
  hLineWidth: (i, node) => (i === 0 ? 0 : i === heads || i === node.table.body.length ? 0.9 : 0.35),
  vLineWidth: () => 0,
  hLineColor: (i, node) => (i === heads || i === node.table.body.length ? PRINT.ink : RULE),
  paddingTop: () => (tight ? 1.1 : 2),
  paddingBottom: () => (tight ? 0.9 : 2),
  paddingLeft: () => 3,
  paddingRight: () => 3,
});

const cell = (
  text: string,
  more: Partial<{ bold: boolean; color: string; alignment: 'left' | 'right'; fontSize: number }> = {},
): TableCell => ({
  text,
  ...more,
});

function valueCell(of: Cell, row: Row, align: 'left' | 'right'): TableCell {
  const bold = row.style === 'total' || (of.is !== 'absent' && of.bold === true);
  const muted = of.is === 'absent' || (of.is === 'text' && of.muted === true);
  return cell(printed(of), {
    alignment: align,
    // The thin space that groups digits must not become a line break.
    ...(of.is === 'number' ? { noWrap: true } : {}),
    ...(bold ? { bold } : {}),
    ...(muted ? { color: PRINT.ink3 } : {}),
  });
}

function heading(text: string, id: string): Content {
  return { text, bold: true, fontSize: 15, margin: [0, 0, 0, 6], id, tocItem: true };
}

/** Number in a diamond, drawn; the number itself stays text. */
const diamond = (number: string): Content => ({
  svg: `<svg xmlns="http://www.w3.org/2000/svg" width="22" height="22" viewBox="0 0 22 22"><path d="M11 0.8L21.2 11L11 21.2L0.8 11Z" fill="#FFFFFF" stroke="${PRINT.ink}" stroke-width="0.9"/><text x="11" y="${number.length > 2 ? 13.6 : 14.2}" font-family="${FONT}" font-weight="600" font-size="${number.length > 3 ? 6 : number.length > 2 ? 7.5 : 9}" text-anchor="middle" fill="${PRINT.ink}">${number.replace(/[&<>"]/g, '')}</text></svg>`,
  width: 22,
  alignment: 'right',
});

function streamPages(table: Table): Content[] {
  return tablePages(table).map((page, k): Content => {
    const columns = page.columns.map((c) => table.columns[c]);
    const width = Math.min(84, (INNER - LABEL_WIDTH - UNIT_WIDTH - 12) / Math.max(1, columns.length) - 6);
    const body: TableCell[][] = [
      [
        cell('Stream', { bold: true, fontSize: 10 }),
        cell(''),
        ...columns.map((c) => diamond(c?.head ?? '') as TableCell),
      ],
      [
        cell('Description', { color: PRINT.ink2 }),
        cell(''),
        ...columns.map((c) => cell(c?.sub ?? '', { alignment: 'right', color: PRINT.ink2 })),
      ],
      ...page.rows.map((row): TableCell[] =>
        row.style === 'group'
          ? [
              cell(row.label, { bold: true, fontSize: 9 }),
              cell(row.unit ?? '', { color: PRINT.ink3 }),
              ...columns.map(() => cell('')),
            ]
          : [
              cell(row.label, row.style === 'total' ? { bold: true } : {}),
              cell(row.unit ?? '', { color: PRINT.ink3, alignment: 'right' }),
              ...page.columns.map((c) => valueCell(row.cells[c] ?? { is: 'absent' }, row, 'right')),
            ],
      ),
    ];
    return [
      {
        ...(k === 0
          ? (heading(table.title, 'streams') as object)
          : { text: `${table.title} (continued)`, bold: true, fontSize: 12, margin: [0, 0, 0, 6] }),
        pageBreak: 'before',
      } as Content,
      {
        table: {
          headerRows: 2,
          widths: [LABEL_WIDTH, UNIT_WIDTH, ...columns.map(() => width)],
          body,
          dontBreakRows: true,
        },
        layout: ruled(2, true),
        fontSize: 7.8,
      },
    ];
  });
}

const notesOf = (table: Table): Content[] =>
  table.notes.map((text): Content => ({ text, fontSize: 8, color: PRINT.ink2, margin: [0, 5, 0, 0] }));

function plainTable(table: Table, widths: readonly (number | string)[], rowHead: string): Content {
  return {
    stack: [
      heading(table.title, table.key),
      ...(table.rows.length > 0
        ? [
            {
              table: {
                headerRows: 1,
                dontBreakRows: true,
                widths: [...widths],
                body: [
                  [
                    cell(rowHead, { bold: true }),
                    ...table.columns.map((c) => cell(c.head, { bold: true, alignment: c.align })),
                  ],
                  ...table.rows.map((row): TableCell[] => [
                    cell(row.unit ? `${row.label}, ${row.unit}` : row.label, { bold: true }),
                    ...table.columns.map((c, k) => valueCell(row.cells[k] ?? { is: 'absent' }, row, c.align)),
                  ]),
                ],
              },
              layout: ruled(1, false),
              fontSize: 8.5,
            } as Content,
          ]
        : []),
      ...notesOf(table),
    ],
    margin: [0, 0, 0, 16],
  };
}

/** Key, limits, closure and title block under the drawing. */
function firstPageFoot(report: ReportModel, input: ReportInput): Content {
  const small = (text: string): Content => ({ text, fontSize: 8.5, margin: [0, 1.5, 0, 0] });
  const key = `<svg xmlns="http://www.w3.org/2000/svg" width="250" height="78" viewBox="0 0 250 78"><path d="M2 9H40" fill="none" stroke="${PRINT.ink}" stroke-width="1.9"/><path d="M40 5.5L48 9L40 12.5Z" fill="${PRINT.ink}"/><path d="M2 33H40" fill="none" stroke="${PRINT.ink}" stroke-width="1.2" stroke-dasharray="5 2.5"/><circle cx="44" cy="33" r="2.6" fill="#FFFFFF" stroke="${PRINT.ink}" stroke-width="1.2"/><path d="M25 46L36 57L25 68L14 57Z" fill="#FFFFFF" stroke="${PRINT.ink}" stroke-width="1.1"/><text x="25" y="60.5" font-family="${FONT}" font-weight="600" font-size="9" text-anchor="middle" fill="${PRINT.ink}">8</text><text x="60" y="12.5" font-family="${FONT}" font-size="9.5" fill="${PRINT.ink}">material stream; a dot joins or divides</text><text x="60" y="36.5" font-family="${FONT}" font-size="9.5" fill="${PRINT.ink}">heat link; double rule under a tag: solved</text><text x="60" y="60.5" font-family="${FONT}" font-size="9.5" fill="${PRINT.ink}">stream number; labels as on the sheet</text></svg>`;
  const limits = report.limits.rows
    .slice(0, LIMITS_SHOWN)
    .map((row) => small(`${row.label}: ${row.title ?? ''}`));
  const closure = report.closure.rows
    .slice(0, 2)
    .map((row) =>
      small(
        `${row.label}: in ${printed(row.cells[0] ?? { is: 'absent' })}, out ${printed(row.cells[1] ?? { is: 'absent' })} ${row.unit ?? ''}, relative ${printed(row.cells[3] ?? { is: 'absent' })}`,
      ),
    );
  const entry = (label: string): string => report.title.find((t) => t.label === label)?.text ?? '';
  const block = (label: string, span = 1): TableCell => ({
    stack: [
      { text: label, fontSize: 7, color: PRINT.ink3 },
      { text: entry(label) || '–', fontSize: 9.5, bold: label === 'Title' },
    ],
    colSpan: span,
  });
  return {
    margin: [0, 8, 0, 0],
    columns: [
      {
        width: 262,
        stack: [
          { text: 'Key', bold: true, fontSize: 10, margin: [0, 0, 0, 4] },
          { svg: key, width: 250 },
        ],
      },
      {
        width: '*',
        stack: [
          { text: 'Limits', bold: true, fontSize: 10 },
          ...(limits.length > 0
            ? limits
            : [small('None of the built-in checks fired. That is no proof of safety.')]),
          ...(report.limits.rows.length > LIMITS_SHOWN
            ? [small(`and ${report.limits.rows.length - LIMITS_SHOWN} more: see the list of limits`)]
            : []),
        ],
        margin: [0, 0, 14, 0],
      },
      {
        width: 240,
        stack: [
          { text: 'Closure', bold: true, fontSize: 10 },
          ...(closure.length > 0 ? closure : [small('open: not every unit is solved')]),
          small('Closure shows arithmetic, not that the model is right.'),
          small(report.state.text),
          small(
            input.basis.model.pairs.length > 0
              ? `${entry('Thermodynamic model')}, ${input.basis.model.pairs.length} pairs`
              : entry('Thermodynamic model'),
          ),
        ],
        margin: [0, 0, 14, 0],
      },
      {
        width: 330,
        table: {
          widths: ['*', '*', '*', '*'],
          body: [
            [block('Project', 2), {}, block('Area', 2), {}],
            [block('Title', 3), {}, {}, block('Number')],
            [block('Author'), block('Checked'), block('Approved'), block('Revision')],
          ],
        },
        layout: {
          hLineWidth: () => 0.5,
          vLineWidth: () => 0.5,
          hLineColor: () => PRINT.hair,
          vLineColor: () => PRINT.hair,
        },
      },
    ],
  };
}

/** Border with zone marks, behind every page. */
function borderSvg(): string {
  const { paths, texts } = frameOf({ x: 0, y: 0, w: PAGE.width, h: PAGE.height });
  const drawn = [...paths.map((p) => pathToSvg(p, PRINT)), ...texts.map((t) => textToSvg(t, PRINT))].join('');
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${PAGE.width}" height="${PAGE.height}" viewBox="0 0 ${PAGE.width} ${PAGE.height}">${drawn}</svg>`;
}

/** Scales the drawing to the room on the page, never above its own size times 1.25. */
function scaledToPage(width: number, height: number): { readonly width: number; readonly height: number } {
  const scale = Math.min(INNER / width, SHEET_HEIGHT / height, 1.25);
  return { width: width * scale, height: height * scale };
}

/** The whole stream summary as a document for the PDF maker; the same input gives the same document. */
export function pdfDocument(report: ReportModel, input: ReportInput): TDocumentDefinitions {
  const { strip } = report;
  const scene = reportScene(input);
  const svg = sceneToSvg(scene, PRINT);
  const size = scaledToPage(scene.box.w + 16, scene.box.h + 16);
  const title = report.title.find((t) => t.label === 'Title')?.text ?? '';
  const foot = [
    strip.purpose,
    strip.margin,
    `Fingerprint ${strip.fingerprint}`,
    strip.measures,
    strip.number,
    strip.version,
  ];
  const border = borderSvg();
  const day = new Date(`${input.day}T00:00:00Z`);
  return {
    pageSize: { width: PAGE.width, height: PAGE.height },
    pageMargins: [MARGIN.left, MARGIN.top, MARGIN.right, MARGIN.bottom],
    defaultStyle: { font: FONT, fontSize: 9, color: PRINT.ink },
    info: {
      title: `${title} – stream summary`,
      subject: 'Stream summary (heat and material balance)',
      creator: strip.version,
      producer: strip.version,
      creationDate: day,
      modDate: day,
    },
    background: () => ({ svg: border, width: PAGE.width, height: PAGE.height }),
    footer: (page, pages) => ({
      margin: [MARGIN.left, 12, MARGIN.right, 0],
      table: {
        widths: ['auto', 'auto', 'auto', '*', 'auto', 'auto', 'auto'],
        body: [
          [
            ...foot.map((text, k): TableCell => ({ text, bold: k === 0, fontSize: 8 })),
            { text: `Page ${page} of ${pages}`, bold: true, fontSize: 8 },
          ],
        ],
      },
      layout: {
        hLineWidth: () => 0.6,
        vLineWidth: () => 0.6,
        hLineColor: () => PRINT.hair,
        vLineColor: () => PRINT.hair,
        paddingTop: () => 5,
        paddingBottom: () => 5,
      },
    }),
    content: [
      {
        stack: [{ svg, width: size.width, height: size.height, alignment: 'center' }],
        margin: [0, (SHEET_HEIGHT - size.height) / 2, 0, (SHEET_HEIGHT - size.height) / 2],
      },
      firstPageFoot(report, input),
      ...streamPages(report.streams),
      ...notesOf(report.streams),
      {
        ...(plainTable(report.units, [52, 70, 110, 76, 84, 84, '*'], 'Tag') as object),
        pageBreak: 'before',
      } as Content,
      ...columnPages(report.columns),
      plainTable(report.closure, [190, 110, 110, 90, 90], 'Balance'),
      plainTable(report.limits, [90, 80, '*', 190, 240], 'Where'),
      plainTable(report.assumptions, [40, 230, 180, '*'], 'No.'),
      plainTable(report.pairs, [220, 60, 90, '*'], 'Pair'),
      {
        stack: [
          heading('Sources', 'sources'),
          ...report.sources.map((text): Content => ({ text, fontSize: 8, margin: [0, 0, 0, 2] })),
        ],
        margin: [0, 0, 0, 16],
      },
      { stack: [heading('Cautions', 'cautions'), { ul: [...report.cautions], fontSize: 9 }] },
    ],
  };
}
