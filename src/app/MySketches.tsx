import { useCallback, useEffect, useRef, useState } from 'react';
import type { SketchHead } from '../store/autosave';
import { useSketch, useStores } from '../store/react';
import { sayFileProblem } from '../wording';
import { Dialogue } from './Dialogue';
import { leaveFor, newSketch, showSketch } from './documents';
import { PastStates } from './PastStates';
import { deleteSketch, duplicateSketch, renameSketch } from './shelving';
import { theStorage } from './storage';
import { openStored } from './stored';

const when = (at: number): string =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short' }).format(at);
const nameOf = (head: SketchHead): string => head.title || 'Untitled sketch';

/** Sketches kept on this computer, and the past states of the open one. */
export function MySketches() {
  const storage = theStorage();
  return (
    <Dialogue title="Sketches on this computer">
      {storage ? (
        <>
          <Kept />
          <PastStates />
        </>
      ) : (
        <p>This browser does not let the page store anything. Save sketches as files instead.</p>
      )}
    </Dialogue>
  );
}

interface Lists {
  readonly heads: readonly SketchHead[];
  readonly deleted: readonly SketchHead[];
}

/** A button of a row, by what it says: of a sketch on the list, or of a deleted one. */
type Button = readonly [row: 'sketch' | 'deleted', id: string, words: string];

/** The same button of the rows beside one, the next first. */
const beside = (rows: readonly SketchHead[], { id }: SketchHead, of: Button[0], words: string): Button[] => {
  const at = rows.findIndex((row) => row.id === id);
  return [rows[at + 1], rows[at - 1]].flatMap((row) => (row ? [[of, row.id, words] as const] : []));
};

/** A row that goes takes the focus with it: it is put on the first of these that is there once the lists are read anew. */
function useFocusAfter(lists: Lists | null, renamed: string | null) {
  const root = useRef<HTMLDivElement>(null);
  const wanted = useRef<readonly Button[] | null>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: it asks when the rows have changed
  useEffect(() => {
    if (!wanted.current) return;
    const buttons = [...(root.current?.querySelectorAll<HTMLElement>('[data-do]') ?? [])];
    const places = wanted.current.map(([row, id, words]) =>
      buttons.find((button) => button.dataset.do === words && button.closest('li')?.dataset[row] === id),
    );
    wanted.current = null;
    (places.find((place) => place !== undefined) ?? buttons.find((b) => b.dataset.do === 'New'))?.focus();
  }, [lists, renamed]);
  const after = (...places: readonly Button[]): void => {
    wanted.current = places;
  };
  return { root, after };
}

