import { rule } from './rule';

/** Both chemicals of a pair without a parameter reach this share of a stream [-]; a gas or water counts from a tenth of it. */
export const PAIR_NONE = rule('model/pair-none', 'caution', 0.05, 'fraction', 'own-rule');
/** Counted in one note whenever two chemicals meet, by no threshold. */
export const PAIR_PREDICTED = rule('model/pair-predicted', 'note', 0, 'fraction', 'own-rule');
/** Size of a predicted pair [-] from which its change with temperature is worth a look, where both reach 0.5 % of a stream. */
export const PAIR_FAR = rule('model/pair-predicted-far', 'caution', 0.3, 'number', 'own-rule');
