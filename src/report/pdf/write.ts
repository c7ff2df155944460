import pdfmake from 'pdfmake';
import { FONT } from '../../drawing/tokens';
import type { ReportInput } from '../input';
import { buildReport } from '../model';
import { pdfDocument } from './document';

/** The three faces of the document's font: file paths in Node, names put into the maker's own store in a browser. */
export interface PdfFonts {
  readonly normal: string;
  readonly bold: string;
  readonly italics: string;
}

/**
 * Writes the stream summary as PDF bytes. The same code serves the page and the command line; fonts are handed in.
 * Two runs on the same input give the same bytes.
 */
export async function writePdf(input: ReportInput, fonts: PdfFonts): Promise<Uint8Array> {
  pdfmake.setUrlAccessPolicy(() => false);
  // Node only: the three font files and nothing else.
  if ('setLocalAccessPolicy' in pdfmake)
    pdfmake.setLocalAccessPolicy((path) => Object.values(fonts).includes(path));
  pdfmake.setFonts({
    [FONT]: { normal: fonts.normal, bold: fonts.bold, italics: fonts.italics, bolditalics: fonts.bold },
  });
  return pdfmake.createPdf(pdfDocument(buildReport(input), input)).getBuffer();
}
