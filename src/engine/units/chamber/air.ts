import { gasPlaces } from '../../chemicals/gases';
import type { StreamState } from '../../equilibrium/types';
import { named, noSolution, type Outcome, saw, solved } from '../../outcome';
import { airFractions } from '../air';
import { emptyStream, streamAt, totalOf, warmFrom } from '../streams';
import type { Call, FlowSI } from '../types';
import { massFlow_kg_s } from '../volume';
import { type Combustion, sumsOf } from './combustion';
import type { ChamberAir, ChamberSettings } from './types';

/**
 * Mole fractions of the air that is drawn, over the full list; its oxygen is found by CAS number or formula.
 *
 * @returns  chamber/air-by-component-flows, or what airFractions gives, at the air's composition
 */
export function drawnFractions(call: Call<ChamberSettings>, air: ChamberAir): Outcome<Float64Array> {
  const { composition: c } = air;
  if (c.is === 'flows')
    return noSolution({
      code: 'chamber/air-by-component-flows',
      weight: 'beyond-limit',
      at: { unit: call.unit, path: 'air.composition' },
      evidence: [],
    });
  if (c.is === 'parts') {
    if (c.basis === 'mole') return solved(c.parts);
    const moles = c.parts.map((w, i) => w / call.model.chemicals[i]!.MW_g_mol);
    const sum = totalOf(moles);
    return solved(moles.map((n) => n / sum));
  }
  const made = airFractions(call, { ...c, at: gasPlaces(call.model.chemicals) }, { T: air.T, P: air.P });
  if (made.state === 'solved') return made;
  const [first] = made.findings;
  return noSolution({ ...first, at: { unit: call.unit, path: 'air.composition' } });
}

/** A flow of air [mol/s]; a share counts from all that the fuel ports bring. */
function stated(call: Call<ChamberSettings>, flow: FlowSI, y: Float64Array, fuel: Float64Array): number {
  if (flow.is === 'molar') return flow.n_mol_s;
  const perMole_kg = massFlow_kg_s(y, call.model);
  if (flow.is === 'mass') return flow.m_kg_s / perMole_kg;
  const of = fuel.map((n, i) => (flow.chemical === undefined || flow.chemical === i ? n : 0));
  return flow.share * (flow.basis === 'mole' ? totalOf(of) : massFlow_kg_s(of, call.model) / perMole_kg);
}

/**
 * Air for an excess over what burns in the fuel and in the air itself [mol/s]; below zero when the fuel brings more oxygen than
 * that, NaN when the air has no oxygen to give.
 *
 * @param fuel    amounts of all fuels, full list [mol/s]
 * @param y       mole fractions of the air, full list
 * @param excess  oxygen over the theoretical, less 1 [-]
 */
export function airForExcess(c: Combustion, fuel: Float64Array, y: Float64Array, excess: number): number {
  const f = sumsOf(c, fuel);
  const a = sumsOf(c, y);
  const gives = a.O2 - (1 + excess) * a.theoreticalO2;
  return gives > 0 ? ((1 + excess) * f.theoreticalO2 - f.O2) / gives : Number.NaN;
}