function Kept() {
  const stores = useStores();
  const openId = useSketch((state) => state.sketch.id);
  const [lists, setLists] = useState<Lists | null>(null);
  const [renamed, setRenamed] = useState<string | null>(null);
  const [said, setSaid] = useState('');
  const { root, after } = useFocusAfter(lists, renamed);
  const { heads, deleted } = lists ?? { heads: [], deleted: [] };

  const read = useCallback(async (): Promise<void> => {
    const storage = theStorage();
    if (!storage) return;
    setLists({ heads: await storage.list(), deleted: await storage.deleted() });
  }, []);
  /** Does something to the list; what cannot be done is said where one looks. */
  const act = useCallback(
    (what: () => Promise<string>): void => {
      what()
        .catch(
          (error: unknown) => `That could not be done: ${error instanceof Error ? error.message : error}`,
        )
        .then(async (words) => {
          setSaid(words);
          await read();
        });
    },
    [read],
  );
  useEffect(() => act(async () => ''), [act]);

  const show = async (id: string): Promise<string> => {
    const stored = await theStorage()?.latest(id);
    if (!stored) return 'This sketch is no longer here.';
    const opened = openStored(stored);
    if (!opened.ok) return `It cannot be shown: ${opened.problems.map(sayFileProblem).join(' ')}`;
    leaveFor(stores, () => showSketch(stores, opened.sketch));
    return '';
  };
  const backToName = (head: SketchHead): void => {
    setRenamed(null);
    after(['sketch', head.id, 'Rename']);
  };
  const remove = async (head: SketchHead): Promise<string> => {
    const done = await deleteSketch(stores, head);
    // Where it was refused its own row is still there.
    after(['sketch', head.id, 'Delete'], ...beside(heads, head, 'sketch', 'Delete'));
    return done;
  };
  const bringBack = async (head: SketchHead): Promise<string> => {
    await theStorage()?.bringBack(head.id);
    after(['sketch', head.id, 'Delete']);
    return `${nameOf(head)} is back.`;
  };
  const removeForGood = async (head: SketchHead): Promise<string> => {
    await theStorage()?.remove(head.id);
    after(...beside(deleted, head, 'deleted', 'Delete for good'));
    return `${nameOf(head)} is gone for good.`;
  };
  const rename = async (head: SketchHead, title: string): Promise<string> => {
    backToName(head);
    if (title === '' || title === head.title) return '';
    if (head.id !== openId) return renameSketch(head, title);
    // The open one is renamed as an edit, so that it can be undone like any other.
    return stores.sketch.apply('rename the sketch', (sketch) => ({
      ...sketch,
      title: { ...sketch.title, title },
    }))
      ? `Renamed to ${title}.`
      : 'Another tab is editing this sketch; rename it there.';
  };

  return (
    <div ref={root}>
      <ul className="sketch-list">
        {heads.map((head) => (
          <li key={head.id} data-sketch={head.id}>
            {renamed === head.id ? (
              <input
                className="plain-field"
                aria-label={`New name of ${nameOf(head)}`}
                defaultValue={head.title}
                ref={(element) => element?.focus()}
                onKeyDown={(event) => {
                  if (event.key !== 'Enter' && event.key !== 'Escape') return;
                  // The button that has the focus next would take the key for its own.
                  event.preventDefault();
                  event.stopPropagation();
                  if (event.key === 'Enter') act(() => rename(head, event.currentTarget.value.trim()));
                  else backToName(head);
                }}
                onBlur={() => setRenamed(null)}
              />
            ) : (
              <button type="button" className="link plain" onClick={() => act(() => show(head.id))}>
                {nameOf(head)}
              </button>
            )}
            <span className="muted">
              {head.id === openId ? 'open now, ' : ''}
              {when(head.at)}
            </span>
            <Small words="Rename" of={head} onClick={() => setRenamed(head.id)} />
            <Small words="Duplicate" of={head} onClick={() => act(() => duplicateSketch(head))} />
            <Small words="Delete" of={head} onClick={() => act(() => remove(head))} />
          </li>
        ))}
      </ul>
      {lists && heads.length === 0 ? (
        <p className="muted">None yet. Every edit is kept here by itself.</p>
      ) : null}
      <p className="sketch-said" role="status">
        {said}
      </p>
      <p>
        <button type="button" className="button line" data-do="New" onClick={() => newSketch(stores)}>
          New sketch
        </button>
      </p>
      {deleted.length > 0 ? (
        <>
          <h3>Deleted, kept for 30 days</h3>
          <ul className="sketch-list">
            {deleted.map((head) => (
              <li key={head.id} data-deleted={head.id}>
                <span>{nameOf(head)}</span>
                <span className="muted">{when(head.gone ?? head.at)}</span>
                <Small words="Undo" of={head} onClick={() => act(() => bringBack(head))} />
                <Small words="Delete for good" of={head} onClick={() => act(() => removeForGood(head))} />
              </li>
            ))}
          </ul>
        </>
      ) : null}
    </div>
  );
}

function Small({
  words,
  of,
  onClick,
}: {
  readonly words: string;
  readonly of: SketchHead;
  readonly onClick: () => void;
}) {
  return (
    <button
      type="button"
      className="button line"
      data-do={words}
      aria-label={`${words}: ${nameOf(of)}`}
      onClick={onClick}
    >
      {words}
    </button>
  );
}
