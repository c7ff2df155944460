import type { StreamId, UnitId } from '../engine/ids';
import type { Stores } from '../store/react';
import type { SessionState } from '../store/session';

interface Keys {
  readonly shiftKey: boolean;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
}

export const adds = (event: Keys): boolean => event.shiftKey || event.ctrlKey || event.metaKey;

const toggled = <T>(list: readonly T[], item: T): readonly T[] =>
  list.includes(item) ? list.filter((other) => other !== item) : [...list, item];

/** Whether another part of the screen points at a unit or stream: it is drawn as if selected. */
export const isPointed = ({ pointed }: SessionState, id: UnitId | StreamId): boolean =>
  pointed !== null && ('unit' in pointed ? pointed.unit : pointed.stream) === id;

/** Adds a stream to the selection or takes it out; what is open in the drawer stays. */
export function toggleStream({ session }: Stores, id: StreamId): void {
  session.setState({ streams: toggled(session.getState().streams, id) });
}

/** A click on a stream: it alone, or it too. */
export function chooseStream(stores: Stores, id: StreamId, event: Keys): void {
  if (adds(event)) toggleStream(stores, id);
  else stores.session.select([], [id]);
}

/** A click on a unit: it alone, or it too. */
export function chooseUnit(stores: Stores, id: UnitId, event: Keys): void {
  if (adds(event)) stores.session.toggleUnit(id);
  else stores.session.select([id]);
}
