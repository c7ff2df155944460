import type { DocumentKind, DocumentOrder } from '../../documents/messages';
import type { ReportInput } from '../../report/input';
import type { Stores } from '../../store/react';
import { download, fileName } from '../files';
import { cleanReportInput } from '../reporting';
import { CANCELLED, documentMaker, type Making } from './maker';

interface ExportKind {
  readonly label: string;
  readonly ending: string;
}

export const EXPORTS: Readonly<Record<DocumentKind, ExportKind>> = {
  'summary-pdf': { label: 'PDF', ending: '.pdf' },
  xlsx: { label: 'Spreadsheet', ending: '.xlsx' },
  csv: { label: 'CSV', ending: '.csv' },
  json: { label: 'Results as JSON', ending: '.results.json' },
  'sheet-pdf': { label: 'PDF', ending: '.drawing.pdf' },
  svg: { label: 'SVG', ending: '.svg' },
  png: { label: 'PNG', ending: '.png' },
};

/** Width of a picture when the sketch names none [px]. */
export const USUAL_WIDTH = 2400;

export const fontsAddress = (): string => new URL('./fonts', document.baseURI).href;

export const orderOf = (what: DocumentKind, input: ReportInput, seconds?: number): DocumentOrder => ({
  what,
  input,
  fonts: fontsAddress(),
  width: input.sketch.documents?.pictureWidth ?? USUAL_WIDTH,
  ...(seconds === undefined ? {} : { seconds }),
});

export interface Solved {
  readonly input: ReportInput;
  /** Wall time of the clean solve. */
  readonly seconds: number;
}

/** The sketch solved once from nothing; says plainly when there is nothing to document. */
export async function solvedForDocuments(stores: Stores): Promise<Solved | undefined> {
  const begun = performance.now();
  const input = await cleanReportInput(stores);
  if (input) return { input, seconds: (performance.now() - begun) / 1000 };
  stores.session.say('caution', 'There is nothing to document yet.', [
    'Choose chemicals and draw a feed first; the stream summary follows.',
  ]);
  return undefined;
}

const messageOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/** Waits for a document and hands it to the downloads; what went wrong is said, a cancelled one is not. */
export async function deliver(
  stores: Stores,
  making: Making,
  what: DocumentKind,
  title: string | undefined,
): Promise<void> {
  const name = fileName(title, EXPORTS[what].ending);
  try {
    const { bytes, type } = await making.made;
    download(name, bytes, type);
    stores.session.setState({ spoken: `${name} is made` });
  } catch (error) {
    if (messageOf(error) !== CANCELLED)
      stores.session.say('beyond', 'The document was not made.', [messageOf(error)]);
  }
}

/** Solves from nothing, makes one document in its worker and saves it. */
export async function exportDocument(stores: Stores, what: DocumentKind): Promise<void> {
  try {
    stores.session.setState({ spoken: `Making the ${EXPORTS[what].label}` });
    const solved = await solvedForDocuments(stores);
    if (!solved) return;
    const making = documentMaker().make(orderOf(what, solved.input, solved.seconds), () => undefined);
    await deliver(stores, making, what, solved.input.sketch.title.title);
  } catch (error) {
    stores.session.say('beyond', 'The document was not made.', [messageOf(error)]);
  }
}

/**
 * The drawing as a picture on the clipboard. The clipboard wants to be asked within the click, so it is handed a promise.
 */
export async function copyPicture(stores: Stores, input: ReportInput): Promise<void> {
  const painted = documentMaker()
    .make(orderOf('png', input), () => undefined)
    .made.then(({ bytes, type }) => new Blob([bytes], { type }));
  try {
    await navigator.clipboard.write([new ClipboardItem({ 'image/png': painted })]);
    stores.session.say('info', 'The drawing is on the clipboard.');
  } catch (error) {
    stores.session.say('caution', 'The drawing was not copied.', [
      messageOf(error),
      'Save it as PNG instead.',
    ]);
  }
}
