import type { Content, TableCell } from 'pdfmake/interfaces';
import { profilePicture } from '../../drawing/profiles';
import { pathToSvg, textToSvg } from '../../drawing/svg';
import { PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { ColumnReport, Table } from '../types';
import type { Paper } from './paper';
import { wrapped } from './wrap';

/** Drawn for a screen, set smaller on paper [px]. */
const PICTURE = { width: 620, height: 280 } as const;
const GAP = 18;

/** The columns: what was set and what came of it as tables, the profiles over the stages beside or below them. */
export function columnPages(columns: readonly ColumnReport[], paper: Paper): Content[] {
  return columns.map((column, k) => columnBlock(column, k === 0, paper));
}

function columnBlock(
  { key, title, settings, figures, profiles }: ColumnReport,
  isFirst: boolean,
  paper: Paper,
): Content {
  const isWide = paper.name === 'A3';
  const figureWidth = isWide ? 224 : 216;
  const pictureWidth = isWide ? 490 : 560;
  const room = paper.inner.w - GAP - figureWidth - (isWide && profiles ? pictureWidth + GAP : 0);
  const size = paper.text;
  const settingWidth = room - 92 - 8;
  const picture: Content[] = profiles
    ? [{ svg: profilesSvg(profiles), width: pictureWidth, margin: [0, isWide ? 0 : 8, 0, 0] }]
    : [];
  const tables: Content[] = [
    {
      width: room,
      ...plain(settings, size, [92, settingWidth], (row, cell) => [
        label(row.label),
        { text: wrapped(printed(cell), settingWidth, size) },
      ]),
    } as Content,
    ...(figures
      ? [
          {
            width: figureWidth,
            ...plain(figures, size, ['*', 'auto', 'auto'], (row, cell) => [
              label(row.label),
              { text: printed(cell), alignment: 'right', noWrap: true },
              { text: row.unit ?? '', color: PRINT.ink3 },
            ]),
          } as Content,
        ]
      : []),
  ];
  return {
    unbreakable: true,
    margin: [0, 0, 0, 16],
    stack: [
      ...(isFirst
        ? [
            {
              text: 'Columns',
              bold: true,
              fontSize: paper.heading,
              margin: [0, 0, 0, 6],
              id: 'columns',
              tocItem: true,
            } as Content,
          ]
        : []),
      {
        text: wrapped(title, paper.inner.w, size + 2, 600),
        bold: true,
        fontSize: size + 2,
        margin: [0, 0, 0, 2],
        id: `column.${key}`,
        tocItem: true,
        tocMargin: [12, 0, 0, 0],
      },
      {
        columnGap: GAP,
        columns: isWide && profiles ? [...tables, { width: pictureWidth, stack: picture }] : tables,
      },
      ...(isWide ? [] : picture),
    ],
  };
}

const label = (text: string): TableCell => ({ text, color: PRINT.ink2 });

function plain(
  table: Table,
  fontSize: number,
  widths: (string | number)[],
  cellsOf: (row: Table['rows'][number], cell: Table['rows'][number]['cells'][number]) => TableCell[],
) {
  return {
    fontSize,
    table: {
      widths,
      dontBreakRows: true,
      body: table.rows.map((row) => cellsOf(row, row.cells[0] ?? { is: 'absent' })),
    },
    layout: {
      hLineWidth: (i: number) => (i === 0 || i === table.rows.length ? 0.9 : 0.35),
      vLineWidth: () => 0,
      hLineColor: (i: number) => (i === 0 || i === table.rows.length ? PRINT.ink : PRINT.rule),
      paddingTop: () => 1.6,
      paddingBottom: () => 1.6,
      paddingLeft: () => 2,
      paddingRight: () => 2,
    },
  };
}

/** The same drawing as on the screen, in the print's inks. */
export function profilesSvg(profiles: NonNullable<ColumnReport['profiles']>): string {
  const { width, height, paths, texts } = profilePicture(profiles, PICTURE);
  const drawn = [...paths.map((p) => pathToSvg(p, PRINT)), ...texts.map((t) => textToSvg(t, PRINT))].join('');
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">${drawn}</svg>`;
}
