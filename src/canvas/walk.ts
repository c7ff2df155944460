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
 * stream, unit; where no stream goes on, to the nearest unit on that side. Up and down choose among the streams that leave
 * the same unit, or enter it; from a unit, the nearest unit above or below. Undefined where there is nothing more.
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
    if (first) return { stream: first.id };
  }
  return nearestUnit(sketch, places, places.unit(id), arrow, id);
}

/** The nearest unit on one side of a point. Sideways counts double: a step should not wander off its line. */
function nearestUnit(
  sketch: Sketch,
  places: Places,
  here: Point | undefined,
  arrow: Arrow,
  except?: UnitId,
): Thing | undefined {
  if (!here) return undefined;
  const all = sketch.units.flatMap(({ id }) => {
    const at = places.unit(id);
    return at && id !== except ? [{ id, at }] : [];
  });
  const best = nearestOnSide(all, here, arrow);
  return best && { unit: best.id };
}

function stepFromStream(sketch: Sketch, places: Places, id: StreamId, arrow: Arrow): Thing | undefined {
  const stream = sketch.streams.find((s) => s.id === id);
  if (!stream) return undefined;
  if (arrow === 'right' || arrow === 'left') {
    const end = arrow === 'right' ? stream.to : stream.from;
    return end ? { unit: end[0] } : nearestUnit(sketch, places, places.stream(id), arrow);
  }
  const leaving = sketch.streams.filter((s) => s.from && s.from[0] === stream.from?.[0]);
  const entering = sketch.streams.filter((s) => s.to && s.to[0] === stream.to?.[0]);
  const branch = (leaving.length > 1 ? leaving : entering).sort(byHeight(places));
  const at = branch.findIndex((s) => s.id === id);
  const next = at < 0 ? undefined : branch[at + (arrow === 'down' ? 1 : -1)];
  return next && { stream: next.id };
}

/** The nearest of what lies on one side of a point; across counts double. */
function nearestOnSide<T extends { readonly at: Point }>(
  all: readonly T[],
  [x, y]: Point,
  arrow: Arrow,
): T | undefined {
  const axis = arrow === 'left' || arrow === 'right' ? 0 : 1;
  const sign = arrow === 'right' || arrow === 'down' ? 1 : -1;
  let best: T | undefined;
  let nearest = Infinity;
  for (const item of all) {
    const away: Point = [item.at[0] - x, item.at[1] - y];
    const along = sign * away[axis];
    if (along <= 0) continue;
    const distance = along + 2 * Math.abs(away[1 - axis] as number);
    if (distance < nearest) {
      nearest = distance;
      best = item;
    }
  }
  return best;
}

/** The target nearest to a point in the direction of an arrow; without one there, the first of all. */
export function chooseByArrow<T extends { readonly at: Point }>(
  all: readonly T[],
  now: T | undefined,
  from: Point,
  arrow: Arrow,
): T | undefined {
  const others = all.filter((item) => item !== now);
  return nearestOnSide(others, now?.at ?? from, arrow) ?? (now ? undefined : all[0]);
}
