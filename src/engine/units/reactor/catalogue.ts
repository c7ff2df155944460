import { heat, pressure } from '../groups';
import type { KindCatalogue } from '../types';
import { REACTOR_FINDINGS } from './findings';

/** Reactions with given conversions, one after another. */
export const reactor: KindCatalogue = {
  kind: 'reactor',
  group: 'vessels',
  tag: { letters: 'R', drawn: true },
  ports: [
    { name: 'in', dir: 'in', numbered: { min: 1, max: 12 } },
    { name: 'out', dir: 'out' },
  ],
  settings: {
    reactions: {
      is: 'list',
      min: 1,
      of: {
        is: 'record',
        fields: {
          stoichiometry: { is: 'map', keys: 'chemical', of: { is: 'quantity', dim: 'number' } },
          of: { is: 'chemical' },
          conversion: { is: 'quantity', dim: 'fraction', min: 0, max: 1 },
        },
      },
    },
    p: pressure,
    h: heat,
  },
  moot: [{ when: ['h.T', 'h.vapourFraction'], key: 'p' }],
  results: {
    T_K: { dim: 'temperature' },
    P_Pa: { dim: 'pressure' },
    vapourFraction: { dim: 'fraction' },
    duty_W: { dim: 'power' },
    heatOfReaction_W: { dim: 'power' },
    extents_mol_s: { dim: 'molarFlow', hidden: true },
  },
  findings: REACTOR_FINDINGS,
};
