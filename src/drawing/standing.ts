import type { UnitId } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue, PortSpec } from '../engine/units/types';
import type { Sketch, SketchUnit } from '../sketch/types';
import { boxOfPiece } from './boxes';
import { withSides } from './dotSides';
import { symbolOf } from './symbols/registry';
import { boxOnSheet, type Pose, portOnSheet, poseOf, toSheet } from './transform';
import type { Box, Point, PortPlace, SymbolData } from './types';

/** A unit with its symbol, where it stands on the sheet. */
export interface StandingUnit {
  readonly unit: SketchUnit;
  readonly symbol: SymbolData;
  readonly pose: Pose;
  readonly box: Box;
  /** Ends of its heat and shaft links: at the symbol, at the ring or double bar. */
  readonly links: readonly (readonly [Point, Point])[];
  /** Room of the links with their end marks. */
  readonly linkBoxes: readonly Box[];
}

/** What lines and texts keep off: symbols, and their links. */
export const symbolBoxes = (units: readonly StandingUnit[]): readonly Box[] =>
  units.flatMap((u) => [u.box, ...u.linkBoxes]);

/** Ports of kinds that nobody knows any more, as far as streams use them. */
function usedPorts(sketch: Sketch): ReadonlyMap<UnitId, readonly PortSpec[]> {
  const used = new Map<UnitId, PortSpec[]>();
  const note = (unit: UnitId, name: string, dir: 'in' | 'out'): void => {
    const ports = used.get(unit) ?? [];
    if (!ports.some((p) => p.name === name)) ports.push({ name, dir });
    used.set(unit, ports);
  };
  for (const { from, to } of sketch.streams) {
    if (from) note(from[0], from[1], 'out');
    if (to) note(to[0], to[1], 'in');
  }
  return used;
}

/** A unit as it stood last: it stands so still while record, symbol and place are the same. */
const stood = new WeakMap<SketchUnit, StandingUnit>();

const samePlace = (a: Pose, b: Pose): boolean =>
  a.at[0] === b.at[0] && a.at[1] === b.at[1] && a.turn === b.turn && a.mirror === b.mirror;

export function standingUnits(
  sketch: Sketch,
  kinds: Readonly<Record<string, KindCatalogue>> = CATALOGUE,
): readonly StandingUnit[] {
  const used = usedPorts(sketch);
  const units = sketch.units.map((unit): StandingUnit => {
    const symbol = symbolOf(unit, kinds, used.get(unit.id));
    const pose = poseOf(unit);
    const known = stood.get(unit);
    if (known?.symbol === symbol && samePlace(known.pose, pose)) return known;
    const links = (symbol.links ?? []).map(
      ({ from, to }) => [toSheet(pose, from), toSheet(pose, to)] as const,
    );
    const linkBoxes = links.map((link) => boxOfPiece(...link, 4));
    const now = { unit, symbol, pose, box: boxOnSheet(pose, symbol.box), links, linkBoxes };
    stood.set(unit, now);
    return now;
  });
  return withSides(units, sketch);
}

export const portOf = (standing: StandingUnit, name: string): PortPlace | undefined => {
  const port = standing.symbol.ports(name);
  return port && portOnSheet(standing.pose, port);
};
