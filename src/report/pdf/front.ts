import type { Content, TableCell } from 'pdfmake/interfaces';
import { limitMark } from '../../drawing/marks';
import { pathToSvg, sceneToSvg } from '../../drawing/svg';
import { FONT, PRINT } from '../../drawing/tokens';
import type { Scene } from '../../drawing/types';
import type { Weight } from '../../engine/outcome';
import { printed } from '../cells';
import type { ReportInput } from '../input';
import { leftOffPaper, paperScene } from '../sheet';
import type { ReportModel } from '../types';
import { anchor, contentsTable, type Entry } from './contents';
import { LINE, type Paper } from './paper';
import { fitted, wrapped } from './wrap';

/** Limits named under the drawing, worst first; all of them stand in their own table. */
const LIMITS_SHOWN = 6;

/** How large the drawing comes out on the first page [pt of the paper for each px]; never above its own size times 1.25. */
const scaleOn =
  (paper: Paper) =>
  ({ box }: Scene): number =>
    Math.min(paper.inner.w / (box.w + 16), paper.sheet / (box.h + 16), 1.25);

/** First page: the drawing in the middle of its room, and below it key, limits, closure and title block. */
export function firstPage(report: ReportModel, input: ReportInput, paper: Paper): Content[] {
  const scene = paperScene(input, scaleOn(paper));
  return [drawing(scene, paper), foot(report, input, paper, leftOffPaper(scene))];
}

function drawing(scene: Scene, paper: Paper): Content {
  const [w, h] = [scene.box.w + 16, scene.box.h + 16];
  const scale = scaleOn(paper)(scene);
  const above = Math.max(0, (paper.sheet - h * scale) / 2);
  return {
    stack: [
      anchor({ key: 'sheet', title: 'Process flow diagram' }, above),
      { svg: sceneToSvg(scene, PRINT), width: w * scale, height: h * scale, alignment: 'center' },
    ],
    margin: [0, above, 0, above],
  };
}

const KEY: readonly (readonly [mark: string, words: string])[] = [
  [
    `<path d="M2 0H40" fill="none" stroke="${PRINT.ink}" stroke-width="1.9"/><path d="M40 -3.5L48 0L40 3.5Z" fill="${PRINT.ink}"/><path d="M15 0a4 4 0 1 0 8 0a4 4 0 1 0 -8 0Z" fill="${PRINT.ink}"/>`,
    'material stream; a dot joins or divides',
  ],
  [
    `<path d="M2 0H40" fill="none" stroke="${PRINT.ink}" stroke-width="1.2" stroke-dasharray="5 2.5"/><path d="M41.4 0a2.6 2.6 0 1 0 5.2 0a2.6 2.6 0 1 0 -5.2 0Z" fill="#FFFFFF" stroke="${PRINT.ink}" stroke-width="1.2"/>`,
    'heat link, ends in a ring; Q duty',
  ],
  [
    `<path d="M2 0H42" fill="none" stroke="${PRINT.ink}" stroke-width="1.2" stroke-dasharray="7 2 1.5 2"/><path d="M43 -5V5M46 -5V5" fill="none" stroke="${PRINT.ink}" stroke-width="1.2"/>`,
    'shaft link, ends in a double bar; W power',
  ],
  [
    `<path d="M25 -10L35 0L25 10L15 0Z" fill="#FFFFFF" stroke="${PRINT.ink}" stroke-width="1.1"/><text x="25" y="3.4" font-family="${FONT}" font-weight="600" font-size="9" text-anchor="middle" fill="${PRINT.ink}">8</text>`,
    'stream number; labels as on the sheet',
  ],
  [
    `<text x="25" y="1" font-family="${FONT}" font-weight="600" font-size="9.5" text-anchor="middle" fill="${PRINT.ink}">V-1</text><path d="M15 4.5H35M15 7H35" fill="none" stroke="${PRINT.ink}" stroke-width="0.9"/>`,
    'double rule under a tag: solved',
  ],
];
const KEY_STEP = 20;

function keySvg(): string {
  const rows = KEY.map(
    ([mark, words], k) =>
      `<g transform="translate(0 ${11 + k * KEY_STEP})">${mark}<text x="60" y="3.4" font-family="${FONT}" font-size="9.5" fill="${PRINT.ink}">${words}</text></g>`,
  );
  const height = KEY.length * KEY_STEP;
  return `<svg xmlns="http://www.w3.org/2000/svg" width="250" height="${height}" viewBox="0 0 250 ${height}">${rows.join('')}</svg>`;
}

