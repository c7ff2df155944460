import type { Display, LabelKey, Sketch } from './types';

export const FORMAT = 'splitwright.sketch';

export const LABEL_KEYS: readonly LabelKey[] = [
  'molarFlow',
  'massFlow',
  'temperature',
  'pressure',
  'vapourFraction',
  'enthalpyFlow',
  'volumeFlow',
];

export const FRESH_DISPLAY: Display = { set: 'metric', labels: ['molarFlow', 'temperature', 'pressure'] };

/** An empty sketch. The model's options stay open and are listed as assumptions until somebody chooses. */
export const emptySketch = (id: string): Sketch => ({
  format: FORMAT,
  version: 1,
  id,
  title: {},
  site: {},
  chemicals: [],
  model: { kind: 'peng-robinson' },
  units: [],
  streams: [],
  display: FRESH_DISPLAY,
  notes: [],
});
