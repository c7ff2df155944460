import { emptySketch } from '../sketch/fresh';
import type { SketchHead } from '../store/autosave';
import type { Stores } from '../store/react';
import { copyOf, showSketch } from './documents';
import { lockOf } from './holding';
import { theStorage } from './storage';
import { openStored } from './stored';

const nameOf = (head: SketchHead): string => head.title || 'Untitled sketch';
const ELSEWHERE = (head: SketchHead): string =>
  `${nameOf(head)} is open in another tab: do that there, or close that tab first.`;

/** Does something to a sketch that no tab holds, and keeps every tab from taking it meanwhile. */
async function whileFree(head: SketchHead, what: () => Promise<string>): Promise<string> {
  if (!('locks' in navigator)) return what();
  return navigator.locks.request(lockOf(head.id), { ifAvailable: true }, (lock) =>
    lock ? what() : Promise.resolve(ELSEWHERE(head)),
  );
}

/** What can be done to sketches on the list. Each answers in words what was done, or why it was not. */

export const renameSketch = (head: SketchHead, title: string): Promise<string> =>
  whileFree(head, async () => {
    const storage = theStorage();
    const stored = await storage?.latest(head.id);
    if (!storage || !stored) return 'This sketch is no longer here.';
    const { document } = stored;
    const renamed = { ...document, title: { ...document.title, title } };
    const outcome = await storage.save(renamed, stored.counter, 'rename the sketch', Date.now());
    return outcome.ok ? `Renamed to ${title}.` : `Not renamed: ${outcome.detail}`;
  });

export async function duplicateSketch(head: SketchHead): Promise<string> {
  const storage = theStorage();
  const stored = await storage?.latest(head.id);
  if (!storage || !stored) return 'This sketch is no longer here.';
  const opened = openStored(stored);
  // What cannot be shown can be kept twice all the same.
  const copy = copyOf(opened.ok ? opened.sketch : stored.document);
  const outcome = await storage.save(copy, 0, `copy of ${nameOf(head)}`, Date.now());
  return outcome.ok
    ? `Kept once more as ${copy.title.title ?? 'Untitled sketch'}.`
    : `Not duplicated: ${outcome.detail}`;
}

/** Takes a sketch off the list; it can be brought back for a while. The sheet goes blank when it is the one that is open. */
export async function deleteSketch(stores: Stores, head: SketchHead): Promise<string> {
  const remove = async (): Promise<string> => {
    await theStorage()?.markDeleted(head.id, Date.now());
    return `${nameOf(head)} is deleted; undo below.`;
  };
  const { sketch, writable } = stores.sketch.getState();
  if (sketch.id !== head.id) return whileFree(head, remove);
  if (!writable) return ELSEWHERE(head);
  const said = await remove();
  showSketch(stores, emptySketch(crypto.randomUUID()));
  stores.session.setState({ over: 'open' });
  return said;
}
