import type { Content, TableCell, TDocumentDefinitions } from 'pdfmake/interfaces';
import { frameOf } from '../../drawing/frame';
import { pathToSvg, textToSvg } from '../../drawing/svg';
import { FONT, PRINT } from '../../drawing/tokens';
import type { ReportInput } from '../input';
import { isShown, type SectionKey } from '../sections';
import type { ReportModel, Table } from '../types';
import { columnPages } from './columns';
import { entriesOf } from './contents';
import { contentsPage, firstPage } from './front';
import { PAPERS, type Paper } from './paper';
import { streamPages } from './streams';
import { type Destinations, type TableStyle, titledList, titledTable, type Width } from './tables';
import { fitted } from './wrap';

/** Border with zone marks, behind every page. */
function borderSvg({ width, height }: Paper): string {
  const { paths, texts } = frameOf({ x: 0, y: 0, w: width, h: height });
  const drawn = [...paths.map((p) => pathToSvg(p, PRINT)), ...texts.map((t) => textToSvg(t, PRINT))].join('');
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">${drawn}</svg>`;
}

export const paperOf = (input: ReportInput): Paper => PAPERS[input.sketch.documents?.paper ?? 'A3'];

/** The strip at the foot of every page; what is long gives way, page and warning never. */
function strip({ strip: of }: ReportModel, paper: Paper): (page: number, pages: number) => Content {
  const size = paper.strip;
  const pageWidth = 62 * (size / 8) + 8;
  const shares = [0.27, 0.12, 0.165, 0.19, 0.165, 0.09];
  const texts = [of.purpose, of.margin, `Fingerprint ${of.fingerprint}`, of.measures, of.number, of.version];
  const room = paper.inner.w - pageWidth - 4.5;
  const widths = shares.map((share) => room * share - 10);
  const cells = texts.map(
    (text, k): TableCell => ({
      text: fitted(text, widths[k] ?? 0, size, 2, k === 0 ? 600 : 400),
      bold: k === 0,
      fontSize: size,
      verticalAlignment: 'middle',
    }),
  );
  // The warning is never cut; the purpose takes what it leaves.
  const warning = of.warning === '' ? [] : [of.warning];
  const purpose =
    of.purpose === '' ? [] : [fitted(of.purpose, widths[0] ?? 0, size, 2 - warning.length, 600)];
  cells[0] = {
    text: [...warning, ...purpose].join('\n'),
    bold: true,
    fontSize: size,
    verticalAlignment: 'middle',
  };
  return (page, pages) => ({
    margin: [paper.margin.left, 8, paper.margin.right, 0],
    table: {
      widths: [...widths, pageWidth - 10],
      heights: 22,
      body: [
        [
          ...cells,
          { text: `Page ${page} of ${pages}`, bold: true, fontSize: size, verticalAlignment: 'middle' },
        ],
      ],
    },
    layout: {
      hLineWidth: () => 0.6,
      vLineWidth: () => 0.6,
      hLineColor: () => PRINT.hair,
      vLineColor: () => PRINT.hair,
      paddingTop: () => 1.5,
      paddingBottom: () => 0,
      paddingLeft: () => 5,
      paddingRight: () => 5,
    },
  });
}

/** Frame, strip, font and metadata that every document of ours has. */
function around(
  report: ReportModel,
  input: ReportInput,
  subject: string,
): Omit<TDocumentDefinitions, 'content'> {
  const paper = paperOf(input);
  const border = borderSvg(paper);
  const day = new Date(`${input.day}T00:00:00Z`);
  const title = report.title.find((t) => t.label === 'Title')?.text ?? '';
  return {
    pageSize: { width: paper.width, height: paper.height },
    pageMargins: [paper.margin.left, paper.margin.top, paper.margin.right, paper.margin.bottom],
    defaultStyle: { font: FONT, fontSize: paper.text, color: PRINT.ink },
    language: 'en-GB',
    info: {
      title: `${title} – ${subject.toLowerCase()}`,
      subject,
      ...(input.sketch.title.author ? { author: input.sketch.title.author } : {}),
      keywords: [report.strip.number, report.strip.fingerprint, report.strip.warning, report.strip.purpose]
        .filter(Boolean)
        .join('; '),
      creator: report.strip.version,
      producer: report.strip.version,
      creationDate: day,
      modDate: day,
    },
    background: () => ({ svg: border, width: paper.width, height: paper.height }),
    footer: strip(report, paper),
  };
}

