import type { DocumentKind, DocumentOrder, Made } from '../../documents/messages';
import type { ReportInput } from '../../report/input';
import type { Stores } from '../../store/react';
import { download, fileName } from '../files';
import { cleanReportInput } from '../reporting';
import { documentMaker } from './maker';
import { isCancelled, type Order, whileShown } from './underWay';

interface ExportKind {
  readonly label: string;
  /** While it is being made. */
  readonly name: string;
  readonly ending: string;
}

export const EXPORTS: Readonly<Record<DocumentKind, ExportKind>> = {
  'summary-pdf': { label: 'PDF', name: 'PDF of the stream summary', ending: '.pdf' },
  xlsx: { label: 'Spreadsheet', name: 'Spreadsheet', ending: '.xlsx' },
  csv: { label: 'CSV', name: 'CSV', ending: '.csv' },
  json: { label: 'Results as JSON', name: 'Results as JSON', ending: '.results.json' },
  'sheet-pdf': { label: 'PDF', name: 'PDF of the drawing', ending: '.drawing.pdf' },
  svg: { label: 'SVG', name: 'Drawing as SVG', ending: '.svg' },
  png: { label: 'PNG', name: 'Drawing as PNG', ending: '.png' },
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
export async function solvedForDocuments(stores: Stores, signal?: AbortSignal): Promise<Solved | undefined> {
  const begun = performance.now();
  const input = await cleanReportInput(stores, signal);
  if (input) return { input, seconds: (performance.now() - begun) / 1000 };
  stores.session.say('caution', 'There is nothing to document yet.', [
    'Choose chemicals and draw a feed first; the stream summary follows.',
  ]);
  return undefined;
}

const messageOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/** Makes one document with a line that shows how far it is. What went wrong is said; cancelled, nothing leaves the page. */
async function shown(stores: Stores, name: string, work: (order: Order) => Promise<void>): Promise<void> {
  try {
    stores.session.setState({ spoken: `Making: ${name}` });
    await whileShown(name, work);
  } catch (error) {
    if (isCancelled(error)) stores.session.setState({ spoken: `Cancelled: ${name}. Nothing was saved.` });
    else stores.session.say('beyond', 'The document was not made.', [messageOf(error)]);
  }
}

/** Makes a document in the worker; an aborted order is given up there too. */
async function madeOf(order: DocumentOrder, { signal, tell }: Order): Promise<Made> {
  signal.throwIfAborted();
  const making = documentMaker().make(order, tell);
  signal.addEventListener('abort', making.cancel);
  const made = await making.made;
  signal.throwIfAborted();
  return made;
}

function save(stores: Stores, what: DocumentKind, { bytes, type }: Made, title: string | undefined): void {
  const name = fileName(title, EXPORTS[what].ending);
  download(name, bytes, type);
  stores.session.setState({ spoken: `${name} is made` });
}

/** Solves from nothing unless that was done, makes one document in its worker and saves it. */
export function exportDocument(
  stores: Stores,
  what: DocumentKind,
  solve = (signal: AbortSignal): Promise<Solved | undefined> => solvedForDocuments(stores, signal),
): Promise<void> {
  return shown(stores, EXPORTS[what].name, async (order) => {
    const solved = await solve(order.signal);
    if (!solved) return;
    const made = await madeOf(orderOf(what, solved.input, solved.seconds), order);
    save(stores, what, made, solved.input.sketch.title.title);
  });
}

/** Saves what was made already. */
export const saveMade = (stores: Stores, made: Made, title: string | undefined): void =>
  save(stores, 'summary-pdf', made, title);

/**
 * The drawing as a picture on the clipboard. The clipboard wants to be asked within the click, so it is handed a promise.
 */
export async function copyPicture(stores: Stores, input: ReportInput): Promise<void> {
  await shown(stores, 'Drawing for the clipboard', async (order) => {
    const painted = madeOf(orderOf('png', input), order).then(
      ({ bytes, type }) => new Blob([bytes], { type }),
    );
    try {
      await navigator.clipboard.write([new ClipboardItem({ 'image/png': painted })]);
    } catch (error) {
      order.signal.throwIfAborted();
      stores.session.say('caution', 'The drawing was not copied.', [
        messageOf(error),
        'Save it as PNG instead.',
      ]);
      return;
    }
    stores.session.say('info', 'The drawing is on the clipboard.');
  });
}
