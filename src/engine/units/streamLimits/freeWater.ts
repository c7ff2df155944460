import { type Finding, saw } from '../../outcome';
import { R_J_molK } from '../../thermo/types';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import { CAS_WATER, flowing, type StreamContext } from './context';

/** Water in a hydrocarbon liquid as a multiple of what dissolves. */
const ABOVE = rule('stream/water-above-solubility', 'caution', 1, 'number');

/** Thresholds of the limits in this file. */
export const FREE_WATER_RULES: readonly Rule[] = [ABOVE];

const AROMATIC: ReadonlySet<string> = new Set(['aromatic']);
const OTHERS: ReadonlySet<string> = new Set(['alkane', 'naphthene', 'olefin', 'diene', 'alkyne']);
/** Solubilities are for liquids with no more than this of anything else but water and hydrocarbons, by mole. */
const ELSE = 0.05;

/** Mole fraction of water that dissolves at 25 degC, and the heat of solution that carries it to other temperatures. */
const IN_AROMATICS = { x: 2.7e-3, h_J_mol: 25e3 };
const IN_OTHERS = { x: 4.8e-4, h_J_mol: 36e3 };
const dissolves = ({ x, h_J_mol }: typeof IN_OTHERS, T_K: number): number =>
  x * Math.exp((h_J_mol / R_J_molK) * (1 / 298.15 - 1 / T_K));

/**
 * Water beyond what a hydrocarbon liquid dissolves: models that mix everything (Raoult's law) never see it part. Silent where
 * the stability test has spoken already.
 *
 * An estimate for screening, between paraffins (hexane) and aromatics (benzene) by their shares, carried from 25 degC by a heat
 * of solution (van 't Hoff): round solubilities as handbooks have them, not checked
 * against one.
 */
export function freeWater({ stream, overrides, at, model }: StreamContext): Finding[] {
  const liquid = flowing(stream, 'liquid');
  const index = model.chemicals.findIndex((c) => c.cas === CAS_WATER);
  const water = liquid?.x[index] ?? 0;
  if (!liquid || water === 0 || stream.hiddenLiquid) return [];
  let aromatic = 0;
  let others = 0;
  model.chemicals.forEach((c, i) => {
    if (AROMATIC.has(c.family ?? '')) aromatic += liquid.x[i]!;
    else if (OTHERS.has(c.family ?? '')) others += liquid.x[i]!;
  });
  const oil = aromatic + others;
  // More water than oil is not oil with water in it, and other solvents take water along.
  if (oil < water || 1 - oil - water > ELSE) return [];
  const most =
    (aromatic * dissolves(IN_AROMATICS, stream.T_K) + others * dissolves(IN_OTHERS, stream.T_K)) / oil;
  const multiple = water / most;
  if (multiple <= thresholdOf(ABOVE, overrides)) return [];
  const seen = [
    saw('fraction', water, 'fraction'),
    saw('dissolves', most, 'fraction'),
    saw('temperature', stream.T_K, 'temperature'),
  ];
  return [finding(ABOVE, at, seen, overrides)];
}
