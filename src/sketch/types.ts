import type { Corr } from '../engine/chemicals/types';
import type { ChemId, Port, StreamId, UnitId } from '../engine/ids';
import type { DesignBasis, DocumentChoices, Hold, Revision } from './documentTypes';
import type { Json, Quantity } from './values';

export type { Json, Quantity } from './values';

/** Fields of the title block; the purpose is what the document is for: "for review". */
export const TITLE_KEYS = [
  'project',
  'area',
  'number',
  'title',
  'author',
  'checked',
  'approved',
  'revision',
  'date',
  'purpose',
  'notes',
] as const;

export type TitleBlock = { readonly [key in (typeof TITLE_KEYS)[number]]?: string };

/** A chemical the user brings: constants in SI (MW in g/mol), correlations by form. */
export interface OwnChemical {
  readonly name: string;
  readonly cas?: string;
  readonly formula?: string;
  readonly MW: number;
  readonly Tc?: number;
  readonly Pc?: number;
  readonly omega?: number;
  readonly Hf?: number;
  readonly S0?: number;
  readonly Cp: readonly Corr[];
  readonly Psat?: readonly Corr[];
  readonly Hvap?: readonly Corr[];
  readonly rhoL?: readonly Corr[];
  readonly cpL?: readonly Corr[];
  readonly groups?: {
    readonly unifac?: Readonly<Record<string, number>>;
    readonly dortmund?: Readonly<Record<string, number>>;
    readonly ppr78?: Readonly<Record<string, number>>;
  };
  readonly vWilson?: number;
  readonly r?: number;
  readonly q?: number;
}

/** Id of a chemical of the bank, or a chemical with the user's own constants. */
export type SketchChemical = string | { readonly id: ChemId; readonly own: OwnChemical };

/** The thermodynamic model as chosen. What is absent is filled in and told as an assumption (compiling/model.ts). */
export interface ModelChoice {
  /** Known kinds are solved; another kind is kept and reads "not available in this version". */
  readonly kind: string;
  readonly alpha?: '1976' | '1978';
  readonly vapour?: string;
  readonly poynting?: boolean;
  readonly liquidH?: 'psat-slope' | 'hvap';
  readonly liquidVolume?: 'corrected' | 'cubic';
  /** Absent: true, an assumption. False: only the pairs given here, all others zero. */
  readonly bankPairs?: boolean;
  /** Absent: none, an assumption. */
  readonly pairs?: readonly Json[];
}

/** A unit on the sheet. Its settings stand as typed, by the catalogue of its kind. */
export interface SketchUnit {
  readonly id: UnitId;
  readonly tag: string;
  readonly name?: string;
  readonly kind: string;
  /** The symbol's origin in sheet px, grid 8. */
  readonly at: readonly [number, number];
  readonly turn?: 0 | 90 | 180 | 270;
  readonly mirror?: true;
  /** The user put it where it stands; arranging may leave it there. Set by moving and lining up, not by dropping or pasting. */
  readonly byHand?: true;
  readonly material?: string;
  readonly settings: { readonly [key: string]: Json };
}

/** A stream. An end that is absent hangs free: a feed without `from`, a product without `to`. */
export interface SketchStream {
  readonly id: StreamId;
  readonly number: string;
  readonly name?: string;
  readonly from?: readonly [UnitId, Port];
  readonly to?: readonly [UnitId, Port];
  /** Bends moved by hand, sheet px. */
  readonly via?: readonly (readonly [number, number])[];
}

/** A text or an area on the sheet. `on`: id of the unit or stream that it stands on. */
export interface Note {
  readonly id: string;
  readonly text: string;
  /** Upper left corner, sheet px; absent: not on the drawing. */
  readonly at?: readonly [number, number];
  readonly on?: string;
  /** An area is a labelled rectangle behind the units. Absent: text. */
  readonly kind?: 'text' | 'area';
  /** Width and height [px]; absent: as the text needs. */
  readonly size?: readonly [number, number];
}

export type MeasureSet = 'SI' | 'metric' | 'US';
/** What a stream's label on the sheet may show, by key; units follow the measures. */
export type LabelKey =
  | 'molarFlow'
  | 'massFlow'
  | 'temperature'
  | 'pressure'
  | 'vapourFraction'
  | 'enthalpyFlow'
  | 'volumeFlow';

export interface Display {
  readonly set: MeasureSet;
  readonly labels: readonly LabelKey[];
  /** Own choice per dimension: display unit text. */
  readonly units?: Readonly<Record<string, string>>;
  readonly gauge?: boolean;
}

/** The document. Immutable; edits make new ones that share what did not change. Unknown fields are kept. */
export interface Sketch {
  readonly format: 'splitwright.sketch';
  readonly version: 1;
  readonly id: string;
  readonly title: TitleBlock;
  readonly site: {
    readonly pressure?: Quantity;
    readonly ambient?: Quantity;
    readonly coolingWater?: Quantity;
  };
  readonly chemicals: readonly SketchChemical[];
  readonly model: ModelChoice;
  readonly units: readonly SketchUnit[];
  readonly streams: readonly SketchStream[];
  readonly display: Display;
  readonly notes: readonly Note[];
  readonly limits?: Readonly<Record<string, Quantity>>;
  readonly revisions?: readonly Revision[];
  readonly designBasis?: DesignBasis;
  readonly holds?: readonly Hold[];
  readonly documents?: DocumentChoices;
}

/** A value used because the user gave none. */
export interface Assumption {
  /** A1, A2, ... */
  readonly no: string;
  readonly unit?: UnitId;
  /** Where to change it: setting path, 'model.alpha', 'site.pressure', 'chemicals'. */
  readonly path: string;
  /** SI value, or text for options. */
  readonly value: number | string;
  /** As a user would type it. */
  readonly unitText: string;
  /** Key or sentence of the reason. */
  readonly reason: string;
}
