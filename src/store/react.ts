import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import type { StreamId, UnitId } from '../engine/ids';
import type { StreamResult, UnitResult } from '../engine/network/types';
import type { SketchStream, SketchUnit } from '../sketch/types';
import type { CompiledState, CompiledStore } from './compiledStore';
import type { ResultsState, ResultsStore } from './resultsStore';
import type { Session, SessionState } from './session';
import type { Shown } from './shown';
import type { SketchState, SketchStore } from './sketchStore';

/** The page's stores, made once by the app and handed down by context; tests make their own. */
export interface Stores {
  readonly sketch: SketchStore;
  readonly results: ResultsStore;
  readonly session: Session;
  readonly compiled: CompiledStore;
}

const Context = createContext<Stores | null>(null);
export const StoresProvider = Context.Provider;

/** The page's stores. Throws outside their provider. */
export function useStores(): Stores {
  const stores = useContext(Context);
  if (!stores) throw new Error('useStores outside StoresProvider');
  return stores;
}

export const useSketch = <T>(pick: (state: SketchState) => T): T => useStore(useStores().sketch, pick);
export const useResults = <T>(pick: (state: ResultsState) => T): T => useStore(useStores().results, pick);
export const useSession = <T>(pick: (state: SessionState) => T): T => useStore(useStores().session, pick);
export const useCompiled = <T>(pick: (state: CompiledState) => T): T => useStore(useStores().compiled, pick);

/** One unit's record; rerenders for its own change only. */
export const useUnit = (id: UnitId): SketchUnit | undefined =>
  useSketch((state) => state.sketch.units.find((unit) => unit.id === id));

/** One stream's record; rerenders for its own change only. */
export const useStream = (id: StreamId): SketchStream | undefined =>
  useSketch((state) => state.sketch.streams.find((stream) => stream.id === id));

/** One unit's result; rerenders for its own change only. */
export const useUnitResult = (id: UnitId): Shown<UnitResult> | undefined =>
  useResults((state) => state.units.get(id));

/** One stream's result; rerenders for its own change only. */
export const useStreamResult = (id: StreamId): Shown<StreamResult> | undefined =>
  useResults((state) => state.streams.get(id));
