import { isOneLiquid } from '../../equilibrium/miscible';
import { makeStream } from '../../equilibrium/stream';
import { type Finding, named, saw } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import { finding, thresholdOf } from '../limits/rule';
import { utilityLevels } from '../limits/utilities';
import { richestOf } from '../present';
import type { Answer, Call, SiteSI } from '../types';
import { topPort } from './free';
import type { ColumnResults, Profile } from './results';
import {
  BELOW_DEW,
  DRIES,
  NEAR_CRITICAL,
  NEAR_CRITICAL_P,
  OFF_STAGE,
  PINCH,
  PRESSURE_FALLS,
  SECOND_LIQUID,
  TOO_NEAR_CRITICAL,
} from './rules';
import type { ColumnSettings, PlaceSI } from './settings';

const PINCH_K = 0.1;

const placeWord = (place: PlaceSI): string => (typeof place === 'number' ? `stage ${place}` : `the ${place}`);
const atPlace = (call: Call<unknown>, place: PlaceSI): Finding['at'] =>
  typeof place === 'number' ? { unit: call.unit, stage: place } : { unit: call.unit };

interface Seen {
  readonly call: Call<ColumnSettings>;
  readonly results: ColumnResults;
}

const feedTotal = ({ call }: Seen): number =>
  Object.values(call.in).reduce((sum, s) => sum + s.n_mol_s.reduce((a, b) => a + b, 0), 0);

/** The stage that is nearest to running dry. */
function dries(seen: Seen): Finding[] {
  const { call, results } = seen;
  const fed = feedTotal(seen);
  let least = Number.POSITIVE_INFINITY;
  let stage = 0;
  let phase: 'liquid' | 'vapour' = 'liquid';
  const look = (flows: Float64Array, of: typeof phase): void => {
    flows.forEach((n, k) => {
      if (n >= least) return;
      least = n;
      stage = k + 1;
      phase = of;
    });
  };
  look(results.stages.L_mol_s, 'liquid');
  look(results.stages.V_mol_s, 'vapour');
  if (least >= thresholdOf(DRIES, call.limits) * fed) return [];
  const evidence = [
    saw('flow', least, 'molarFlow'),
    saw('share', least / fed, 'fraction'),
    named('phase', phase),
  ];
  return [finding(DRIES, { unit: call.unit, stage }, evidence, call.limits)];
}

/** The longest run of stages of nearly one temperature. */
function pinch({ call, results }: Seen): Finding[] {
  const { T_K } = results.stages;
  let best = 0;
  let from = 0;
  for (let a = 0, b = 0; b < T_K.length; b++) {
    while (a < b && Math.max(...T_K.subarray(a, b + 1)) - Math.min(...T_K.subarray(a, b + 1)) > PINCH_K) a++;
    if (b - a + 1 > best) {
      best = b - a + 1;
      from = a + 1;
    }
  }
  if (best <= thresholdOf(PINCH, call.limits)) return [];
  const evidence = [
    saw('stages', best, 'number'),
    saw('from', from, 'number'),
    saw('to', from + best - 1, 'number'),
    saw('temperature', T_K[from - 1]!, 'temperature'),
  ];
  return [finding(PINCH, { unit: call.unit, stage: from }, evidence, call.limits)];
}

/** Temperature and pressure where a feed enters. */
function placeAt(
  results: ColumnResults,
  stage: PlaceSI,
): { readonly T_K: number; readonly P_Pa: number } | undefined {
  if (stage === 'condenser') return results.condenser;
  if (stage === 'reboiler') return results.reboiler;
  return { T_K: results.stages.T_K[stage - 1]!, P_Pa: results.stages.P_Pa[stage - 1]! };
}

function feeds({ call, results }: Seen): Finding[] {
  const found: Finding[] = [];
  for (const { stage, port } of results.stages.feed) {
    const stream = call.in[port];
    const there = placeAt(results, stage);
    if (!stream || !there) continue;
    const at = typeof stage === 'number' ? { stage } : {};
    const below = joiningPressure(call.unit, { [port]: stream }, there.P_Pa, call.limits);
    found.push(...below.map((f) => ({ ...f, at: { ...f.at, ...at } })));
    const off = stream.T_K - there.T_K;
    if (Math.abs(off) <= thresholdOf(OFF_STAGE, call.limits)) continue;
    const evidence = [
      saw('feedTemperature', stream.T_K, 'temperature'),
      saw('stageTemperature', there.T_K, 'temperature'),
      named('port', port),
    ];
    found.push(finding(OFF_STAGE, { unit: call.unit, port, ...at }, evidence, call.limits));
  }
  return found;
}

