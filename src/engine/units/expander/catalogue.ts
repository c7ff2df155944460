import { MACHINE_RESULTS, machineDrive, machineEfficiency, machineOutlet } from '../compression/settings';
import type { KindCatalogue } from '../types';
import { EXPANDER_FINDINGS } from './findings';

/** Lets a gas down and takes shaft power from it. */
export const expander: KindCatalogue = {
  kind: 'expander',
  group: 'rotating',
  tag: { letters: 'K', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out' },
  ],
  settings: { p: machineOutlet, efficiency: machineEfficiency, drive: machineDrive },
  results: MACHINE_RESULTS,
  findings: EXPANDER_FINDINGS,
};
