import { measuresOf as sketchMeasures, withReference } from '../drawing/measures';
import type { StreamId, UnitId } from '../engine/ids';
import type { Basis, Closure, StreamResult, UnitResult } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import type { KindCatalogue } from '../engine/units/types';
import type { Measures } from '../quantity';
import type { Assumption, Sketch } from '../sketch/types';

/** What a report is made from: one sketch and the clean answer to it. Pure data; the same input gives the same document. */
export interface ReportInput {
  readonly sketch: Sketch;
  readonly basis: Basis;
  readonly streams: ReadonlyMap<StreamId, StreamResult>;
  readonly units: ReadonlyMap<UnitId, UnitResult>;
  readonly closure: Closure | null;
  readonly findings: readonly Finding[];
  /** What still needs a value, from compiling. */
  readonly gaps: readonly Finding[];
  readonly assumptions: readonly Assumption[];
  /** Source tag -> full citation. */
  readonly citations: Readonly<Record<string, string>>;
  readonly sitePressure_Pa: number;
  /** Of the program. */
  readonly version: string;
  /** Of the file: first digits of its SHA-256, in groups of four. */
  readonly fingerprint: string;
  /** ISO day the document was made on; handed in, so that two runs give the same bytes. */
  readonly day: string;
  /** The kinds of unit that are known; the catalogue when absent. */
  readonly kinds?: Readonly<Record<string, KindCatalogue>>;
  /** The clean answer differed from the live one. */
  readonly severalAnswers?: boolean;
}

export type SolvedStream = Extract<StreamResult, { state: 'solved' }>;

/** Tables print absolute pressures; gauge ones have a row of their own. */
export const measuresOf = (input: Pick<ReportInput, 'sketch'>): Measures =>
  withReference(sketchMeasures(input.sketch), 'absolute');

export const solvedStream = (result: StreamResult | undefined): SolvedStream | undefined =>
  result?.state === 'solved' ? result : undefined;
