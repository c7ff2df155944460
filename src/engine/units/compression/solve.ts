import type { StreamState } from '../../equilibrium/types';
import { bracketedRoot } from '../../numerics/root';
import { type Finding, type FindingCode, noSolution, type Outcome, saw, solved } from '../../outcome';
import { R_J_molK } from '../../thermo/types';
import { answerOf } from '../answer';
import { emptyStream, outletPressure, streamAt, warmFrom, warmOf } from '../streams';
import type { Answer, Call } from '../types';
import { massFlow_kg_s, volumeFlow_m3_s } from '../volume';
import {
  type Entering,
  entering,
  isOneGas,
  type Leaving,
  leavingAt,
  type MachineWarm,
  polytropicPath,
  withLosses,
} from './state';
import type { MachineResults, MachineSettings } from './types';

/** Which way the fluid goes when the discharge temperature is given: a compressor heats, an expander cools. */
export type Direction = 'compress' | 'expand';

/** How far ln P is searched for a discharge temperature. */
const FARTHEST = Math.log(1e5);

const refused = <T>(call: Call<MachineSettings>, code: FindingCode, e: Entering, T_K: number): Outcome<T> =>
  noSolution({
    code,
    weight: 'beyond-limit',
    at: { unit: call.unit, path: 'p.T' },
    evidence: [saw('temperature', T_K, 'temperature'), saw('inletTemperature', e.stream.T_K, 'temperature')],
  });

/** ln of the pressure ratio that an ideal gas of the inlet's heat capacity needs for a temperature; a start value. */
function idealSpan(
  e: Entering,
  T_K: number,
  efficiency: MachineSettings['efficiency'],
  direction: Direction,
): number {
  const cp = e.stream.phases.reduce((sum, p) => sum + p.fraction * p.cp_J_molK, 0);
  const kappa = R_J_molK / Math.max(cp, 2.5 * R_J_molK);
  const t = T_K / e.stream.T_K;
  const up = direction === 'compress';
  if ('polytropic' in efficiency)
    return (Math.log(t) / kappa) * (up ? efficiency.polytropic : 1 / efficiency.polytropic);
  const ideal = 1 + (up ? efficiency.isentropic : 1 / efficiency.isentropic) * (t - 1);
  return Math.log(Math.max(ideal, 0.05)) / kappa;
}

/** The pressure at which the fluid leaves with a temperature. */
function toTemperature(
  call: Call<MachineSettings>,
  e: Entering,
  T_K: number,
  direction: Direction,
  warm: MachineWarm,
): Outcome<Leaving> {
  const sign = direction === 'compress' ? 1 : -1;
  if (T_K === e.stream.T_K) return leavingAt(call, e, e.stream.P_Pa, warm);
  if (sign * (T_K - e.stream.T_K) < 0)
    return refused(
      call,
      direction === 'compress' ? 'compressor/temperature-below-inlet' : 'expander/temperature-above-inlet',
      e,
      T_K,
    );
  let reason: readonly Finding[] = [];
  let last: Outcome<Leaving> | undefined;
  let lastSpan = Number.NaN;
  // Distance past the temperature that is asked for, positive beyond it.
  const past = (span: number): number => {
    if (span === 0) return -sign * (T_K - e.stream.T_K);
    lastSpan = span;
    last = leavingAt(call, e, e.stream.P_Pa * Math.exp(sign * span), warm);
    if (last.state === 'solved') return sign * (last.value.out.T_K - T_K);
    reason = last.findings;
    return Number.NaN;
  };
  let near = 0;
  let far = Math.min(
    Math.abs(idealSpan(e, T_K, call.settings.efficiency, direction)) * 1.02 + 1e-6,
    FARTHEST,
  );
  for (let value = past(far); !(value >= 0); value = past(far)) {
    if (Number.isNaN(value) || far >= FARTHEST) {
      const [first, ...rest] = reason;
      return Number.isNaN(value) && first
        ? noSolution(first, ...rest)
        : refused(call, 'compression/temperature-out-of-reach', e, T_K);
    }
    near = far;
    far = Math.min(far * 1.3, FARTHEST);
  }
  const root = bracketedRoot(past, near, far, { xTol: 1e-14, fTol: 1e-9 * T_K, evaluations: 60 });
  if (root.why === 'not-finite') {
    const [first, ...rest] = reason;
    if (first) return noSolution(first, ...rest);
  }
  if (lastSpan !== root.x || last === undefined)
    last = leavingAt(call, e, e.stream.P_Pa * Math.exp(sign * root.x), warm);
  // A temperature that jumps over what was asked is not met.
  return Math.abs(root.f) < 1e-6 ? last : refused(call, 'compression/temperature-out-of-reach', e, T_K);
}

