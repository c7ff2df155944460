import type { StreamState } from '../equilibrium/types';
import type { Port } from '../ids';
import type { Finding, Outcome } from '../outcome';
import type { Answer, SiteSI } from '../units/types';
import type { UnitClosure, UnitResult } from './types';

/** What was found for a unit, and for what: the key is the settings and the states entering, compared bit for bit. */
export interface UnitMemory {
  readonly kind: string;
  readonly settings: unknown;
  readonly in: Readonly<Record<Port, StreamState>>;
  readonly outPorts: readonly Port[];
  readonly site: SiteSI;
  readonly outcome: Outcome<Answer>;
  /** Start values of the last answer that was solved. */
  readonly warm: unknown;
  readonly result: UnitResult;
  /** Of a solved unit inside the sketch. */
  readonly closure?: UnitClosure;
  /** Limits pass: what it found, and under which thresholds. */
  readonly limits: Readonly<Record<string, number>>;
  readonly limitFindings: readonly Finding[];
}
