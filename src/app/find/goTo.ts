import { sheetOf } from '../../canvas/handle';
import { focusChemical } from '../../drawers/focusField';
import type { Stores } from '../../store/react';
import type { Target } from './things';

/** From farther away than this little of a unit can be read: the sheet comes nearer [-]. */
const READABLE = 0.6;

/** Selects what was found, opens its drawer, brings it into the middle of the sheet and gives it the keyboard. */
export function goTo(stores: Stores, target: Target): void {
  const { session } = stores;
  session.setState({ over: 'none' });
  if ('chemical' in target) {
    session.enterDrawer({ is: 'chemicals' });
    focusChemical(target.chemical);
    return;
  }
  if ('unit' in target) session.select([target.unit]);
  else session.select([], [target.stream]);
  // Once the field has gone, and the drawer has taken its width.
  setTimeout(() => {
    const sheet = sheetOf(stores);
    if (sheet && sheet.zoom() < READABLE) sheet.zoomTo(READABLE);
    session.centre(target);
    sheet?.focus(target);
  });
}
