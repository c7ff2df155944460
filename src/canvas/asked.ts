import { pageOf, zoneOf } from '../drawing/frame';
import { sameLayout } from '../drawing/scene';
import type { Box, LineShape, Point, UnitShape } from '../drawing/types';
import type { Stores } from '../store/react';
import type { Thing } from '../store/session';
import { middleOf } from './lines';
import type { SheetState, SheetStore } from './sheetStore';
import type { SheetView } from './view';

/** Where a unit or stream stands, sheet coordinates: its symbol's origin, its diamond. */
export function placeOf(
  { units, lines }: Pick<SheetState, 'units' | 'lines'>,
  thing: Thing,
): Point | undefined {
  if ('unit' in thing) return units.get(thing.unit)?.at;
  const line = lines.get(thing.stream);
  return line && (line.diamond ?? middleOf(line.points));
}

/** Brings to the middle of the view what other parts of the screen ask for. Returns a function that stops it. */
export const keepCentred = ({ session }: Stores, view: SheetView): (() => void) =>
  session.subscribe(({ centred }, before) => {
    if (!centred || centred === before.centred) return;
    const at = placeOf(view.store.getState(), centred.thing);
    if (at) view.centre(at);
  });

/** Tells the zone of each unit and stream to the rest of the screen, anew only for shapes that changed. */
export function keepZones({ session }: Stores, sheet: SheetStore): () => void {
  let box: Box | null = null;
  let known = new Map<UnitShape | LineShape, string>();
  let told: ReadonlyMap<string, string> = new Map();
  const tell = (): void => {
    const state = sheet.getState();
    if (state.scene.box !== box) known = new Map();
    box = state.scene.box;
    const page = pageOf(box);
    const next = new Map<UnitShape | LineShape, string>();
    const zones = new Map<string, string>();
    const add = (shape: UnitShape | LineShape, thing: Thing, id: string): void => {
      const at = placeOf(state, thing);
      const zone = known.get(shape) ?? (at && zoneOf(at, page));
      if (zone === undefined) return;
      next.set(shape, zone);
      zones.set(id, zone);
    };
    for (const shape of state.scene.units) add(shape, { unit: shape.unit }, shape.unit);
    for (const shape of state.scene.lines) add(shape, { stream: shape.stream }, shape.stream);
    known = next;
    if (zones.size === told.size && [...zones].every(([id, zone]) => told.get(id) === zone)) return;
    told = zones;
    session.setState({ zones });
  };
  tell();
  return sheet.subscribe((now, before) => {
    if (!sameLayout(now.scene, before.scene)) tell();
  });
}
