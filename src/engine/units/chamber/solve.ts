import type { StreamState } from '../../equilibrium/types';
import { type Finding, noSolution, type Outcome, saw, solved } from '../../outcome';
import { answerOf } from '../answer';
import {
  emptyStream,
  type Mixed,
  mixed,
  outletPressure,
  streamAt,
  totalOf,
  type WarmState,
  warmFrom,
  warmOf,
} from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { drawnAir, drawnFractions, short } from './air';
import { burnt, type Combustion, combustionOf, type Sums, sumsOf, WATER_CONDENSES_J_MOL } from './combustion';
import { chamberLimits } from './limits';
import type { ChamberResults, ChamberSettings } from './types';

interface ChamberWarm {
  readonly out?: WarmState;
  readonly air?: WarmState;
}

const withoutAir = (inlets: Call<unknown>['in']): Call<unknown>['in'] =>
  Object.fromEntries(Object.entries(inlets).filter(([port]) => port !== 'air'));

/** Where a search for the flame temperature starts [K]. */
const firstGuess_K = (all: Mixed, sums: Sums, heat_W: number): number =>
  Math.min(2500, Math.max(300, all.T_K + (sums.LHV_W + heat_W) / (all.total_mol_s * 38)));

/** Heat into the chamber, as far as it is known before the flue gas is [W]. */
function heatGiven_W(heat: ChamberSettings['heat'], LHV_W: number): number | undefined {
  if ('duty' in heat) return heat.duty;
  return 'lossOfLHV' in heat ? -heat.lossOfLHV * LHV_W : undefined;
}

/** What comes in beside the fuel: the air's mole fractions, and the air itself when it is drawn. */
interface AirSide {
  readonly y?: Float64Array;
  readonly drawn?: StreamState;
}

function airSide(
  call: Call<ChamberSettings>,
  fuel: Float64Array,
  warm: ChamberWarm,
): Outcome<AirSide & { readonly combustion: Combustion }> {
  const { air } = call.settings;
  const joined = call.in.air;
  let y: Float64Array | undefined;
  if (joined) {
    const total = totalOf(joined.n_mol_s);
    if (total > 0) y = joined.n_mol_s.map((n) => n / total);
  } else if (air) {
    const made = drawnFractions(call, air);
    if (made.state !== 'solved') return noSolution(...made.findings);
    y = made.value;
  }
  const combustion = combustionOf(call, (i) => fuel[i]! > 0 || (y?.[i] ?? 0) > 0);
  if (combustion.state !== 'solved') return noSolution(...combustion.findings);
  const common = { combustion: combustion.value, ...(y ? { y } : {}) };
  if (joined || !air || !y) return solved(common);
  const drawn = drawnAir(call, air, combustion.value, fuel, y, warm.air);
  if (drawn.state !== 'solved') return noSolution(...drawn.findings);
  return solved({ ...common, drawn: drawn.value });
}

/** Amounts after the flame, or why there is none. */
function afterFlame(
  call: Call<ChamberSettings>,
  c: Combustion,
  fuel: Float64Array,
  side: AirSide,
  all: Mixed,
): Outcome<Float64Array> {
  const n_mol_s = burnt(c, all.n_mol_s);
  const O2 = c.places.O2 < 0 ? 0 : n_mol_s[c.places.O2]!;
  if (O2 < 0) return short(call, c, fuel, side.y, -O2);
  const H2O = c.places.H2O < 0 ? 0 : n_mol_s[c.places.H2O]!;
  if (H2O < 0)
    return noSolution({
      code: 'chamber/chlorine-without-hydrogen',
      weight: 'beyond-limit',
      at: { unit: call.unit },
      evidence: [saw('water', -H2O, 'molarFlow')],
    });
  return solved(n_mol_s);
}

