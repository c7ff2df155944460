import { emptySketch } from '../sketch/fresh';
import { type Opened, openSketch } from '../sketch/read';
import type { Sketch } from '../sketch/types';
import { writeSketch } from '../sketch/write';
import type { Stores } from '../store/react';
import { sayFileProblem, sayFinding } from '../wording';
import { download, fileName, pickFile } from './files';
import { theStorage } from './storage';

export const SKETCH_ENDING = '.sketch.json';

export const isEmpty = (sketch: Sketch): boolean =>
  sketch.units.length === 0 && sketch.chemicals.length === 0 && sketch.notes.length === 0;

/** Puts a document on the sheet: fresh history, nothing selected. */
export function showSketch(stores: Stores, sketch: Sketch): void {
  stores.results.clear();
  stores.session.setState({
    units: [],
    streams: [],
    notes: [],
    drawer: null,
    connecting: null,
    over: 'none',
    notice: null,
  });
  stores.sketch.open(sketch);
}

/** The document that was last saved as a file. */
let asFile: Sketch | null = null;

/** What is shown is kept nowhere but in this page. */
export function isKeptNowhere(stores: Stores): boolean {
  const { sketch } = stores.sketch.getState();
  return stores.session.getState().saved.state === 'failed' && !isEmpty(sketch) && sketch !== asFile;
}

/** Goes on to another sketch at once, or only when asked again where the one that is shown would be lost. */
export function leaveFor(stores: Stores, go: () => void): void {
  if (!isKeptNowhere(stores)) {
    go();
    return;
  }
  stores.session.setState({ over: 'none' });
  stores.session.say(
    'caution',
    'The sketch that is shown is not saved.',
    ['It would be lost. Save it as a file first.'],
    [
      { label: 'Save as a file', run: () => saveFile(stores) },
      { label: 'Go on without it', run: go },
    ],
  );
}

/** The browser asks before a page is closed whose sketch is kept nowhere else. */
export function guardLeaving(stores: Stores): void {
  window.addEventListener('beforeunload', (event) => {
    if (isKeptNowhere(stores)) event.preventDefault();
  });
}

export function newSketch(stores: Stores): void {
  leaveFor(stores, () => showSketch(stores, emptySketch(crypto.randomUUID())));
}

/** The same content as another sketch, with a name of its own. */
export function copyOf(sketch: Sketch): Sketch {
  const title = sketch.title.title ? { ...sketch.title, title: `${sketch.title.title}, copy` } : sketch.title;
  return { ...sketch, id: crypto.randomUUID(), title };
}

/** The sketch that is shown goes on as another one. */
export function editCopy(stores: Stores): void {
  showSketch(stores, copyOf(stores.sketch.getState().sketch));
}

function refuse(stores: Stores, name: string, { problems }: Extract<Opened, { ok: false }>): void {
  stores.session.say(
    'beyond',
    `${name} was not opened; your sketch is untouched.`,
    problems.map(sayFileProblem),
  );
}

/** What was noticed on reading a file that opened: what was added to it, what this version cannot show. */
function notedOn({ sketch, notes }: Extract<Opened, { ok: true }>): readonly string[] {
  const context = {
    measures: sketch.display.set,
    tag: (id: string) => sketch.units.find((unit) => unit.id === id)?.tag,
    number: (id: string) => sketch.streams.find((stream) => stream.id === id)?.number,
  };
  return notes.map((note) => {
    const { sentence, next } = sayFinding(note, context);
    return next ? `${sentence} ${next}` : sentence;
  });
}

/** Nothing of a file is lost without a word. */
function tell(stores: Stores, title: string, lines: readonly string[]): void {
  if (lines.length > 0) stores.session.say('info', title, lines);
}

