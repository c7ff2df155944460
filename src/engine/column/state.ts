import type { StageSystem } from './system';
import type { ColumnState } from './types';

/** A copy of a system's unknowns. */
export const stateOf = (s: StageSystem): ColumnState => ({
  l: s.l.slice(),
  v: s.v.slice(),
  T_K: s.T.slice(),
  p: s.p.slice(),
});

/** Copies a system's unknowns into a state of its shape. */
export function put(s: StageSystem, kept: ColumnState): void {
  kept.l.set(s.l);
  kept.v.set(s.v);
  kept.T_K.set(s.T);
  kept.p.set(s.p);
}

/** Brings a system's unknowns back to a state. */
export function restore(s: StageSystem, kept: ColumnState): void {
  s.l.set(kept.l);
  s.v.set(kept.v);
  s.T.set(kept.T_K);
  s.p.set(kept.p);
}