function resultsOf(
  c: Combustion,
  sums: Sums,
  out: StreamState,
  duty_W: number,
  drawn?: StreamState,
): ChamberResults {
  const n = out.n_mol_s;
  const at = (place: number): number => (place < 0 ? 0 : n[place]!);
  const total = totalOf(n);
  const dry = total - at(c.places.H2O);
  const share = (amount: number, of: number): number => (of > 0 ? amount / of : 0);
  return {
    ...(sums.theoreticalO2 > 0 ? { excess: (sums.O2 - sums.theoreticalO2) / sums.theoreticalO2 } : {}),
    T_K: out.T_K,
    P_Pa: out.P_Pa,
    theoreticalO2_mol_s: sums.theoreticalO2,
    LHV_W: sums.LHV_W,
    HHV_W: sums.LHV_W + sums.waterMade * WATER_CONDENSES_J_MOL,
    duty_W,
    O2Dry: share(at(c.places.O2), dry),
    O2Wet: share(at(c.places.O2), total),
    CO2Dry: share(at(c.places.CO2), dry),
    CO2_kg_s: at(c.places.CO2) * CO2_kg_mol,
    ...(drawn ? { air_mol_s: totalOf(drawn.n_mol_s) } : {}),
  };
}

/** Molar mass of CO2 from the standard atomic weights [kg/mol]. */
const CO2_kg_mol = 44.009e-3;

/** What is said of a solved chamber beside its limits. */
function notes(call: Call<ChamberSettings>, sums: Sums): Finding[] {
  const found: Finding[] = [];
  const at = { unit: call.unit };
  if (call.in.air && call.settings.air)
    found.push({
      code: 'chamber/air-setting-idle',
      weight: 'note',
      at: { ...at, path: 'air' },
      evidence: [],
    });
  if (!(sums.theoreticalO2 > 0))
    found.push({ code: 'chamber/nothing-burns', weight: 'caution', at, evidence: [] });
  return found;
}

/**
 * Complete combustion of everything that burns, by its elements; the flue gas leaves at the temperature that the enthalpies
 * give, without dissociation.
 */
function solve(call: Call<ChamberSettings>): Outcome<Answer<ChamberResults>> {
  const { p, heat } = call.settings;
  const warm = (call.warm ?? {}) as ChamberWarm;
  const fuel = mixed(withoutAir(call.in), call.model.nc).n_mol_s;
  const side = airSide(call, fuel, warm);
  if (side.state !== 'solved') return noSolution(...side.findings);
  const { combustion, drawn } = side.value;
  const all = mixed(drawn ? { ...call.in, air: drawn } : call.in, call.model.nc);
  const P = outletPressure(call, p, all.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const sums = sumsOf(combustion, all.n_mol_s);
  const after = afterFlame(call, combustion, fuel, side.value, all);
  if (after.state !== 'solved') return noSolution(...after.findings);
  const n_mol_s = after.value;
  const given_W = heatGiven_W(heat, sums.LHV_W);
  let out: StreamState;
  let findings: readonly Finding[] = notes(call, sums);
  if (all.total_mol_s === 0) {
    out = emptyStream(call.model.nc, 'T' in heat ? heat.T : all.T_K, P.value);
  } else {
    const made = streamAt(
      call,
      n_mol_s,
      'T' in heat ? { T_K: heat.T, P_Pa: P.value } : { P_Pa: P.value, H_W: all.H_W + given_W! },
      warmFrom(warm.out, n_mol_s, firstGuess_K(all, sums, given_W ?? 0)),
    );
    if (made.state !== 'solved') return noSolution(...made.findings);
    out = made.value;
    findings = [...findings, ...made.findings];
  }
  const heat_W = all.total_mol_s === 0 ? 0 : (given_W ?? out.H_W - all.H_W);
  const results = resultsOf(combustion, sums, out, heat_W, drawn);
  const next: ChamberWarm = { out: warmOf(out), ...(drawn ? { air: warmOf(drawn) } : {}) };
  return solved(
    {
      ...answerOf({ out }, results, drawn ? [drawn, out] : [out], heat_W),
      made_mol_s: n_mol_s.map((n, i) => n - all.n_mol_s[i]!),
      ...(drawn ? { drawn: { air: drawn } } : {}),
      warm: next,
    },
    findings,
  );
}

/** Fuel burnt with air. */
export const chamber: UnitKind<ChamberSettings, ChamberResults> = { solve, limits: chamberLimits };
