import { arrange, arranged } from '../../drawing/arrange';
import type { UnitId } from '../../engine/ids';
import type { Action } from '../../store/action';
import type { Stores } from '../../store/react';
import { layoutEngine } from '../arranging';

/** Places units anew as one step; what is not among them stays. */
async function arrangeUnits(stores: Stores, which: ReadonlySet<UnitId> | 'all'): Promise<void> {
  const { sketch, edit } = stores.sketch.getState();
  const keep =
    which === 'all' ? [] : sketch.units.filter((unit) => !which.has(unit.id)).map((unit) => unit.id);
  stores.session.setState({ spoken: 'Arranging' });
  try {
    const plan = await arrange(sketch, await layoutEngine(), { keep });
    if (stores.sketch.getState().edit !== edit) {
      stores.session.say('info', 'Not arranged: the sketch was changed meanwhile.', ['Arrange once more.']);
      return;
    }
    const label =
      which === 'all' ? 'arrange all' : `arrange ${which.size} unit${which.size === 1 ? '' : 's'}`;
    stores.sketch.apply(label, (now) => arranged(now, plan));
    stores.session.setState({ spoken: `Done: ${label}` });
  } catch (error) {
    stores.session.say('beyond', 'Not arranged; the sketch is as it was.', [
      error instanceof Error ? error.message : String(error),
    ]);
  }
}

const isReady = ({ sketch, session }: Stores): boolean =>
  sketch.getState().writable &&
  session.getState().over === 'none' &&
  sketch.getState().sketch.units.length > 1;

/** Layers from left to right along the flow. */
export const arrangeActions: readonly Action[] = [
  {
    id: 'arrange',
    label: 'Arrange all',
    group: 'edit',
    keys: ['Shift+A'],
    when: isReady,
    run: (stores) => void arrangeUnits(stores, 'all'),
  },
  {
    id: 'arrange-selected',
    label: 'Arrange only what is selected',
    group: 'edit',
    keys: ['Shift+S'],
    when: (stores) => isReady(stores) && stores.session.getState().units.length > 0,
    run: (stores) => void arrangeUnits(stores, new Set(stores.session.getState().units)),
  },
];
