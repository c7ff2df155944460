import type { ProfileData } from '../drawing/profiles';
import type { Weight } from '../engine/outcome';
import type { Dimension } from '../quantity/dimension';

/** A cell keeps the unrounded number; writers format it. Text cells are guarded against formula injection where it matters. */
export type Cell =
  | { readonly is: 'text'; readonly text: string; readonly bold?: boolean; readonly muted?: boolean }
  /**
   * Already in display units; `decimals` fixed for the row; trace: shown '<0.01' when smaller than the last place but not zero.
   * `power`: printed by its size, "3 × 10⁻¹⁵".
   */
  | {
      readonly is: 'number';
      readonly value: number;
      readonly decimals: number;
      readonly bold?: boolean;
      readonly power?: true;
    }
  | { readonly is: 'absent' };

export interface Row {
  readonly key: string;
  readonly label: string;
  readonly unit?: string;
  readonly cells: readonly Cell[];
  /** The row in a few words, where a page has room for no more. */
  readonly title?: string;
  readonly style?: 'head' | 'group' | 'total';
  /** Where more is said of it in the document: "stream.s3", "column.u5". */
  readonly link?: string;
  /** Weight of the limit that the row tells of. */
  readonly mark?: Weight;
}

export interface Table {
  readonly key: string;
  readonly title: string;
  /** Where room is short: whose the table is and what it holds, "C-101" and "results"; of the two only the first is cut. */
  readonly short?: readonly [whose: string, what: string];
  readonly columns: readonly {
    readonly key: string;
    readonly head: string;
    readonly sub?: string;
    readonly align: 'left' | 'right';
  }[];
  readonly rows: readonly Row[];
  readonly notes: readonly string[];
}

/** One column: what was set in words and, where it is solved, figures, stages and profiles. */
export interface ColumnReport {
  readonly key: string;
  readonly title: string;
  readonly settings: Table;
  readonly figures?: Table;
  /** Every stage, from the top, ends by name. */
  readonly stages?: Table;
  readonly profiles?: ProfileData;
}

export interface TitleEntry {
  readonly label: string;
  readonly text: string;
}

/** One model behind every table on screen, in CSV and in PDF. */
export interface ReportModel {
  readonly title: readonly TitleEntry[];
  readonly strip: {
    /** Empty when the purpose says otherwise. */
    readonly warning: string;
    readonly purpose: string;
    readonly margin: string;
    readonly fingerprint: string;
    readonly measures: string;
    readonly version: string;
    readonly number: string;
  };
  readonly streams: Table;
  readonly units: Table;
  readonly duties: Table;
  readonly powers: Table;
  readonly columns: readonly ColumnReport[];
  readonly closure: Table;
  readonly requirements: Table;
  readonly limits: Table;
  readonly basis: Table;
  readonly utilities: Table;
  readonly assumptions: Table;
  readonly holds: Table;
  readonly revisions: Table;
  readonly pairs: Table;
  readonly sources: readonly string[];
  readonly cautions: readonly string[];
  readonly state: { readonly solved: boolean; readonly text: string };
}

export interface MeasureOf {
  readonly dim: Dimension;
  readonly unit: string;
}
