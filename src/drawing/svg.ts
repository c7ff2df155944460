import { grown } from './boxes';
import { diamondPath } from './diamonds';
import type { Frame } from './frame';
import { limitMark } from './marks';
import { FONT, type Palette, PRINT, TEXT, WEIGHT } from './tokens';
import { toSheet, transformOf } from './transform';
import type { Box, LabelShape, LineShape, PathShape, Point, Scene, TextShape, UnitShape } from './types';

const escaped = (text: string): string =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
const n = (value: number): string => `${Math.round(value * 100) / 100}`;

/** One path with explicit attributes: no classes, no styles, so that every writer of SVG subsets can read it. */
export function pathToSvg(shape: PathShape, palette: Palette): string {
  const fill = shape.fill === 'none' ? 'none' : palette[shape.fill];
  const stroked = shape.stroke !== 'none' && shape.width > 0;
  const stroke = stroked
    ? ` stroke="${palette[shape.stroke]}" stroke-width="${n(shape.width)}" stroke-linejoin="round"` +
      (shape.dash ? ` stroke-dasharray="${shape.dash}"` : '')
    : '';
  return `<path d="${shape.d}" fill="${fill}"${stroke}/>`;
}

/** One text, on its baseline. A placed text covers nothing, so no halo is drawn. */
export function textToSvg(shape: TextShape, palette: Palette): string {
  return (
    `<text x="${n(shape.at[0])}" y="${n(shape.at[1])}" font-family="${FONT}" font-size="${shape.size}"` +
    `${shape.weight === 600 ? ' font-weight="600"' : ''}${shape.italic ? ' font-style="italic"' : ''}` +
    `${shape.anchor === 'start' ? '' : ` text-anchor="${shape.anchor}"`} fill="${palette[shape.ink]}">` +
    `${escaped(shape.text)}</text>`
  );
}

const material = (line: LineShape, heavier: number): readonly PathShape[] => [
  { d: line.d, width: WEIGHT.material * heavier, stroke: 'ink', fill: 'none' },
  ...(line.head ? [{ d: line.head, width: 0, stroke: 'none', fill: 'ink' } as const] : []),
];

/** Texts of a label, row by row: the number ends where the unit begins. */
export function labelTexts(label: LabelShape): readonly TextShape[] {
  return label.rows.flatMap((row, k): TextShape[] => {
    const y = label.baseline + k * TEXT.labelLine;
    const common = { weight: 400, ...(label.stale ? { italic: true } : {}) } as const;
    return [
      {
        ...common,
        at: [label.numberRight, y],
        text: row.number,
        size: TEXT.label,
        anchor: 'end',
        ink: label.stale ? 'ink3' : 'ink',
      },
      {
        ...common,
        at: [label.unitLeft, y],
        text: row.unit,
        size: TEXT.labelUnit,
        anchor: 'start',
        ink: 'ink3',
      },
    ];
  });
}

/** The thin line that joins a label to its diamond. */
export const leaderShape = ([a, b]: readonly [Point, Point]): PathShape => ({
  d: `M${n(a[0])} ${n(a[1])}L${n(b[0])} ${n(b[1])}`,
  width: WEIGHT.leader,
  stroke: 'ink3',
  fill: 'none',
});

/** A stream's diamond with its number. */
export function diamondShapes(
  line: LineShape,
): { readonly path: PathShape; readonly text: TextShape } | undefined {
  if (!line.diamond) return undefined;
  const [x, y] = line.diamond;
  return {
    path: { d: diamondPath(line.diamond), width: WEIGHT.diamond, stroke: 'ink', fill: 'paper' },
    text: {
      at: [x, y + 3.8],
      text: line.number,
      size: line.number.length > 3 ? 9 : TEXT.diamond,
      weight: 600,
      anchor: 'middle',
      ink: 'ink',
    },
  };
}

const pathsToSvg = (list: readonly PathShape[], palette: Palette): string =>
  list.map((p) => pathToSvg(p, palette)).join('');

const symbolInPlace = (shape: UnitShape, palette: Palette, heavier = 1): string => {
  const paths = shape.symbol.paths.map((p) => (heavier === 1 ? p : { ...p, width: p.width * heavier }));
  return `<g transform="${transformOf(shape)}">${pathsToSvg(paths, palette)}</g>`;
};

/** Lines of a small picture keep at least this weight [px]. */
const LIGHTEST = 1.1;