/** How much air is drawn [mol/s]. */
function amount(
  call: Call<ChamberSettings>,
  air: ChamberAir,
  c: Combustion,
  fuel: Float64Array,
  y: Float64Array,
): Outcome<number> {
  if (air.flow !== undefined) {
    const n = stated(call, air.flow, y, fuel);
    if (n >= 0) return solved(n);
    return noSolution({
      code: 'chamber/air-below-zero',
      weight: 'beyond-limit',
      at: { unit: call.unit, path: 'air.flow' },
      evidence: [saw('flow', n, 'molarFlow')],
    });
  }
  const f = sumsOf(c, fuel);
  const a = sumsOf(c, y);
  const oxygen = saw('oxygen', f.O2, 'molarFlow');
  if (air.excess !== undefined) {
    const at = { unit: call.unit, path: 'air.excess' };
    const n = airForExcess(c, fuel, y, air.excess);
    if (f.theoreticalO2 <= 0 && f.O2 === 0) return solved(0);
    if (Number.isNaN(n))
      return noSolution({
        code: 'chamber/no-oxygen',
        weight: 'beyond-limit',
        at,
        evidence: [saw('short', f.theoreticalO2 - f.O2, 'molarFlow')],
      });
    return n >= 0
      ? solved(n)
      : noSolution({ code: 'chamber/oxygen-without-air', weight: 'beyond-limit', at, evidence: [oxygen] });
  }
  const wanted = air.stackO2Dry!;
  const at = { unit: call.unit, path: 'air.stackO2Dry' };
  const seen = [saw('wanted', wanted, 'fraction')];
  // wanted = (O2 left)/(O2 left + other dry gas), each linear in the air.
  const left0 = f.O2 - f.theoreticalO2;
  const perAir = a.O2 - a.theoreticalO2;
  const gives = perAir - wanted * (perAir + a.dryRest);
  if (!(gives > 0)) {
    const dry = a.O2 + a.dryRest;
    return noSolution({
      code: 'chamber/stack-oxygen-out-of-reach',
      weight: 'beyond-limit',
      at,
      evidence: [...seen, saw('air', dry > 0 ? a.O2 / dry : 0, 'fraction')],
    });
  }
  const n = (wanted * (left0 + f.dryRest) - left0) / gives;
  return n >= 0
    ? solved(n)
    : noSolution({ code: 'chamber/oxygen-without-air', weight: 'beyond-limit', at, evidence: [oxygen] });
}

/**
 * The air that is drawn from outside, at its own temperature and pressure.
 *
 * @param fuel  amounts of all fuels, full list [mol/s]
 * @param y     mole fractions of the air, full list
 * @returns     chamber/air-below-zero, chamber/no-oxygen, chamber/oxygen-without-air, chamber/stack-oxygen-out-of-reach, or the
 *              flash's reason
 */
export function drawnAir(
  call: Call<ChamberSettings>,
  air: ChamberAir,
  c: Combustion,
  fuel: Float64Array,
  y: Float64Array,
  warm: unknown,
): Outcome<StreamState> {
  const n = amount(call, air, c, fuel, y);
  if (n.state !== 'solved') return noSolution(...n.findings);
  if (n.value === 0) return solved(emptyStream(call.model.nc, air.T, air.P));
  const amounts = y.map((part) => part * n.value);
  return streamAt(call, amounts, { T_K: air.T, P_Pa: air.P }, warmFrom(warm, amounts, air.T));
}

/**
 * That air (or oxygen) is missing, with what 15 % excess would take: chamber/air-short, or chamber/no-oxygen where the air has
 * none.
 *
 * @param y          mole fractions of the air, full list; undefined without any air
 * @param missingO2  [mol/s]
 */
export function short<T>(
  call: Call<ChamberSettings>,
  c: Combustion,
  fuel: Float64Array,
  y: Float64Array | undefined,
  missingO2: number,
): Outcome<T> {
  const at = { unit: call.unit, ...(call.in.air ? { port: 'air' } : { path: 'air' }) };
  const gives = y ? sumsOf(c, y) : undefined;
  const net = gives ? gives.O2 - gives.theoreticalO2 : 0;
  const enough = y ? airForExcess(c, fuel, y, 0.15) : Number.NaN;
  if (!(net > 0) || Number.isNaN(enough))
    return noSolution({
      code: 'chamber/no-oxygen',
      weight: 'beyond-limit',
      at,
      evidence: [saw('short', missingO2, 'molarFlow')],
    });
  return noSolution({
    code: 'chamber/air-short',
    weight: 'beyond-limit',
    at,
    evidence: [
      saw('short', missingO2 / net, 'molarFlow'),
      saw('enough', enough, 'molarFlow'),
      named('excess', '15 %'),
    ],
  });
}
