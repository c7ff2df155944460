import type { Dimension } from '../quantity/dimension';
import type { StreamId, UnitId } from './ids';

/**
 * What went wrong or deserves notice, as a value: code, place and evidence. The sentence and the next step live in
 * wording/, found by the code. Codes read 'room/what' ('valve/outlet-above-inlet'); every kind keeps its own list in
 * its findings.ts.
 */
export type FindingCode = `${string}/${string}`;

export type Weight = 'note' | 'caution' | 'beyond-limit';

export interface Evidence {
  /** Word used in the sentence's slots, e.g. 'outletPressure'. */
  readonly name: string;
  /** SI value of the stated dimension; 0 when only `text` matters. */
  readonly value: number;
  readonly dim: Dimension;
  /** An id or a tag (never a sentence): a chemical's id, a port, what was typed. */
  readonly text?: string;
}

export interface Place {
  readonly unit?: UnitId;
  readonly stream?: StreamId;
  readonly port?: string;
  /** Path of a setting inside `settings`, with dots: 'p.P'. */
  readonly path?: string;
  readonly stage?: number;
  readonly chemical?: string;
}

export interface Finding {
  readonly code: FindingCode;
  readonly weight: Weight;
  readonly at: Place;
  readonly evidence: readonly Evidence[];
}

/** An answer with what was noticed on the way, or the reasons why there is none. */
export type Outcome<T> =
  | { readonly state: 'solved'; readonly value: T; readonly findings: readonly Finding[] }
  | {
      readonly state: 'no-solution';
      /** Evidence for the reason; never shown as a result, never fed downstream. */
      readonly best?: T;
      readonly findings: readonly [Finding, ...Finding[]];
    };

/** A number seen, for a sentence's slot: SI value of the stated dimension. */
export const saw = (name: string, value: number, dim: Dimension): Evidence => ({ name, value, dim });

/** A name seen (an id, a port, what was typed), for a sentence's slot. */
export const named = (name: string, text: string): Evidence => ({ name, value: 0, dim: 'number', text });

/** An answer, with what was noticed on the way. */
export const solved = <T>(value: T, findings: readonly Finding[] = []): Outcome<T> => ({
  state: 'solved',
  value,
  findings,
});

/** No answer: the reasons, the first of them the one that stopped the work. */
export const noSolution = <T>(first: Finding, ...rest: Finding[]): Outcome<T> => ({
  state: 'no-solution',
  findings: [first, ...rest],
});
