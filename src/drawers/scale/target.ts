import { useEffect, useState } from 'react';
import type { StreamId } from '../../engine/ids';
import type { Dimension } from '../../quantity';
import type { Sketch } from '../../sketch/types';
import type { Stores } from '../../store/react';
import { type ResultsState, shownStream } from '../../store/resultsStore';

export type FlowDim = Extract<Dimension, 'molarFlow' | 'massFlow'>;
export const FLOW_DIMS: readonly FlowDim[] = ['molarFlow', 'massFlow'];

/** What a stream is to become by scaling the feeds. */
export interface Target {
  readonly stream: StreamId;
  readonly dim: FlowDim;
  /** [mol/s] or [kg/s]. */
  readonly wanted: number;
}

/** Further off than this is said. */
export const MISSED = 1e-3;

/** A stream's flow in the latest answer [mol/s or kg/s]; undefined where that has none. */
export function flowNow(
  results: Pick<ResultsState, 'streams'>,
  { stream, dim }: Pick<Target, 'stream' | 'dim'>,
): number | undefined {
  const shown = shownStream(results.streams.get(stream));
  if (!shown || shown.outOfDate) return undefined;
  return dim === 'molarFlow' ? shown.result.n_mol_s : shown.result.m_kg_s;
}

/** How far from the wanted flow the stream came out, relative, where that is worth saying. */
export function missedBy(results: Pick<ResultsState, 'streams'>, target: Target): number | undefined {
  const now = flowNow(results, target);
  if (now === undefined) return undefined;
  const off = now / target.wanted - 1;
  return Math.abs(off) > MISSED ? off : undefined;
}

/**
 * Calls back once the document that is shown now has its answer; never when another edit comes first. A stream without an
 * answer then has none to tell.
 */
export function onceSolved({ sketch, results }: Stores, then: () => void): void {
  const { edit } = sketch.getState();
  if (results.getState().solvedEdit >= edit) {
    then();
    return;
  }
  const stop = results.subscribe(({ solvedEdit }) => {
    if (sketch.getState().edit !== edit) stop();
    else if (solvedEdit >= edit) {
      stop();
      then();
    }
  });
}

/** What factors are counted from: the sketch as it was on opening, and the answer to that. */
export interface Base {
  readonly sketch: Sketch;
  readonly results: Pick<ResultsState, 'streams'>;
  /** Whether that answer has come. */
  readonly known: boolean;
}

const NOTHING: Base['results'] = { streams: new Map() };

/** Waits for the answer where it is not there on opening. */
export function useBase(stores: Stores): Base {
  const [base, setBase] = useState<Base>(() => {
    const { sketch, edit } = stores.sketch.getState();
    const results = stores.results.getState();
    const known = results.solvedEdit >= edit;
    return { sketch, results: known ? results : NOTHING, known };
  });
  const { known } = base;
  useEffect(() => {
    if (known) return;
    onceSolved(stores, () => setBase((b) => ({ ...b, results: stores.results.getState(), known: true })));
  }, [known, stores]);
  return base;
}
