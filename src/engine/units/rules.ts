import { CHAMBER_RULES } from './chamber/limits';
import { COLUMN_RULES } from './column/rules';
import { COMPRESSOR_RULES } from './compressor/limits';
import { COOLER_RULES } from './cooler/limits';
import { DRUM_RULES } from './drum/limits';
import { EXPANDER_RULES } from './expander/limits';
import { HEATER_RULES } from './heater/limits';
import { ENTERS_BELOW } from './limits/joiningPressure';
import { PAIR_FAR, PAIR_NONE } from './limits/pairs';
import type { Rule } from './limits/rule';
import { UTILITY_RULES } from './limits/utilities';
import { PRODUCT_RULES } from './product/limits';
import { PUMP_RULES } from './pump/limits';
import { STREAM_RULES } from './streamLimits';
import { VALVE_RULES } from './valve/limits';

/**
 * Every limit that counts from a threshold, with its default and basis: what a sketch may override. What is there or not (a
 * second liquid, a dense phase, a predicted pair) has none. Imports no solver.
 */
export const RULES: readonly Rule[] = [
  ...STREAM_RULES,
  ENTERS_BELOW,
  ...VALVE_RULES,
  ...PUMP_RULES,
  ...COMPRESSOR_RULES,
  ...EXPANDER_RULES,
  ...HEATER_RULES,
  ...COOLER_RULES,
  ...UTILITY_RULES,
  ...DRUM_RULES,
  ...COLUMN_RULES,
  ...CHAMBER_RULES,
  ...PRODUCT_RULES,
  PAIR_NONE,
  PAIR_FAR,
];
