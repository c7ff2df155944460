import type { Phase, StreamState } from '../equilibrium/types';
import type { Model } from '../thermo/types';
import { phaseVolume_m3_mol } from '../units/volume';
import { capacityRatio } from './capacityRatio';
import { type ClosureData, idealDatum_W } from './closure';
import { standardLiquid } from './standardLiquid';
import type { PhaseResult, StreamResult } from './types';
import { phaseViscosity } from './viscosity';

/** Molar mass of fractions x [kg/mol]. */
function molarMass_kg_mol(x: Float64Array, data: ClosureData): number {
  let MW = 0;
  for (let i = 0; i < data.nc; i++) MW += x[i]! * data.MW_kg_mol[i]!;
  return MW;
}

function describePhase(
  phase: Phase,
  stream: StreamState,
  model: Model,
  data: ClosureData,
): { result: PhaseResult; v_m3_mol: number } {
  const MW = molarMass_kg_mol(phase.x, data);
  const v_m3_mol = phaseVolume_m3_mol(phase, stream, model);
  const cpOverCv = capacityRatio(phase, stream.T_K, stream.P_Pa, model);
  const viscosity = phaseViscosity(phase, stream.T_K, model);
  const result: PhaseResult = {
    kind: phase.kind,
    fraction: phase.fraction,
    ...(phase.byConvention ? { byConvention: true } : {}),
    x: phase.x,
    h_J_mol: phase.h_J_mol,
    ...(stream.S_W_K === undefined ? {} : { s_J_molK: phase.s_J_molK }),
    Z: phase.Z,
    MW_g_mol: MW * 1e3,
    density_kg_m3: MW / v_m3_mol,
    cp_J_molK: phase.cp_J_molK,
    ...(cpOverCv === undefined ? {} : { cpOverCv }),
    ...(viscosity ?? {}),
  };
  return { result, v_m3_mol };
}

/** A stream through which nothing flows: conditions stand, everything per mole is 0. */
const describeEmpty = (stream: StreamState, nc: number): StreamResult => ({
  state: 'solved',
  T_K: stream.T_K,
  P_Pa: stream.P_Pa,
  n_mol_s: 0,
  m_kg_s: 0,
  MW_g_mol: 0,
  H_W: 0,
  HfromIdeal_W: 0,
  h_J_mol: 0,
  vapourFraction: 0,
  vapourMassFraction: 0,
  z: new Float64Array(nc),
  volume_m3_s: 0,
  phases: [],
});

/**
 * A stream as it is shown, printed and written to files: everything that follows from its state. A pure function of the state;
 * the network asks it once per new state.
 *
 * @returns  a solved record; without flow its conditions stand and all amounts are 0
 */
export function describe(stream: StreamState, model: Model, data: ClosureData): StreamResult {
  if (stream.phases.length === 0) return describeEmpty(stream, data.nc);
  let n = 0;
  let m = 0;
  for (let i = 0; i < data.nc; i++) {
    n += stream.n_mol_s[i]!;
    m += stream.n_mol_s[i]! * data.MW_kg_mol[i]!;
  }
  let volume = 0;
  let vapourMass = 0;
  const phases = stream.phases.map((phase) => {
    const { result, v_m3_mol } = describePhase(phase, stream, model, data);
    const flow = phase.fraction * n;
    volume += flow * v_m3_mol;
    const gas = phase.kind === 'vapour' || (phase.kind === 'dense' && stream.vapourFraction >= 0.5);
    if (gas) vapourMass += (flow * result.MW_g_mol) / 1e3;
    return result;
  });
  const standard = standardLiquid(stream.n_mol_s, model);
  return {
    state: 'solved',
    T_K: stream.T_K,
    P_Pa: stream.P_Pa,
    n_mol_s: n,
    m_kg_s: m,
    MW_g_mol: (m / n) * 1e3,
    H_W: stream.H_W,
    HfromIdeal_W: stream.H_W - idealDatum_W(stream.n_mol_s, data),
    ...(stream.S_W_K === undefined ? {} : { S_W_K: stream.S_W_K, s_J_molK: stream.S_W_K / n }),
    h_J_mol: stream.H_W / n,
    vapourFraction: stream.vapourFraction,
    vapourMassFraction: vapourMass / m,
    z: stream.n_mol_s.map((x) => x / n),
    volume_m3_s: volume,
    ...('m3_s' in standard ? { standardLiquid_m3_s: standard.m3_s } : { noStandardLiquid: standard.lacking }),
    phases,
    ...(stream.hiddenLiquid ? { hiddenLiquid: stream.hiddenLiquid } : {}),
    ...(stream.liquidsTogether ? { liquidsTogether: true } : {}),
  };
}
