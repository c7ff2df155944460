import { MACHINE_RESULTS, MACHINE_SETTINGS } from '../machine';
import type { KindWords } from '../types';

export const expander: KindWords = {
  name: 'expander',
  about: 'Lets a gas down and takes shaft power from it.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: { ...MACHINE_SETTINGS, drive: 'efficiency of drive and generator' },
  results: MACHINE_RESULTS,
  sentences: {
    'expander/temperature-above-inlet': {
      title: 'Discharge warmer than the inlet',
      says: 'The discharge temperature of {temperature} is above the {inletTemperature} at the inlet; expanding cools.',
      next: 'Give a lower discharge temperature, or use a compressor or a heater.',
    },
    'expander/takes-power': {
      title: 'The expander takes power',
      says: 'The pressure rises from {inletPressure} to {outletPressure}.',
      next: 'Check the outlet pressure, or use a compressor.',
    },
  },
};
