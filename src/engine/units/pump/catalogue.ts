import type { KindCatalogue } from '../types';
import { PUMP_FINDINGS } from './findings';

/** Raises the pressure of a liquid; all of the shaft power goes into it. */
export const pump: KindCatalogue = {
  kind: 'pump',
  group: 'rotating',
  tag: { letters: 'P', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out' },
  ],
  settings: {
    p: {
      is: 'some',
      count: 1,
      of: {
        P: { is: 'quantity', dim: 'pressure', min: 0 },
        drop: { is: 'quantity', dim: 'pressureDifference' },
        ratio: { is: 'quantity', dim: 'number', min: 0 },
        head: { is: 'quantity', dim: 'length' },
      },
    },
    efficiency: {
      is: 'quantity',
      dim: 'fraction',
      min: 0.01,
      max: 1,
      otherwise: {
        value: 0.75,
        text: '75 %',
        why: 'No pump efficiency was given; 75 % is common practice for a centrifugal pump in early design.',
      },
    },
    staticHead: { is: 'quantity', dim: 'length', optional: true },
    drive: { is: 'quantity', dim: 'fraction', min: 0.01, max: 1, optional: true },
  },
  results: {
    power_W: { dim: 'power' },
    hydraulicPower_W: { dim: 'power' },
    electric_W: { dim: 'power' },
    head_m: { dim: 'length' },
    npshAvailable_m: { dim: 'length' },
    bubbleP_Pa: { dim: 'pressure' },
    volume_m3_s: { dim: 'volumeFlow' },
    P_Pa: { dim: 'pressure' },
    T_K: { dim: 'temperature' },
  },
  findings: PUMP_FINDINGS,
};
