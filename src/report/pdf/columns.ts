import type { Content, TableCell } from 'pdfmake/interfaces';
import { profilePicture } from '../../drawing/profiles';
import { pathToSvg, textToSvg } from '../../drawing/svg';
import { PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { ColumnReport, Table } from '../types';

/** Drawn for a screen, set smaller on paper [px], [pt]. */
const PICTURE = { width: 620, height: 280 } as const;
const PICTURE_WIDTH = 490;
const SIZE = 8.5;

/** The columns: what was set and what came of it as tables, the profiles over the stages beside them. */
export function columnPages(columns: readonly ColumnReport[]): Content[] {
  if (columns.length === 0) return [];
  return [
    { text: 'Columns', bold: true, fontSize: 15, margin: [0, 0, 0, 6], id: 'columns', tocItem: true },
    ...columns.map(columnBlock),
  ];
}

function columnBlock({ title, settings, figures, profiles }: ColumnReport): Content {
  return {
    unbreakable: true,
    margin: [0, 0, 0, 16],
    stack: [
      { text: title, bold: true, fontSize: 10.5, margin: [0, 0, 0, 2] },
      {
        columnGap: 18,
        columns: [
          {
            width: '*',
            ...plain(settings, [92, '*'], (row, cell) => [label(row.label), { text: printed(cell) }]),
          },
          ...(figures
            ? [
                {
                  width: 224,
                  ...plain(figures, ['*', 'auto', 'auto'], (row, cell) => [
                    label(row.label),
                    { text: printed(cell), alignment: 'right', noWrap: true },
                    { text: row.unit ?? '', color: PRINT.ink3 },
                  ]),
                },
              ]
            : []),
          ...(profiles
            ? [{ width: PICTURE_WIDTH, stack: [{ svg: profilesSvg(profiles), width: PICTURE_WIDTH }] }]
            : []),
        ],
      },
    ],
  };
}

const label = (text: string): TableCell => ({ text, color: PRINT.ink2 });

function plain(
  table: Table,
  widths: (string | number)[],
  cellsOf: (row: Table['rows'][number], cell: Table['rows'][number]['cells'][number]) => TableCell[],
) {
  return {
    fontSize: SIZE,
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
