import { type Rule, rule } from '../limits/rule';

/** Liquid or vapour on a stage as a share of all feeds. */
export const DRIES = rule('column/stage-dries', 'caution', 0.01, 'fraction');
/** More than this many neighbouring stages within 0.1 K. */
export const PINCH = rule('column/pinch', 'note', 5, 'number');
/** How far a feed is from the temperature of its stage, either way. */
export const OFF_STAGE = rule('column/feed-off-stage', 'note', 40, 'temperatureDifference');
/** Mass density of liquid to vapour on a stage. */
export const NEAR_CRITICAL = rule('column/near-critical', 'caution', 4, 'number');
/** As above, where the numbers are not to be used. */
export const TOO_NEAR_CRITICAL = rule('column/too-near-critical', 'beyond-limit', 2.5, 'number');
/** Pressure of a stage by the pseudo-critical pressure of its liquid (mole-fraction average). */
export const NEAR_CRITICAL_P = rule('column/near-critical-pressure', 'caution', 0.85, 'fraction');
/** By how much a place lies above the pressure of one below it, to which its vapour would have to flow uphill. */
export const PRESSURE_FALLS = rule(
  'column/pressure-falls-downwards',
  'beyond-limit',
  1e3,
  'pressureDifference',
  'balance',
);
/** How far a vapour leaves below its dew point, which an efficiency of its stage may bring about. */
export const BELOW_DEW = rule(
  'column/vapour-below-dew-point',
  'note',
  0.5,
  'temperatureDifference',
  'own-rule',
);
/** Told wherever the stability test finds another liquid: there is no threshold that a sketch could move. */
export const SECOND_LIQUID = rule('column/second-liquid', 'beyond-limit', 0, 'number', 'phase-stability');

/** Thresholds that only a column has. */
export const COLUMN_RULES: readonly Rule[] = [
  DRIES,
  PINCH,
  OFF_STAGE,
  PRESSURE_FALLS,
  BELOW_DEW,
  NEAR_CRITICAL,
  TOO_NEAR_CRITICAL,
  NEAR_CRITICAL_P,
];