/** Each in its own room, nothing runs over. */
function foot(report: ReportModel, input: ReportInput, paper: Paper, leftOff: string): Content {
  const scale = paper.name === 'A3' ? 1 : 0.72;
  const size = paper.name === 'A3' ? 8.5 : 6.6;
  const widths = [262, 318, 232, 322].map((w) => (w * (paper.inner.w - 36)) / 1134);
  const head = (text: string): Content => ({
    text,
    bold: true,
    fontSize: size + 1.5,
    margin: [0, 0, 0, 3 * scale],
  });
  const lines = (texts: readonly string[], width: number, most: number): Content[] => {
    const all = texts.flatMap((text) => fitted(text, width, size, 2).split('\n'));
    return all.slice(0, most).map((text): Content => ({ text, fontSize: size, margin: [0, 0.8, 0, 0] }));
  };
  const most = Math.floor((paper.foot - 8 - (size + 1.5) * LINE - 3) / (size * LINE + 0.8));
  const limits = report.limits.rows.slice(0, LIMITS_SHOWN).map(
    (row): Content => ({
      columns: [
        { svg: markSvg(row.mark), width: size + 1, margin: [0, 1, 0, 0] },
        {
          text: fitted(`${row.label}: ${row.title ?? ''}`, (widths[1] ?? 0) - size - 8, size, 1),
          fontSize: size,
          width: '*',
        },
      ],
      columnGap: 5,
      margin: [0, 0.8, 0, 0],
    }),
  );
  const more = report.limits.rows.length - LIMITS_SHOWN;
  return {
    margin: [0, 6, 0, 0],
    table: {
      widths,
      heights: paper.foot - 8,
      body: [
        [
          {
            stack: [head('Process flow diagram: key'), { svg: keySvg(), width: 250 * scale }],
          },
          {
            stack: [
              head('Limits'),
              ...limits,
              ...lines(
                [
                  ...(limits.length > 0
                    ? []
                    : ['None of the built-in checks fired. That is no proof of safety.']),
                  ...(more > 0 ? [`and ${more} more: see the list of limits`] : []),
                ],
                widths[1] ?? 0,
                most,
              ),
            ],
          },
          {
            stack: [
              head('Closure'),
              ...lines([...closureLines(report, input), ...(leftOff ? [leftOff] : [])], widths[2] ?? 0, most),
            ],
          },
          titleBlock(report, widths[3] ?? 0, scale),
        ],
      ],
    },
    layout: {
      hLineWidth: (i) => (i === 0 ? 0.6 : 0),
      vLineWidth: (i) => (i === 0 || i === 4 ? 0 : 0.6),
      hLineColor: () => PRINT.hair,
      vLineColor: () => PRINT.hair,
      paddingTop: () => 5,
      paddingBottom: () => 0,
      paddingLeft: (i) => (i === 0 ? 0 : 6),
      paddingRight: (i) => (i === 3 ? 0 : 6),
    },
  };
}

/** The mark of a limit as on the sheet. */
function markSvg(weight: Weight = 'note'): string {
  const paths = limitMark(weight).map((path) => pathToSvg(path, PRINT));
  return `<svg xmlns="http://www.w3.org/2000/svg" width="16" height="16" viewBox="-8 -8 16 16">${paths.join('')}</svg>`;
}

function closureLines(report: ReportModel, { basis }: ReportInput): string[] {
  const model = report.title.find((t) => t.label === 'Thermodynamic model')?.text ?? '';
  const figures = report.closure.rows.slice(0, 2).map((row) => {
    const [into, out, , relative] = row.cells.map(printed);
    return `${row.label}: in ${into}, out ${out} ${row.unit ?? ''}, relative ${relative}`;
  });
  return [
    ...(figures.length > 0 ? figures : ['open: not every unit is solved']),
    'Closure shows arithmetic, not that the model is right.',
    report.state.text,
    ...requirementLine(report),
    basis.model.pairs.length > 0 ? `${model}, ${basis.model.pairs.length} pairs` : model,
  ];
}

