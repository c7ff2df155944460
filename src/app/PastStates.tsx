import { useEffect, useState } from 'react';
import type { StoredState } from '../store/autosave';
import { useSketch, useStores } from '../store/react';
import { sayFileProblem } from '../wording';
import { theStorage } from './storage';
import { openStored } from './stored';

/** To the second: several edits of one minute often have the same name. */
const when = (at: number): string =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'medium' }).format(at);

/**
 * What each state is called, no two alike: when it was, and what was done; the count of the edit where that does not tell
 * them apart.
 */
export function stateNames(
  states: readonly Pick<StoredState, 'at' | 'label' | 'counter'>[],
): readonly { readonly time: string; readonly label: string }[] {
  const plain = states.map(({ at, label }) => ({ time: when(at), label }));
  const isTwice = (name: (typeof plain)[number]): boolean =>
    plain.filter(({ time, label }) => time === name.time && label === name.label).length > 1;
  return plain.map((name, k) =>
    isTwice(name) ? { ...name, label: `${name.label} (edit ${states[k]?.counter})` } : name,
  );
}

/** Past states of the open sketch, the newest first; each can be brought back as an edit. */
export function PastStates() {
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
  const names = stateNames(states);
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
        {states.map((state, k) => (
          <li key={state.counter}>
            <span>
              {names[k]?.time} <span className="muted">{names[k]?.label}</span>
            </span>
            <button
              type="button"
              className="button line"
              aria-label={`Bring back the state of ${names[k]?.time}: ${names[k]?.label}`}
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
