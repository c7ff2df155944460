import { roomOf } from '../../src/drawing/arrangeGraph';
import { grown, overlaps } from '../../src/drawing/boxes';
import { standingUnits } from '../../src/drawing/standing';
import type { Box, Point } from '../../src/drawing/types';
import type { UnitId } from '../../src/engine/ids';
import { moveUnits } from '../../src/sketch/edits';
import type { Sketch, SketchUnit } from '../../src/sketch/types';
import { seeded } from './random';

/** Rooms of units placed by hand stay this far apart: wider than a line, narrower than what arranging leaves [px]. */
const APART = 16;
/** How far a hand carries a unit at most [px]. */
const FAR = 480;

/** A sheet with its units turned and mirrored at random, before anything is placed. */
export function turnedAbout(sketch: Sketch, seed: number): Sketch {
  const next = seeded(7000 + seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(next() * list.length)]!;
  const units = sketch.units.map((unit): SketchUnit => {
    const turn = next() < 0.2 ? pick([90, 180, 270] as const) : undefined;
    const mirror = next() < 0.2;
    return { ...unit, ...(turn ? { turn } : {}), ...(mirror ? { mirror } : {}) };
  });
  return { ...sketch, units };
}

/**
 * A sheet on which somebody moved some units to other places by hand, a few or nearly all of them; no two of those stand in
 * one another's room. All others are thrown about, wherever.
 */
export function handPlaced(sketch: Sketch, seed: number): Sketch {
  const next = seeded(9000 + seed);
  const step = (far: number): number => 8 * Math.round(((next() * 2 - 1) * far) / 8);
  const share = 0.1 + 0.8 * next();
  const standing = standingUnits(sketch);
  const taken: Box[] = [];
  const places = new Map<UnitId, Point>();
  for (const u of standing) {
    if (next() > share) continue;
    const room = roomOf(u);
    for (let tries = 0; tries < 20; tries++) {
      const by: Point = [step(FAR) || 8, step(FAR)];
      const box = { ...room, x: room.x + by[0], y: room.y + by[1] };
      if (taken.some((other) => overlaps(grown(box, APART), other))) continue;
      taken.push(box);
      places.set(u.unit.id, [u.pose.at[0] + by[0], u.pose.at[1] + by[1]]);
      break;
    }
  }
  const edit = moveUnits(sketch, places);
  if (!edit.ok) throw new Error(edit.code);
  const thrown = edit.sketch.units.map(
    (unit): SketchUnit => (places.has(unit.id) ? unit : { ...unit, at: [step(900), step(900)] }),
  );
  return { ...edit.sketch, units: thrown };
}
