import { hull } from '../boxes';
import { pathToSvg } from '../svg';
import { type Palette, PRINT, WEIGHT } from '../tokens';
import type { Box, PathShape, Point } from '../types';
import { plainSymbol, SYMBOLS } from './registry';
import { arrowhead, linkShapes, solid } from './shapes';

/** A kind as it stands on the shelf: its paths and the box they fill. */
export interface Icon {
  readonly box: Box;
  readonly paths: readonly PathShape[];
}

const DOT_BOX: Box = { x: -28, y: -6, w: 56, h: 32 };

/** A heat link on the shelf is short and its arrowhead large, so that in and out are told apart [px]. */
const REACH = 22;
const HEAD: readonly [number, number] = [12, 7];

/** The shelf's picture of a kind, made of the same data as its symbol; heat shows which way it goes. */
export function iconOf(kind: string): Icon {
  const own = Object.hasOwn(SYMBOLS, kind) ? SYMBOLS[kind]?.icon : undefined;
  if (own) return { box: DOT_BOX, paths: own };
  const { box, paths, links = [] } = plainSymbol(kind);
  const [link] = links;
  if (!link || link.carries === 'shaft') return { box, paths };
  if (links.length > 1) {
    const drawn = links.map(linkShapes).flatMap(({ line, marks }) => [line, ...marks]);
    return { box, paths: [...paths, ...drawn] };
  }
  const [x, y] = link.from;
  const length = Math.hypot(link.to[0] - x, link.to[1] - y);
  const [ux, uy]: Point = [(link.to[0] - x) / length, (link.to[1] - y) / length];
  const at = (reach: number): Point => [x + ux * reach, y + uy * reach];
  const foot = at(REACH);
  const [from, to] = [at(link.flow === 'in' ? HEAD[0] : 0), at(REACH - (link.flow === 'out' ? HEAD[0] : 0))];
  const line: PathShape = {
    d: `M${from[0]} ${from[1]}L${to[0]} ${to[1]}`,
    width: WEIGHT.outline,
    stroke: 'ink',
    fill: 'none',
  };
  const head =
    link.flow === 'in'
      ? [solid(arrowhead(link.from, [-ux, -uy], ...HEAD))]
      : link.flow === 'out'
        ? [solid(arrowhead(foot, [ux, uy], ...HEAD))]
        : [];
  const reach: Box = {
    x: Math.min(x, foot[0]),
    y: Math.min(y, foot[1]),
    w: Math.abs(foot[0] - x),
    h: Math.abs(foot[1] - y),
  };
  return { box: hull([box, reach])!, paths: [line, ...paths, ...head] };
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
