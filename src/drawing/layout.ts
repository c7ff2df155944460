import type { StreamId, UnitId } from '../engine/ids';
import { BoxIndex, boxAround, hull, pieceBoxes } from './boxes';
import { crossingsOf } from './crossings';
import { DIAMOND, type DiamondPlace, diamondPlaces, piecesByLength } from './diamonds';
import type { Ground } from './ground';
import { foldedBox, type LabelWish } from './labelPlaces';
import { rowsIn, scaledSize } from './labelSize';
import { LabelGround, type LabelTask, type PlacedLabel, placeLabels } from './labels';
import { nearestOnLine, scaledAbout } from './near';
import { placeNotes } from './notes';
import { bridgesOf, drawPath } from './path';
import { keepSame } from './same';
import { symbolBoxes } from './standing';
import { WEIGHT } from './tokens';
import type { Box, LabelShape, LineShape, NoteShape, Omitted, Point } from './types';
import { growFlags, placeTexts, type UnitTexts } from './units';
import { type RouteCache, type Wire, wireSheet } from './wiring';

const HALF_LINE = WEIGHT.material / 2;
/** Half the width of an arrowhead [px]. */
const HALF_HEAD = 4;
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
  readonly notes: readonly NoteShape[];
  /** Tags and remarks without room. */
  readonly omitted: readonly Omitted[];
  /** Links without room for a duty. */
  readonly lost: readonly { readonly unit: UnitId; readonly link: string }[];
  readonly routes: RouteCache;
}

/** @param before an earlier layout: its ways are kept where they still hold, its lines wherever nothing changed */
export function layOut(ground: Ground, before: Layout | undefined): Layout {
  const { standing, ribbons, rooms, remarks, textScale: scale } = ground;
  const { wires, cache } = wireSheet(ground.streams, standing, before?.routes);
  const stones = new Stones(wires, scale);
  const sheet = new LabelGround();
  for (const { unit, box, linkBoxes } of standing) {
    stones.add(box, unit.id);
    sheet.taken.add(box, unit.id);
    for (const link of linkBoxes) {
      stones.add(link);
      sheet.taken.add(link);
    }
  }
  wires.forEach((wire, k) => {
    const half = Math.max((ribbons?.get(wire.stream.id) ?? 0) / 2, HALF_LINE);
    sheet.addLine(pieceBoxes(wire.points, half), k);
    sheet.taken.add(boxAround(wire.points.at(-1)!, HALF_HEAD));
  });
  const flags = growFlags(standing, flagGround(ground, wires), scale);
  for (const { box } of flags) {
    stones.add(box);
    sheet.taken.add(box);
  }
  const notes = placeNotes(ground.notes, sheet.taken, scale);
  for (const { shape, room } of notes) if (shape.texts.length > 0) stones.add(room);
  const first = stones.place();
  first.forEach((place, k) => {
    sheet.setDiamond(k, place?.at, scale);
  });
  const { texts, boxes, omitted } = placeTexts(standing, { rooms, remarks, scale, flags }, sheet.taken);
  const { labels, places } = layLabels(wires, first, stones, ground, sheet);
  const lines = drawLines(wires, places);
  return {
    box:
      hull([
        ...symbolBoxes(standing),
        ...flags.map(({ box }) => box),
        ...boxes,
        ...notes.flatMap(({ shape, room }) => [shape.box, room]),
        ...wires.flatMap((wire) => pieceBoxes(wire.points, HALF_LINE)),
        ...places.flatMap((place) => (place ? [boxAround(place.at, DIAMOND * scale)] : [])),
        ...labels.flatMap(({ folded, box, hold }) => (folded ? [] : [scaledAbout(box, hold, scale)])),
      ]) ?? EMPTY,
    lines: before ? keepSame(lines, before.lines, (line) => line.stream) : lines,
    texts,
    labels,
    notes: notes.map(({ shape }) => shape),
    omitted,
    lost: standing.flatMap(({ unit, symbol }, k) =>
      (symbol.links ?? []).flatMap(({ name }, n) =>
        texts[k]!.duties[n] ? [] : [{ unit: unit.id, link: name }],
      ),
    ),
    routes: cache,
  };
}

