import type { ReportInput } from '../report/input';

/** What can be made of a solved sketch. */
export type DocumentKind = 'summary-pdf' | 'sheet-pdf' | 'xlsx' | 'csv' | 'json' | 'svg' | 'png';

export interface DocumentOrder {
  readonly what: DocumentKind;
  readonly input: ReportInput;
  /** Address of the folder with the shipped font's files. */
  readonly fonts: string;
  /** Width of a picture [px]. */
  readonly width?: number;
  /** Wall time of the solve [s], for the results file. */
  readonly seconds?: number;
}

export interface Made {
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly type: string;
  /** Of a PDF. */
  readonly pages?: number;
}

export type ToDocuments =
  | { readonly say: 'make'; readonly job: number; readonly order: DocumentOrder }
  /** Pages will be asked for soon: load what makes them. */
  | { readonly say: 'wake'; readonly fonts: string };

export type FromDocuments =
  | { readonly say: 'progress'; readonly job: number; readonly doing: string; readonly share: number }
  | ({ readonly say: 'made'; readonly job: number } & Made)
  | { readonly say: 'failed'; readonly job: number; readonly message: string };