/** The drawing alone, with its key and title block, on one page. */
export function sheetDocument(report: ReportModel, input: ReportInput): TDocumentDefinitions {
  const paper = paperOf(input);
  return {
    ...around(report, input, 'Process flow diagram'),
    content: firstPage(report, input, paper),
  };
}

/** The whole stream summary as a document for the PDF maker; the same input gives the same document. */
export function pdfDocument(report: ReportModel, input: ReportInput): TDocumentDefinitions {
  const paper = paperOf(input);
  const choices = input.sketch.documents;
  const part = (key: SectionKey, make: () => Content[]): Content[] => (isShown(choices, key) ? make() : []);
  const links = destinations(report, input);
  const style = (rowHead: string, first: number, ...others: Width[]): TableStyle => ({
    paper,
    rowHead,
    links,
    widths: [paper.name === 'A3' ? first : 0.72 * first, ...others],
  });
  const table = (of: Table, ...styled: Parameters<typeof style>): Content =>
    titledTable(of, style(...styled));
  const w = (points: number): number => (paper.name === 'A3' ? points : 0.72 * points);
  const share = (of: number): Width => ({ share: of });
  const sheet = part('sheet', () => firstPage(report, input, paper));
  const sections: Content[] = [
    table(report.revisions, 'Revision', 60, w(80), share(1), w(110), w(110), w(110)),
    ...part('basis', () => [
      table(report.basis, 'What', 220, share(1)),
      ...(report.utilities.rows.length > 0
        ? [table(report.utilities, 'Level', 200, w(80), w(120), w(120), share(1))]
        : []),
    ]),
    ...part('streams', () => streamPages(report.streams, paper)),
    ...part('duties', () => [
      titledTable(report.duties, {
        ...style('Unit', 60, w(120), share(1), w(90), w(90), w(90), w(90), share(1.6)),
        pageBreak: true,
      }),
      table(report.powers, 'Unit', 60, w(120), share(1), w(120), w(120), w(120)),
    ]),
    ...part('units', () => [table(report.units, 'Tag', 60, w(110), share(1), w(90), share(3.6))]),
    ...part('columns', () => columnPages(report.columns, paper)),
    ...part('closure', () => [table(report.closure, 'Balance', 220, w(130), w(130), w(110), w(100))]),
    ...part('requirements', () => [
      table(report.requirements, 'Stream', 80, share(1.2), w(100), w(100), w(120), share(1), share(1)),
    ]),
    ...part('limits', () => [table(report.limits, 'Where', 100, w(84), share(2), share(1), share(1.2))]),
    ...part('assumptions', () => [
      table(report.assumptions, 'No.', 40, share(1.3), share(1), share(2), w(70)),
      table(report.holds, 'No.', 70, share(2), share(1), w(110), w(110)),
    ]),
    ...part('model', () => [
      table(report.pairs, 'Pair', 260, w(70), w(100), share(1)),
      titledList('sources', 'Sources', report.sources, paper),
    ]),
    titledList('cautions', 'Cautions', report.cautions, paper),
  ];
  const entries = entriesOf([sheet, sections]);
  return {
    ...around(report, input, 'Stream summary (heat and material balance)'),
    content: [...sheet, contentsPage(report, paper, { entries, isFirst: sheet.length === 0 }), ...sections],
  };
}

/** Where links may lead in this document. */
function destinations(report: ReportModel, input: ReportInput): Destinations {
  const choices = input.sketch.documents;
  return new Set([
    ...(isShown(choices, 'streams') ? report.streams.columns.map((c) => `stream.${c.key}`) : []),
    ...(isShown(choices, 'columns') ? report.columns.map((c) => `column.${c.key}`) : []),
  ]);
}
