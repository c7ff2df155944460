import type { FlashWarm, StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, saw, solved } from '../../outcome';
import type { ThermoModel } from '../../thermo/types';
import { placesOf } from '../present';
import { streamAt, totalOf, type WarmState, warmFrom, warmOf } from '../streams';
import type { Call } from '../types';
import { followPath, gasVolumes } from './path';
import type { MachineSettings } from './types';

/** Largest steps of ln P: with the gas alone, and with a flash at every point. */
const GAS_STEP = 0.1;
const FLASH_STEP = 0.2;
/** For the efficiency that is only reported: no step longer than this, nor one that warms an ideal gas by more than 6 %. */
const REPORT_STEP = 0.4;
const REPORT_RISE = 0.06;

/** Start values of a machine's flashes. */
export interface MachineWarm {
  readonly out?: WarmState;
  readonly isentropic?: WarmState;
  readonly dew?: WarmState;
  /** What the reported efficiency's path came to, by the ideal gas' answer [-]. */
  readonly pathToIdeal?: number;
}

/** What enters, prepared once. */
export interface Entering {
  readonly stream: StreamState;
  readonly total_mol_s: number;
  readonly h_J_mol: number;
  /** The gas alone, when what enters is one gas phase. */
  readonly gas?: { readonly thermo: ThermoModel; readonly x: Float64Array };
}

/** What leaves at a pressure. */
export interface Leaving {
  readonly out: StreamState;
  /** Absent when a chemical has no standard entropy. */
  readonly isentropic?: StreamState;
}

const flowing = (s: StreamState) => s.phases.filter((p) => p.fraction > 0);

/** Whether what flows is one gas phase: a vapour, or a dense phase that counts as one. */
export const isOneGas = (s: StreamState): boolean => {
  const phases = flowing(s);
  const kind = phases.length === 1 ? phases[0]!.kind : undefined;
  return kind === 'vapour' || (kind === 'dense' && s.vapourFraction === 1);
};

/** What enters a machine, with flow; the gas alone is prepared where it is one gas phase. */
export function entering(call: Call<unknown>, stream: StreamState): Entering {
  const total_mol_s = totalOf(stream.n_mol_s);
  const common = { stream, total_mol_s, h_J_mol: stream.H_W / total_mol_s };
  if (!isOneGas(stream)) return common;
  const present = placesOf(stream.n_mol_s);
  const x = Float64Array.from(present, (i) => stream.n_mol_s[i]! / total_mol_s);
  return { ...common, gas: { thermo: call.model.of(present), x } };
}

/**
 * Work that is done for a work without losses, in any unit: more where the fluid takes it (>= 0), less where the fluid gives
 * it.
 */
export const withLosses = (ideal: number, efficiency: number): number =>
  ideal >= 0 ? ideal / efficiency : ideal * efficiency;

/** A step of temperature after which the next one is lost in rounding [-]. */
const EXACT = 1e-8;

/**
 * Temperature at which the gas that enters has a molar enthalpy or entropy, if it stays one gas: where the flash starts, which
 * then only has to find that it does [K]. Undefined when what enters is no gas.
 */
function gasTemperature_K(
  { gas, stream }: Entering,
  P_Pa: number,
  of: 'h_J_mol' | 's_J_molK',
  target: number,
  near_K: number | undefined,
): number | undefined {
  if (!gas) return undefined;
  const props = gas.thermo.makeProps();
  let T = near_K ?? stream.T_K;
  for (let pass = 0; pass < 12; pass++) {
    gas.thermo.evaluate('vapour', T, P_Pa, gas.x, 2, props);
    const miss = target - props[of];
    const dT = ((of === 'h_J_mol' ? 1 : T) * miss) / props.cp_J_molK;
    T = Math.min(Math.max(T + dT, 0.7 * T), 1.4 * T);
    if (Math.abs(dT) < EXACT * T) return T;
  }
  return undefined;
}

