import type { Sketch } from '../sketch/types';
import type { Edit, Edited } from '../store/commands';
import type { Stores } from '../store/react';
import { sayEditRefusal } from '../wording';

/** Makes one edit with its name for undo. A refusal is said in words and changes nothing. */
export function tryEdit(stores: Stores, make: (sketch: Sketch) => Edit): Edited | undefined {
  const { sketch, writable } = stores.sketch.getState();
  if (!writable) {
    stores.session.say('info', 'This sketch is open in another tab, so it cannot be changed here.');
    return undefined;
  }
  const edit = make(sketch);
  if (!edit.ok) {
    stores.session.say('caution', sayEditRefusal(edit));
    return undefined;
  }
  stores.sketch.apply(edit.label, () => edit.sketch);
  return edit;
}

/** Several edits as one step; the first refusal stops them all. Its name and what was made come from the first. */
export function together(sketch: Sketch, first: Edit, ...rest: ((sketch: Sketch) => Edit)[]): Edit {
  if (!first.ok) return first;
  let now = first.sketch;
  let made: Partial<Edited> = {};
  for (const make of rest) {
    const next = make(now);
    if (!next.ok) return next;
    now = next.sketch;
    if (next.stream) made = { ...made, stream: next.stream };
  }
  return now === sketch ? first : { ...first, ...made, sketch: now };
}
