import type { Finding } from '../engine/outcome';
import { MODEL_KINDS } from './compiling/modelKinds';
import { decode } from './file/bytes';
import { checkJoints } from './file/joints';
import { MIGRATIONS, type Migration, migrate, oldest, VERSION } from './file/migrate';
import { placeUnits } from './file/place';
import { checkPlain } from './file/plain';
import { type FileProblem, Problems, typeName } from './file/problem';
import { checkShape } from './file/shape';
import { readJson } from './file/text';
import { evidence, finding, word } from './findings';
import { FORMAT, FRESH_DISPLAY, LABEL_KEYS } from './fresh';
import { isObject, type JsonObject, own } from './json';
import { hangingStreams, nextNoteId } from './naming';
import { KNOWN_KINDS, kindOf, type Registry } from './registry';
import type { Display, Json, LabelKey, Note, Sketch, SketchStream, SketchUnit } from './types';

export type { FileCode, FileProblem } from './file/problem';

/** A sketch with what was noticed on reading, or every reason why the file is none. */
export type Opened =
  | { readonly ok: true; readonly sketch: Sketch; readonly notes: readonly Finding[] }
  | { readonly ok: false; readonly problems: readonly [FileProblem, ...FileProblem[]] };

export interface OpenOptions {
  readonly registry?: Registry;
  /** Makes the id of a sketch that has none. */
  readonly newId?: () => string;
  readonly migrations?: readonly Migration[];
}

/**
 * Opens a sketch from the bytes of a file, its text or parsed data: a whole document with everything optional filled in, or every reason
 * with its place. Unknown fields, unknown kinds of unit and unknown models are kept. Never throws on any input.
 */
export function openSketch(source: unknown, options: OpenOptions = {}): Opened {
  const { registry = KNOWN_KINDS, newId = () => crypto.randomUUID(), migrations = MIGRATIONS } = options;
  const problems = new Problems();
  let raw = source;
  if (source instanceof Uint8Array) {
    const decoded = decode(source);
    if (!decoded.ok) return { ok: false, problems: [decoded.problem] };
    raw = decoded.text;
  }
  const wasText = typeof raw === 'string';
  if (typeof raw === 'string') {
    const read = readJson(raw);
    if (!read.ok) return { ok: false, problems: [read.problem] };
    raw = read.value;
  }
  if (!checkPlain(raw, problems)) return refused(problems);
  // Data that never was text may carry more than JSON can say: extra fields of lists, absent values.
  if (!wasText && raw !== undefined) raw = JSON.parse(JSON.stringify(raw));
  if (!isObject(raw)) {
    problems.add('', 'file/not-a-sketch', word('found', typeName(raw)));
    return refused(problems);
  }
  const version = versionOf(raw, oldest(migrations), problems);
  const migrated = version === undefined ? undefined : migrate(raw, version, problems, migrations);
  if (migrated === undefined) return refused(problems);
  const { document, steps } = migrated;
  checkShape(document, problems);
  if (problems.none) checkJoints(document, registry, problems);
  if (!problems.none) return refused(problems);
  return { ok: true, ...filled(document, registry, newId, steps) };
}

function refused(problems: Problems): Opened {
  const [first, ...rest] = problems.list();
  if (!first) throw new Error('refused without a reason');
  return { ok: false, problems: [first, ...rest] };
}

const formatWord = (format: Json | undefined): string =>
  format === undefined ? '' : typeof format === 'string' ? format : typeName(format);

function versionOf(raw: JsonObject, first: number, problems: Problems): number | undefined {
  const format = own(raw, 'format');
  const version = own(raw, 'version');
  if (format !== FORMAT) problems.add('format', 'file/not-a-sketch', word('found', formatWord(format)));
  else if (version === undefined) problems.add('version', 'file/missing');
  else if (typeof version !== 'number' || !Number.isInteger(version) || version < first)
    problems.wrongType('version', `whole number from ${first}`, version);
  else if (version > VERSION)
    problems.add('version', 'file/newer-version', evidence('found', version), evidence('known', VERSION));
  else return version;
  return undefined;
}

/** Fills what may be absent. Values that a solve would need are left open: they become assumptions, not text of the user's. */
function filled(
  raw: JsonObject,
  registry: Registry,
  newId: () => string,
  steps: readonly string[],
): { readonly sketch: Sketch; readonly notes: readonly Finding[] } {
  // Every field was checked by shape.ts; the rest is kept as it stands.
  const given = raw as unknown as Omit<Partial<Sketch>, 'units'> &
    Pick<Sketch, 'chemicals' | 'model' | 'streams'> & {
      readonly units: readonly (Omit<SketchUnit, 'at' | 'mirror' | 'byHand'> & {
        readonly at?: SketchUnit['at'];
        readonly mirror?: boolean;
        readonly byHand?: boolean;
      })[];
    };
  const notes: Finding[] = steps.map((what) => finding('sketch/migrated', 'note', {}, word('what', what)));
  const upright = given.units.map(({ mirror, byHand, ...unit }) => ({
    ...unit,
    ...(mirror === true ? { mirror } : {}),
    ...(byHand === true ? { byHand } : {}),
  }));
  const units = upright.every((u) => u.at !== undefined)
    ? (upright as readonly SketchUnit[])
    : placeUnits(upright, given.streams);
  const added = hangingStreams(units, given.streams, registry);
  const streams: readonly SketchStream[] = [...given.streams, ...added];
  for (const unit of units)
    if (!kindOf(registry, unit.kind))
      notes.push(finding('sketch/kind-not-available', 'caution', { unit: unit.id }, word('kind', unit.kind)));
  if (!MODEL_KINDS.some((kind) => kind === given.model.kind))
    notes.push(
      finding(
        'sketch/model-not-available',
        'caution',
        { path: 'model.kind' },
        word('kind', given.model.kind),
      ),
    );
  for (const stream of added)
    notes.push(finding('sketch/stream-added', 'note', { stream: stream.id }, word('number', stream.number)));
  for (const stream of given.streams)
    if (!stream.from && !stream.to)
      notes.push(finding('sketch/stream-without-ends', 'caution', { stream: stream.id }));
  const display = displayOf(given.display, notes);
  const sketch: Sketch = {
    ...(given as Partial<Sketch>),
    format: FORMAT,
    version: VERSION,
    id: given.id === undefined || given.id.trim() === '' ? newId() : given.id,
    title: given.title ?? {},
    site: given.site ?? {},
    chemicals: given.chemicals,
    model: given.model,
    units,
    streams,
    display,
    notes: notesOf(given.notes ?? []),
  };
  return { sketch, notes };
}

function displayOf(given: Partial<Display> | undefined, notes: Finding[]): Display {
  const isKnown = (label: LabelKey): boolean => LABEL_KEYS.includes(label);
  const labels = given?.labels ?? FRESH_DISPLAY.labels;
  for (const label of labels)
    if (!isKnown(label))
      notes.push(
        finding('sketch/label-not-available', 'note', { path: 'display.labels' }, word('label', label)),
      );
  return { ...FRESH_DISPLAY, ...given, labels: [...new Set(labels.filter(isKnown))] };
}

/** Notes are told apart by id; those without one, or with one that is taken, get the next free. */
function notesOf(given: readonly (Omit<Note, 'id'> & { readonly id?: string })[]): readonly Note[] {
  const named: Note[] = [];
  for (const note of given) {
    const free = note.id !== undefined && note.id !== '' && !named.some((n) => n.id === note.id);
    named.push({ ...note, id: free && note.id !== undefined ? note.id : nextNoteId([...named]) });
  }
  return named;
}
