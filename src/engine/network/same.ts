import type { StreamState } from '../equilibrium/types';

/** Bit for bit, so that 0 and -0 differ and NaN equals itself. */
export function sameVector(a: Float64Array, b: Float64Array): boolean {
  if (a === b) return true;
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) if (!Object.is(a[i], b[i])) return false;
  return true;
}

/** Plain data of equal structure with equal leaves, vectors bit for bit. */
export function sameData(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  if (a instanceof Float64Array || b instanceof Float64Array)
    return a instanceof Float64Array && b instanceof Float64Array && sameVector(a, b);
  if (Array.isArray(a) !== Array.isArray(b)) return false;
  const keys = Object.keys(a);
  return (
    keys.length === Object.keys(b).length &&
    keys.every((key) => Object.hasOwn(b, key) && sameData(a[key as keyof typeof a], b[key as keyof typeof b]))
  );
}

/** The same state: amounts, pressure, enthalpy and the phases that the source stated. */
export function sameState(a: StreamState, b: StreamState): boolean {
  return (
    a === b ||
    (Object.is(a.P_Pa, b.P_Pa) &&
      Object.is(a.H_W, b.H_W) &&
      Object.is(a.T_K, b.T_K) &&
      sameVector(a.n_mol_s, b.n_mol_s) &&
      a.phases.length === b.phases.length &&
      a.phases.every((p, k) => p.kind === b.phases[k]!.kind && sameVector(p.n_mol_s, b.phases[k]!.n_mol_s)))
  );
}
