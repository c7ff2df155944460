import { plainSymbol } from '../drawing/symbols/registry';
import { AWAY } from '../drawing/transform';
import type { Point } from '../drawing/types';
import type { StreamId } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import { addUnit, connect, disconnect, nextPortName, reconnect } from '../store/commands';
import type { Stores } from '../store/react';
import { freePlace, takenBoxes } from './drop';
import { together, tryEdit } from './edit';
import { sheetOf } from './handle';
import { targetsFor } from './ports';
import type { Offer, PortRef, SheetStore, Target } from './sheetStore';

/** A port takes the stream within this distance [screen px]. */
const CATCH = 14;
/** A unit chosen by keys stands this far from the port, if there is room [px]. */
const BESIDE = 104;
/** Shorter pulls are taken for a click on the unit: ports of a dot on the line lie over all of it [screen px]. */
const SHORTEST = 20;

/** Takes hold of a port: every other port shows whether the stream can end there. */
export function beginPull(
  stores: Stores,
  sheet: SheetStore,
  from: Target,
  byKeys: boolean,
  moving?: StreamId,
): void {
  const { sketch } = stores.sketch.getState();
  const loose = moving === undefined ? undefined : disconnect(sketch, moving);
  const targets = targetsFor(loose?.ok ? loose.sketch : sketch, from, sheet.getState().units);
  sheet.setState({
    pulling: { from, targets, at: from.place.at, over: null, byKeys, ...(moving ? { moving } : {}) },
    offer: null,
    hovered: null,
  });
  stores.session.setState({ connecting: { unit: from.unit, port: from.port } });
}

export function movePull(sheet: SheetStore, at: Point, zoom: number): void {
  const { pulling } = sheet.getState();
  if (!pulling) return;
  let over: Target | null = null;
  let nearest = CATCH / zoom;
  for (const target of pulling.targets) {
    // Where two ports lie close together, the one that fits is meant.
    const handicap = target.reason ? CATCH / 2 / zoom : 0;
    const away = Math.hypot(target.place.at[0] - at[0], target.place.at[1] - at[1]) + handicap;
    if (away <= nearest) {
      nearest = away;
      over = target;
    }
  }
  sheet.setState({ pulling: { ...pulling, at: over ? over.place.at : at, over } });
}

export function cancelPull(stores: Stores, sheet: SheetStore): void {
  sheet.setState({ pulling: null, offer: null });
  stores.session.setState({ connecting: null });
}

/** Lets go: at a fitting port the stream is made, at another the reason is said, on empty sheet units are offered. */
export function endPull(stores: Stores, sheet: SheetStore, zoom: number): void {
  const { pulling } = sheet.getState();
  if (!pulling) return;
  cancelPull(stores, sheet);
  const { from, over, at, byKeys, moving } = pulling;
  if (over?.reason) {
    stores.session.say('caution', over.reason);
    return;
  }
  if (moving) {
    if (over) tryEdit(stores, (sketch) => reconnect(sketch, moving, [over.unit, over.port]));
    else if (!byKeys) tryEdit(stores, (sketch) => disconnect(sketch, moving));
    stores.session.select([], [moving]);
    return;
  }
  if (over) {
    const made = tryEdit(stores, (sketch) => connect(sketch, [from.unit, from.port], [over.unit, over.port]));
    const stream = made?.stream;
    if (stream && byKeys) stores.session.select([], [stream]);
    return;
  }
  const [x, y] = from.place.at;
  if (byKeys) {
    const [ux, uy] = AWAY[from.place.side];
    const offered: Point = [x + ux * BESIDE, y + uy * BESIDE];
    sheet.setState({
      offer: { from: { unit: from.unit, port: from.port, dir: from.dir }, at: offered, byKeys: true },
    });
    return;
  }
  if (Math.hypot(at[0] - x, at[1] - y) * zoom >= SHORTEST) {
    sheet.setState({ offer: { from: { unit: from.unit, port: from.port, dir: from.dir }, at } });
  } else stores.session.select([from.unit]);
}

/** The first port of a kind that faces the other way, by its full name. */
function matching(kind: string, dir: PortRef['dir']): string | undefined {
  const spec = CATALOGUE[kind]?.ports.find((port) => port.dir !== dir);
  return spec && nextPortName(spec, []);
}

/** Kinds that a pulled stream can lead to; a product, or a feed, stands first. */
export const offeredKinds = (dir: PortRef['dir']): readonly string[] =>
  Object.keys(CATALOGUE)
    .filter((kind) => matching(kind, dir) !== undefined)
    .sort((a, b) => Number(b === 'product') - Number(a === 'product'));

/** Makes the chosen unit with its port where the stream was let go, and connects it, in one step. */
export function takeOffer(stores: Stores, sheet: SheetStore, offer: Offer, kind: string): void {
  sheet.setState({ offer: null });
  const port = matching(kind, offer.from.dir);
  const place = port === undefined ? undefined : plainSymbol(kind).ports(port);
  if (port === undefined || !place) return;
  const wished: Point = [offer.at[0] - place.at[0], offer.at[1] - place.at[1]];
  const at = offer.byKeys ? freePlace(takenBoxes(sheet.getState()), plainSymbol(kind).box, wished) : wished;
  const made = tryEdit(stores, (sketch) => {
    const added = addUnit(sketch, kind, at);
    if (!added.ok || !added.unit) return added;
    const unit = added.unit;
    return together(sketch, added, (now) => connect(now, [offer.from.unit, offer.from.port], [unit, port]));
  });
  const unit = made?.unit;
  if (!unit) return;
  stores.session.select([unit]);
  // Once its drawer has taken its room from the sheet.
  setTimeout(() => {
    sheetOf(stores)?.reveal(at);
    sheetOf(stores)?.focus({ unit });
  }, 0);
}
