import { useMemo } from 'react';
import type { Finding } from '../engine/outcome';
import { useMeasures } from '../parts/measures';
import { useSketch } from '../store/react';
import type { SketchState } from '../store/sketchStore';
import { type Said, sayFinding } from '../wording';
import { useSolvedChemicals } from './chemicalNames';
import { useSteady } from './useSteady';

/** What sentences name, apart from chemicals: it stays while settings and places change. */
const namesIn = ({ sketch: { units, streams } }: SketchState) => ({
  units: units.map(({ id, tag, kind }) => ({ id, tag, kind })),
  streams: streams.map(({ id, number }) => ({ id, number })),
});

/** Sentences about findings, with the sketch's own tags, numbers and measures in them. */
export function useSay(): (finding: Finding) => Said {
  const measures = useMeasures();
  const { units, streams } = useSketch(useSteady(namesIn));
  const chemicals = useSolvedChemicals();
  return useMemo(() => {
    const context = {
      measures,
      tag: (id: string) => units.find((unit) => unit.id === id)?.tag,
      kind: (id: string) => units.find((unit) => unit.id === id)?.kind,
      number: (id: string) => streams.find((stream) => stream.id === id)?.number,
      chemical: (id: string) => chemicals.find((chemical) => chemical.id === id)?.name,
    };
    return (finding) => sayFinding(finding, context);
  }, [measures, units, streams, chemicals]);
}
