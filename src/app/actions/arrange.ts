import { sheetOf } from '../../canvas/handle';
import { arrange, arranged, placedByHand } from '../../drawing/arrange';
import type { UnitId } from '../../engine/ids';
import type { Sketch } from '../../sketch/types';
import { type Action, isSheetFree } from '../../store/action';
import type { Stores } from '../../store/react';
import { layoutEngine } from '../arranging';

const count = (n: number): string => `${n} unit${n === 1 ? '' : 's'}`;

/** Places units anew as one step; those to keep stay. */
async function arrangeAround(stores: Stores, keep: readonly UnitId[], label: string): Promise<void> {
  const { sketch, edit } = stores.sketch.getState();
  stores.session.setState({ spoken: 'Arranging' });
  try {
    const plan = await arrange(sketch, await layoutEngine(), { keep });
    if (stores.sketch.getState().edit !== edit) {
      stores.session.say('info', 'Not arranged: the sketch was changed meanwhile.', ['Arrange once more.']);
      return;
    }
    const next = arranged(sketch, plan);
    if (next !== sketch) stores.sketch.apply(label, () => next);
    // Where much was placed anew, some of it would lie out of view.
    if (keep.length < sketch.units.length / 2) sheetOf(stores)?.fit();
    stores.session.setState({ spoken: next === sketch ? 'All stands as arranged' : `Done: ${label}` });
  } catch (error) {
    stores.session.say('beyond', 'Not arranged; the sketch is as it was.', [
      error instanceof Error ? error.message : String(error),
    ]);
  }
}

const sketchOf = ({ sketch }: Stores): Sketch => sketch.getState().sketch;

const isReady = (stores: Stores): boolean =>
  stores.sketch.getState().writable && isSheetFree(stores) && sketchOf(stores).units.length > 1;

/** Why nothing could be arranged around what was placed by hand. */
function whyNotKeep(stores: Stores): string | undefined {
  const { units } = sketchOf(stores);
  const kept = placedByHand(sketchOf(stores)).length;
  if (units.length < 2) return undefined;
  if (kept === 0) return 'No unit was moved or lined up by hand since it was last arranged.';
  return kept === units.length ? 'Every unit was placed by hand: none is left to arrange.' : undefined;
}

function arrangeSelected(stores: Stores): void {
  const chosen = new Set(stores.session.getState().units);
  const others = sketchOf(stores).units.filter((unit) => !chosen.has(unit.id));
  const keep = others.map((unit) => unit.id);
  void arrangeAround(stores, keep, `arrange ${count(chosen.size)}`);
}

function arrangeTheRest(stores: Stores): void {
  const keep = placedByHand(sketchOf(stores));
  void arrangeAround(stores, keep, `arrange, ${count(keep.length)} kept`);
}

/** Layers from left to right along the flow. */
export const arrangeActions: readonly Action[] = [
  {
    id: 'arrange',
    label: 'Arrange all',
    group: 'edit',
    keys: ['Shift+A'],
    when: isReady,
    run: (stores) => void arrangeAround(stores, [], 'arrange all'),
  },
  {
    id: 'arrange-rest',
    label: 'Arrange, keep what I placed',
    group: 'edit',
    keys: ['Shift+K'],
    when: (stores) => isReady(stores) && whyNotKeep(stores) === undefined,
    whyNot: whyNotKeep,
    run: arrangeTheRest,
  },
  {
    id: 'arrange-selected',
    label: 'Arrange only what is selected',
    group: 'edit',
    keys: ['Shift+S'],
    when: (stores) => isReady(stores) && stores.session.getState().units.length > 0,
    run: arrangeSelected,
  },
];
