import { hull } from '../boxes';
import { pathToSvg } from '../svg';
import { type Palette, PRINT } from '../tokens';
import type { Box, PathShape } from '../types';
import { plainSymbol, SYMBOLS } from './registry';
import { linkShapes } from './shapes';

/** A kind as it stands on the shelf: its paths and the box they fill. */
export interface Icon {
  readonly box: Box;
  readonly paths: readonly PathShape[];
}

const DOT_BOX: Box = { x: -28, y: -6, w: 56, h: 32 };

/** The shelf's picture of a kind, made of the same data as its symbol, with its heat link. */
export function iconOf(kind: string): Icon {
  const own = Object.hasOwn(SYMBOLS, kind) ? SYMBOLS[kind]?.icon : undefined;
  if (own) return { box: DOT_BOX, paths: own };
  const symbol = plainSymbol(kind);
  if (!symbol.link) return { box: symbol.box, paths: symbol.paths };
  const { line } = linkShapes({ ...symbol.link, flow: 'none' });
  const { marks } = linkShapes(symbol.link);
  const [[x1, y1], [x2, y2]] = [symbol.link.from, symbol.link.to];
  const reach: Box = {
    x: Math.min(x1, x2) - 3,
    y: Math.min(y1, y2),
    w: Math.abs(x2 - x1) + 6,
    h: Math.abs(y2 - y1) + 3,
  };
  return { box: hull([symbol.box, reach])!, paths: [line, ...symbol.paths, ...marks] };
}

/** How an icon fits a rectangle: its scale, and line weights that come out as on the shelf [px]. */
export function fitIcon(
  icon: Icon,
  width: number,
  height: number,
): { readonly scale: number; readonly view: Box } {
  const pad = 1;
  const scale = Math.min((width - 2 * pad) / icon.box.w, (height - 2 * pad) / icon.box.h, 1);
  const [w, h] = [width / scale, height / scale];
  const cx = icon.box.x + icon.box.w / 2;
  const cy = icon.box.y + icon.box.h / 2;
  return { scale, view: { x: cx - w / 2, y: cy - h / 2, w, h } };
}

/** A kind's icon as SVG text; line weights do not shrink with the symbol. */
export function symbolToSvg(
  kind: string,
  size: { readonly width: number; readonly height: number } = { width: 30, height: 26 },
  palette: Palette = PRINT,
): string {
  const icon = iconOf(kind);
  const { scale, view } = fitIcon(icon, size.width, size.height);
  const paths = icon.paths.map((p) => pathToSvg({ ...p, width: (p.width * 0.8) / scale }, palette)).join('');
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" width="${size.width}" height="${size.height}" ` +
    `viewBox="${view.x} ${view.y} ${view.w} ${view.h}">${paths}</svg>`
  );
}
