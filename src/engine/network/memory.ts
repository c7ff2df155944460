import type { StreamState } from '../equilibrium/types';
import type { StreamId, UnitId } from '../ids';
import type { Finding } from '../outcome';
import { makeModel } from '../thermo/model';
import type { Model } from '../thermo/types';
import type { Work } from '../units/types';
import { type ClosureData, closureData } from './closure';
import type { LoopMemory } from './loop/memory';
import type { Basis, StreamResult, UnitResult } from './types';
import type { UnitMemory } from './unitMemory';

/** A solved stream: its state, how it is shown, what it runs into. */
export interface StreamMemory {
  readonly state: StreamState;
  readonly result: StreamResult;
  readonly limits: Readonly<Record<string, number>>;
  readonly materialNoted: boolean;
  readonly findings: readonly Finding[];
}

/** What was last handed out, by id; an untouched record keeps its identity. */
export interface Posted {
  readonly streams: Map<StreamId, StreamResult>;
  readonly units: Map<UnitId, UnitResult>;
}

/** What one solve has found so far. */
export type Found = Posted;

/** Everything a worker keeps between solves of one basis. Owned by one solve at a time. */
export interface Memory {
  readonly basis: Basis;
  readonly model: Model;
  readonly data: ClosureData;
  readonly work: Work;
  readonly units: Map<UnitId, UnitMemory>;
  readonly streams: Map<StreamId, StreamMemory>;
  /** By the ids of a loop's units. */
  readonly loops: Map<string, LoopMemory>;
  readonly posted: Posted;
  /** The edit whose answer is complete in here; undefined while or after a solve was broken off. */
  complete: number | undefined;
}

/** Nothing was handed out yet. */
export const nothingPosted = (): Posted => ({ streams: new Map(), units: new Map() });

/**
 * An empty memory for a basis, with its model. A chemical that lacks what the model needs throws here or in the first solve:
 * compiling lets none through (missingForModel).
 *
 * @param posted  shared by the memories of one reader, so that a change of basis hands out what the reader does not have
 */
export function makeMemory(basis: Basis, posted: Posted = nothingPosted()): Memory {
  const model = makeModel(basis.model, basis.chemicals);
  return {
    basis,
    model,
    data: closureData(model),
    work: { flash: new Map() },
    units: new Map(),
    streams: new Map(),
    loops: new Map(),
    posted,
    complete: undefined,
  };
}
