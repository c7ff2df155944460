import { type Rule, rule } from '../limits/rule';

/** The duty's sign is against the unit's name by more than this [W]. */
export const HEATS = rule('cooler/heats', 'caution', 0, 'power', 'balance');
/** Thresholds that only a cooler has. */
export const COOLER_RULES: readonly Rule[] = [HEATS];
