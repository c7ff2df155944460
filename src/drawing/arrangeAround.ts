import type { StreamId, UnitId } from '../engine/ids';
import type { KindCatalogue } from '../engine/units/types';
import type { Sketch } from '../sketch/types';
import { settle } from './arrangeSettle';
import { overlaps, pieceBoxes } from './boxes';
import { standingNotes } from './notes';
import { tangles } from './nudge';
import { portOf, type StandingUnit, standingUnits } from './standing';
import type { Box, Point } from './types';
import { wireSheet } from './wiring';

/**
 * What is tried until all lines find ways that meet nothing: room for lines between units, and how far down units are pushed
 * whose lines were in trouble before [px].
 */
const TRIES = [
  { passage: 32, down: 0 },
  { passage: 48, down: 0 },
  { passage: 72, down: 0 },
  { passage: 32, down: 24 },
  { passage: 32, down: -24 },
  { passage: 48, down: 40 },
  { passage: 48, down: -40 },
  { passage: 104, down: 0 },
] as const;
/** Lines that run along one another nearer than this look like one; ports of one symbol are further apart [px]. */
const MERGED = 4;
/** A line bent by hand keeps units this far away [px]. */
const BESIDE_LINE = 8;

/** Places around what was placed by hand: with as little room for lines as lets them meet no symbol and no other line. */
export function settleAround(
  sketch: Sketch,
  standing: readonly StandingUnit[],
  wanted: ReadonlyMap<UnitId, Point>,
  kept: ReadonlySet<UnitId>,
  kinds: Readonly<Record<string, KindCatalogue>>,
): ReadonlyMap<UnitId, Point> {
  const taken = takenByHand(sketch, standing, kept);
  let best: ReadonlyMap<UnitId, Point> = new Map();
  let least: readonly StreamId[] | undefined;
  for (const { passage, down } of TRIES) {
    const pushed = down === 0 ? wanted : pushedDown(sketch, wanted, kept, least ?? [], down);
    const places = settle(sketch, standing, pushed, { kept, taken, passage });
    const faults = linesInTrouble(sketch, places, kinds);
    if (least && faults.length >= least.length) continue;
    [best, least] = [places, faults];
    if (faults.length === 0) break;
  }
  return best;
}

/** The layout with the units at some lines elsewhere; with all, where both ends of all those lines are kept. */
function pushedDown(
  sketch: Sketch,
  wanted: ReadonlyMap<UnitId, Point>,
  kept: ReadonlySet<UnitId>,
  lines: readonly StreamId[],
  down: number,
): ReadonlyMap<UnitId, Point> {
  const ends = new Set(
    sketch.streams
      .filter(({ id }) => lines.includes(id))
      .flatMap(({ from, to }) => [from, to].flatMap((end) => (end && !kept.has(end[0]) ? [end[0]] : []))),
  );
  return new Map(
    [...wanted].map(([id, [x, y]]) =>
      !kept.has(id) && (ends.size === 0 || ends.has(id)) ? [id, [x, y + down]] : [id, [x, y]],
    ),
  );
}

/** Texts on the sheet, and lines between kept units with their bends. */
function takenByHand(
  sketch: Sketch,
  standing: readonly StandingUnit[],
  kept: ReadonlySet<UnitId>,
): readonly Box[] {
  const byId = new Map(standing.map((u) => [u.unit.id, u]));
  const texts = standingNotes(sketch.notes).map((note) => note.textBox);
  const lines = sketch.streams.flatMap(({ from, to, via }) => {
    if (!via || !from || !to || !kept.has(from[0]) || !kept.has(to[0])) return [];
    const ends = [from, to].map(([id, port]) => portOf(byId.get(id)!, port)?.at);
    const [a, b] = ends;
    return a && b ? pieceBoxes([a, ...via, b], BESIDE_LINE) : [];
  });
  return [...texts, ...lines];
}

/** Streams whose lines lead over a symbol or along one another when units stand at these places. */
function linesInTrouble(
  sketch: Sketch,
  places: ReadonlyMap<UnitId, Point>,
  kinds: Readonly<Record<string, KindCatalogue>>,
): readonly StreamId[] {
  const units = sketch.units.map((unit) => ({ ...unit, at: places.get(unit.id) ?? unit.at }));
  const standing = standingUnits({ ...sketch, units }, kinds);
  const { wires } = wireSheet(sketch.streams, standing, undefined);
  const lines = wires.map((wire) => wire.points);
  const merged = tangles(lines, MERGED);
  return wires.flatMap(({ points, stream }, line) => {
    const along = [...(merged.get(line) ?? [])].some((other) => !shareAnEnd(points, lines[other]!));
    const pieces = pieceBoxes(points, 1);
    const isOver = (piece: Box, k: number): boolean => {
      const own = [k === 0 && stream.from?.[0], k === pieces.length - 1 && stream.to?.[0]];
      return standing.some(
        ({ unit, box, linkBoxes }) =>
          !own.includes(unit.id) && [box, ...linkBoxes].some((b) => overlaps(piece, b)),
      );
    };
    return along || pieces.some(isOver) ? [stream.id] : [];
  });
}

/** Lines of one port run into it together. */
const shareAnEnd = (a: readonly Point[], b: readonly Point[]): boolean =>
  [a[0]!, a.at(-1)!].some(([x, y]) => [b[0]!, b.at(-1)!].some((p) => p[0] === x && p[1] === y));
