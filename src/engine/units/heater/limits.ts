import { type Rule, rule } from '../limits/rule';

/** The duty's sign is against the unit's name by more than this [W]. */
export const COOLS = rule('heater/cools', 'caution', 0, 'power', 'balance');
/** Thresholds that only a heater has. */
export const HEATER_RULES: readonly Rule[] = [COOLS];