/** What keeps its size while the sheet is small, drawn larger about the point that it holds to. */
const grownAbout = (svg: string, [x, y]: Point, scale: number): string =>
  scale === 1 || svg === ''
    ? svg
    : `<g transform="translate(${n(x)} ${n(y)}) scale(${scale}) translate(${n(-x)} ${n(-y)})">${svg}</g>`;

function unitToSvg(shape: UnitShape, palette: Palette, textScale: number): string {
  const paths = (list: readonly PathShape[]): string => pathsToSvg(list, palette);
  const texts = (list: readonly TextShape[]): string => list.map((t) => textToSvg(t, palette)).join('');
  const links = shape.links.map(({ line, marks }) => paths([line, ...marks])).join('');
  const symbol = symbolInPlace(shape, palette) + texts(shape.texts);
  const port = shape.symbol.nameInside ? (shape.symbol.ports('out') ?? shape.symbol.ports('in')) : undefined;
  const flag = port ? toSheet(shape, port.at) : shape.at;
  let tag = paths(shape.stateMark) + texts([...(shape.tagText ? [shape.tagText] : []), ...shape.remarks]);
  if (shape.limit) {
    const [x, y] = shape.limit.at;
    tag += `<g transform="translate(${n(x)} ${n(y)})">${paths(limitMark(shape.limit.weight))}</g>`;
  }
  const duties = shape.links.map(({ text }) =>
    text ? grownAbout(textToSvg(text, palette), text.at, textScale) : '',
  );
  return (
    links +
    grownAbout(symbol, flag, port ? Math.min(textScale, shape.flagUpTo) : 1) +
    grownAbout(tag, shape.hold, Math.min(textScale, shape.tagUpTo)) +
    duties.join('')
  );
}

export interface SvgOptions {
  /** Border with zones; the picture is then its page. */
  readonly frame?: Frame;
  /** Only symbols and lines: what a small picture can show. */
  readonly bare?: boolean;
  /** Paint the ground in the palette's paper. */
  readonly ground?: boolean;
  /** Size of the picture [px]; absent: the size of what is drawn. */
  readonly width?: number;
  readonly height?: number;
}

/**
 * The scene as SVG text in the plain subset that the PDF writer reads: paths, texts and transforms with explicit
 * attributes. The font is Source Sans 3 under the name of tokens.ts; the reader brings it.
 */
export function sceneToSvg(scene: Scene, palette: Palette = PRINT, options: SvgOptions = {}): string {
  const { frame, bare = false, ground = false } = options;
  const view: Box = frame?.page ?? grown(scene.box, 8);
  const { width = view.w, height = view.h } = options;
  const scale = Math.min(width / view.w, height / view.h);
  const heavier = bare ? Math.max(1, LIGHTEST / (WEIGHT.material * scale)) : 1;
  const parts: string[] = [];
  if (ground) {
    parts.push(
      `<path d="M${view.x} ${view.y}h${view.w}v${view.h}h${-view.w}Z" fill="${palette.paper}" stroke="none"/>`,
    );
  }
  if (frame) {
    parts.push(...frame.paths.map((p) => pathToSvg(p, palette)));
    parts.push(...frame.texts.map((t) => textToSvg(t, palette)));
  }
  for (const { border } of bare ? [] : scene.notes) if (border) parts.push(pathToSvg(border, palette));
  for (const line of scene.lines) parts.push(...material(line, heavier).map((p) => pathToSvg(p, palette)));
  for (const unit of scene.units) {
    parts.push(bare ? symbolInPlace(unit, palette, heavier) : unitToSvg(unit, palette, scene.textScale));
  }
  if (!bare) {
    for (const line of scene.lines) {
      const diamond = diamondShapes(line);
      if (!diamond) continue;
      const svg = pathToSvg(diamond.path, palette) + textToSvg(diamond.text, palette);
      parts.push(grownAbout(svg, line.diamond!, scene.textScale));
    }
    for (const { texts, hold, upTo } of scene.notes) {
      const svg = texts.map((t) => textToSvg(t, palette)).join('');
      parts.push(grownAbout(svg, hold, Math.min(scene.textScale, upTo)));
    }
    for (const label of scene.labels) {
      if (label.folded) continue;
      const leader = label.leader ? pathToSvg(leaderShape(label.leader), palette) : '';
      const rows = labelTexts(label).map((t) => textToSvg(t, palette));
      parts.push(grownAbout(leader + rows.join(''), label.hold, scene.textScale));
    }
  }
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" width="${n(width)}" height="${n(height)}" ` +
    `viewBox="${n(view.x)} ${n(view.y)} ${n(view.w)} ${n(view.h)}">${parts.join('')}</svg>`
  );
}