/** Where a flash of the machine starts: two phases from the last answer, a gas from its own temperature. */
function startOf(
  e: Entering,
  warm: WarmState | undefined,
  P_Pa: number,
  of: 'h_J_mol' | 's_J_molK',
  target: number,
): FlashWarm {
  const last = warmFrom(warm, e.stream.n_mol_s, e.stream.T_K);
  if (last.K) return last;
  const T_K = gasTemperature_K(e, P_Pa, of, target, warm?.T_K);
  return T_K === undefined ? last : { T_K };
}

/** The fluid at the same entropy and another pressure. */
function isentropicTo(
  call: Call<MachineSettings>,
  e: Entering,
  P_Pa: number,
  warm: MachineWarm,
): Outcome<StreamState> {
  const { stream, total_mol_s } = e;
  // Without a standard entropy the flash itself gives the reason and the chemical.
  const s_J_molK = (stream.S_W_K ?? 0) / total_mol_s;
  const start = startOf(e, warm.isentropic, P_Pa, 's_J_molK', s_J_molK);
  return streamAt(call, stream.n_mol_s, { P_Pa, s_J_molK }, start);
}

/** Enthalpy flow after a path of constant polytropic efficiency, with a flash at every point [W]; undefined without states. */
function flashedPath_W(
  call: Call<MachineSettings>,
  e: Entering,
  P_Pa: number,
  factor: number,
): number | undefined {
  const { stream, total_mol_s } = e;
  let warm = warmOf(stream);
  const h = followPath(
    (P, h_J_mol) => {
      const at = { P_Pa: P, H_W: h_J_mol * total_mol_s };
      let made = streamAt(call, stream.n_mol_s, at, warmFrom(warm, stream.n_mol_s, stream.T_K));
      if (made.state !== 'solved') made = streamAt(call, stream.n_mol_s, at);
      if (made.state !== 'solved') return undefined;
      warm = warmOf(made.value);
      return made.value.phases.reduce((v, p) => v + p.fraction * p.v_m3_mol, 0);
    },
    { P_Pa: stream.P_Pa, h_J_mol: e.h_J_mol },
    P_Pa,
    factor,
    FLASH_STEP,
  );
  return h === undefined ? undefined : h * total_mol_s;
}

const outAt = (
  call: Call<MachineSettings>,
  e: Entering,
  P_Pa: number,
  H_W: number,
  warm: MachineWarm,
): Outcome<StreamState> => {
  const start = startOf(e, warm.out, P_Pa, 'h_J_mol', H_W / e.total_mol_s);
  return streamAt(call, e.stream.n_mol_s, { P_Pa, H_W }, start);
};

/** What leaves after a path of constant polytropic efficiency. */
function polytropicTo(
  call: Call<MachineSettings>,
  e: Entering,
  P_Pa: number,
  efficiency: number,
  warm: MachineWarm,
): Outcome<StreamState> {
  const factor = P_Pa >= e.stream.P_Pa ? 1 / efficiency : efficiency;
  if (e.gas) {
    const at = { P_Pa: e.stream.P_Pa, h_J_mol: e.h_J_mol };
    const volumes = gasVolumes(e.gas.thermo, e.gas.x, { T_K: e.stream.T_K, h_J_mol: e.h_J_mol });
    const h = followPath(volumes, at, P_Pa, factor, GAS_STEP);
    if (h !== undefined) {
      const made = outAt(call, e, P_Pa, h * e.total_mol_s, warm);
      // Where liquid forms the gas alone was the wrong fluid to follow.
      if (made.state === 'solved' && isOneGas(made.value)) return made;
    }
  }
  const H_W = flashedPath_W(call, e, P_Pa, factor);
  if (H_W === undefined)
    return noSolution({
      code: 'compression/path-breaks-off',
      weight: 'beyond-limit',
      at: { unit: call.unit, path: 'efficiency.polytropic' },
      evidence: [saw('pressure', P_Pa, 'pressure')],
    });
  return outAt(call, e, P_Pa, H_W, warm);
}

/**
 * What leaves at a pressure [Pa], with the efficiency that is set, and without losses. At the inlet's own pressure it is the
 * inlet.
 *
 * @returns  no solution where the isentropic or the last state is not found, or the path breaks off; a polytropic machine goes
 *           without its isentropic state where there is none
 */
