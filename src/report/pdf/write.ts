import pdfmake from 'pdfmake';
import { FONT } from '../../drawing/tokens';
import type { ReportInput } from '../input';
import { buildReport } from '../model';
import { pdfDocument, sheetDocument } from './document';

/** The three faces of the document's font: file paths in Node, names put into the maker's own store in a browser. */
export interface PdfFonts {
  readonly normal: string;
  readonly bold: string;
  readonly italics: string;
}

export interface PdfOrder {
  /** The whole stream summary, or the drawing with its title block alone. */
  readonly what?: 'summary' | 'sheet';
  /** Share of the pages written, 0 to 1. */
  readonly onProgress?: (share: number) => void;
}

/**
 * Writes a document as PDF bytes. The same code serves the page's worker and the command line; fonts are handed in.
 * Two runs on the same input give the same bytes.
 */
export async function writePdf(
  input: ReportInput,
  fonts: PdfFonts,
  { what = 'summary', onProgress }: PdfOrder = {},
): Promise<Uint8Array> {
  pdfmake.setUrlAccessPolicy(() => false);
  // Node only: the three font files and nothing else.
  if ('setLocalAccessPolicy' in pdfmake)
    pdfmake.setLocalAccessPolicy((path) => Object.values(fonts).includes(path));
  pdfmake.setFonts({
    [FONT]: { normal: fonts.normal, bold: fonts.bold, italics: fonts.italics, bolditalics: fonts.bold },
  });
  pdfmake.setProgressCallback((share) => onProgress?.(share));
  const report = buildReport(input);
  const make = what === 'sheet' ? sheetDocument : pdfDocument;
  return pdfmake.createPdf(make(report, input)).getBuffer();
}
