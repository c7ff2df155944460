import { createStore } from 'zustand/vanilla';
import type { Basis, Problem } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import type { Assumption } from '../sketch/types';

/** What the page knows before solving: missing values, assumptions, the chemicals and pairs in force. */
export interface CompiledState {
  readonly edit: number;
  readonly basis: Basis | null;
  readonly problem: Problem | null;
  readonly gaps: readonly Finding[];
  /** Noticed while compiling; hinders nothing. */
  readonly notes: readonly Finding[];
  readonly assumptions: readonly Assumption[];
  /** Chemicals the bank could not give yet (still loading), by id. */
  readonly loading: readonly string[];
  /** Why the data of the sketch's chemicals could not be had; then what stands here is not of the sketch that is shown. */
  readonly trouble?: string | undefined;
}

/** An empty store: nothing compiled yet. */
export function createCompiledStore() {
  const store = createStore<CompiledState>()(() => ({
    edit: 0,
    basis: null,
    problem: null,
    gaps: [],
    notes: [],
    assumptions: [],
    loading: [],
  }));
  return store;
}

export type CompiledStore = ReturnType<typeof createCompiledStore>;
