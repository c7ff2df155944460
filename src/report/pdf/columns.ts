import type { Content, ContentText, TableCell } from 'pdfmake/interfaces';
import { profilePicture } from '../../drawing/profiles';
import { pathToSvg, textToSvg } from '../../drawing/svg';
import { PRINT } from '../../drawing/tokens';
import { printed } from '../cells';
import type { ColumnReport } from '../types';
import { type Entry, marked } from './contents';
import { LINE, type Paper } from './paper';
import { GAP, highestRow } from './tables';
import { keptTogether, type Lined, PADDING, rowHeight, setRows } from './together';
import { linesOf } from './wrap';

/** Drawn for a screen, set smaller on paper [px]. */
const PICTURE = { width: 620, height: 280 } as const;
const BESIDE = 18;
const SECTION: Entry = { key: 'columns', title: 'Columns' };
/** Above and below a row [pt]. */
const PAD = 1.6;
/** Widths of a setting's label and of the figures [pt]. */
const LABEL = 92;
const ABOVE_PICTURE = 8;

/** The columns: what was set and what came of it as tables, the profiles over the stages beside or below them. */
export function columnPages(columns: readonly ColumnReport[], paper: Paper): Content[] {
  return columns.flatMap((column, k) => columnBlock(column, k === 0, paper));
}

function columnBlock(column: ColumnReport, isFirst: boolean, paper: Paper): Content[] {
  const { profiles } = column;
  const isWide = paper.name === 'A3';
  const size = paper.text;
  const figureWidth = isWide ? 224 : 216;
  const pictureWidth = isWide ? 490 : 560;
  const room = paper.inner.w - BESIDE - figureWidth - (isWide && profiles ? pictureWidth + BESIDE : 0);
  const { head, entries, height: headHeight } = headOf(column, isFirst, paper);
  const settings = settingRows(column, room, paper);
  const figures = figureRows(column, paper);
  const picture: Content[] = profiles
    ? [
        {
          svg: profilesSvg(profiles),
          width: pictureWidth,
          margin: [0, isWide ? 0 : ABOVE_PICTURE, 0, 0],
        },
      ]
    : [];
  const pictureHeight = profiles ? (pictureWidth * PICTURE.height) / PICTURE.width + ABOVE_PICTURE : 0;
  const tablesHeight = Math.max(heightOf(settings, size), heightOf(figures, size));
  const height = headHeight + (isWide ? Math.max(tablesHeight, pictureHeight) : tablesHeight + pictureHeight);
  if (height > paper.inner.h) return longBlock(column, isFirst, picture, paper);
  const tables: Content[] = [
    { width: room, ...plain(settings, size, [LABEL, room - LABEL - 8]) } as Content,
    ...(figures.length > 0
      ? [{ width: figureWidth, ...plain(figures, size, ['*', 'auto', 'auto']) } as Content]
      : []),
  ];
  return [
    {
      unbreakable: true,
      margin: [0, GAP, 0, 0],
      stack: [
        ...head.map((text, k) => ({ ...text, ...marked(entries[k] as Entry) })),
        {
          columnGap: BESIDE,
          columns: isWide && profiles ? [...tables, { width: pictureWidth, stack: picture }] : tables,
        },
        ...(isWide ? [] : picture),
      ],
    },
  ];
}

/** More than a page takes in one piece: one below the other, each table over as many pages as it needs. */
function longBlock(
  column: ColumnReport,
  isFirst: boolean,
  picture: readonly Content[],
  paper: Paper,
): Content[] {
  const size = paper.text;
  const { head, entries, height } = headOf(column, isFirst, paper);
  const highest = highestRow(paper);
  const tableOf = (
    rows: readonly Lined[][],
    widths: number[],
    above: Content[],
    at: { readonly head: number; readonly entries: readonly Entry[] },
  ): Content => ({
    margin: [0, GAP, 0, 0],
    fontSize: size,
    ...keptTogether(
      [[{ stack: above, colSpan: widths.length }, ...widths.slice(1).map((): TableCell => '')]],
      rows.flatMap((row) => setRows(row, size, highest)),
      widths,
      { page: paper.inner.h, ...at },
    ),
  });
  const value = paper.inner.w - LABEL - 4 * PADDING;
  const figures = figureRows(column, paper);
  const results = `${column.title}: results`;
  return [
    tableOf(settingRows(column, paper.inner.w, paper), [LABEL, value], head, { head: height, entries }),
    ...(figures.length > 0
      ? [
          tableOf(figures, [180, 70, 90], [{ text: results, bold: true }], {
            head: rowHeight(linesOf(results, paper.inner.w, size, 600).length, size),
            entries: [],
          }),
        ]
      : []),
    ...picture,
  ];
}

/** Heading of the section above the first, the column's own above every one, and what they take [pt]. */
function headOf(
  { key, title }: ColumnReport,
  isFirst: boolean,
  paper: Paper,
): { readonly head: ContentText[]; readonly entries: readonly Entry[]; readonly height: number } {
  const size = paper.text + 2;
  const lines = linesOf(title, paper.inner.w, size, 600);
  const own: ContentText = { text: lines.join('\n'), bold: true, fontSize: size, margin: [0, 0, 0, 2] };
  const entry: Entry = { key: `column.${key}`, title, parent: SECTION.key };
  const ownHeight = lines.length * size * LINE + 2;
  if (!isFirst) return { head: [own], entries: [entry], height: ownHeight };
  const section: ContentText = {
    text: SECTION.title,
    bold: true,
    fontSize: paper.heading,
    margin: [0, 0, 0, 6],
  };
  return {
    head: [section, own],
    entries: [SECTION, entry],
    height: paper.heading * LINE + 6 + ownHeight,
  };
}

const label = (lines: readonly string[]): Lined => ({ lines, look: { color: PRINT.ink2 } });

function settingRows({ settings }: ColumnReport, room: number, { text: size }: Paper): Lined[][] {
  const width = room - LABEL - 4 * PADDING;
  return settings.rows.map((row) => [
    label(linesOf(row.label, LABEL, size)),
    { lines: linesOf(printed(row.cells[0] ?? { is: 'absent' }), width, size) },
  ]);
}

function figureRows({ figures }: ColumnReport, { text: size }: Paper): Lined[][] {
  return (figures?.rows ?? []).map((row) => [
    label(linesOf(row.label, 180, size)),
    { lines: [printed(row.cells[0] ?? { is: 'absent' })], look: { alignment: 'right', noWrap: true } },
    { lines: [row.unit ?? ''], look: { color: PRINT.ink3 } },
  ]);
}

const heightOf = (rows: readonly Lined[][], size: number): number =>
  rows.reduce((sum, row) => {
    const lines = row.reduce((n, cell) => Math.max(n, cell.lines.length), 1);
    return sum + rowHeight(lines, size, PAD);
  }, 1);

function plain(rows: readonly Lined[][], fontSize: number, widths: (string | number)[]) {
  return {
    fontSize,
    table: {
      widths,
      dontBreakRows: true,
      body: rows.map((row) => row.map(({ lines, look }): TableCell => ({ ...look, text: lines.join('\n') }))),
    },
    layout: {
      hLineWidth: (i: number) => (i === 0 || i === rows.length ? 0.9 : 0.35),
      vLineWidth: () => 0,
      hLineColor: (i: number) => (i === 0 || i === rows.length ? PRINT.ink : PRINT.rule),
      paddingTop: () => PAD,
      paddingBottom: () => PAD,
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