/** What a flag must not meet when it grows: symbols and lines, its own and what ends at its port left out. */
function flagGround({ standing, textScale }: Ground, wires: readonly Wire[]): BoxIndex {
  const taken = new BoxIndex();
  if (textScale === 1) return taken;
  for (const { unit, box, linkBoxes } of standing) {
    taken.add(box, unit.id);
    for (const link of linkBoxes) taken.add(link);
  }
  for (const { points, stream } of wires) {
    // A straight line ends at two units: each owns its half.
    const [a, b] = [points[0]!, points.at(-1)!];
    const middle: Point = [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
    const split = points.length === 2 ? [a, middle, b] : points;
    pieceBoxes(split, HALF_LINE).forEach((box, k) => {
      taken.add(box, k === 0 ? stream.from?.[0] : k === split.length - 2 ? stream.to?.[0] : undefined);
    });
  }
  return taken;
}

/** Diamonds: where they may stand, and where they stand. */
class Stones {
  private readonly taken = new BoxIndex();
  private readonly wires: readonly Wire[];
  private readonly crossings: readonly (readonly Point[])[];
  private readonly scale: number;

  constructor(wires: readonly Wire[], scale: number) {
    this.wires = wires;
    this.scale = scale;
    this.crossings = crossingsOf(wires.map((wire) => wire.points));
    wires.forEach((wire, k) => {
      for (const box of pieceBoxes(wire.points, HALF_LINE)) this.taken.add(box, k);
    });
  }

  add(box: Box, owner?: unknown): void {
    this.taken.add(box, owner);
  }

  /** All places of one stream's diamond, as far as the other diamonds at first stand in no way. */
  of(k: number): Generator<DiamondPlace> {
    return diamondPlaces(this.wires[k]!.points, k, this.taken, this.crossings[k]!, this.scale);
  }

  place(): readonly (DiamondPlace | undefined)[] {
    return this.wires.map((_, k) => {
      for (const place of this.of(k)) {
        this.taken.add(boxAround(place.at, DIAMOND * this.scale), k);
        return place;
      }
      return undefined;
    });
  }
}

function drawLines(
  wires: readonly Wire[],
  places: readonly (Pick<DiamondPlace, 'at'> | undefined)[],
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

/** Labels, and the diamonds as they stand once some have moved for the sake of a label. */
function layLabels(
  wires: readonly Wire[],
  first: readonly (DiamondPlace | undefined)[],
  stones: Stones,
  { sizes, ribbons, outer, textScale: scale }: Ground,
  sheet: LabelGround,
): {
  readonly labels: readonly LabelPlace[];
  readonly places: readonly (DiamondPlace | undefined)[];
} {
  const tasks = wires.map((wire, k): LabelTask | undefined => {
    const size = sizes.get(wire.stream.id);
    if (!size) return undefined;
    const place = first[k];
    const wish: LabelWish = {
      points: wire.points,
      anchor: { ...(place ?? middleOf(wire.points)), diamond: place !== undefined },
      size: scaledSize(size, scale),
      ...(wire.freeEnd ? { freeEnd: wire.freeEnd } : {}),
      half: Math.max((ribbons?.get(wire.stream.id) ?? 0) / 2, HALF_LINE),
      scale,
    };
    return { wish, first: outer.has(wire.stream.id), elsewhere: () => stones.of(k) };
  });
  const placed = placeLabels(tasks, sheet);
  const labels = tasks.flatMap((task, k): LabelPlace[] =>
    task ? [labelAt(wires[k]!.stream.id, task.wish, placed[k], sizes.get(wires[k]!.stream.id)!)] : [],
  );
  const places = first.map((place, k) => (placed[k]?.anchor.diamond ? placed[k].anchor : place));
  return { labels, places };
}

/** The label as it is at 100 %, with the point it grows about. */
export function labelAt(
  stream: StreamId,
  wish: LabelWish,
  placed: PlacedLabel | undefined,
  size: Parameters<typeof rowsIn>[1],
): LabelPlace {
  const { scale } = wish;
  const box = placed?.box ?? foldedBox(wish);
  const hold: Point = placed?.leader
    ? placed.anchor.at
    : nearestOnLine(wish.points, [box.x + box.w / 2, box.y + box.h / 2]);
  const small = scaledAbout(box, hold, 1 / scale);
  const shrunk = ([x, y]: Point): Point => [hold[0] + (x - hold[0]) / scale, hold[1] + (y - hold[1]) / scale];
  return {
    stream,
    box: small,
    hold,
    ...(placed?.leader ? { leader: [shrunk(placed.leader[0]), shrunk(placed.leader[1])] } : {}),
    ...rowsIn(small, size),
    folded: placed === undefined,
  };
}
