import type { TitleBlock } from '../sketch/types';
import { type Frame, ZONES_ACROSS, ZONES_DOWN } from './frame';
import { cutText, measureText, wrapText } from './metrics';
import type { Box, PathShape, TextShape } from './types';

/** Sheets of ISO 216, landscape [mm]. */
const PAPERS = { A3: { w: 420, h: 297 }, A4: { w: 297, h: 210 } } as const;
export type SheetPaper = keyof typeof PAPERS;

/** Border with the zone marks, title block, and what is kept clear around the drawing [mm]. */
const MM = {
  edge: 5,
  border: 5,
  block: { w: 180, h: 30 },
  clear: 5,
  zone: 2.6,
  caption: 1.9,
  value: 2.8,
  title: 3.6,
  inset: 1.4,
} as const;
/** A small drawing is not blown up beyond this [px of the sheet for each mm of paper]. */
const LEAST_SCALE = 3.2;
const LETTERS = 'ABCDEF';
/** Cap height of Source Sans 3 over its font size [-], as the font's OS/2 table says. */
const CAPS = 0.66;
/** From line to line of a value in two lines, by its size [-]. */
const LINE = 1.12;

interface Cell {
  readonly caption: string;
  readonly value: string;
  /** In the title block [mm]. */
  readonly at: readonly [x: number, y: number, w: number, h: number];
  readonly large?: true;
}

/** The sheet a drawing is printed on. */
export interface SheetFrame extends Frame {
  /** Where the drawing goes: inside the border, above the title block. */
  readonly drawing: Box;
  readonly block: Box;
  /** Sheet px for each mm of the paper. */
  readonly scale: number;
}

/** What a sheet says besides its title block's fields. */
export interface SheetWords {
  /** "PRELIMINARY – NOT FOR CONSTRUCTION", or nothing. */
  readonly warning?: string;
  /** What the drawing had no room for, or nothing; stands beside the title block. */
  readonly leftOff?: string;
}

/** Cells of the title block, in ISO 7200's manner: who, what, which, when. */
function cellsOf(title: TitleBlock, warning: string): readonly Cell[] {
  const of = (value: string | undefined): string => value?.trim() ?? '';
  return [
    { caption: 'Project', value: of(title.project), at: [0, 0, 90, 8] },
    { caption: 'Area', value: of(title.area), at: [90, 0, 45, 8] },
    { caption: 'Purpose', value: of(title.purpose), at: [135, 0, 45, 8] },
    { caption: 'Title', value: of(title.title), at: [0, 8, 110, 14], large: true },
    { caption: 'Number', value: of(title.number), at: [110, 8, 45, 7] },
    { caption: 'Revision', value: of(title.revision), at: [155, 8, 25, 7] },
    { caption: 'Status', value: warning, at: [110, 15, 70, 7] },
    { caption: 'Date', value: of(title.date), at: [0, 22, 36, 8] },
    { caption: 'Author', value: of(title.author), at: [36, 22, 48, 8] },
    { caption: 'Checked', value: of(title.checked), at: [84, 22, 48, 8] },
    { caption: 'Approved', value: of(title.approved), at: [132, 22, 48, 8] },
  ];
}

const rectangle = ({ x, y, w, h }: Box): string => `M${r(x)} ${r(y)}H${r(x + w)}V${r(y + h)}H${r(x)}Z`;
const r = (value: number): number => Math.round(value * 100) / 100;
const ruled = (d: string, width: number, stroke: PathShape['stroke']): PathShape => ({
  d,
  width,
  stroke,
  fill: 'none',
});

/**
 * Border with zones and title block around a drawing, on A3 or A4 landscape: the smallest such sheet that holds it, in the
 * drawing's own px. What is too long for its cell is set smaller, then in two lines, then cut with an ellipsis.
 *
 * @param drawing the box of the scene
 */
export function sheetFrame(
  drawing: Box,
  paper: SheetPaper,
  title: TitleBlock,
  { warning = '', leftOff = '' }: SheetWords = {},
): SheetFrame {
  const { w: W, h: H } = PAPERS[paper];
  const off = MM.edge + MM.border;
  const room = {
    w: W - 2 * (off + MM.clear),
    h: H - 2 * (off + MM.clear) - MM.block.h,
  };
  const scale = Math.max(drawing.w / room.w, drawing.h / room.h, LEAST_SCALE);
  const [w, h] = [W * scale, H * scale];
  const middle = [drawing.x + drawing.w / 2, drawing.y + drawing.h / 2] as const;
  const page: Box = { x: middle[0] - w / 2, y: middle[1] - (off + MM.clear + room.h / 2) * scale, w, h };
  const onPage = (x: number, y: number, bw: number, bh: number): Box => ({
    x: page.x + x * scale,
    y: page.y + y * scale,
    w: bw * scale,
    h: bh * scale,
  });
  const outer = onPage(MM.edge, MM.edge, W - 2 * MM.edge, H - 2 * MM.edge);
  const inner = onPage(off, off, W - 2 * off, H - 2 * off);
  const block = onPage(W - off - MM.block.w, H - off - MM.block.h, MM.block.w, MM.block.h);
  const cells = cellsOf(title, warning).map((cell) => {
    const [x, y, cw, ch] = cell.at;
    return { cell, box: { x: block.x + x * scale, y: block.y + y * scale, w: cw * scale, h: ch * scale } };
  });
  const zones = zoneMarks(outer, inner, scale);
  const thin = 0.25 * scale;
  return {
    page,
    inner,
    drawing: onPage(off + MM.clear, off + MM.clear, room.w, room.h),
    block,
    scale,
    paths: [
      ruled(rectangle(outer), thin, 'rule'),
      ruled(zones.ticks, thin, 'rule'),
      ruled(cells.map(({ box }) => rectangle(box)).join(''), thin, 'hair'),
      ruled(rectangle(inner), 2 * thin, 'ink'),
      ruled(rectangle(block), 2 * thin, 'ink'),
    ],
    texts: [
      ...zones.texts,
      ...cells.flatMap(({ cell, box }) => cellTexts(cell, box, scale)),
      ...(leftOff === '' ? [] : [beside(leftOff, inner, block, scale)]),
    ],
  };
}

