import pdfmake from 'pdfmake';
import type { ReportInput } from '../report/input';
import { type PdfFonts, writePdf } from '../report/pdf/write';

const FACES: Readonly<Record<keyof PdfFonts, string>> = {
  normal: 'SourceSans3-Regular.ttf',
  bold: 'SourceSans3-SemiBold.ttf',
  italics: 'SourceSans3-Italic.ttf',
};

interface FileStore {
  writeFileSync(name: string, bytes: Uint8Array): void;
}

let ready: Promise<PdfFonts> | null = null;

/** Puts the shipped font where the PDF maker looks for it; once a page. */
async function loadFonts(): Promise<PdfFonts> {
  const files = (pdfmake as unknown as { readonly virtualfs: FileStore }).virtualfs;
  await Promise.all(
    Object.values(FACES).map(async (file) => {
      const answer = await fetch(`./fonts/${file}`);
      if (!answer.ok) throw new Error(`font ${file}: ${answer.status}`);
      files.writeFileSync(file, new Uint8Array(await answer.arrayBuffer()));
    }),
  );
  return FACES;
}

export async function makePdf(input: ReportInput): Promise<Uint8Array> {
  ready ??= loadFonts();
  return writePdf(input, await ready);
}
