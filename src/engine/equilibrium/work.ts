import type { PhaseProps, Side, ThermoModel } from '../thermo/types';
import { liquidFormers } from './candidates';
import type { FlashAnswer, FlashWorkOwner } from './types';

/** One phase while a flash is at work: flows, fractions, properties. Exchanged by reference, never copied. */
export interface Slot {
  /** Molar flows for one mole of feed [mol], length n. */
  readonly flow: Float64Array;
  /** Mole fractions, length n. */
  readonly x: Float64Array;
  readonly props: PhaseProps;
  /** Sum of `flow` [mol]. */
  total: number;
  /** Which root of the model this phase takes. */
  side: Side;
}

/** Where a flash at given temperature and pressure ended; lives in the workspace. */
export interface FlashWork extends FlashWorkOwner {
  readonly n: number;
  /** Chemicals whose pure liquid is tried when a second liquid is sought; see candidates.ts. */
  readonly formers: Int32Array;
  readonly heat_K: Float64Array;
  readonly lightest: number;
  readonly heaviest: number;

  /** The phase that is expanded further (vapour), the other one; `feed` holds a single phase. */
  vap: Slot;
  liq: Slot;
  readonly feed: Slot;
  /** Trial phase of stability tests; `trial.x` normalised, `trial.flow` as the iteration left it. */
  readonly trial: Slot;
  /** Scratch phases for comparisons of several splits. */
  vap2: Slot;
  liq2: Slot;

  readonly K: Float64Array;
  readonly lnK: Float64Array;
  readonly lnKOld: Float64Array;
  /** ln of the fugacity divided by pressure of the phase that is tested, length n. */
  readonly d: Float64Array;
  /** Gradient, scaling, steps and saved flows of the Newton iterations, length n or n + 1. */
  readonly g: Float64Array;
  readonly s: Float64Array;
  readonly step: Float64Array;
  readonly saved: Float64Array;
  readonly saved2: Float64Array;
  readonly startW: Float64Array;
  /** Matrices, n x n and (n + 1) x (n + 1), row-major; the second also spares the first's entries. */
  readonly hess: Float64Array;
  readonly border: Float64Array;
  readonly rhs: Float64Array;
  readonly pivots: Int32Array;

  /** Answer so far. */
  phases: 1 | 2;
  T_K: number;
  P_Pa: number;
  iterations: number;
  residual: number;
  /** The single phase is two liquids taken together (w.vap, w.liq): the model has no single liquid for this feed. */
  lumped: boolean;
  /** More than one state answers, as far as the search has seen; the answer is one of them. */
  several: boolean;
  /** An answer that is not in the slots (a state between two others). */
  told: FlashAnswer | undefined;
  /** Another liquid was found; its composition is in hiddenX. */
  hidden: boolean;
  readonly hiddenX: Float64Array;
}

const slot = (model: ThermoModel, side: Side): Slot => ({
  flow: new Float64Array(model.n),
  x: new Float64Array(model.n),
  props: model.makeProps(),
  total: 0,
  side,
});

/**
 * Scratch for flashes of one model; made once and used again, also for other conditions and compositions.
 *
 * @param model  the model of the chemicals present
 * Allocates: about 12 vectors and two matrices of the model's size, seven sets of phase properties.
 */
export function makeFlashWork(model: ThermoModel): FlashWork {
  const n = model.n;
  const { formers, heat_K, lightest, heaviest } = liquidFormers(model);
  const vector = (): Float64Array => new Float64Array(n + 1);
  return {
    model,
    n,
    formers,
    heat_K,
    lightest,
    heaviest,
    vap: slot(model, 'vapour'),
    liq: slot(model, 'liquid'),
    feed: slot(model, 'stable'),
    trial: slot(model, 'stable'),
    vap2: slot(model, 'vapour'),
    liq2: slot(model, 'liquid'),
    K: new Float64Array(n),
    lnK: new Float64Array(n),
    lnKOld: new Float64Array(n),
    d: new Float64Array(n),
    g: vector(),
    s: vector(),
    step: vector(),
    saved: vector(),
    saved2: vector(),
    startW: new Float64Array(n),
    hess: new Float64Array(n * n),
    border: new Float64Array((n + 1) * (n + 1)),
    rhs: vector(),
    pivots: new Int32Array(n + 1),
    phases: 1,
    T_K: 0,
    P_Pa: 0,
    iterations: 0,
    residual: 0,
    lumped: false,
    several: false,
    told: undefined,
    hidden: false,
    hiddenX: new Float64Array(n),
  };
}
