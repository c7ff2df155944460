import { useMemo } from 'react';
import type { Json } from '../../sketch/types';
import { useSketch } from '../../store/react';
import { fixedByText, fixingText } from '../../wording';
import { useChemicals } from '../chemicalNames';
import { portWord } from '../words';

const OFFERS: Readonly<Record<string, string>> = {
  refluxRatio: 'reflux ratio',
  boilup: 'boil-up ratio',
  reflux: 'reflux',
  purity: 'purity',
  recovery: 'recovery',
  temperature: 'temperature',
  'duty condenser': 'condenser duty',
  'duty reboiler': 'reboiler duty',
};

export interface FixingWords {
  /** A quantity that may be chosen: "reflux ratio", "vapour distillate". */
  offer(key: string): string;
  /** A row as it stands: "reflux ratio 2.4". */
  item(item: Json): string;
  all(settings: { readonly [key: string]: Json }): string;
}

/** Words for what fixes a column, with the sketch's own numbers and names. */
export function useFixingWords(): FixingWords {
  const streams = useSketch((state) => state.sketch.streams);
  const chemicals = useChemicals();
  return useMemo(() => {
    const names = {
      number: (id: string) => streams.find((stream) => stream.id === id)?.number,
      chemical: (id: string) => chemicals.find((chemical) => chemical.id === id)?.name,
    };
    return {
      offer: (key) => {
        const [fix = '', of = ''] = key.split(' ');
        return fix === 'flow' ? portWord('column', of) : (OFFERS[key] ?? fix);
      },
      item: (item) => fixingText(item, names),
      all: (settings) => fixedByText(settings, names),
    };
  }, [streams, chemicals]);
}
