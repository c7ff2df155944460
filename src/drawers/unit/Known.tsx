import { useMemo } from 'react';
import { useShallow } from 'zustand/react/shallow';
import { FigureRow } from '../../parts/Figure';
import { useMeasures } from '../../parts/measures';
import { show } from '../../quantity';
import type { SketchStream } from '../../sketch/types';
import { useSketch, useStores, useStreamResult } from '../../store/react';
import { shownStream } from '../../store/resultsStore';
import { useForm } from './useForm';

/** What enters the unit, so that a setting can be chosen with it in sight. */
export function Known() {
  const form = useForm();
  const inlets = useSketch(
    useShallow((state) => state.sketch.streams.filter((stream) => stream.to?.[0] === form.unit.id)),
  );
  if (inlets.length === 0) return null;
  return (
    <section className="section">
      <div className="section-head">
        <h3>What it knows</h3>
      </div>
      {inlets.map((stream) => (
        <Inlet key={stream.id} stream={stream} />
      ))}
    </section>
  );
}

function Inlet({ stream }: { readonly stream: SketchStream }) {
  const { session } = useStores();
  const measures = useMeasures();
  const shown = shownStream(useStreamResult(stream.id));
  const { id, number } = stream;
  const label = useMemo(
    () => (
      <>
        Inlet,{' '}
        <button type="button" className="link" onClick={() => session.select([], [id])}>
          stream {number}
        </button>
      </>
    ),
    [session, id, number],
  );
  if (!shown)
    return (
      <dl className="figures">
        <FigureRow label={label} text="–" unit="" />
      </dl>
    );
  const { result, outOfDate } = shown;
  const [P, T, n] = [
    show(result.P_Pa, 'pressure', measures),
    show(result.T_K, 'temperature', measures),
    show(result.n_mol_s, 'molarFlow', measures),
  ];
  const vapour = show(result.vapourFraction, 'fraction', measures);
  return (
    <dl className="figures">
      <FigureRow label={label} text={n.number} unit={n.unit} outOfDate={outOfDate} />
      <FigureRow label="Inlet pressure" text={P.number} unit={P.unit} outOfDate={outOfDate} />
      <FigureRow label="Inlet temperature" text={T.number} unit={T.unit} outOfDate={outOfDate} />
      <FigureRow label="Inlet vapour fraction" text={vapour.number} unit="mol/mol" outOfDate={outOfDate} />
    </dl>
  );
}
