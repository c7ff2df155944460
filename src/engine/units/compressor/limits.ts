import type { StreamState } from '../../equilibrium/types';
import { type Finding, saw } from '../../outcome';
import type { Model } from '../../thermo/types';
import type { MachineResults, MachineSettings } from '../compression/types';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import { totalOf } from '../total';
import type { Answer, Call } from '../types';
import { massFlow_kg_s } from '../volume';

/** Liquid in what enters, by mass [-]. */
const LIQUID = rule('compressor/liquid-enters', 'beyond-limit', 1e-3, 'fraction');
const NEAR_DEW = rule('compressor/near-dew-point', 'caution', 5, 'temperatureDifference');
const RATIO = rule('compressor/high-ratio', 'note', 4, 'number');
const HOT = rule('compressor/hot', 'caution', 423.15, 'temperature');
const HOT_LIGHT = rule('compressor/hot-light-gas', 'caution', 408.15, 'temperature');
const HOT_OLEFINS = rule('compressor/hot-olefins', 'caution', 373.15, 'temperature');
/** Power that comes out of the compressor [W]. */
const GIVES = rule('compressor/gives-power', 'caution', 0, 'power', 'balance');

/** Thresholds that only a compressor has. */
export const COMPRESSOR_RULES: readonly Rule[] = [
  LIQUID,
  NEAR_DEW,
  RATIO,
  HOT,
  HOT_LIGHT,
  HOT_OLEFINS,
  GIVES,
];

/** A gas of this molar mass or less counts as light [kg/mol]. */
const LIGHT_kg_mol = 12e-3;
/** Dienes and olefins count from this mole fraction on [-]. */
const OLEFINS_FROM = 0.05;

/** Share of liquid, by mass [-]. */
function liquidShare(stream: StreamState, model: Model): number {
  let liquid = 0;
  for (const phase of stream.phases)
    if (phase.kind === 'liquid' || phase.kind === 'liquid2') liquid += massFlow_kg_s(phase.n_mol_s, model);
  return liquid / massFlow_kg_s(stream.n_mol_s, model);
}

/** Mole fraction of dienes and olefins together [-]. */
function olefinShare(stream: StreamState, model: Model): number {
  let olefins = 0;
  model.chemicals.forEach((c, i) => {
    if (c.family === 'olefin' || c.family === 'diene') olefins += stream.n_mol_s[i]!;
  });
  return olefins / totalOf(stream.n_mol_s);
}

function discharge(call: Call<MachineSettings>, out: StreamState): Finding | undefined {
  const { model, limits } = call;
  const at = { unit: call.unit, port: 'out' };
  const seen = [saw('temperature', out.T_K, 'temperature')];
  const MW_kg_mol = massFlow_kg_s(out.n_mol_s, model) / totalOf(out.n_mol_s);
  if (MW_kg_mol > LIGHT_kg_mol)
    return out.T_K > thresholdOf(HOT, limits) ? finding(HOT, at, seen, limits) : undefined;
  return out.T_K > thresholdOf(HOT_LIGHT, limits)
    ? finding(HOT_LIGHT, at, [...seen, saw('molarMass', MW_kg_mol, 'molarMass')], limits)
    : undefined;
}

/**
 * Limits of a compressor: liquid at the suction or a suction near its dew point, a high ratio, a hot discharge (sooner for
 * light gases, and for olefins and dienes), power that comes out. None without flow.
 */
export function compressorLimits(call: Call<MachineSettings>, answer: Answer<MachineResults>): Finding[] {
  const inlet = call.in.in;
  const out = answer.out.out;
  if (!inlet || !out || out.phases.length === 0) return [];
  const { model, limits } = call;
  const at = { unit: call.unit };
  const { results } = answer;
  const found: Finding[] = [];
  const liquid = liquidShare(inlet, model);
  if (liquid > thresholdOf(LIQUID, limits))
    found.push(finding(LIQUID, { ...at, port: 'in' }, [saw('liquid', liquid, 'fraction')], limits));
  // Where liquid is about, the gas stands at its dew point.
  const margin = liquid > 0 ? 0 : results.dewMargin_K;
  if (
    liquid <= thresholdOf(LIQUID, limits) &&
    margin !== undefined &&
    margin < thresholdOf(NEAR_DEW, limits)
  ) {
    const seen = [
      saw('margin', margin, 'temperatureDifference'),
      saw('temperature', inlet.T_K, 'temperature'),
    ];
    found.push(finding(NEAR_DEW, { ...at, port: 'in' }, seen, limits));
  }
  if (results.ratio > thresholdOf(RATIO, limits))
    found.push(finding(RATIO, at, [saw('ratio', results.ratio, 'number')], limits));
  const hot = results.power_W > 0 ? discharge(call, out) : undefined;
  if (hot) found.push(hot);
  const olefins = olefinShare(out, model);
  if (results.power_W > 0 && olefins > OLEFINS_FROM && out.T_K > thresholdOf(HOT_OLEFINS, limits)) {
    const seen = [saw('temperature', out.T_K, 'temperature'), saw('olefins', olefins, 'fraction')];
    found.push(finding(HOT_OLEFINS, { ...at, port: 'out' }, seen, limits));
  }
  if (-results.power_W > thresholdOf(GIVES, limits)) {
    const seen = [saw('inletPressure', inlet.P_Pa, 'pressure'), saw('outletPressure', out.P_Pa, 'pressure')];
    found.push(finding(GIVES, at, seen, limits));
  }
  return found;
}