/** Opens a sketch as a new one of its own. Refused: says where and why, and the open sketch stays. */
export function openAsNew(stores: Stores, source: unknown, name: string): boolean {
  const opened = openSketch(source);
  if (!opened.ok) {
    refuse(stores, name, opened);
    return false;
  }
  leaveFor(stores, () => {
    showSketch(stores, { ...opened.sketch, id: crypto.randomUUID() });
    tell(stores, `${name} is open.`, notedOn(opened));
  });
  return true;
}

/** Larger than any sketch: such a file is not even read [bytes]. */
const MOST_BYTES = 16 * 1024 * 1024;

/** The bytes of a file, or undefined once it is said why there are none. */
async function bytesOf(stores: Stores, file: File): Promise<Uint8Array | undefined> {
  const refused = (why: string): undefined =>
    void stores.session.say('beyond', `${file.name} was not opened; your sketch is untouched.`, [why]);
  if (file.size > MOST_BYTES)
    return refused(`It has ${Math.round(file.size / 2 ** 20)} MB; no sketch has more than 16.`);
  try {
    return new Uint8Array(await file.arrayBuffer());
  } catch (error) {
    // Taken away, locked, or a folder.
    if (!(error instanceof DOMException)) throw error;
    return refused(`The browser could not read it (${error.message}). Is it still there, and is it a file?`);
  }
}

/**
 * Opens a file. Where its sketch is on this computer in another state, neither takes the other's place: the file becomes a
 * sketch of its own.
 */
export async function openFileOf(stores: Stores, file: File): Promise<void> {
  const bytes = await bytesOf(stores, file);
  if (!bytes) return;
  const opened = openSketch(bytes);
  if (!opened.ok) {
    refuse(stores, file.name, opened);
    return;
  }
  const { sketch } = opened;
  const stored = await theStorage()
    ?.latest(sketch.id)
    .catch((error: unknown) => {
      // A store that breaks keeps no file from being opened; that it cannot be kept is said when it is to be kept.
      console.warn(`What is stored of ${file.name} could not be looked up: ${String(error)}`);
      return undefined;
    });
  const isOther = stored !== undefined && writeSketch(stored.document) !== writeSketch(sketch);
  leaveFor(stores, () => {
    showSketch(stores, isOther ? { ...sketch, id: crypto.randomUUID() } : sketch);
    const notes = notedOn(opened);
    if (isOther)
      tell(stores, `${file.name} was opened as a sketch of its own.`, [
        'This sketch is on this computer in another state, which stays as it is: see “Sketches on this computer”.',
        ...notes,
      ]);
    else tell(stores, `${file.name} is open.`, notes);
  });
}

export async function openFile(stores: Stores): Promise<void> {
  const file = await pickFile('.json,application/json');
  if (file) await openFileOf(stores, file);
}

export function saveFile(stores: Stores): void {
  const { sketch } = stores.sketch.getState();
  const name = fileName(sketch.title.title, SKETCH_ENDING);
  download(name, writeSketch(sketch), 'application/json');
  asFile = sketch;
  stores.session.setState({ spoken: `Saved as ${name}` });
}

/** Files dropped anywhere on the page: one is opened; of several, none is chosen for the user. */
export async function dropFiles(stores: Stores, files: FileList): Promise<void> {
  const [file, ...more] = files;
  if (!file) return;
  if (more.length > 0)
    stores.session.say('caution', 'One sketch at a time: nothing was opened.', [
      `${files.length} files were dropped. Drop one of them.`,
    ]);
  else await openFileOf(stores, file);
}

/** An example is opened as a copy, so that what is done to it is kept apart from the example. */
export async function openExample(stores: Stores, file: string): Promise<void> {
  const refused = (why: string): void =>
    stores.session.say('beyond', 'The example could not be read.', [`${file}: ${why}`]);
  try {
    const answer = await fetch(`./examples/${file}`);
    if (answer.ok) openAsNew(stores, await answer.text(), file);
    else refused(String(answer.status));
  } catch (error) {
    // Without a network, before the page's files are kept.
    if (!(error instanceof TypeError)) throw error;
    refused(`there is no network (${error.message})`);
  }
}
