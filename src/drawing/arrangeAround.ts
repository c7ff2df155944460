import type { UnitId } from '../engine/ids';
import type { KindCatalogue } from '../engine/units/types';
import type { Sketch } from '../sketch/types';
import { settle } from './arrangeSettle';
import { overlaps, pieceBoxes } from './boxes';
import { standingNotes } from './notes';
import { tangles } from './nudge';
import { portOf, type StandingUnit, standingUnits } from './standing';
import type { Box, Point } from './types';
import { wireSheet } from './wiring';

/** Room for lines between units, tried until they find ways that meet nothing [px]. */
const PASSAGES = [32, 48, 72, 104] as const;
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
  let least = Infinity;
  for (const passage of PASSAGES) {
    const places = settle(sketch, standing, wanted, { kept, taken, passage });
    const faults = faultsOf(sketch, places, kinds);
    if (faults >= least) continue;
    [best, least] = [places, faults];
    if (faults === 0) break;
  }
  return best;
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

/** How often lines lead over symbols or along one another when units stand at these places. */
function faultsOf(
  sketch: Sketch,
  places: ReadonlyMap<UnitId, Point>,
  kinds: Readonly<Record<string, KindCatalogue>>,
): number {
  const units = sketch.units.map((unit) => ({ ...unit, at: places.get(unit.id) ?? unit.at }));
  const standing = standingUnits({ ...sketch, units }, undefined, kinds);
  const { wires } = wireSheet(sketch.streams, standing, undefined);
  const lines = wires.map((wire) => wire.points);
  let faults = 0;
  for (const [line, near] of tangles(lines, MERGED))
    for (const other of near) if (!shareAnEnd(lines[line]!, lines[other]!)) faults += 1;
  for (const { points, stream } of wires) {
    const pieces = pieceBoxes(points, 1);
    pieces.forEach((piece, k) => {
      const own = [k === 0 && stream.from?.[0], k === pieces.length - 1 && stream.to?.[0]];
      for (const { unit, box, linkBoxes } of standing) {
        if (!own.includes(unit.id) && [box, ...linkBoxes].some((b) => overlaps(piece, b))) faults += 1;
      }
    });
  }
  return faults;
}

/** Lines of one port run into it together. */
const shareAnEnd = (a: readonly Point[], b: readonly Point[]): boolean =>
  [a[0]!, a.at(-1)!].some(([x, y]) => [b[0]!, b.at(-1)!].some((p) => p[0] === x && p[1] === y));
