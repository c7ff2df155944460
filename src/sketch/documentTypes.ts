import type { ChemId, StreamId, UnitId } from '../engine/ids';
import type { Quantity } from './values';

/** One line of the revision table. */
export interface Revision {
  /** A, B ... before approval, 0, 1 ... after. */
  readonly mark: string;
  readonly date?: string;
  readonly what?: string;
  readonly by?: string;
  readonly checked?: string;
  readonly approved?: string;
}

/** A feed that the process has to take, in words. */
export interface FeedCase {
  readonly name: string;
  readonly text?: string;
}

/** What a product requirement is about. `recovery`: share of the chemical in all feeds that leaves in the stream. */
export const REQUIREMENT_KINDS = [
  'fraction',
  'recovery',
  'molarFlow',
  'massFlow',
  'temperature',
  'pressure',
  'vapourFraction',
] as const;
export type RequirementKind = (typeof REQUIREMENT_KINDS)[number];

/** What a stream must keep, judged against the results. */
export interface Requirement {
  readonly stream: StreamId;
  readonly of: RequirementKind;
  /** Of a fraction or a recovery. */
  readonly chemical?: ChemId;
  /** Of a fraction; absent: mole. */
  readonly basis?: 'mole' | 'mass';
  readonly min?: Quantity;
  readonly max?: Quantity;
  readonly note?: string;
}

/** A level at which heat can be had or given away. */
export interface UtilityLevel {
  readonly name: string;
  readonly use: 'heating' | 'cooling';
  /** Temperature at which it comes. */
  readonly supply?: Quantity;
  /** Temperature at which it leaves; absent: as it comes (condensing, boiling). */
  readonly back?: Quantity;
  readonly note?: string;
}

export interface DesignBasis {
  readonly cases?: readonly FeedCase[];
  readonly requirements?: readonly Requirement[];
  readonly utilities?: readonly UtilityLevel[];
  /** Least temperature difference to a utility; absent: 10 K. */
  readonly approach?: Quantity;
  /** Site conditions in words, beside the values of `site`. */
  readonly conditions?: string;
  readonly notes?: string;
}

/** Something that is not settled, as on drawings: HOLD 1, 2 ... with who settles it by when. */
export interface Hold {
  readonly no: string;
  readonly what: string;
  readonly owner?: string;
  readonly date?: string;
  /** The assumption it belongs to, by unit and path as in the register. */
  readonly unit?: UnitId;
  readonly path?: string;
}

/** What the documents show. What is left out is listed, so that what is new comes along. */
export interface DocumentChoices {
  readonly paper?: 'A3' | 'A4';
  readonly withoutRows?: readonly string[];
  readonly withoutStreams?: readonly StreamId[];
  readonly withoutSections?: readonly string[];
  /** Width of an exported picture [px]. */
  readonly pictureWidth?: number;
}
