import type { StreamId, UnitId } from '../engine/ids';
import type { Stores } from '../store/react';
import { bendArrow, endBend } from './bending';
import { type SheetHandle, sheetOf } from './handle';
import { middleOf } from './lines';
import { endMove, nudge } from './moving';
import { isFree, portsOf, type StandingPort, sourcePort } from './ports';
import { beginPull, cancelPull, endPull } from './pull';
import { AT_REST, type SheetStore, type Target } from './sheetStore';
import { type Arrow, chooseByArrow, type Places, stepFrom, type Thing } from './walk';
import { portName } from './words';

const say = ({ session }: Stores, spoken: string): void => session.setState({ spoken });

const placesOf = (sheet: SheetStore): Places => {
  const { units, lines } = sheet.getState();
  return {
    unit: (id) => units.get(id)?.at,
    stream: (id) => {
      const line = lines.get(id);
      return line && (line.diamond ?? middleOf(line.points));
    },
  };
};

/** The one thing the keys start from: what has the focus on the sheet, else what is selected last. */
export function currentThing({ session }: Stores): Thing | undefined {
  const { units, streams } = session.getState();
  const unit = units.at(-1);
  const stream = streams.at(-1);
  if (unit) return { unit };
  return stream ? { stream } : undefined;
}

function goTo(stores: Stores, handle: SheetHandle, thing: Thing, add: boolean): void {
  const { units, streams } = stores.session.getState();
  if (add) {
    if ('unit' in thing) {
      stores.session.setState({ units: [...units.filter((id) => id !== thing.unit), thing.unit] });
    } else
      stores.session.setState({ streams: [...streams.filter((id) => id !== thing.stream), thing.stream] });
  } else if ('unit' in thing) stores.session.select([thing.unit]);
  else stores.session.select([], [thing.stream]);
  const places = placesOf(handle.store);
  const at = 'unit' in thing ? places.unit(thing.unit) : places.stream(thing.stream);
  if (at) handle.reveal(at);
  handle.focus(thing);
}

/** An arrow key: it chooses a port, moves units, or walks along the streams, as the sheet stands. */
export function arrow(stores: Stores, direction: Arrow, shift: boolean): void {
  const handle = sheetOf(stores);
  if (!handle) return;
  const state = handle.store.getState();
  if (state.pulling) choosePort(stores, handle.store, direction);
  else if (state.bending) bendArrow(stores, handle.store, direction, shift ? 5 : 1);
  else if (state.movingByKeys) nudge(stores, handle.store, direction, shift ? 5 : 1);
  else walk(stores, handle, direction, shift);
}

function walk(stores: Stores, handle: SheetHandle, direction: Arrow, add: boolean): void {
  const { sketch } = stores.sketch.getState();
  const from = currentThing(stores);
  const first = sketch.units[0];
  const next = from ? stepFrom(sketch, placesOf(handle.store), from, direction) : first && { unit: first.id };
  if (next) goTo(stores, handle, next, add);
}

/** Starts a connection at the selected unit or loose stream; pressed again, from its next free port. */
export function connectByKeys(stores: Stores): void {
  const handle = sheetOf(stores);
  if (!handle) return;
  const { sketch } = stores.sketch.getState();
  const free = freePorts(stores);
  const joined = joinedStream(stores);
  const source = joined && sourcePort(sketch, handle.store.getState().units, joined);
  if (source) {
    beginPull(stores, handle.store, source, true, joined);
    say(stores, 'Leading the stream elsewhere. Arrows choose a port, Enter connects, Esc leaves it.');
    return;
  }
  if (free.length === 0) {
    say(stores, 'No port is free here.');
    return;
  }
  const { pulling } = handle.store.getState();
  const at = pulling ? free.findIndex((port) => port.port === pulling.from.port) : -1;
  const from = free[(at + 1) % free.length]!;
  beginPull(stores, handle.store, from, true);
  const fitting = handle.store.getState().pulling?.targets.filter((target) => !target.reason) ?? [];
  say(
    stores,
    `Connect from ${portName(sketch, from)}: ${fitting.length === 1 ? 'one port fits' : `${fitting.length} ports fit`}. Arrows choose, Enter connects; Enter without a port offers units; Esc leaves it.`,
  );
}

