import type { StreamState } from '../../equilibrium/types';
import type { StreamId, UnitId } from '../../ids';
import type { Anderson } from '../../numerics/anderson';
import type { Finding, Outcome } from '../../outcome';
import type { AnyKind } from '../../units/solvers';
import type { Answer, Call } from '../../units/types';
import type { Run } from '../run';
import type { LoopResult, ProblemUnit } from '../types';
import type { Torn } from './memory';
import type { LoopPlan } from './tears';

export interface Member {
  readonly unit: ProblemUnit;
  readonly solver: AnyKind;
  readonly boundary: boolean;
}

/** A loop that is being solved. */
export interface Loop {
  readonly run: Run;
  readonly plan: LoopPlan;
  /** In the order of a pass. */
  readonly members: readonly Member[];
  /** Streams that come from outside, or are read there. */
  readonly entering: readonly (readonly [StreamId, StreamState])[];
}

/** What a unit was asked in the last pass, and what it said. */
export interface Said {
  readonly call: Call<unknown>;
  readonly outcome: Outcome<Answer>;
}

/** What goes from pass to pass of one attempt. */
export interface Going {
  readonly said: Map<UnitId, Said>;
  readonly states: Map<StreamId, StreamState>;
  readonly warm: Map<UnitId, unknown>;
}

/** How an attempt ends. */
export type Ending =
  | {
      readonly is: 'solved';
      /** What came back in the last pass, which is what the torn streams are. */
      readonly torn: Torn;
      readonly going: Going;
      readonly result: LoopResult;
      readonly slopes: Anderson;
    }
  /** What an earlier answer carried does not enter any more: a start from nothing is due. */
  | { readonly is: 'stale' }
  /** The loop as a whole has no answer. */
  | {
      readonly is: 'no-solution' | 'needs-value';
      readonly findings: readonly [Finding, ...Finding[]];
    }
  /** One of its units has none. */
  | { readonly is: 'unit-fails'; readonly unit: UnitId; readonly said: Said };
