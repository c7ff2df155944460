import type { StreamId } from '../engine/ids';
import { BoxIndex, boxAround, hull, pieceBoxes } from './boxes';
import { DIAMOND, type DiamondPlace, piecesByLength, placeDiamond } from './diamonds';
import type { Ground } from './ground';
import { foldedBox, type LabelWish, placeLabels, rowsIn } from './labels';
import { bridgesOf, drawPath } from './path';
import { keepSame } from './same';
import { WEIGHT } from './tokens';
import type { Box, LabelShape, LineShape, Point } from './types';
import { placeTexts, type UnitTexts } from './units';
import { crossingsOf, type RouteCache, type Wire, wireSheet } from './wiring';

const HALF_LINE = WEIGHT.material / 2;
const EMPTY: Box = { x: 0, y: 0, w: 0, h: 0 };

/** A label without its digits. */
export type LabelPlace = Omit<LabelShape, 'rows' | 'stale'>;

/** Where everything stands. Digits, states and limits have no say in it. */
export interface Layout {
  readonly box: Box;
  readonly lines: readonly LineShape[];
  /** One for each unit. */
  readonly texts: readonly UnitTexts[];
  readonly labels: readonly LabelPlace[];
  readonly routes: RouteCache;
}

/** @param before an earlier layout: its ways are kept where they still hold, its lines wherever nothing changed */
export function layOut(ground: Ground, before: Layout | undefined): Layout {
  const { standing, ribbons } = ground;
  const { wires, cache } = wireSheet(ground.streams, standing, before?.routes);
  const symbolBoxes = standing.flatMap((u) => (u.linkBox ? [u.box, u.linkBox] : [u.box]));

  const places = placeDiamonds(wires, symbolBoxes);
  const lines = drawLines(wires, places);
  const taken = new BoxIndex();
  for (const box of symbolBoxes) taken.add(box);
  wires.forEach((wire, k) => {
    const half = (ribbons?.get(wire.stream.id) ?? 0) / 2;
    for (const box of pieceBoxes(wire.points, Math.max(half, HALF_LINE))) taken.add(box, k);
    taken.add(boxAround(wire.points.at(-1)!, 4));
    const place = places[k];
    if (place) taken.add(boxAround(place.at, DIAMOND));
  });
  const { texts, boxes } = placeTexts(standing, ground.rooms, taken);
  const labels = layLabels(wires, places, ground, taken);

  return {
    box:
      hull([
        ...symbolBoxes,
        ...boxes,
        ...wires.flatMap((wire) => pieceBoxes(wire.points, HALF_LINE)),
        ...places.flatMap((place) => (place ? [boxAround(place.at, DIAMOND)] : [])),
        ...labels.filter((label) => !label.folded).map((label) => label.box),
      ]) ?? EMPTY,
    lines: before ? keepSame(lines, before.lines, (line) => line.stream) : lines,
    texts,
    labels,
    routes: cache,
  };
}

function placeDiamonds(
  wires: readonly Wire[],
  symbols: readonly Box[],
): readonly (DiamondPlace | undefined)[] {
  const taken = new BoxIndex();
  for (const box of symbols) taken.add(box);
  wires.forEach((wire, k) => {
    for (const box of pieceBoxes(wire.points, HALF_LINE)) taken.add(box, k);
  });
  const crossings = crossingsOf(wires.map((wire) => wire.points));
  return wires.map((wire, k) => {
    const place = placeDiamond(wire.points, k, taken, crossings[k]!);
    if (place) taken.add(boxAround(place.at, DIAMOND));
    return place;
  });
}

function drawLines(
  wires: readonly Wire[],
  places: readonly (DiamondPlace | undefined)[],
): readonly LineShape[] {
  const bridges = bridgesOf(wires.map((wire) => wire.points));
  return wires.map((wire, k) => {
    const { d, head, arrow } = drawPath(wire.points, bridges.get(k), wire.reach);
    const place = places[k];
    return {
      stream: wire.stream.id,
      number: wire.stream.number,
      points: wire.points,
      d,
      arrow,
      head,
      ...(place ? { diamond: place.at } : {}),
      hanging: wire.hanging,
    };
  });
}

/** Middle of the longest piece: what a label names when its line is too short for a diamond. */
function middleOf(points: readonly Point[]): { readonly at: Point; readonly piece: number } {
  const piece = piecesByLength(points)[0]!;
  const [a, b] = [points[piece]!, points[piece + 1]!];
  return { at: [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2], piece };
}

function layLabels(
  wires: readonly Wire[],
  places: readonly (DiamondPlace | undefined)[],
  { sizes, ribbons }: Ground,
  taken: BoxIndex,
): readonly LabelPlace[] {
  const wanted = wires.flatMap((wire, k): { stream: StreamId; wish: LabelWish }[] => {
    const size = sizes.get(wire.stream.id);
    if (!size) return [];
    const place = places[k];
    const wish: LabelWish = {
      points: wire.points,
      anchor: { ...(place ?? middleOf(wire.points)), diamond: place !== undefined },
      size,
      ...(wire.freeEnd ? { freeEnd: wire.freeEnd } : {}),
      half: Math.max((ribbons?.get(wire.stream.id) ?? 0) / 2, HALF_LINE),
    };
    return [{ stream: wire.stream.id, wish }];
  });
  const boxes = placeLabels(
    wanted.map(({ wish }) => wish),
    taken,
  );
  return wanted.map(({ stream, wish }, k) => {
    const box = boxes[k] ?? foldedBox(wish);
    return { stream, box, ...rowsIn(box, wish.size), folded: boxes[k] === undefined };
  });
}
