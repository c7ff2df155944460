import type { StreamId } from '../engine/ids';
import type { StreamResult } from '../engine/network/types';
import { solvedStream } from './input';

/** Relative difference in a chemical's flow above which two answers are not the same. */
const FLOW = 1e-6;
/** Difference in temperature [K]. */
const KELVIN = 1e-4;

/**
 * Whether the answer from nothing differs from the live one beyond tolerance: 1e-6 relative in any flow (relative to the
 * stream's total where a chemical is rarer than that), or 1e-4 K. Streams not solved in both are not compared.
 */
export function answersDiffer(
  live: ReadonlyMap<StreamId, StreamResult>,
  clean: ReadonlyMap<StreamId, StreamResult>,
): boolean {
  for (const [id, result] of clean) {
    const now = solvedStream(result);
    const then = solvedStream(live.get(id));
    if (!now || !then) continue;
    if (Math.abs(now.T_K - then.T_K) > KELVIN) return true;
    if (Math.abs(now.n_mol_s - then.n_mol_s) > FLOW * now.n_mol_s) return true;
    for (let i = 0; i < now.z.length; i += 1) {
      const a = (now.z[i] ?? 0) * now.n_mol_s;
      const b = (then.z[i] ?? 0) * then.n_mol_s;
      if (Math.abs(a - b) > FLOW * Math.max(a, FLOW * now.n_mol_s)) return true;
    }
  }
  return false;
}
