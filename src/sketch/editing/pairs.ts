import { word } from '../findings';
import { isObject, own } from '../json';
import type { Json, ModelChoice, Sketch } from '../types';
import { type Edit, refuse } from './edited';

/** Whether an entry is a binary constant of these two, in either order. Parameters of other forms are left alone. */
const isPairOf = (entry: Json, one: string, two: string): boolean => {
  if (!isObject(entry) || own(entry, 'kij') === undefined) return false;
  const [i, j] = [own(entry, 'i'), own(entry, 'j')];
  return (i === one && j === two) || (i === two && j === one);
};

/**
 * Gives a pair of chemicals a binary constant of the user's own, or takes it away (undefined), so that the bank's counts
 * again. An entry keeps its place, order and further fields; entries that say the same pair twice become one.
 *
 * @param one, two  ids of chemicals, in either order
 * @param kij       [-], finite
 */
export function setPair(sketch: Sketch, one: string, two: string, kij: number | undefined): Edit {
  if (one === two) return refuse('edit/same-chemical', word('chemical', one));
  if (kij !== undefined && !Number.isFinite(kij)) return refuse('edit/not-a-number');
  const label = `${kij === undefined ? 'clear' : 'set'} pair ${one} + ${two}`;
  const pairs = sketch.model.pairs ?? [];
  const last = pairs.map((entry) => isPairOf(entry, one, two)).lastIndexOf(true);
  const kept = pairs.flatMap((entry, k): Json[] => {
    if (!isPairOf(entry, one, two)) return [entry];
    return k === last && kij !== undefined && isObject(entry) ? [{ ...entry, kij }] : [];
  });
  const next = last < 0 && kij !== undefined ? [...kept, { i: one, j: two, kij }] : kept;
  const entry = pairs[last];
  const isSame =
    next.length === pairs.length && (last < 0 ? kij === undefined : isObject(entry) && entry.kij === kij);
  return { ok: true, sketch: isSame ? sketch : { ...sketch, model: withPairs(sketch.model, next) }, label };
}

/** Without any, none are given: that is said by the register of assumptions again. */
function withPairs(model: ModelChoice, pairs: readonly Json[]): ModelChoice {
  const { pairs: _, ...rest } = model;
  return pairs.length === 0 ? rest : { ...rest, pairs };
}