/** At the foot of the sheet, left of the title block. */
function beside(words: string, inner: Box, block: Box, scale: number): TextShape {
  const size = MM.value * scale;
  const inset = 2 * MM.inset * scale;
  return {
    at: [inner.x + inset, inner.y + inner.h - inset],
    text: cutText(words, block.x - inner.x - 2 * inset, size, 400),
    size,
    weight: 400,
    anchor: 'start',
    ink: 'ink3',
  };
}

/** Sizes in which a value is tried, by the size of its cell [-]. */
const SMALLER = [1, 0.85, 0.7] as const;

/** A value in the largest size in which it fits its cell: in one line, in as many as there is height for, or cut at last. */
function valueIn(
  value: string,
  room: { readonly w: number; readonly h: number },
  full: number,
): { readonly rows: readonly string[]; readonly size: number } {
  for (const share of SMALLER) {
    const size = full * share;
    const rows = wrapText(value, room.w, size, 600);
    const whole = rows.every((row) => measureText(row, size, 600) <= room.w);
    if (whole && rows.length <= Math.max(1, Math.floor(room.h / (size * LINE)))) return { rows, size };
  }
  const size = full * SMALLER[SMALLER.length - 1]!;
  const most = Math.max(1, Math.floor(room.h / (size * LINE)));
  const wrapped = wrapText(value, room.w, size, 600);
  const rest = wrapped.slice(most - 1).join(' ');
  return { rows: [...wrapped.slice(0, most - 1), cutText(rest, room.w, size, 600)], size };
}

function cellTexts({ caption, value, large }: Cell, box: Box, scale: number): readonly TextShape[] {
  const inset = MM.inset * scale;
  const small = MM.caption * scale;
  const head: TextShape = {
    at: [box.x + inset, box.y + 0.8 * scale + small * CAPS],
    text: caption,
    size: small,
    weight: 400,
    anchor: 'start',
    ink: 'ink3',
  };
  if (value === '') return [head];
  const under = (0.8 + MM.caption * CAPS + 0.5) * scale;
  const room = { w: box.w - 2 * inset, h: box.h - under - 0.6 * scale };
  const { rows, size } = valueIn(value, room, (large ? MM.title : MM.value) * scale);
  const bottom = box.y + box.h - (rows.length > 1 && !large ? 0.8 : 1.2) * scale;
  return [
    head,
    ...rows.map(
      (text, k): TextShape => ({
        at: [box.x + inset, bottom - (rows.length - 1 - k) * size * LINE],
        text,
        size,
        weight: 600,
        anchor: 'start',
        ink: 'ink',
      }),
    ),
  ];
}

/** Zones 1 to 8 across and A to F down, named at both edges between the two borders. */
function zoneMarks(
  outer: Box,
  inner: Box,
  scale: number,
): { readonly ticks: string; readonly texts: readonly TextShape[] } {
  const texts: TextShape[] = [];
  let ticks = '';
  const size = MM.zone * scale;
  const name = (x: number, y: number, text: string): void => {
    const at = [x, y + (size * CAPS) / 2] as const;
    texts.push({ at, text, size, weight: 400, anchor: 'middle', ink: 'ink3' });
  };
  const half = (MM.border * scale) / 2;
  const [right, bottom] = [outer.x + outer.w, outer.y + outer.h];
  for (let k = 0; k < ZONES_ACROSS; k++) {
    const x = inner.x + (inner.w * (k + 0.5)) / ZONES_ACROSS;
    name(x, outer.y + half, `${k + 1}`);
    name(x, bottom - half, `${k + 1}`);
    const edge = r(inner.x + (inner.w * k) / ZONES_ACROSS);
    if (k > 0) ticks += `M${edge} ${r(outer.y)}V${r(inner.y)}M${edge} ${r(inner.y + inner.h)}V${r(bottom)}`;
  }
  for (let k = 0; k < ZONES_DOWN; k++) {
    const y = inner.y + (inner.h * (k + 0.5)) / ZONES_DOWN;
    name(outer.x + half, y, LETTERS[k]!);
    name(right - half, y, LETTERS[k]!);
    const edge = r(inner.y + (inner.h * k) / ZONES_DOWN);
    if (k > 0) ticks += `M${r(outer.x)} ${edge}H${r(inner.x)}M${r(inner.x + inner.w)} ${edge}H${r(right)}`;
  }
  return { ticks, texts };
}
