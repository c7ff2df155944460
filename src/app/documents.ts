import { emptySketch } from '../sketch/fresh';
import { openSketch } from '../sketch/read';
import type { Sketch } from '../sketch/types';
import { writeSketch } from '../sketch/write';
import type { Stores } from '../store/react';
import { sayFileProblem } from '../wording';
import { download, fileName, pickFile } from './files';

export const SKETCH_ENDING = '.sketch.json';

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

export function newSketch(stores: Stores): void {
  showSketch(stores, emptySketch(crypto.randomUUID()));
}

/** The sketch that is shown goes on as another one, with a name of its own. */
export function editCopy(stores: Stores): void {
  const { sketch } = stores.sketch.getState();
  const title = sketch.title.title ? { ...sketch.title, title: `${sketch.title.title}, copy` } : sketch.title;
  showSketch(stores, { ...sketch, id: crypto.randomUUID(), title });
}

/** Opens a sketch from text. Refused: says where and why, and the open sketch stays. */
export function openText(stores: Stores, text: string, name: string, as: 'same' | 'copy' = 'same'): boolean {
  const opened = openSketch(text);
  if (!opened.ok) {
    stores.session.say(
      'beyond',
      `${name} was not opened; your sketch is untouched.`,
      opened.problems.map(sayFileProblem),
    );
    return false;
  }
  showSketch(stores, as === 'copy' ? { ...opened.sketch, id: crypto.randomUUID() } : opened.sketch);
  return true;
}

export async function openFile(stores: Stores): Promise<void> {
  const file = await pickFile('.json,application/json');
  if (file) openText(stores, await file.text(), file.name);
}

export function saveFile(stores: Stores): void {
  const { sketch } = stores.sketch.getState();
  const name = fileName(sketch.title.title, SKETCH_ENDING);
  download(name, writeSketch(sketch), 'application/json');
  stores.session.setState({ spoken: `Saved as ${name}` });
}

/** Files dropped anywhere on the page: the first one is opened. */
export async function dropFiles(stores: Stores, files: FileList): Promise<void> {
  const [file] = files;
  if (file) openText(stores, await file.text(), file.name);
}

/** An example is opened as a copy, so that what is done to it is kept apart from the example. */
export async function openExample(stores: Stores, file: string): Promise<void> {
  const answer = await fetch(`./examples/${file}`);
  if (answer.ok) openText(stores, await answer.text(), file, 'copy');
  else stores.session.say('beyond', 'The example could not be read.', [`${file}: ${answer.status}`]);
}
