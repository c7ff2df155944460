import type { StreamId, UnitId } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue } from '../engine/units/types';
import type { Sketch, SketchStream } from '../sketch/types';
import { settleAround } from './arrangeAround';
import { graphOf, type LaidOut, type LayoutGraph, placesIn } from './arrangeGraph';
import { settle } from './arrangeSettle';
import type { Point } from './types';

/**
 * What lays out a graph in layers: elkjs, in a worker of the page or in Node. Only its one function is used, so that the
 * package (450 kB gzip) is loaded by whoever asks for arranging, and by nobody else.
 */
export interface LayoutEngine {
  layout(graph: LayoutGraph): Promise<LaidOut>;
}

export interface ArrangeOptions {
  /** Units that stay where they are. */
  readonly keep?: Iterable<UnitId>;
  readonly kinds?: Readonly<Record<string, KindCatalogue>>;
}

/** Where units go, and streams whose bends moved by hand make no sense any more. */
export interface Arrangement {
  readonly at: ReadonlyMap<UnitId, Point>;
  readonly unbent: readonly StreamId[];
}

/**
 * Places a sketch's units from left to right along the flow, on the grid, with room for lines, tags and labels between them.
 * Ports, turns and mirrors stay as they are; recycles run back. The same sketch gives the same places.
 *
 * Source of the method: layered drawing after Sugiyama, Tagawa & Toda, IEEE Trans. Syst. Man Cybern. 11(2), 1981, p. 109, as
 * elkjs carries it out.
 *
 * @param engine made by the caller: a worker on the page, the bundle in Node
 */
export async function arrange(
  sketch: Sketch,
  engine: LayoutEngine,
  { keep = [], kinds = CATALOGUE }: ArrangeOptions = {},
): Promise<Arrangement> {
  const kept = new Set(keep);
  const free = sketch.units.filter((unit) => !kept.has(unit.id));
  if (free.length === 0) return { at: new Map(), unbent: [] };
  const { graph, standing } = graphOf(sketch, kinds);
  const wanted = placesIn(await engine.layout(graph), standing);
  const at =
    kept.size === 0
      ? settle(sketch, standing, wanted, { kept, taken: [], passage: 0 })
      : settleAround(sketch, standing, wanted, kept, kinds);
  const hasMoved = (end: SketchStream['from']): boolean => end !== undefined && !kept.has(end[0]);
  const unbent = sketch.streams
    .filter(({ via, from, to }) => via !== undefined && (hasMoved(from) || hasMoved(to)))
    .map(({ id }) => id);
  return { at, unbent };
}

/** The units that the user placed by hand. */
export const placedByHand = (sketch: Pick<Sketch, 'units'>): readonly UnitId[] =>
  sketch.units.filter((unit) => unit.byHand).map((unit) => unit.id);

/**
 * The sketch with its units as arranged: what is placed anew is no longer placed by hand. The same sketch when all stands
 * so already.
 */
export function arranged(sketch: Sketch, { at, unbent }: Arrangement): Sketch {
  const straight = new Set(unbent);
  const units = sketch.units.map((unit) => {
    const place = at.get(unit.id);
    if (!place || (!unit.byHand && place[0] === unit.at[0] && place[1] === unit.at[1])) return unit;
    const { byHand: _, ...rest } = unit;
    return { ...rest, at: place };
  });
  const streams = sketch.streams.map((stream) => {
    if (!straight.has(stream.id)) return stream;
    const { via: _, ...rest } = stream;
    return rest;
  });
  const stands =
    units.every((unit, k) => unit === sketch.units[k]) &&
    streams.every((stream, k) => stream === sketch.streams[k]);
  return stands ? sketch : { ...sketch, units, streams };
}