/** Vapour rises from a higher pressure to a lower one; here the largest fall on the way down. */
function pressureFalls({ call, results }: Seen): Finding[] {
  const { condenser, reboiler, stages } = results;
  const places: (readonly [PlaceSI, number])[] = [
    ...(condenser ? [['condenser', condenser.P_Pa] as const] : []),
    ...Array.from(stages.P_Pa, (P, k) => [k + 1, P] as const),
    ...(reboiler ? [['reboiler', reboiler.P_Pa] as const] : []),
  ];
  let most = places[0]!;
  let fall = 0;
  let found: readonly [typeof most, typeof most] = [most, most];
  for (const place of places) {
    if (place[1] > most[1]) most = place;
    if (most[1] - place[1] <= fall) continue;
    fall = most[1] - place[1];
    found = [most, place];
  }
  if (fall <= thresholdOf(PRESSURE_FALLS, call.limits)) return [];
  const [upper, lower] = found;
  const evidence = [
    saw('upperPressure', upper[1], 'pressure'),
    saw('lowerPressure', lower[1], 'pressure'),
    named('upper', placeWord(upper[0])),
    named('lower', placeWord(lower[0])),
  ];
  return [finding(PRESSURE_FALLS, { ...atPlace(call, lower[0]), path: 'pressure' }, evidence, call.limits)];
}

/** Vapours that leave stages with an efficiency: Murphree's relation may leave them below their dew point. */
function belowDewPoint({ call }: Seen, out: Answer<ColumnResults>['out']): Finding[] {
  const { settings, model, work, unit, limits } = call;
  if (!settings.murphree?.length) return [];
  const stages = new Map<string, number>();
  if (settings.top.distillate === 'none') stages.set(topPort(settings), 1);
  for (const [port, { stage, phase }] of Object.entries(settings.sides ?? {}))
    if (phase === 'vapour') stages.set(port, stage);
  const found: Finding[] = [];
  for (const [port, stage] of stages) {
    const stream = out[port];
    if (!stream || stream.phases.length === 0) continue;
    const dew = makeStream(model, stream.n_mol_s, { P_Pa: stream.P_Pa, vapourFraction: 1 }, work);
    if (dew.state !== 'solved') continue;
    const below = dew.value.T_K - stream.T_K;
    if (below <= thresholdOf(BELOW_DEW, limits)) continue;
    const evidence = [
      saw('temperature', stream.T_K, 'temperature'),
      saw('below', below, 'temperatureDifference'),
      named('port', port),
    ];
    found.push(finding(BELOW_DEW, { unit, port, stage }, evidence, limits));
  }
  return found;
}

/** Liquid and vapour of nearly one density; else a pressure near the pseudo-critical one. */
function nearCritical(seen: Seen): Finding[] {
  const { call, results } = seen;
  let least = Number.POSITIVE_INFINITY;
  let place: PlaceSI = 1;
  const look = (ratio: number, at: PlaceSI): void => {
    if (ratio >= least) return;
    least = ratio;
    place = at;
  };
  results.stages.densityRatio.forEach((r, k) => {
    look(r, k + 1);
  });
  if (results.condenser) look(results.condenser.densityRatio, 'condenser');
  if (results.reboiler) look(results.reboiler.densityRatio, 'reboiler');
  const broken = [TOO_NEAR_CRITICAL, NEAR_CRITICAL].find((r) => least < thresholdOf(r, call.limits));
  if (!broken) return nearCriticalPressure(seen);
  const evidence = [saw('densityRatio', least, 'number'), named('place', placeWord(place))];
  return [finding(broken, atPlace(call, place), evidence, call.limits)];
}

