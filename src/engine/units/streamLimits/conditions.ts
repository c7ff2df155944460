import { type Finding, saw } from '../../outcome';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import { richestOf } from '../present';
import { CAS_CO2, CAS_WATER, flowing, fractionByCas, type StreamContext } from './context';

const COLD = rule('stream/cold-steel', 'caution', 273.15 - 29, 'temperature');
const TOO_COLD = rule('stream/too-cold-for-steel', 'beyond-limit', 273.15 - 46, 'temperature');
const VACUUM = rule('stream/vacuum', 'note', 1e5, 'pressure');
/** The threshold is the share of gases that form hydrates. */
const HYDRATES = rule('stream/hydrates-not-checked', 'note', 0.5, 'fraction');
/** Mass density of liquid to vapour. */
const NEAR_CRITICAL = rule('stream/near-critical', 'caution', 4, 'number');
const TOO_NEAR_CRITICAL = rule('stream/too-near-critical', 'beyond-limit', 2.5, 'number');
// Told wherever the stability test finds another liquid: there is no threshold that a sketch could move.
const SECOND_LIQUID = rule('stream/second-liquid', 'caution', 0, 'number', 'phase-stability');
const LIQUIDS_TOGETHER = rule('stream/liquids-together', 'caution', 0, 'number', 'phase-stability');

/** Thresholds of the limits in this file. */
export const CONDITION_RULES: readonly Rule[] = [
  COLD,
  TOO_COLD,
  VACUUM,
  HYDRATES,
  NEAR_CRITICAL,
  TOO_NEAR_CRITICAL,
];

/**
 * Plain carbon steel turns brittle in the cold: a caution below the first temperature, beyond limit below the second unless a
 * material was chosen for the unit.
 */
export function coldSteel({ stream, overrides, at, materialNoted }: StreamContext): Finding[] {
  const below = (r: Rule): boolean => stream.T_K < thresholdOf(r, overrides);
  const broken = !materialNoted && below(TOO_COLD) ? TOO_COLD : below(COLD) ? COLD : undefined;
  return broken ? [finding(broken, at, [saw('temperature', stream.T_K, 'temperature')], overrides)] : [];
}

/** A pressure below the atmosphere's: air may leak in. */
export const vacuum = ({ stream, overrides, at }: StreamContext): Finding[] =>
  stream.P_Pa < thresholdOf(VACUUM, overrides)
    ? [finding(VACUUM, at, [saw('pressure', stream.P_Pa, 'pressure')], overrides)]
    : [];

/** Methane, ethane, propane, carbon dioxide, hydrogen sulfide. */
const FORMERS: ReadonlySet<string> = new Set(['74-82-8', '74-84-0', '74-98-6', CAS_CO2, '7783-06-4']);
const WATER: ReadonlySet<string> = new Set([CAS_WATER]);
const HYDRATE_BELOW_K = 293.15;
const HYDRATE_ABOVE_PA = 1e6;

/** Cold wet gas under pressure: hydrates are possible and nobody has looked. Wet: as much water as saturates it, or more. */
export function hydrates(c: StreamContext): Finding[] {
  const { stream, overrides, at, model } = c;
  if (stream.P_Pa <= HYDRATE_ABOVE_PA || stream.T_K >= HYDRATE_BELOW_K) return [];
  const water = fractionByCas(c, WATER);
  const share = fractionByCas(c, FORMERS);
  if (water === 0 || share <= thresholdOf(HYDRATES, overrides)) return [];
  const index = model.chemicals.findIndex((chemical) => chemical.cas === CAS_WATER);
  const saturated = (model.of([index]).saturationP_Pa(0, stream.T_K) ?? 0) / stream.P_Pa;
  const wet =
    flowing(stream, 'liquid') !== undefined || stream.hiddenLiquid !== undefined || water >= saturated;
  if (!wet) return [];
  const seen = [
    saw('temperature', stream.T_K, 'temperature'),
    saw('pressure', stream.P_Pa, 'pressure'),
    saw('fraction', share, 'fraction'),
  ];
  return [finding(HYDRATES, at, seen, overrides)];
}

/**
 * Vapour and liquid that are nearly alike, by the ratio of their mass densities (the model's own volumes): an equation of state
 * is at its weakest there.
 */
export function nearCritical({ stream, overrides, at, model }: StreamContext): Finding[] {
  const vapour = flowing(stream, 'vapour');
  const liquid = flowing(stream, 'liquid');
  if (!vapour || !liquid) return [];
  const density = (p: typeof vapour): number =>
    p.x.reduce((sum, x, i) => sum + x * model.chemicals[i]!.MW_g_mol, 0) / p.v_m3_mol;
  const ratio = density(liquid) / density(vapour);
  const below = (r: Rule): boolean => ratio < thresholdOf(r, overrides);
  const broken = below(TOO_NEAR_CRITICAL)
    ? TOO_NEAR_CRITICAL
    : below(NEAR_CRITICAL)
      ? NEAR_CRITICAL
      : undefined;
  return broken ? [finding(broken, at, [saw('densityRatio', ratio, 'number')], overrides)] : [];
}

/**
 * The stability test found another liquid: the numbers are for one liquid only, or the liquid's properties are those of both
 * together.
 */
export function secondLiquid({ stream, overrides, at, model }: StreamContext): Finding[] {
  if (!stream.hiddenLiquid) return [];
  const seen = richestOf(stream.hiddenLiquid, model);
  return [finding(stream.liquidsTogether ? LIQUIDS_TOGETHER : SECOND_LIQUID, at, [seen], overrides)];
}
