import { boxAround, grown, overlaps, pieceBoxes } from './boxes';
import { DIAMOND, diamondPlaces, piecesByLength } from './diamonds';
import { sizeOf } from './ground';
import { HALF_LINE, type HandGround, seenBox, seenLeader } from './handGround';
import { atAnchor, CLEAR, type LabelWish } from './labelPlaces';
import { scaledSize } from './labelSize';
import { ALOOF, NEARER } from './labels';
import { labelAt } from './layout';
import { distanceTo, distanceToLine } from './near';
import { piecesOf } from './nudge';
import type { Box, LabelShape, LineShape, Point } from './types';

/** A line as it runs under the hand. */
export interface HandLine {
  readonly points: readonly Point[];
  /** The shift of all of it, when both its ends move alike. */
  readonly alike?: Point;
  readonly freeEnd?: 'first' | 'last';
}

/** A line with the label it had before the hand came. */
export interface Marked {
  readonly line: LineShape;
  readonly label: LabelShape | undefined;
}

export interface Marks {
  /** Undefined: no room. */
  readonly diamonds: ReadonlyMap<number, Point | undefined>;
  readonly labels: ReadonlyMap<number, LabelShape>;
}

const add = ([x, y]: Point, [dx, dy]: Point): Point => [x + dx, y + dy];

/** A label that goes with its diamond. */
function movedLabel(label: LabelShape, by: Point): LabelShape {
  return {
    ...label,
    box: { ...label.box, x: label.box.x + by[0], y: label.box.y + by[1] },
    hold: add(label.hold, by),
    ...(label.leader ? { leader: [add(label.leader[0], by), add(label.leader[1], by)] } : {}),
    numberRight: label.numberRight + by[0],
    unitLeft: label.unitLeft + by[0],
    baseline: label.baseline + by[1],
  };
}

export function middleOf(points: readonly Point[]): { readonly at: Point; readonly piece: number } {
  const piece = piecesByLength(points)[0] ?? 0;
  const [a, b] = [points[piece]!, points[piece + 1]!];
  return { at: [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2], piece };
}

/** The piece of a line that a point lies on. */
function pieceAt(points: readonly Point[], [x, y]: Point): number {
  const on = pieceBoxes(points, 1).findIndex((b) => x >= b.x && x <= b.x + b.w && y >= b.y && y <= b.y + b.h);
  return Math.max(0, on);
}

/**
 * Diamonds and labels of lines that the hand moves, and of those that it comes upon: each where it covers nothing, a label
 * at its diamond as it was or on another side of it. What finds no room is left off until the hand lets go.
 *
 * @param lines all lines as they run now, those of `changed` elsewhere than before
 */
export function marksUnderHand(
  ground: HandGround,
  before: readonly Marked[],
  lines: readonly HandLine[],
  changed: ReadonlySet<number>,
  upon: ReadonlySet<number>,
): Marks {
  const { scale } = ground;
  const all = [...changed, ...upon];
  for (const k of all) {
    ground.takeOut('diamond', k);
    ground.takeOut('label', k);
  }
  const crossings = crossingsOfSome(
    lines.map((line) => line.points),
    new Set(all),
  );
  const diamonds = new Map<number, Point | undefined>();
  for (const k of all) {
    const at =
      stillFree(ground, before[k]!, lines[k]!, k) ??
      placeOf(ground, lines[k]!.points, k, crossings.get(k) ?? []);
    diamonds.set(k, at);
    ground.putDiamond(k, at);
  }
  const labels = new Map<number, LabelShape>();
  for (const k of all) {
    const { line, label } = before[k]!;
    if (!label) continue;
    const { points, freeEnd } = lines[k]!;
    const at = diamonds.get(k);
    const anchor = at
      ? { at, piece: pieceAt(points, at), diamond: true }
      : { ...middleOf(points), diamond: false };
    const size = sizeOf(label.rows);
    const wish: LabelWish = {
      points,
      anchor,
      size: scaledSize(size, scale),
      half: HALF_LINE,
      scale,
      ...(freeEnd ? { freeEnd } : {}),
    };
    const held = line.diamond ?? middleOf(line.points).at;
    const along = movedLabel(label, [anchor.at[0] - held[0], anchor.at[1] - held[1]]);
    const now = asItWas(ground, along, wish, k) ?? elsewhere(ground, along, wish, k);
    labels.set(k, now);
    ground.putLabel(k, now);
  }
  return { diamonds, labels };
}

/** With many lines under the hand: marks of lines that move as they are move along, the others are left off. */
export function marksMovedAlong(
  before: readonly Marked[],
  lines: readonly HandLine[],
  changed: ReadonlySet<number>,
): Marks {
  const diamonds = new Map<number, Point | undefined>();
  const labels = new Map<number, LabelShape>();
  for (const k of changed) {
    const { line, label } = before[k]!;
    const { alike } = lines[k]!;
    diamonds.set(k, alike && line.diamond && add(line.diamond, alike));
    if (label) labels.set(k, alike ? movedLabel(label, alike) : { ...label, folded: true });
  }
  return { diamonds, labels };
}