/** The one selected stream, when it has both ends: its target end can be led elsewhere. */
export function joinedStream({ session, sketch }: Stores): StreamId | undefined {
  const { units, streams } = session.getState();
  const known = sketch.getState().sketch.streams.find(({ id }) => id === streams[0]);
  return units.length === 0 && streams.length === 1 && known?.from && known.to ? known.id : undefined;
}

/** Free ports of what is selected: outlets first. */
export function freePorts(stores: Stores): readonly StandingPort[] {
  const { sketch } = stores.sketch.getState();
  const thing = currentThing(stores);
  if (!thing) return [];
  const stream = 'stream' in thing ? sketch.streams.find((s) => s.id === thing.stream) : undefined;
  const id = 'unit' in thing ? thing.unit : (stream?.from?.[0] ?? stream?.to?.[0]);
  const unit = sketch.units.find((u) => u.id === id);
  if (!unit) return [];
  return portsOf(sketch, unit, sheetOf(stores)?.store.getState().units.get(unit.id))
    .filter(isFree)
    .filter((port) => stream === undefined || port.stream?.id === stream.id)
    .sort((a, b) => Number(a.dir === 'in') - Number(b.dir === 'in'));
}

function choosePort(stores: Stores, sheet: SheetStore, direction: Arrow): void {
  const { pulling } = sheet.getState();
  if (!pulling) return;
  const fitting = pulling.targets
    .filter((target) => !target.reason)
    .map((target) => ({ target, at: target.place.at }));
  const now = fitting.find(({ target }) => target === pulling.over);
  const next: Target | undefined = chooseByArrow(fitting, now, pulling.from.place.at, direction)?.target;
  if (!next) return;
  sheet.setState({ pulling: { ...pulling, over: next, at: next.place.at } });
  say(stores, portName(stores.sketch.getState().sketch, next));
}

/** The pointer takes over: units moved by keys stay where they are, a connection started by keys is left. */
export function endKeys(stores: Stores, sheet: SheetStore): void {
  const { movingByKeys, bending, pulling } = sheet.getState();
  if (bending?.byKeys) endBend(stores, sheet);
  if (movingByKeys) endMove(stores, sheet);
  if (pulling?.byKeys) cancelPull(stores, sheet);
}

/** Enter: ends a connection or a move; else goes into the drawer of what is selected. */
export function enter(stores: Stores): void {
  const handle = sheetOf(stores);
  if (!handle) return;
  const { pulling, movingByKeys, bending } = handle.store.getState();
  if (pulling) endPull(stores, handle.store, handle.zoom());
  else if (bending) endBend(stores, handle.store);
  else if (movingByKeys) endMove(stores, handle.store);
  else {
    const [note] = stores.session.getState().notes;
    const thing = currentThing(stores) ?? focusedThing();
    if (!thing && note !== undefined) handle.store.setState({ writing: note });
    if (!thing) return;
    stores.session.enterDrawer(
      'unit' in thing ? { is: 'unit', id: thing.unit } : { is: 'stream', id: thing.stream },
    );
  }
}

/** Esc: leaves what is under way, one thing at a time; last, the selection and then the drawer. */
export function leave(stores: Stores): boolean {
  const sheet = sheetOf(stores)?.store;
  if (!sheet) return false;
  const { pulling, offer, moved, heldNotes, bending, dropping } = sheet.getState();
  if (pulling || offer) cancelPull(stores, sheet);
  else if (dropping) sheet.setState({ dropping: null });
  else if (moved || heldNotes || bending) sheet.setState(AT_REST);
  else {
    const { units, streams, notes, notice, drawer } = stores.session.getState();
    if (notice) stores.session.dismiss();
    else if (units.length + streams.length + notes.length > 0) stores.session.select([], []);
    else if (drawer) stores.session.openDrawer(null);
    else return false;
  }
  return true;
}

/** The unit or stream that has the keyboard's focus. */
export function focusedThing(): Thing | undefined {
  const focused = document.activeElement;
  if (!(focused instanceof HTMLElement)) return undefined;
  const { focusUnit, focusStream } = focused.dataset;
  if (focusUnit) return { unit: focusUnit as UnitId };
  return focusStream ? { stream: focusStream as StreamId } : undefined;
}
