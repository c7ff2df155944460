import { writeCsv } from '../report/csv';
import { buildReport } from '../report/model';
import { sheetSvg, sheetSvgFile } from '../report/picture';
import { resultsJson } from '../report/resultsJson';
import type { DocumentOrder, Made } from './messages';
import { paintSvg, sizeOf } from './paint';

/** Tells how far a document is: what is being done, and which share of the whole is behind. */
export type Progress = (doing: string, share: number) => void;

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

/** Loads the PDF maker and its fonts. */
export async function wakePdf(fonts: string): Promise<void> {
  const [, { pdfFonts }] = await Promise.all([import('../report/pdf/write'), import('./fonts')]);
  await pdfFonts(fonts);
}

/** Makes one document. Heavy parts load when they are first asked for. */
export async function makeDocument(order: DocumentOrder, progress: Progress): Promise<Made> {
  const { what, input, fonts } = order;
  const text = (content: string, type: string): Made => ({ bytes: new TextEncoder().encode(content), type });
  progress('Collecting the figures', 0.05);
  switch (what) {
    case 'summary-pdf':
    case 'sheet-pdf': {
      const [{ writePdf }, { pdfFonts }] = await Promise.all([
        import('../report/pdf/write'),
        import('./fonts'),
      ]);
      progress('Laying out the pages', 0.15);
      const ready = await pdfFonts(fonts);
      const bytes = await writePdf(input, ready, {
        what: what === 'summary-pdf' ? 'summary' : 'sheet',
        onProgress: (share) => progress('Writing the pages', 0.5 + 0.5 * share),
      });
      return { bytes: new Uint8Array(bytes), type: 'application/pdf', pages: pageCount(bytes) };
    }
    case 'xlsx': {
      const { writeXlsx } = await import('../report/xlsx');
      progress('Writing the tables', 0.3);
      return { bytes: new Uint8Array(await writeXlsx(buildReport(input))), type: XLSX };
    }
    case 'csv':
      return text(writeCsv(buildReport(input)), 'text/csv;charset=utf-8');
    case 'json':
      return text(`${JSON.stringify(resultsJson(input, order.seconds ?? 0), null, 1)}\n`, 'application/json');
    case 'svg': {
      const { fontFiles } = await import('./fonts');
      return text(sheetSvgFile(input, await fontFiles(fonts)), 'image/svg+xml');
    }
    case 'png':
      return { bytes: await picture(order), type: 'image/png' };
  }
}

/** Objects of the kind "page", as the writer names each once. */
function pageCount(bytes: Uint8Array): number {
  const all = new TextDecoder('latin1').decode(bytes);
  return all.match(/\/Type \/Page\b/g)?.length ?? 0;
}

/** Widest and highest picture that canvases of all browsers can hold [px]. */
const LARGEST = 8192;

async function picture({ input, fonts, width = 2000 }: DocumentOrder): Promise<Uint8Array<ArrayBuffer>> {
  const svg = sheetSvg(input);
  const size = sizeOf(svg);
  const height = Math.round((width * size.height) / size.width);
  if (width > LARGEST || height > LARGEST)
    throw new Error(
      `${width} × ${height} px is more than a picture can hold: choose a width below ${Math.floor(LARGEST * Math.min(1, width / height))} px.`,
    );
  const { canvasFonts } = await import('./fonts');
  await canvasFonts(fonts);
  const canvas = new OffscreenCanvas(width, height);
  const to = canvas.getContext('2d');
  if (!to) throw new Error('this browser paints no pictures outside the page');
  paintSvg(svg, width, to, (d) => new Path2D(d));
  const blob = await canvas.convertToBlob({ type: 'image/png' });
  return new Uint8Array(await blob.arrayBuffer());
}
