import { named, saw } from '../../outcome';
import { pressure } from '../groups';
import type { KindCatalogue } from '../types';
import { CHAMBER_FINDINGS } from './findings';

const AIR_KEYS = ['excess', 'stackO2Dry', 'flow'] as const;

/** Complete combustion of any fuel with air that is drawn from outside or joined as a stream. */
export const chamber: KindCatalogue = {
  kind: 'chamber',
  group: 'vessels',
  tag: { letters: 'F', drawn: true },
  ports: [
    { name: 'fuel', dir: 'in', numbered: { min: 1, max: 12 } },
    { name: 'air', dir: 'in', optional: true },
    { name: 'out', dir: 'out' },
  ],
  settings: {
    air: {
      is: 'record',
      optional: true,
      fields: {
        excess: { is: 'quantity', dim: 'fraction', min: 0, optional: true },
        stackO2Dry: { is: 'quantity', dim: 'fraction', min: 0, max: 1, optional: true },
        flow: { is: 'flow', optional: true },
        T: { is: 'quantity', dim: 'temperature', min: 0 },
        P: { is: 'quantity', dim: 'pressure', min: 0 },
        composition: {
          is: 'composition',
          otherwise: {
            value: { is: 'preset', preset: 'dry air', relativeHumidity: 0 },
            text: 'dry air',
            why: 'No composition of the air was given.',
          },
        },
      },
      choose: [{ keys: AIR_KEYS, count: 1 }],
    },
    p: pressure,
    heat: {
      is: 'some',
      count: 1,
      of: {
        duty: { is: 'quantity', dim: 'power' },
        lossOfLHV: { is: 'quantity', dim: 'fraction', max: 1 },
        T: { is: 'quantity', dim: 'temperature', min: 0 },
      },
      otherwise: {
        value: { duty: 0 },
        text: '0 kW',
        why: 'No heat loss was given: the chamber is adiabatic.',
      },
    },
  },
  missing: (settings, ports) =>
    ports.includes('air') || (settings as { readonly air?: unknown }).air !== undefined
      ? []
      : [
          {
            code: 'sketch/needs-one-of',
            at: { path: 'air' },
            evidence: [named('known', AIR_KEYS.join(', ')), saw('wanted', 1, 'number'), named('given', '')],
          },
        ],
  brings: 'combustion',
  results: {
    T_K: { dim: 'temperature' },
    P_Pa: { dim: 'pressure' },
    excess: { dim: 'fraction', percent: true },
    O2Dry: { dim: 'fraction', percent: true },
    O2Wet: { dim: 'fraction', percent: true },
    CO2Dry: { dim: 'fraction', percent: true },
    CO2_kg_s: { dim: 'massFlow' },
    air_mol_s: { dim: 'molarFlow' },
    theoreticalO2_mol_s: { dim: 'molarFlow' },
    LHV_W: { dim: 'power' },
    HHV_W: { dim: 'power' },
    duty_W: { dim: 'power' },
  },
  findings: CHAMBER_FINDINGS,
};
