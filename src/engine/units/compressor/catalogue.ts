import { MACHINE_RESULTS, machineDrive, machineEfficiency, machineOutlet } from '../compression/settings';
import type { KindCatalogue } from '../types';
import { COMPRESSOR_FINDINGS } from './findings';

/** Raises the pressure of a gas; a fan is one in other words. */
export const compressor: KindCatalogue = {
  kind: 'compressor',
  group: 'rotating',
  tag: { letters: 'K', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out' },
  ],
  settings: {
    p: machineOutlet,
    efficiency: machineEfficiency,
    drive: machineDrive,
    service: { is: 'option', values: ['compressor', 'fan'], optional: true },
  },
  results: MACHINE_RESULTS,
  findings: COMPRESSOR_FINDINGS,
};