function nearCriticalPressure({ call, results }: Seen): Finding[] {
  const { P_Pa, x } = results.stages;
  const { thermo, profiles } = presentIn(call, x);
  const here = new Float64Array(profiles.length);
  let most = 0;
  let stage = 0;
  let critical = 0;
  for (let k = 0; k < P_Pa.length; k++) {
    for (let p = 0; p < here.length; p++) here[p] = profiles[p]![k]!;
    const Pc = thermo.pseudoCritical(here).P_Pa;
    if (P_Pa[k]! <= most * Pc) continue;
    most = P_Pa[k]! / Pc;
    critical = Pc;
    stage = k + 1;
  }
  if (most <= thresholdOf(NEAR_CRITICAL_P, call.limits)) return [];
  const evidence = [
    saw('share', most, 'fraction'),
    saw('pressure', P_Pa[stage - 1]!, 'pressure'),
    saw('critical', critical, 'pressure'),
  ];
  return [finding(NEAR_CRITICAL_P, { unit: call.unit, stage }, evidence, call.limits)];
}

/** The model of those that are on the stages, and their profiles in its order. */
function presentIn({ model }: Call<ColumnSettings>, x: Profile) {
  const present = model.chemicals.flatMap((c, i) => (x[c.id]!.some((v) => v > 0) ? [i] : []));
  return {
    present,
    thermo: model.of(present),
    profiles: present.map((i) => x[model.chemicals[i]!.id]!),
  };
}

/** A liquid somewhere in the column, over the chemicals that are present. */
interface LiquidAt {
  readonly place: PlaceSI;
  readonly T_K: number;
  readonly P_Pa: number;
  readonly x: Float64Array;
}

/** The liquids from the top down: what is condensed is coldest, and there water parts first. */
function liquidsOf({ call, results }: Seen, present: readonly number[]): LiquidAt[] {
  const { T_K, P_Pa, x } = results.stages;
  const ids = present.map((i) => call.model.chemicals[i]!.id);
  const found: LiquidAt[] = [];
  const end = (place: 'condenser' | 'reboiler'): void => {
    const at = results[place];
    if (at) found.push({ place, T_K: at.T_K, P_Pa: at.P_Pa, x: Float64Array.from(ids, (id) => at.x[id]!) });
  };
  end('condenser');
  for (let k = 0; k < T_K.length; k++)
    found.push({ place: k + 1, T_K: T_K[k]!, P_Pa: P_Pa[k]!, x: Float64Array.from(ids, (id) => x[id]![k]!) });
  end('reboiler');
  return found;
}

/** The first place whose liquid would rather be two: each that might is tested a little above its bubble pressure. */
function secondLiquid(seen: Seen): Finding[] {
  const { call, results } = seen;
  const { model } = call;
  const { present, thermo } = presentIn(call, results.stages.x);
  for (const { place, T_K, P_Pa, x } of liquidsOf(seen, present)) {
    if (isOneLiquid(thermo, T_K, x)) continue;
    const n = new Float64Array(model.nc);
    for (let p = 0; p < x.length; p++) n[present[p]!] = x[p]!;
    const state = makeStream(model, n, { T_K, P_Pa: 1.001 * P_Pa }, call.work);
    const other = state.state === 'solved' ? state.value.hiddenLiquid : undefined;
    if (!other) continue;
    const evidence = [richestOf(other, model), named('place', placeWord(place))];
    return [finding(SECOND_LIQUID, atPlace(call, place), evidence, call.limits)];
  }
  return [];
}

/**
 * Limits of a column: feeds that would have to flow uphill or are far from their stage's temperature, pressures that fall
 * downwards, stages that nearly dry, pinches, nearness to the critical point, liquids that would part, vapours below their dew
 * point, and the level of utility of each end's heat.
 */
export function columnLimits(
  call: Call<ColumnSettings>,
  { out, results }: Answer<ColumnResults>,
  site: SiteSI,
): Finding[] {
  const seen = { call, results };
  const found = [
    ...feeds(seen),
    ...pressureFalls(seen),
    ...belowDewPoint(seen, out),
    ...dries(seen),
    ...pinch(seen),
    ...nearCritical(seen),
    ...secondLiquid(seen),
  ];
  const top = out[topPort(call.settings)];
  if (top && results.condenserDuty_W !== undefined)
    found.push(...utilityLevels(call.unit, results.condenserDuty_W, top, call.model, site, call.limits));
  if (out.bottoms && results.reboilerDuty_W !== undefined)
    found.push(
      ...utilityLevels(call.unit, results.reboilerDuty_W, out.bottoms, call.model, site, call.limits),
    );
  return found;
}
