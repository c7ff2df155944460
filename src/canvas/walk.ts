import type { Point } from '../drawing/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Sketch, SketchStream } from '../sketch/types';

export type Arrow = 'left' | 'right' | 'up' | 'down';
export type Thing = { readonly unit: UnitId } | { readonly stream: StreamId };

/** Where things stand on the sheet, for choosing by direction. */
export interface Places {
  readonly unit: (id: UnitId) => Point | undefined;
  /** A point on the stream's line, and the point where it leaves or enters. */
  readonly stream: (id: StreamId) => Point | undefined;
}

const byHeight =
  (places: Places) =>
  (a: SketchStream, b: SketchStream): number =>
    (places.stream(a.id)?.[1] ?? 0) - (places.stream(b.id)?.[1] ?? 0);

/**
 * The next thing from a unit or stream in the direction of an arrow. Right goes on with the flow, left against it: unit,
 * stream, unit. Up and down choose among the streams that leave the same unit, or enter it; from a unit, the nearest unit
 * above or below. Undefined where there is nothing more.
 */
export function stepFrom(sketch: Sketch, places: Places, from: Thing, arrow: Arrow): Thing | undefined {
  return 'unit' in from
    ? stepFromUnit(sketch, places, from.unit, arrow)
    : stepFromStream(sketch, places, from.stream, arrow);
}

function stepFromUnit(sketch: Sketch, places: Places, id: UnitId, arrow: Arrow): Thing | undefined {
  if (arrow === 'left' || arrow === 'right') {
    const [first] = sketch.streams
      .filter((s) => (arrow === 'right' ? s.from : s.to)?.[0] === id)
      .sort(byHeight(places));
    return first && { stream: first.id };
  }
  const here = places.unit(id);
  if (!here) return undefined;
  let best: UnitId | undefined;
  let nearest = Infinity;
  for (const unit of sketch.units) {
    const there = places.unit(unit.id);
    if (!there || unit.id === id) continue;
    const down = there[1] - here[1];
    if (arrow === 'down' ? down <= 0 : down >= 0) continue;
    // Sideways counts double: up and down should not wander off along the train.
    const away = Math.abs(down) + 2 * Math.abs(there[0] - here[0]);
    if (away < nearest) {
      nearest = away;
      best = unit.id;
    }
  }
  return best && { unit: best };
}

function stepFromStream(sketch: Sketch, places: Places, id: StreamId, arrow: Arrow): Thing | undefined {
  const stream = sketch.streams.find((s) => s.id === id);
  if (!stream) return undefined;
  if (arrow === 'right') return stream.to && { unit: stream.to[0] };
  if (arrow === 'left') return stream.from && { unit: stream.from[0] };
  const leaving = sketch.streams.filter((s) => s.from && s.from[0] === stream.from?.[0]);
  const entering = sketch.streams.filter((s) => s.to && s.to[0] === stream.to?.[0]);
  const branch = (leaving.length > 1 ? leaving : entering).sort(byHeight(places));
  const at = branch.findIndex((s) => s.id === id);
  const next = at < 0 ? undefined : branch[at + (arrow === 'down' ? 1 : -1)];
  return next && { stream: next.id };
}

/** The target nearest to a point in the direction of an arrow; without one there, the next in the list. */
export function chooseByArrow<T extends { readonly at: Point }>(
  all: readonly T[],
  now: T | undefined,
  from: Point,
  arrow: Arrow,
): T | undefined {
  const here = now?.at ?? from;
  const along = (p: Point): number =>
    arrow === 'right'
      ? p[0] - here[0]
      : arrow === 'left'
        ? here[0] - p[0]
        : arrow === 'down'
          ? p[1] - here[1]
          : here[1] - p[1];
  const across = (p: Point): number =>
    arrow === 'left' || arrow === 'right' ? Math.abs(p[1] - here[1]) : Math.abs(p[0] - here[0]);
  let best: T | undefined;
  let nearest = Infinity;
  for (const item of all) {
    if (item === now || along(item.at) <= 0) continue;
    const away = along(item.at) + 2 * across(item.at);
    if (away < nearest) {
      nearest = away;
      best = item;
    }
  }
  return best ?? (now ? undefined : all[0]);
}
