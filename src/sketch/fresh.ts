import type { Display, LabelKey, Sketch } from './types';

/** What a sketch file says it is. */
export const FORMAT = 'splitwright.sketch';

/** Everything that a stream's label may show, in the order of the list of choices. */
export const LABEL_KEYS: readonly LabelKey[] = [
  'molarFlow',
  'massFlow',
  'temperature',
  'pressure',
  'vapourFraction',
  'enthalpyFlow',
  'volumeFlow',
];

/** What a new sketch shows, and a file that says nothing of it. */
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
