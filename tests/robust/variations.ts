/**
 * The three train examples with their numbers moved as an engineer would slide them. Each variation is a list of settings, as
 * `TAG.path` and value, so that `npm run solve -- FILE --set ...` repeats it.
 *
 * Feasible by construction as far as balances tell: what is downstream follows what is upstream (a distillate share follows the
 * light ends, air follows the fuel, pressures fall along the flow).
 */
import type { Random } from './random';

export type Setting = readonly [place: string, value: string];

const round = (value: number, digits = 5): number => Number(value.toPrecision(digits));
const of = (value: number, unit: string): string => `${round(value)} ${unit}`;

/** A composition around the given one [%]: each part times 0.7 to 1.4, and all brought back to 100 %. */
function parts(
  random: Random,
  tag: string,
  base: Readonly<Record<string, number>>,
): { readonly settings: Setting[]; readonly percent: Readonly<Record<string, number>> } {
  const raw = Object.entries(base).map(([id, x]) => [id, x * random.logBetween(0.7, 1.4)] as const);
  const total = raw.reduce((sum, [, x]) => sum + x, 0);
  const percent = Object.fromEntries(raw.map(([id, x]) => [id, round((100 * x) / total, 6)]));
  return {
    settings: Object.entries(percent).map(([id, x]) => [`${tag}.composition.parts.${id}`, `${x} %`]),
    percent,
  };
}

/** Stages and the feed's place among them, in the example's proportion give or take. */
function stages(
  random: Random,
  tag: string,
  most: readonly [number, number],
  feed: readonly [number, number],
) {
  const count = random.whole(...most);
  const at = Math.max(2, Math.min(count - 1, Math.round(count * random.between(...feed))));
  return [
    [`${tag}.stages`, String(count)],
    [`${tag}.feeds.feed1.stage`, String(at)],
  ] as const;
}

/** Condenser, top and bottom pressure, all times one factor [bar]. */
const pressures = (tag: string, bar: readonly [number, number, number], factor: number): Setting[] =>
  (['condenser', 'top', 'bottom'] as const).map((at, k) => [
    `${tag}.pressure.${at}`,
    of(bar[k]! * factor, 'bar'),
  ]);

const CONDENSATE = {
  methane: 8,
  ethane: 5,
  propane: 4,
  'n-butane': 2.5,
  'n-pentane': 3.5,
  'n-hexane': 4,
  benzene: 31,
  toluene: 25,
  ethylbenzene: 4,
  'm-xylene': 13,
};

/**
 * Feed 90 to 300 kmol/h, 105 to 135 degC, 7.2 to 9 bar; cooled to 28 to 48 degC; heated to 72 to 92 degC; light-ends column of
 * 20 to 36 stages at 0.9 to 1.12 of its pressure, reflux ratio 1.6 to 4, distillate 0.85 to 1.15 of the example's for the
 * light ends fed; benzene column of 24 to 44 stages, reflux ratio 1.5 to 4, distillate 36 to 52 % of its feed; air 0.8 to 1.4
 * of the example's for the light gas fed.
 */
export function condensate(random: Random): Setting[] {
  const { settings, percent } = parts(random, 'FEED-1', CONDENSATE);
  const flow = random.logBetween(90, 300);
  const lights = ['methane', 'ethane', 'propane', 'n-butane', 'n-pentane', 'n-hexane'];
  const light = lights.reduce((sum, id) => sum + percent[id]!, 0) / 27;
  const gas = (percent.methane! + 1.75 * percent.ethane! + 2.5 * percent.propane!) / (8 + 1.75 * 5 + 2.5 * 4);
  const factor = random.between(0.9, 1.12);
  return [
    ...settings,
    ['FEED-1.flow', of(flow, 'kmol/h')],
    ['FEED-1.state.T', of(random.between(105, 135), 'degC')],
    ['FEED-1.state.P', of(random.between(7.2, 9), 'bar')],
    ['E-101.T', of(random.between(28, 48), 'degC')],
    ['FEED-2.flow', of(597 * (flow / 185) * gas * random.between(0.8, 1.4), 'kmol/h')],
    ['FEED-2.state.T', of(random.between(5, 35), 'degC')],
    ['FEED-2.composition.relativeHumidity', of(random.between(20, 90), '%')],
    ['K-102.efficiency.isentropic', of(random.between(60, 80), '%')],
    ['E-106.T', of(random.between(160, 250), 'degC')],
    ['PV-102.p.P', of(random.between(3.8, 4.4), 'bar')],
    ['E-102.T', of(random.between(72, 92), 'degC')],
    ...stages(random, 'C-101', [20, 36], [0.3, 0.55]),
    ...pressures('C-101', [2.6, 2.75, 3.05], factor),
    ['C-101.fixedBy.0.value', String(round(random.logBetween(1.6, 4)))],
    ['C-101.fixedBy.1.value.share', of(14 * light * random.between(0.85, 1.15), '%')],
    ['K-101.p.P', of(random.between(5, 7.5), 'bar')],
    ['K-101.efficiency.isentropic', of(random.between(65, 82), '%')],
    ...stages(random, 'C-102', [24, 44], [0.35, 0.6]),
    ...pressures('C-102', [1.2, 1.3, 1.62], random.between(0.9, 1.05)),
    ['C-102.fixedBy.0.value', String(round(random.logBetween(1.5, 4)))],
    ['C-102.fixedBy.1.value.share', of(random.between(36, 52), '%')],
    ['P-101.p.P', of(random.between(4, 9), 'bar')],
    ['P-101.efficiency', of(random.between(55, 80), '%')],
    ['E-104.T', of(random.between(32, 45), 'degC')],
    ['E-105.T', of(random.between(35, 60), 'degC')],
  ];
}

