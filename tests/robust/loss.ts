import { readJson } from '../../src/sketch/file/text';
import type { Opened } from '../../src/sketch/read';

type Plain = unknown;
const isRecord = (value: Plain): value is Readonly<Record<string, Plain>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** What opening may change, because it means the same or because it is told. */
function isExcused(path: string, before: Plain, told: ReadonlySet<string>): boolean {
  // Not turned over, not placed by hand is what the absence of the word says; a sketch or note without a usable id gets one.
  if (/^units\.\d+\.(mirror|byHand)$/.test(path)) return before === false;
  if (path === 'id') return typeof before === 'string' && before.trim() === '';
  if (/^notes\.\d+\.id$/.test(path)) return true;
  return path === 'display.labels' && told.has('sketch/label-not-available');
}

/**
 * Where what stood in a file no longer stands in the document that was made of it. Numbers compare as numbers (1.0 is 1),
 * the order of keys does not count; more than before is no loss.
 */
function lost(before: Plain, after: Plain, path: string, told: ReadonlySet<string>): string[] {
  const at = path === '' ? '' : `${path}.`;
  if (Array.isArray(before) && Array.isArray(after) && before.length <= after.length)
    return before.flatMap((item, k) => lost(item, after[k], `${at}${k}`, told));
  if (isRecord(before) && isRecord(after))
    return Object.keys(before).flatMap((key) =>
      lost(before[key], Object.hasOwn(after, key) ? after[key] : undefined, `${at}${key}`, told),
    );
  const same =
    before === after || (Array.isArray(before) && Array.isArray(after) && isSameSet(path, before, after));
  return same || isExcused(path, before, told) ? [] : [path];
}

/** A label that is named twice shows once. */
const isSameSet = (path: string, before: readonly Plain[], after: readonly Plain[]): boolean =>
  path === 'display.labels' && before.every((item) => after.includes(item));

/** Places whose content was lost without a word between the file's text and the text that was saved of it. */
export function lossesOf(
  file: string,
  saved: string,
  notes: Extract<Opened, { ok: true }>['notes'],
): string[] {
  const [before, after] = [readJson(file), readJson(saved)];
  if (!before.ok || !after.ok) throw new Error('not JSON');
  return lost(before.value, after.value, '', new Set(notes.map((note) => note.code)));
}