const isClear = (ground: HandGround, at: Point, k: number): boolean =>
  !ground.labels.hits(boxAround(at, DIAMOND * ground.scale), CLEAR * ground.scale, k);

/** Where a diamond stood, moved with its line when all of that moves; undefined when something is there now. */
function stillFree(
  ground: HandGround,
  { line }: Marked,
  { points, alike }: HandLine,
  k: number,
): Point | undefined {
  const at = line.diamond && (alike ? add(line.diamond, alike) : line.diamond);
  if (!at || !(alike || line.points === points)) return undefined;
  const isFree = !ground.taken.hits(boxAround(at, DIAMOND * ground.scale), 2, k);
  return isFree && isClear(ground, at, k) ? at : undefined;
}

/** Where a diamond usually stands. */
function placeOf(
  ground: HandGround,
  points: readonly Point[],
  k: number,
  crossings: readonly Point[],
): Point | undefined {
  for (const { at } of diamondPlaces(points, k, ground.taken, crossings, ground.scale))
    if (isClear(ground, at, k)) return at;
  return undefined;
}

/** Covers nothing and can only be read as its own stream's. */
function isAllowed(ground: HandGround, box: Box, { points, scale, anchor }: LabelWish, k: number): boolean {
  if (ground.taken.hits(box, CLEAR * scale) || ground.labels.hits(box, CLEAR * scale, k)) return false;
  const toMiddle = anchor.diamond ? distanceTo(box, anchor.at) : Infinity;
  const own = Math.min(distanceToLine(box, points), toMiddle - (DIAMOND * scale) / Math.SQRT2);
  if (ground.lines.hits(box, own + NEARER * scale, k)) return false;
  return !ground.middles.hits(box, anchor.diamond ? toMiddle + NEARER * scale : (DIAMOND + ALOOF) * scale, k);
}

function asItWas(ground: HandGround, label: LabelShape, wish: LabelWish, k: number): LabelShape | undefined {
  const { scale, anchor } = wish;
  if (label.folded) return undefined;
  const box = seenBox(label, scale);
  if (!label.leader) return isAllowed(ground, box, wish, k) ? label : undefined;
  const [dots, stone] = [seenLeader(label, scale), boxAround(anchor.at, DIAMOND * scale)];
  const isFree =
    anchor.diamond &&
    !ground.taken.hits(box, CLEAR * scale) &&
    !ground.labels.hits(box, CLEAR * scale, k) &&
    dots.every((dot) => overlaps(dot, stone) || !ground.taken.hits(dot, 0, `diamond ${k}`)) &&
    dots.every((dot) => !ground.labels.hits(dot, 0, k));
  return isFree ? label : undefined;
}

/** On another side of its diamond, else left off. */
function elsewhere(ground: HandGround, label: LabelShape, wish: LabelWish, k: number): LabelShape {
  const { rows, stale, stream } = label;
  for (const box of atAnchor(wish)) {
    if (!isAllowed(ground, box, wish, k)) continue;
    return { ...labelAt(stream, wish, { box, anchor: wish.anchor }, sizeOf(rows)), rows, stale };
  }
  return { ...labelAt(stream, wish, undefined, sizeOf(rows)), rows, stale };
}

/** Where some lines cross others. */
function crossingsOfSome(
  lines: readonly (readonly Point[])[],
  some: ReadonlySet<number>,
): ReadonlyMap<number, readonly Point[]> {
  const pieces = piecesOf(lines);
  const out = new Map<number, Point[]>();
  for (const a of pieces) {
    if (!some.has(a.line)) continue;
    for (const b of pieces) {
      if (a.across === b.across || a.line === b.line) continue;
      if (b.at < a.lo || b.at > a.hi || a.at < b.lo || a.at > b.hi) continue;
      const list = out.get(a.line) ?? [];
      list.push(a.across ? [b.at, a.at] : [a.at, b.at]);
      out.set(a.line, list);
    }
  }
  return out;
}

/** Lines left where they were whose diamond or label the hand comes upon. */
export function comeUpon(
  before: readonly Marked[],
  changed: ReadonlySet<number>,
  boxes: readonly Box[],
  scale: number,
): ReadonlySet<number> {
  const upon = new Set<number>();
  before.forEach(({ line, label }, k) => {
    if (changed.has(k)) return;
    const stone = line.diamond && grown(boxAround(line.diamond, DIAMOND * scale), 2);
    const room =
      label && !label.folded
        ? [grown(seenBox(label, scale), CLEAR * scale), ...seenLeader(label, scale)]
        : [];
    const own = stone ? [stone, ...room] : room;
    if (own.some((one) => boxes.some((box) => overlaps(one, box)))) upon.add(k);
  });
  return upon;
}
