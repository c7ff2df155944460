import type { StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, solved } from '../../outcome';
import { answerOf } from '../answer';
import { emptyStream, outletPressure, streamAt, type WarmState, warmFrom, warmOf } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { GRAVITY_m_s2, massFlow_kg_s, volumeFlow_m3_s } from '../volume';
import { pumpLimits } from './limits';
import type { PumpResults, PumpSettings } from './types';

/** Start values of a pump's flashes. */
interface PumpWarm {
  readonly out?: WarmState;
  readonly bubble?: WarmState;
}

/** What enters, at its bubble pressure; undefined when vapour enters or there is no such state. */
function bubblePoint(call: Call<PumpSettings>, inlet: StreamState, warm: PumpWarm): StreamState | undefined {
  const incipient = inlet.phases.length === 2 && inlet.phases[0]!.fraction === 0;
  if (incipient) return inlet;
  if (inlet.phases.some((p) => p.kind === 'vapour' && p.fraction > 0)) return undefined;
  const at = { T_K: inlet.T_K, vapourFraction: 0 };
  const point = streamAt(call, inlet.n_mol_s, at, warmFrom(warm.bubble, inlet.n_mol_s, inlet.T_K));
  return point.state === 'solved' ? point.value : undefined;
}

/** How far a pressure lies above the bubble pressure [Pa]; what a flash leaves by rounding at the bubble point itself is none. */
const above_Pa = (P_Pa: number, bubbleP_Pa: number): number =>
  Math.abs(P_Pa - bubbleP_Pa) < 1e-9 * P_Pa ? 0 : P_Pa - bubbleP_Pa;

/**
 * The shaft power that a rise of pressure takes; where the pressure falls, what a machine of this efficiency would give.
 * Hydraulic power over efficiency in the first case, times efficiency in the second.
 */
const shaftPower_W = (hydraulic_W: number, efficiency: number): number =>
  hydraulic_W >= 0 ? hydraulic_W / efficiency : hydraulic_W * efficiency;

function nothing(call: Call<PumpSettings>, inlet: StreamState): Outcome<Answer<PumpResults>> {
  const { p } = call.settings;
  const P = 'head' in p ? solved(inlet.P_Pa) : outletPressure(call, p, inlet.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const out = emptyStream(call.model.nc, inlet.T_K, P.value);
  const { P_Pa, T_K } = out;
  const results = { power_W: 0, hydraulicPower_W: 0, head_m: 0, volume_m3_s: 0, P_Pa, T_K };
  return solved(answerOf({ out }, results, []));
}

function solve(call: Call<PumpSettings>): Outcome<Answer<PumpResults>> {
  const inlet = call.in.in!;
  const warm = (call.warm ?? {}) as PumpWarm;
  const { p, efficiency, staticHead, drive } = call.settings;
  if (inlet.phases.length === 0) return nothing(call, inlet);
  const volume_m3_s = volumeFlow_m3_s(inlet, call.model);
  /** Weight of one cubic metre [N/m3]. */
  const weight = (massFlow_kg_s(inlet.n_mol_s, call.model) / volume_m3_s) * GRAVITY_m_s2;
  const P = outletPressure(call, 'head' in p ? { drop: -p.head * weight } : p, inlet.P_Pa);
  if (P.state !== 'solved') {
    const [first] = P.findings;
    return noSolution('head' in p ? { ...first, at: { ...first.at, path: 'p.head' } } : first);
  }
  const P_Pa = P.value;
  const hydraulicPower_W = volume_m3_s * (P_Pa - inlet.P_Pa);
  const power_W = shaftPower_W(hydraulicPower_W, efficiency);
  const made =
    P_Pa === inlet.P_Pa
      ? solved(inlet)
      : streamAt(
          call,
          inlet.n_mol_s,
          { P_Pa, H_W: inlet.H_W + power_W },
          warmFrom(warm.out, inlet.n_mol_s, inlet.T_K),
        );
  if (made.state !== 'solved') return noSolution(...made.findings);
  const out = made.value;
  const bubble = bubblePoint(call, inlet, warm);
  const bubbleP_Pa = bubble?.P_Pa;
  const results: PumpResults = {
    power_W,
    hydraulicPower_W,
    ...(drive === undefined ? {} : { electric_W: shaftPower_W(power_W, drive) }),
    head_m: (P_Pa - inlet.P_Pa) / weight,
    ...(bubbleP_Pa === undefined
      ? {}
      : { npshAvailable_m: above_Pa(inlet.P_Pa, bubbleP_Pa) / weight + (staticHead ?? 0), bubbleP_Pa }),
    volume_m3_s,
    P_Pa,
    T_K: out.T_K,
  };
  const next: PumpWarm = { out: warmOf(out), ...(bubble ? { bubble: warmOf(bubble) } : {}) };
  const answer = answerOf({ out }, results, out === inlet ? [] : [out]);
  return solved({ ...answer, power_W, warm: next }, made.findings);
}

/**
 * A liquid brought to a higher pressure. Hydraulic power is volume flow entering times rise of pressure; all shaft power goes
 * into the fluid, which is flashed at the outlet pressure and its enthalpy.
 *
 * Gives pressure/not-positive, or the flash's reason why there is no such outlet. Vapour at the suction is a limit, not a
 * failure.
 */
export const pump: UnitKind<PumpSettings, PumpResults> = { solve, limits: pumpLimits };
