import type { Port } from '../../ids';
import type { FlowSI } from '../types';

/** A place in a column as settings name it: a stage from 1, or an end. */
export type PlaceSI = number | 'condenser' | 'reboiler';

export type FixedBy =
  | { readonly fix: 'refluxRatio' | 'boilup'; readonly value: number }
  | { readonly fix: 'flow'; readonly product: Port; readonly value: FlowSI }
  | { readonly fix: 'reflux'; readonly value: FlowSI }
  | {
      readonly fix: 'purity';
      readonly product: Port;
      readonly chemical: number;
      readonly value: number;
      readonly basis: 'mole' | 'mass';
    }
  | { readonly fix: 'recovery'; readonly product: Port; readonly chemical: number; readonly value: number }
  | { readonly fix: 'temperature'; readonly stage: PlaceSI; readonly value: number }
  | { readonly fix: 'duty'; readonly at: 'condenser' | 'reboiler'; readonly value: number };

/** Compiled settings of a column. */
export interface ColumnSettings {
  readonly stages: number;
  readonly top: { readonly distillate: 'liquid' | 'vapour' | 'none' };
  readonly bottom: { readonly reboiler: boolean };
  readonly feeds: Readonly<Record<Port, { readonly stage: PlaceSI }>>;
  readonly pressure: {
    readonly condenser?: number;
    readonly top: number;
    /** This or perStage. */
    readonly bottom?: number;
    readonly perStage?: number;
    readonly reboiler?: number;
  };
  /** Absent: nothing is fixed, as a column without ends has it. */
  readonly fixedBy?: readonly FixedBy[];
  readonly sides?: Readonly<
    Record<Port, { readonly stage: number; readonly phase: 'liquid' | 'vapour'; readonly flow: FlowSI }>
  >;
  readonly murphree?: readonly { readonly from: number; readonly to: number; readonly value: number }[];
  readonly subcooling?: number;
}
