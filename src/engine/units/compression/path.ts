import type { ThermoModel } from '../../thermo/types';

/** Molar volume at a pressure and a molar enthalpy [m3/mol]; undefined where there is no such state. */
export type VolumeAt = (P_Pa: number, h_J_mol: number) => number | undefined;

/**
 * Molar enthalpy at the end of a path of constant polytropic efficiency [J/mol]: dh/d ln P = factor v P.
 *
 * Fourth-order Runge-Kutta in ln P. With a step of 0.1 a twentyfold compression of a monatomic gas ends within 1e-7 of its
 * temperature.
 *
 * @param P2_Pa   pressure at the end, above or below the one at the start [Pa]
 * @param factor  1/efficiency while compressing, efficiency while expanding
 * @param step    largest step of ln P [-]
 * @returns       undefined when a state on the way does not exist
 * Source: the constant-efficiency path as in Huntington, J. Eng. Gas Turbines Power 107 (1985) 872.
 */
export function followPath(
  volumeAt: VolumeAt,
  from: { readonly P_Pa: number; readonly h_J_mol: number },
  P2_Pa: number,
  factor: number,
  step: number,
): number | undefined {
  const span = Math.log(P2_Pa / from.P_Pa);
  const steps = Math.max(1, Math.ceil(Math.abs(span) / step));
  const d = span / steps;
  let h = from.h_J_mol;
  let lnP = Math.log(from.P_Pa);
  const slope = (at: number, hAt: number): number => {
    const P = Math.exp(at);
    const v = Number.isFinite(hAt) ? volumeAt(P, hAt) : undefined;
    return v === undefined ? Number.NaN : factor * P * v;
  };
  for (let k = 0; k < steps; k++) {
    const k1 = slope(lnP, h);
    const k2 = slope(lnP + d / 2, h + (d / 2) * k1);
    const k3 = slope(lnP + d / 2, h + (d / 2) * k2);
    const k4 = slope(lnP + d, h + d * k3);
    h += (d / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
    lnP += d;
    if (!Number.isFinite(h)) return undefined;
  }
  return h;
}

/** A correction of temperature so small that the volume is carried over it along the line through the last two states [-]. */
const SMALL = 1e-6;

/**
 * Volumes of a gas that stays one phase: temperature from enthalpy by Newton's method, no flash. The search starts from the
 * last state found, moved by the change of enthalpy alone; heat capacity is taken once a call.
 *
 * @param x     mole fractions of the chemicals of `thermo`, sum 1
 * @param from  a state of the gas
 * @returns     a function with a memory: asked along a path, undefined where thirty steps find no temperature
 */
export function gasVolumes(
  thermo: ThermoModel,
  x: Float64Array,
  from: { readonly T_K: number; readonly h_J_mol: number },
): VolumeAt {
  const props = thermo.makeProps();
  let { T_K: T, h_J_mol: h } = from;
  let cp = 0;
  return (P_Pa, h_J_mol) => {
    if (cp > 0) T = Math.max(T + (h_J_mol - h) / cp, 0.7 * T);
    h = h_J_mol;
    let before = Number.NaN;
    let vBefore = Number.NaN;
    for (let pass = 0; pass < 30; pass++) {
      thermo.evaluate('vapour', T, P_Pa, x, pass === 0 || pass > 4 ? 2 : 1, props);
      if (pass === 0 || pass > 4) cp = props.cp_J_molK;
      const v = props.v_m3_mol;
      const dT = (h_J_mol - props.h_J_mol) / cp;
      if (Math.abs(dT) < 1e-9 * T) return v;
      const known = T - before;
      if (Math.abs(dT) < SMALL * T && Math.abs(dT) < Math.abs(known)) {
        T += dT;
        return v + (dT * (v - vBefore)) / known;
      }
      before = T;
      vBefore = v;
      T = Math.min(Math.max(T + dT, 0.7 * T), 1.4 * T);
      if (!(T > 1)) return undefined;
    }
    return undefined;
  };
}
