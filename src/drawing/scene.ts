import { CATALOGUE } from '../engine/units/catalogue';
import type { Sketch } from '../sketch/types';
import { BoxIndex, boxAround, hull, pieceBoxes, sameBox } from './boxes';
import { DIAMOND, type DiamondPlace, piecesByLength, placeDiamond } from './diamonds';
import { foldedBox, type LabelWish, labelSize, placeLabels, rowsIn } from './labels';
import { bridgesOf, drawPath } from './path';
import { keepSame } from './same';
import { standingUnits } from './standing';
import { WEIGHT } from './tokens';
import type { Box, LabelShape, LineShape, Point, Scene, SceneInput } from './types';
import { drawUnits } from './units';
import { crossingsOf, type RouteCache, type Wire, wireSheet } from './wiring';

const caches = new WeakMap<Scene, RouteCache>();
const HALF_LINE = WEIGHT.material / 2;
const EMPTY: Box = { x: 0, y: 0, w: 0, h: 0 };

/**
 * Everything on the sheet, placed: symbols, lines, diamonds, tags, duties and labels, in sheet px. Pure: the same sketch
 * and input give the same scene.
 *
 * @param before an earlier scene; its shapes are handed on as the same objects wherever nothing changed
 */
export function buildScene(sketch: Sketch, input: SceneInput, before?: Scene): Scene {
  const standing = standingUnits(sketch, input.moved, input.kinds ?? CATALOGUE);
  const { wires, cache } = wireSheet(sketch, standing, before && caches.get(before));
  const symbolBoxes = standing.flatMap((u) => (u.linkBox ? [u.box, u.linkBox] : [u.box]));

  const places = placeDiamonds(wires, symbolBoxes);
  const lines = drawLines(wires, places);
  const taken = new BoxIndex();
  for (const box of symbolBoxes) taken.add(box);
  wires.forEach((wire, k) => {
    const half = (input.ribbons?.get(wire.stream.id) ?? 0) / 2;
    for (const box of pieceBoxes(wire.points, Math.max(half, HALF_LINE))) taken.add(box, k);
    taken.add(boxAround(wire.points.at(-1)!, 4));
    const place = places[k];
    if (place) taken.add(boxAround(place.at, DIAMOND));
  });
  const drawn = drawUnits(standing, input, taken);
  const labels = drawLabels(wires, places, input, taken);

  const scene: Scene = {
    box:
      hull([
        ...symbolBoxes,
        ...drawn.boxes,
        ...wires.flatMap((wire) => pieceBoxes(wire.points, HALF_LINE)),
        ...places.flatMap((place) => (place ? [boxAround(place.at, DIAMOND)] : [])),
        ...labels.filter((label) => !label.folded).map((label) => label.box),
      ]) ?? EMPTY,
    units: drawn.shapes,
    lines,
    labels,
  };
  const kept = before ? keepScene(scene, before) : scene;
  caches.set(kept, cache);
  return kept;
}

function keepScene(next: Scene, before: Scene): Scene {
  const units = keepSame(next.units, before.units, (u) => u.unit);
  const lines = keepSame(next.lines, before.lines, (l) => l.stream);
  const labels = keepSame(next.labels, before.labels, (l) => l.stream);
  const same = sameBox(next.box, before.box);
  if (same && units === before.units && lines === before.lines && labels === before.labels) return before;
  return { box: same ? before.box : next.box, units, lines, labels };
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

function drawLabels(
  wires: readonly Wire[],
  places: readonly (DiamondPlace | undefined)[],
  input: SceneInput,
  taken: BoxIndex,
): readonly LabelShape[] {
  const wanted = wires.flatMap((wire, k) => {
    const rows = input.labels.get(wire.stream.id);
    if (!rows || rows.length === 0) return [];
    const place = places[k];
    const wish: LabelWish = {
      points: wire.points,
      anchor: { ...(place ?? middleOf(wire.points)), diamond: place !== undefined },
      size: labelSize(rows),
      ...(wire.freeEnd ? { freeEnd: wire.freeEnd } : {}),
      half: Math.max((input.ribbons?.get(wire.stream.id) ?? 0) / 2, HALF_LINE),
    };
    const from = wire.stream.from?.[0];
    const stale = from !== undefined && input.states.get(from) === 'out-of-date';
    return [{ wire, rows, wish, stale }];
  });
  const boxes = placeLabels(
    wanted.map(({ wish }) => wish),
    taken,
  );
  return wanted.map(({ wire, rows, wish, stale }, k) => {
    const box = boxes[k] ?? foldedBox(wish);
    return {
      stream: wire.stream.id,
      box,
      rows,
      ...rowsIn(box, wish.size),
      folded: boxes[k] === undefined,
      stale,
    };
  });
}
