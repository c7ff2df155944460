import { BoxIndex, boxAround, boxOfPiece, grown } from '../drawing/boxes';
import { DIAMOND } from '../drawing/diamonds';
import { LIMIT_SIDE, STATE_ROOM } from '../drawing/marks';
import { measureText } from '../drawing/metrics';
import type { Box, Point, Scene, UnitShape } from '../drawing/types';
import type { StreamId } from '../engine/ids';
import { anchorOf, longestPiece } from './lines';
import type { Quiet } from './sheetStore';

/** Between these zooms text, diamonds and marks keep their size on the screen. */
export const SMALL = 0.5;
const LARGE = 1.5;
/** Below this zoom not everything has room. */
const CROWDED = 0.85;
const SHORTEST_ON_SCREEN = 40;
const CLEAR = 2;

/** By how much text is drawn larger than the sheet, so that it keeps its size on the screen. */
export const steadyScale = (zoom: number): number => 1 / Math.min(Math.max(zoom, SMALL), LARGE);

/** A box grown about a fixed point. */
export const scaledAbout = (box: Box, [x, y]: Point, k: number): Box => ({
  x: x + (box.x - x) * k,
  y: y + (box.y - y) * k,
  w: box.w * k,
  h: box.h * k,
});

/** The point of a box nearest to another point. */
export const nearestOf = (box: Box, [x, y]: Point): Point => [
  Math.min(Math.max(x, box.x), box.x + box.w),
  Math.min(Math.max(y, box.y), box.y + box.h),
];

/** Where a unit's tag and marks hang on its symbol while the zoom changes. */
export const tagHold = (unit: UnitShape): Point =>
  nearestOf(unit.box, unit.tagText?.at ?? unit.limit?.at ?? unit.at);

function tagBoxes(unit: UnitShape, k: number): readonly Box[] {
  const { tagText: tag, limit } = unit;
  const hold = tagHold(unit);
  const boxes: Box[] = [];
  if (tag) {
    const w = measureText(tag.text, tag.size, tag.weight);
    boxes.push({ x: tag.at[0], y: tag.at[1] - 10, w, h: 10 + STATE_ROOM });
  }
  if (limit) boxes.push(boxAround(limit.at, LIMIT_SIDE / 2));
  return boxes.map((box) => scaledAbout(box, hold, k));
}

const ALL_CLEAR: Quiet = { labels: new Set(), diamonds: new Set(), duties: false };

/**
 * What steps back at a zoom. At 85 % and above nothing does. Below, duties go, pieces under 40 px on the screen lose their
 * diamonds, and labels that would cover something fold into theirs: those of streams between units first, those of feeds
 * and products last. Below 50 % only symbols, tags and lines stay.
 *
 * @param outer streams that come from a feed or lead out
 */
export function quietAt(scene: Scene, zoom: number, outer: ReadonlySet<StreamId>): Quiet {
  if (zoom >= CROWDED) return ALL_CLEAR;
  if (zoom < SMALL) {
    const all = new Set(scene.lines.map((line) => line.stream));
    return { labels: all, diamonds: all, duties: true };
  }
  const k = steadyScale(zoom);
  const taken = new BoxIndex();
  const standing = new BoxIndex();
  for (const unit of scene.units) {
    taken.add(unit.box);
    for (const box of tagBoxes(unit, k)) {
      taken.add(box);
      standing.add(box);
    }
  }
  const diamonds = new Set<StreamId>();
  for (const line of scene.lines) {
    for (let p = 0; p + 1 < line.points.length; p += 1) {
      taken.add(boxOfPiece(line.points[p]!, line.points[p + 1]!, 1));
    }
    if (!line.diamond || longestPiece(line.points) * zoom < SHORTEST_ON_SCREEN) diamonds.add(line.stream);
  }
  for (const line of scene.lines) {
    if (diamonds.has(line.stream)) continue;
    const box = boxAround(line.diamond!, DIAMOND * k);
    if (standing.hits(box)) diamonds.add(line.stream);
    else {
      standing.add(box);
      taken.add(box);
    }
  }
  const labels = new Set<StreamId>();
  const points = new Map(scene.lines.map((line) => [line.stream, line.points]));
  const inOrder = [...scene.labels].sort((a, b) => Number(outer.has(b.stream)) - Number(outer.has(a.stream)));
  for (const label of inOrder) {
    const line = points.get(label.stream);
    const box = line ? scaledAbout(label.box, anchorOf(line, label.box), k) : label.box;
    if (label.folded || taken.hits(grown(box, CLEAR))) labels.add(label.stream);
    else taken.add(box);
  }
  return { labels, diamonds, duties: true };
}
