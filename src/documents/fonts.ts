import pdfmake from 'pdfmake';
import { FONT } from '../drawing/tokens';
import type { PdfFonts } from '../report/pdf/write';
import type { FontFiles } from '../report/picture';

const FACES: Readonly<Record<keyof PdfFonts, string>> = {
  normal: 'SourceSans3-Regular.ttf',
  bold: 'SourceSans3-SemiBold.ttf',
  italics: 'SourceSans3-Italic.ttf',
};

interface FileStore {
  writeFileSync(name: string, bytes: Uint8Array): void;
}

const files = new Map<string, Promise<ArrayBuffer>>();

/** A face of the shipped font; fetched once. */
function face(folder: string, file: string): Promise<ArrayBuffer> {
  const known = files.get(file);
  if (known) return known;
  const fetched = fetch(`${folder}/${file}`).then((answer) => {
    if (!answer.ok) throw new Error(`font ${file}: ${answer.status}`);
    return answer.arrayBuffer();
  });
  files.set(file, fetched);
  // What failed once may succeed the next time.
  fetched.catch(() => files.delete(file));
  return fetched;
}

/** The shipped font's files. */
export async function fontFiles(folder: string): Promise<FontFiles> {
  const bytes = async (file: string): Promise<Uint8Array> => new Uint8Array(await face(folder, file));
  const [normal, bold, italics] = await Promise.all([
    bytes(FACES.normal),
    bytes(FACES.bold),
    bytes(FACES.italics),
  ]);
  return { normal, bold, italics };
}

/** Puts the shipped font where the PDF maker looks for it. */
export async function pdfFonts(folder: string): Promise<PdfFonts> {
  const store = (pdfmake as unknown as { readonly virtualfs: FileStore }).virtualfs;
  await Promise.all(
    Object.values(FACES).map(async (file) =>
      store.writeFileSync(file, new Uint8Array(await face(folder, file))),
    ),
  );
  return FACES;
}

/** Lets canvases of this worker write in the shipped font. */
export async function canvasFonts(folder: string): Promise<void> {
  const { fonts } = globalThis as unknown as { readonly fonts: FontFaceSet };
  const faces = [
    [FACES.normal, '400', 'normal'],
    [FACES.bold, '600', 'normal'],
    [FACES.italics, '400', 'italic'],
  ] as const;
  for (const [file, weight, style] of faces) {
    const loaded = await new FontFace(FONT, await face(folder, file), { weight, style }).load();
    fonts.add(loaded);
  }
}