export function leavingAt(
  call: Call<MachineSettings>,
  e: Entering,
  P_Pa: number,
  warm: MachineWarm,
): Outcome<Leaving> {
  const { efficiency } = call.settings;
  const { stream } = e;
  if (P_Pa === stream.P_Pa) return solved({ out: stream, isentropic: stream });
  if ('polytropic' in efficiency) {
    const made = polytropicTo(call, e, P_Pa, efficiency.polytropic, warm);
    if (made.state !== 'solved') return noSolution(...made.findings);
    if (stream.S_W_K === undefined) return solved({ out: made.value }, made.findings);
    const ideal = isentropicTo(call, e, P_Pa, warm);
    const isentropic = ideal.state === 'solved' ? { isentropic: ideal.value } : {};
    return solved({ out: made.value, ...isentropic }, made.findings);
  }
  const ideal = isentropicTo(call, e, P_Pa, warm);
  if (ideal.state !== 'solved') return noSolution(...ideal.findings);
  const H_W = stream.H_W + withLosses(ideal.value.H_W - stream.H_W, efficiency.isentropic);
  const made = outAt(call, e, P_Pa, H_W, warm);
  if (made.state !== 'solved') return noSolution(...made.findings);
  return solved({ out: made.value, isentropic: ideal.value }, made.findings);
}

/** The path of constant polytropic efficiency between two states. */
export interface PathFound {
  readonly efficiency: number;
  /** Its factor (see followPath) by the ideal gas' [-]: where the next search starts. */
  readonly toIdeal: number;
}

/**
 * The polytropic efficiency that leads from what enters to what leaves, both one gas phase: secant steps on the path itself,
 * from the ideal gas' answer times `toIdeal`.
 *
 * @returns  undefined where it cannot be told: two phases, no entropy, no change of pressure, a path that breaks off, or one
 *           whose work is not met in eight steps to 1e-6
 */
export function polytropicPath(
  e: Entering,
  { out, isentropic }: Leaving,
  toIdeal: number,
): PathFound | undefined {
  const { stream, gas } = e;
  if (!gas || !isentropic || !isOneGas(out) || out.P_Pa === stream.P_Pa) return undefined;
  const up = out.P_Pa > stream.P_Pa;
  const [ideal, real] = [Math.log(isentropic.T_K / stream.T_K), Math.log(out.T_K / stream.T_K)];
  const at = { P_Pa: stream.P_Pa, h_J_mol: e.h_J_mol };
  const wanted = out.H_W / e.total_mol_s - e.h_J_mol;
  const volumes = gasVolumes(gas.thermo, gas.x, { T_K: stream.T_K, h_J_mol: e.h_J_mol });
  const span = Math.abs(Math.log(out.P_Pa / stream.P_Pa));
  const step = Math.min(REPORT_STEP, (REPORT_RISE * span) / Math.abs(real));
  const work = (factor: number): number =>
    (followPath(volumes, at, out.P_Pa, factor, step) ?? Number.NaN) - e.h_J_mol;
  const start = real / ideal;
  let factor = start * toIdeal;
  let last = factor;
  let lastMiss = 0;
  for (let pass = 0; pass < 8; pass++) {
    const miss = work(factor) - wanted;
    if (!Number.isFinite(miss)) return undefined;
    // The work is nearly proportional to the factor: that is the first step.
    const slope = pass === 0 ? (miss + wanted) / factor : (miss - lastMiss) / (factor - last);
    last = factor;
    lastMiss = miss;
    if (miss !== 0) factor -= miss / slope;
    // That step leaves no more than a tenth of what it found.
    if (Math.abs(miss) > 1e-6 * Math.abs(wanted)) continue;
    const efficiency = up ? 1 / factor : factor;
    return efficiency > 0 && Number.isFinite(efficiency)
      ? { efficiency, toIdeal: factor / start }
      : undefined;
  }
  return undefined;
}
