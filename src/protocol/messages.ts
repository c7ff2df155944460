import type { UnitId } from '../engine/ids';
import type { Basis, LoopProgress, Problem, SolveBatch } from '../engine/network/types';

/** Questions outside the sketch's solve, e.g. saturation points for a drawer. Grows with the drawers. */
export type Question = { readonly ask: 'prewarm' };

/** Page to worker. One job in flight, one waiting; the latest wins. */
export type ToWorker =
  | { readonly say: 'basis'; readonly basis: Basis }
  /**
   * `announce`: say 'at' before every unit; asked for after a silence, so that a second one names the unit.
   * `blank`: the page holds no results, so everything is handed out, changed or not.
   */
  | {
      readonly say: 'solve';
      readonly problem: Problem;
      readonly from: 'warm' | 'nothing';
      readonly announce?: true;
      readonly blank?: true;
    }
  /** The solve in flight and the one that waits are given up; what was solved on the way stays known. */
  | { readonly say: 'stop' }
  | { readonly say: 'question'; readonly job: number; readonly about: Question }
  | { readonly say: 'drop'; readonly job: number };

/** Worker to page. 'at' comes at most every 250 ms, with `loop` while one is on its way; silence for 3 s while a job runs means restart. */
export type FromWorker =
  | { readonly say: 'ready' }
  | { readonly say: 'at'; readonly edit: number; readonly unit: UnitId; readonly loop?: LoopProgress }
  | ({
      readonly say: 'results';
      readonly edit: number;
      readonly last: boolean;
      /** Solved from nothing, for something that leaves the app. */
      readonly from?: 'nothing';
    } & SolveBatch)
  | { readonly say: 'answer'; readonly job: number; readonly value: unknown }
  | { readonly say: 'broke'; readonly edit?: number; readonly job?: number; readonly message: string };
