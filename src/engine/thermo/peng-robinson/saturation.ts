import { positiveRoots } from '../../numerics/cubic';
import { attraction } from './attraction';
import { OMEGA_A, OMEGA_B, Z_CRITICAL } from './constants';

/** q = a/(bRT) at the critical point. */
const Q_CRITICAL = OMEGA_A / OMEGA_B;
/** v/b at the critical point. */
const V_CRITICAL = Z_CRITICAL / OMEGA_B;

/**
 * Saturation of a pure fluid: bP/(RT) at which both roots have the same fugacity. For a pure fluid it depends on
 * q = a/(bRT) alone, whatever the temperature function of a.
 *
 * @param q  a/(bRT) [-]
 * @returns  bP/(RT), or undefined at and above the critical temperature (q <= 5.877), or below the smallest pressure
 *           that a double can hold
 * Newton in ln P inside a bracket: where one root only exists, its volume tells on which side the pressure lies.
 * Source: after Soave, Fluid Phase Equilib. 31 (1986) 203.
 */
export function saturationReduced(q: number): number | undefined {
  if (!(q > Q_CRITICAL)) return undefined;
  const ends = new Float64Array(2);
  // ln B is close to linear in q.
  let low = Number.NEGATIVE_INFINITY;
  let high = Math.log(0.08);
  let y = -2.5538 - 1.06 * (q - Q_CRITICAL);
  for (let pass = 0; pass < 200; pass++) {
    const B = Math.exp(y);
    if (!(B > 1e-290)) return undefined;
    const real = positiveRoots(4 * B - 1, q * B - 4 * B + 2 * B * B, -2 * B * B, ends);
    let next: number;
    if (real === 3) {
      const [l, v] = [ends[0]!, ends[1]!];
      // ln(phi_liquid / phi_vapour) and its slope by ln P
      const gap = l - v - Math.log(l / v) - q * (attraction(l + B, B) - attraction(v + B, B));
      const step = gap / (v - l);
      if (Math.abs(step) < 4e-16 * Math.max(1, Math.abs(y)) || high - low < 1e-15) return B;
      if (gap > 0) low = y;
      else high = y;
      next = y + step;
      if (Math.abs(step) < 1e-13) return Math.exp(next);
    } else {
      const vapour = (ends[0]! + B) / B > V_CRITICAL;
      if (vapour) low = y;
      else high = y;
      next = Number.NaN;
    }
    if (!(next > low && next < high))
      next = low === Number.NEGATIVE_INFINITY ? high - 2 * (high - y) - 1 : (low + high) / 2;
    if (next === y || high - low < 1e-15) return B;
    y = next;
  }
  return Math.exp(y);
}
