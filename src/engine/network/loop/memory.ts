import type { StreamState } from '../../equilibrium/types';
import type { StreamId, UnitId } from '../../ids';
import type { Anderson } from '../../numerics/anderson';
import type { SiteSI } from '../../units/types';
import type { ProblemUnit, Read, UnitResult } from '../types';
import type { UnitMemory } from '../unitMemory';

/** What a pass assumes, or what came back of it. */
export interface Torn {
  /** As the plan's tears. */
  readonly streams: readonly StreamState[];
  /** As the plan's scalars [mol/s or kg/s]. */
  readonly seen: readonly number[];
}

/** Where the next solve of a loop may start: the tear of the last answer, and the slopes that were found on the way. */
export interface LoopWarm {
  readonly tears: readonly StreamId[];
  readonly scalars: readonly Read[];
  readonly torn: Torn;
  readonly slopes: Anderson;
}

/** What was found for a loop, and for what. */
export interface LoopMemory {
  readonly units: readonly ProblemUnit[];
  readonly reads: readonly Read[];
  readonly site: SiteSI;
  readonly entering: readonly (readonly [StreamId, StreamState])[];
  /** Of every unit, when all have an answer: what the units themselves remember may be of another sketch by then. */
  readonly answers?: readonly UnitMemory[];
  /** What is said of every unit, when not. */
  readonly unsolved?: readonly (readonly [UnitId, UnitResult])[];
  readonly warm?: LoopWarm;
}