/** "Product requirements: 2 met, 1 missed"; nothing where none is given. */
function requirementLine({ requirements }: ReportModel): string[] {
  const verdicts = requirements.rows.map((row) => (row.cells[4] ? printed(row.cells[4]) : ''));
  if (verdicts.length === 0) return [];
  const counts = [
    ['met', verdicts.filter((v) => v === 'met').length],
    ['missed', verdicts.filter((v) => v.startsWith('missed')).length],
    ['not known', verdicts.filter((v) => v.startsWith('not known')).length],
  ] as const;
  const said = counts.filter(([, n]) => n > 0).map(([word, n]) => `${n} ${word}`);
  return [`Product requirements: ${said.join(', ')}`];
}

function titleBlock(report: ReportModel, width: number, scale: number): TableCell {
  const entry = (label: string): string => report.title.find((t) => t.label === label)?.text ?? '';
  const quarter = width / 4;
  const block = (label: string, span = 1): TableCell => {
    const weight = label === 'Title' ? 600 : 400;
    const { text, size } = inRoom(entry(label) || '–', quarter * span - 10, weight);
    return {
      stack: [
        { text: label, fontSize: 6 * scale, color: PRINT.ink3 },
        { text, fontSize: size * scale, bold: weight === 600 },
      ],
      colSpan: span,
    };
  };
  /** A title block is read to its end: the letters are smaller where that is enough, else two lines, which four rows have room for. */
  function inRoom(words: string, room: number, weight: 400 | 600): { text: string; size: number } {
    const oneLine = [9.5, 8.5, 7.5].find((size) => fitted(words, room, size * scale, 1, weight) === words);
    const size = oneLine ?? 6;
    return { text: fitted(words, room, size * scale, 2, weight), size };
  }
  return {
    table: {
      widths: [1, 2, 3, 4].map(() => quarter - 8.2),
      body: [
        [block('Project', 2), {}, block('Area', 2), {}],
        [block('Title', 2), {}, block('Sheet number', 2), {}],
        [block('Author'), block('Checked'), block('Approved'), block('Date')],
        [block('Purpose', 3), {}, {}, block('Revision')],
      ],
    },
    layout: {
      hLineWidth: (i) => (i === 0 ? 0 : 0.5),
      vLineWidth: (i) => (i === 0 || i === 4 ? 0 : 0.5),
      hLineColor: () => PRINT.hair,
      vLineColor: () => PRINT.hair,
      paddingTop: () => 1.4 * scale,
      paddingBottom: () => 1.4 * scale,
    },
  };
}

/** Title block in full, contents with page numbers that lead there, and the state of the whole. */
export function contentsPage(
  report: ReportModel,
  paper: Paper,
  { entries, isFirst }: { readonly entries: readonly Entry[]; readonly isFirst: boolean },
): Content {
  const room = 0.42 * paper.inner.w;
  const size = paper.text + 0.5;
  const value = room - 120;
  const facts = [
    ...report.title,
    { label: 'State', text: report.state.text },
    { label: 'Fingerprint of the file', text: report.strip.fingerprint },
    { label: 'Program', text: report.strip.version },
    { label: 'Measures', text: report.strip.measures.replace(/^Measures: /, '') },
    { label: 'HOLDs', text: report.holds.rows.length === 0 ? 'none raised' : `${report.holds.rows.length}` },
  ];
  return {
    ...(isFirst ? {} : { pageBreak: 'before' }),
    columnGap: 40,
    columns: [
      {
        width: room,
        stack: [
          { text: 'Contents', bold: true, fontSize: paper.heading, margin: [0, 0, 0, 6], id: 'contents' },
          contentsTable(entries, size),
        ],
      },
      {
        width: room,
        stack: [
          { text: 'This document', bold: true, fontSize: paper.heading, margin: [0, 0, 0, 6] },
          {
            fontSize: size,
            table: {
              widths: [108, value],
              body: facts.map(({ label, text }): TableCell[] => [
                { text: label, color: PRINT.ink2 },
                { text: wrapped(text || '–', value, size) },
              ]),
            },
            layout: {
              hLineWidth: (i, node) => (i === 0 || i === node.table.body.length ? 0.9 : 0.35),
              vLineWidth: () => 0,
              hLineColor: (i, node) => (i === 0 || i === node.table.body.length ? PRINT.ink : PRINT.rule),
              paddingTop: () => 2,
              paddingBottom: () => 2,
            },
          },
        ],
      },
    ],
  };
}
