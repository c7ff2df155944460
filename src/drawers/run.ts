import type { Sketch } from '../sketch/types';
import type { Edit } from '../store/commands';
import type { SketchStore } from '../store/sketchStore';
import { refusedSentence } from './words';

/** Does one edit, under its own label; answers why not when it was refused. */
export function run(store: SketchStore, edit: (sketch: Sketch) => Edit): string | undefined {
  const done = edit(store.getState().sketch);
  if (!done.ok) return refusedSentence(done);
  store.apply(done.label, () => done.sketch);
  return undefined;
}
