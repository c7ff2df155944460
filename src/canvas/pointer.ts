import type { StreamId } from '../engine/ids';
import type { Stores } from '../store/react';
import { sheetOf } from './handle';
import { beginPull, cancelPull, endPull, movePull } from './pull';
import type { SheetStore, Target } from './sheetStore';

/** Follows the pointer until it is let go. `end(false)`: the gesture was taken away (lost pointer, Esc). */
export function follow(
  move: (event: PointerEvent) => void,
  end: (kept: boolean, event: PointerEvent | null) => void,
): void {
  const stop = (kept: boolean, event: PointerEvent | null): void => {
    window.removeEventListener('pointermove', move);
    window.removeEventListener('pointerup', up);
    window.removeEventListener('pointercancel', cancel);
    window.removeEventListener('keydown', key, true);
    end(kept, event);
  };
  const up = (event: PointerEvent): void => stop(true, event);
  const cancel = (event: PointerEvent): void => stop(false, event);
  const key = (event: KeyboardEvent): void => {
    if (event.key !== 'Escape') return;
    event.preventDefault();
    event.stopPropagation();
    stop(false, null);
  };
  window.addEventListener('pointermove', move);
  window.addEventListener('pointerup', up);
  window.addEventListener('pointercancel', cancel);
  window.addEventListener('keydown', key, true);
}

/** Pulls a stream from a port with the pointer. */
export function pullByPointer(
  stores: Stores,
  sheet: SheetStore,
  from: Target,
  event: React.PointerEvent,
  moving?: StreamId,
): void {
  if (event.button !== 0) return;
  event.preventDefault();
  event.stopPropagation();
  beginPull(stores, sheet, from, false, moving);
  const to = ({ clientX, clientY }: PointerEvent): void => {
    const handle = sheetOf(stores);
    const at = handle?.toSheet(clientX, clientY);
    if (handle && at) movePull(sheet, at, handle.zoom());
  };
  follow(to, (kept, last) => {
    if (kept && last) {
      to(last);
      endPull(stores, sheet, sheetOf(stores)?.zoom() ?? 1);
    } else cancelPull(stores, sheet);
  });
}
