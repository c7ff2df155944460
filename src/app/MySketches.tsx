import { useCallback, useEffect, useState } from 'react';
import type { SketchHead, StoredState } from '../store/autosave';
import { useSketch, useStores } from '../store/react';
import { sayFileProblem } from '../wording';
import { Dialogue } from './Dialogue';
import { leaveFor, newSketch, showSketch } from './documents';
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

function Kept() {
  const stores = useStores();
  const openId = useSketch((state) => state.sketch.id);
  const [heads, setHeads] = useState<readonly SketchHead[] | null>(null);
  const [deleted, setDeleted] = useState<readonly SketchHead[]>([]);
  const [renamed, setRenamed] = useState<string | null>(null);
  const [said, setSaid] = useState('');

  const read = useCallback(async (): Promise<void> => {
    const storage = theStorage();
    if (!storage) return;
    setHeads(await storage.list());
    setDeleted(await storage.deleted());
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
  const rename = async (head: SketchHead, title: string): Promise<string> => {
    setRenamed(null);
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
    <>
      <ul className="sketch-list">
        {heads?.map((head) => (
          <li key={head.id} data-sketch={head.id}>
            {renamed === head.id ? (
              <input
                className="plain-field"
                aria-label={`New name of ${nameOf(head)}`}
                defaultValue={head.title}
                ref={(element) => element?.focus()}
                onKeyDown={(event) => {
                  if (event.key === 'Enter') act(() => rename(head, event.currentTarget.value.trim()));
                  if (event.key !== 'Escape') return;
                  event.preventDefault();
                  event.stopPropagation();
                  setRenamed(null);
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
            <Small words="Delete" of={head} onClick={() => act(() => deleteSketch(stores, head))} />
          </li>
        ))}
      </ul>
      {heads?.length === 0 ? <p className="muted">None yet. Every edit is kept here by itself.</p> : null}
      <p className="sketch-said" role="status">
        {said}
      </p>
      <p>
        <button type="button" className="button line" onClick={() => newSketch(stores)}>
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
                <Small
                  words="Undo"
                  of={head}
                  onClick={() =>
                    act(async () => {
                      await theStorage()?.bringBack(head.id);
                      return `${nameOf(head)} is back.`;
                    })
                  }
                />
                <Small
                  words="Delete for good"
                  of={head}
                  onClick={() =>
                    act(async () => {
                      await theStorage()?.remove(head.id);
                      return `${nameOf(head)} is gone for good.`;
                    })
                  }
                />
              </li>
            ))}
          </ul>
        </>
      ) : null}
    </>
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
    <button type="button" className="button line" aria-label={`${words}: ${nameOf(of)}`} onClick={onClick}>
      {words}
    </button>
  );
}

function PastStates() {
  const stores = useStores();
  const openId = useSketch((state) => state.sketch.id);
  const writable = useSketch((state) => state.writable);
  const [states, setStates] = useState<readonly StoredState[]>([]);
  const [trouble, setTrouble] = useState('');
  useEffect(() => {
    theStorage()
      ?.history(openId)
      .then(setStates, (error: unknown) => setTrouble(String(error)));
  }, [openId]);
  const bringBack = (state: StoredState): void => {
    const opened = openStored(state);
    if (!opened.ok) {
      setTrouble(`It cannot be shown: ${opened.problems.map(sayFileProblem).join(' ')}`);
      return;
    }
    stores.sketch.apply(`bring back the state of ${when(state.at)}`, () => opened.sketch);
    stores.session.setState({ over: 'none' });
  };
  return (
    <>
      <h3>Past states of this sketch</h3>
      <p className="muted">
        The last 20 and one of every hour. Bringing one back is an edit: it can be undone.
      </p>
      {trouble ? <p role="alert">{trouble}</p> : null}
      <ul className="sketch-list">
        {states.map((state) => (
          <li key={state.counter}>
            <span>
              {when(state.at)} <span className="muted">{state.label}</span>
            </span>
            <button
              type="button"
              className="button line"
              aria-label={`Bring back the state of ${when(state.at)}: ${state.label}`}
              disabled={!writable}
              onClick={() => bringBack(state)}
            >
              Bring back
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