function nothing(call: Call<MachineSettings>, inlet: StreamState): Outcome<Answer<MachineResults>> {
  const { p } = call.settings;
  const P = 'T' in p ? solved(inlet.P_Pa) : outletPressure(call, p, inlet.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const out = emptyStream(call.model.nc, inlet.T_K, P.value);
  const { P_Pa, T_K } = out;
  const ratio = P_Pa / inlet.P_Pa;
  return solved(answerOf({ out }, { power_W: 0, P_Pa, ratio, T_K, suctionVolume_m3_s: 0 }, []));
}

/** How far a temperature lies above the dew point [K]; what a flash leaves by rounding at the dew point itself is none. */
const above_K = (T_K: number, dewT_K: number): number => (Math.abs(T_K - dewT_K) < 1e-6 ? 0 : T_K - dewT_K);

/** The dew point of a vapour that enters, at its pressure; undefined for anything else and without one. */
function dewPoint(
  call: Call<MachineSettings>,
  stream: StreamState,
  warm: MachineWarm,
): StreamState | undefined {
  if (!isOneGas(stream) || stream.phases.some((p) => p.kind === 'dense')) return undefined;
  const at = { P_Pa: stream.P_Pa, vapourFraction: 1 };
  const made = streamAt(call, stream.n_mol_s, at, warmFrom(warm.dew, stream.n_mol_s, stream.T_K));
  return made.state === 'solved' ? made.value : undefined;
}

/**
 * A compressor or an expander: from one pressure to another with losses, no heat.
 *
 * Isentropic efficiency: the change of enthalpy at constant entropy divided by it (compressing) or times it (expanding).
 * Polytropic efficiency: dh = v dP / efficiency (compressing), dh = efficiency v dP (expanding), in small steps of pressure on
 * the model's real volumes, with a flash at every point where two phases are about. The other efficiency of the two is reported
 * where it can be told.
 *
 * @param direction  in which a discharge temperature is sought; pressures are followed either way
 * @returns  pressure/not-positive, compression/path-breaks-off, compression/temperature-out-of-reach,
 *           compressor/temperature-below-inlet, expander/temperature-above-inlet, or the flash's reason (equilibrium/...), of
 *           which a missing standard entropy is one
 */
export function solveMachine(
  call: Call<MachineSettings>,
  direction: Direction,
): Outcome<Answer<MachineResults>> {
  const inlet = call.in.in!;
  if (inlet.phases.length === 0) return nothing(call, inlet);
  const { p, efficiency, drive } = call.settings;
  const warm = (call.warm ?? {}) as MachineWarm;
  const e = entering(call, inlet);
  let left: Outcome<Leaving>;
  if ('T' in p) left = toTemperature(call, e, p.T, direction, warm);
  else {
    const P = outletPressure(call, p, inlet.P_Pa);
    if (P.state !== 'solved') return noSolution(...P.findings);
    left = leavingAt(call, e, P.value, warm);
  }
  if (left.state !== 'solved') return noSolution(...left.findings);
  const { out, isentropic } = left.value;
  const power_W = out.H_W - inlet.H_W;
  const mass = massFlow_kg_s(inlet.n_mol_s, call.model);
  const ideal_W = isentropic ? isentropic.H_W - inlet.H_W : undefined;
  const path = 'polytropic' in efficiency ? undefined : polytropicPath(e, left.value, warm.pathToIdeal ?? 1);
  const polytropic = 'polytropic' in efficiency ? efficiency.polytropic : path?.efficiency;
  const dew = dewPoint(call, inlet, warm);
  const polytropic_W =
    polytropic === undefined ? undefined : power_W >= 0 ? power_W * polytropic : power_W / polytropic;
  const results: MachineResults = {
    power_W,
    ...(drive === undefined ? {} : { electric_W: withLosses(power_W, drive) }),
    P_Pa: out.P_Pa,
    ratio: out.P_Pa / inlet.P_Pa,
    T_K: out.T_K,
    ...(isentropic === undefined ? {} : { isentropicT_K: isentropic.T_K }),
    ...isentropicOf(efficiency, ideal_W, power_W),
    ...(polytropic === undefined ? {} : { polytropicEfficiency: polytropic }),
    ...(ideal_W === undefined ? {} : { isentropicHead_J_kg: ideal_W / mass }),
    ...(polytropic_W === undefined ? {} : { polytropicHead_J_kg: polytropic_W / mass }),
    suctionVolume_m3_s: volumeFlow_m3_s(inlet, call.model),
    ...(dew === undefined ? {} : { dewMargin_K: above_K(inlet.T_K, dew.T_K) }),
  };
  const flashed = out === inlet ? [] : isentropic ? [isentropic, out] : [out];
  const next: MachineWarm = {
    out: warmOf(out),
    ...(isentropic ? { isentropic: warmOf(isentropic) } : {}),
    ...(dew ? { dew: warmOf(dew) } : {}),
    ...(path ? { pathToIdeal: path.toIdeal } : {}),
  };
  return solved({ ...answerOf({ out }, results, flashed), power_W, warm: next }, left.findings);
}

/** The isentropic efficiency as given, or from the work with and without losses. */
function isentropicOf(
  efficiency: MachineSettings['efficiency'],
  ideal_W: number | undefined,
  power_W: number,
): { readonly isentropicEfficiency?: number } {
  if ('isentropic' in efficiency) return { isentropicEfficiency: efficiency.isentropic };
  if (ideal_W === undefined || ideal_W === 0 || power_W === 0) return {};
  return { isentropicEfficiency: power_W >= 0 ? ideal_W / power_W : power_W / ideal_W };
}