const LIGHT = {
  methane: 0.8,
  ethane: 21.2,
  propane: 34,
  isobutane: 9,
  'n-butane': 17,
  isopentane: 6,
  'n-pentane': 5.5,
  'n-hexane': 4.5,
  'n-heptane': 2,
};

/**
 * Feed 300 to 1,200 kmol/h, 35 to 60 degC; ethane column of 24 to 36 stages at 0.85 to 1 of its pressure, reflux ratio 2 to 4,
 * ethane in its bottoms 1 to 4 %; propane column of 32 to 48 stages at 0.9 to 1.05 of its pressure, isobutane in its
 * distillate 0.6 to 2.5 %, propane in its bottoms 0.5 to 2 %; butane column of 26 to 40 stages, reflux ratio 1.2 to 3, recovery of
 * n-butane 97 to 99.5 %.
 */
export function lightHydrocarbons(random: Random): Setting[] {
  const { settings } = parts(random, 'FEED-1', LIGHT);
  const [f1, f2, f3] = [random.between(0.85, 1), random.between(0.9, 1.05), random.between(0.85, 1.1)];
  return [
    ...settings,
    ['FEED-1.flow', of(random.logBetween(300, 1200), 'kmol/h')],
    ['FEED-1.state.T', of(random.between(35, 60), 'degC')],
    ['PV-201.p.P', of(27.4 * f1, 'bar')],
    ...stages(random, 'C-201', [24, 36], [0.28, 0.5]),
    ...pressures('C-201', [26.6, 26.8, 27.2], f1),
    ['C-201.fixedBy.0.value', String(round(random.logBetween(2, 4)))],
    ['C-201.fixedBy.1.value', of(random.logBetween(1, 4), '%')],
    ['PV-202.p.P', of(17.6 * f2, 'bar')],
    ...stages(random, 'C-202', [32, 48], [0.4, 0.58]),
    ...pressures('C-202', [16.6, 16.8, 17.3], f2),
    ['C-202.fixedBy.0.value', of(random.logBetween(0.6, 2.5), '%')],
    ['C-202.fixedBy.1.value', of(random.logBetween(0.5, 2), '%')],
    ['PV-203.p.P', of(6.4 * f3, 'bar')],
    ...stages(random, 'C-203', [26, 40], [0.38, 0.58]),
    ...pressures('C-203', [5.6, 5.75, 6.1], f3),
    ['C-203.fixedBy.0.value', String(round(random.logBetween(1.2, 3)))],
    ['C-203.fixedBy.1.value', of(random.between(97, 99.5), '%')],
  ];
}

/**
 * Solvent 12 to 50 kmol/h at 75 to 100 degC, leak 0.3 to 2 and make-up nitrogen 2 to 8 kmol/h; cooled to 5 to 20 and -25 to
 * -5 degC; purge 1 to 8 %; heated to 55 to 95 degC.
 */
export function nitrogenLoop(random: Random): Setting[] {
  const oxygen = round(random.between(15, 25), 4);
  return [
    ['FEED-1.flow', of(random.logBetween(12, 50), 'kmol/h')],
    ['FEED-1.state.T', of(random.between(75, 100), 'degC')],
    ['FEED-2.flow', of(random.logBetween(0.3, 2), 'kmol/h')],
    ['FEED-2.state.T', of(random.between(0, 35), 'degC')],
    ['FEED-2.composition.parts.oxygen', `${oxygen} %`],
    ['FEED-2.composition.parts.nitrogen', `${round(100 - oxygen, 6)} %`],
    ['FEED-3.flow', of(random.logBetween(2, 8), 'kmol/h')],
    ['FEED-3.state.T', of(random.between(0, 35), 'degC')],
    ['E-301.T', of(random.between(5, 20), 'degC')],
    ['E-302.T', of(random.between(-25, -5), 'degC')],
    ['D-1.shares.out2', of(random.logBetween(1, 8), '%')],
    ['K-301.p.P', of(random.between(1.14, 1.25), 'bar')],
    ['K-301.efficiency.isentropic', of(random.between(55, 80), '%')],
    ['E-303.T', of(random.between(55, 95), 'degC')],
  ];
}
