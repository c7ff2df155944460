import type { NewtonEnd } from './newton';
import type { StageSystem } from './system';

/** Where the best attempt stood when it was given up. */
export interface Failure {
  readonly why: 'dries' | 'trivial' | 'no-convergence' | 'out-of-reach' | 'open';
  /** Place of the worst residual, or the one that runs dry. */
  readonly place: number;
  /** 'dries': what runs out there. */
  readonly phase?: 'liquid' | 'vapour';
  readonly residual: number;
  readonly of: 'balance' | 'equilibrium' | 'energy';
  /** 'out-of-reach': how much of the way from a plain column to what is asked was possible, and which fixing. */
  readonly way?: number;
  readonly fixing?: number;
  /** 'out-of-reach': what was reached instead of that fixing's value, in its own unit. */
  readonly reached?: number;
}

/** A place is dry below this share of the feed. */
const DRY = 1e-7;

/** Why an attempt ended where the system stands. */
export function explain(s: StageSystem, end: NewtonEnd): Failure {
  if (end.end === 'solved') return { ...standing(s), why: 'trivial' };
  for (let j = 0; j < s.places; j++) {
    const L = s.L[j]! / s.feedTotal;
    const V = s.V[j]! / s.feedTotal;
    if (L < DRY || V < DRY)
      return { ...standing(s), why: 'dries', place: j, phase: L < V ? 'liquid' : 'vapour' };
  }
  return standing(s);
}

/** Where the system stands, without an opinion why. */
export function standing(s: StageSystem): Failure {
  const worst = s.worst();
  return { why: 'no-convergence', place: worst.place, residual: worst.value, of: worst.of };
}

/** Both phases of a stage are one: an answer of the equations, not of the column. */
export function isTrivial(s: StageSystem): boolean {
  for (let j = 0; j < s.places; j++) {
    let size = 0;
    for (let i = j * s.n; i < (j + 1) * s.n; i++)
      size = Math.max(size, Math.abs(Math.log((s.v[i]! * s.L[j]!) / (s.l[i]! * s.V[j]!))));
    const volumes = s.vap[j]!.v_m3_mol / s.liq[j]!.v_m3_mol;
    if (size < 1e-5 && volumes < 1.01) return true;
  }
  return false;
}
