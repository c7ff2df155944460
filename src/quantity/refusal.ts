/** Why a text is not the quantity asked for. The sentences live with the other wording; this is the evidence. */
export type QuantityCode =
  | 'quantity/empty' // nothing typed
  | 'quantity/not-a-number' // does not begin with a number, or the number breaks off
  | 'quantity/decimal-comma' // "3,5 bar": `.` is the decimal sign; `near` has the number so written
  | 'quantity/digit-grouping' // "1,000 bar", "1 000 bar": digits are not grouped; `near` has the number without
  | 'quantity/out-of-range' // too large or too small to be held
  | 'quantity/no-unit' // a bare number where a unit is needed
  | 'quantity/unknown-unit' // `found` is the symbol; `near` the accepted one most likely meant
  | 'quantity/unit-syntax' // a bracket, sign or slash out of place
  | 'quantity/second-slash' // "kg/m3/h": one slash only
  | 'quantity/unbracketed' // "J/mol K": `near` is "J/(mol K)"
  | 'quantity/reference-in-compound' // barg or bar(a) as part of a compound unit
  | 'quantity/wrong-dimension' // a sound unit that measures something else
  | 'quantity/volume-flow' // "10 m3/h" as a flow: ambiguous; `fits` says it in amount, mass, reference gas volume
  | 'quantity/drop-has-no-reference' // "0.3 barg" as a pressure difference
  | 'quantity/below-absolute-zero' // an absolute temperature under 0 K
  | 'quantity/below-vacuum'; // an absolute pressure under 0 Pa

/** Why a text is no quantity; its sentence stands in wording/, by the code. */
export interface Refusal {
  readonly ok: false;
  readonly code: QuantityCode;
  /** Index in the text where the trouble begins. */
  readonly at: number;
  /** The piece of text found there. */
  readonly found: string;
  /** Units that would be accepted, the usual ones first. */
  readonly fits: readonly string[];
  /** What was most likely meant, where one can tell. */
  readonly near?: string;
}

/** A refusal from inside the unit scanner, before it is known what fits. */
export interface UnitFault {
  readonly ok: false;
  readonly code: QuantityCode;
  readonly at: number;
  readonly found: string;
  readonly near?: string;
}
