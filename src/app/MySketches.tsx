import { useEffect, useState } from 'react';
import type { SketchHead, StoredState } from '../store/autosave';
import { useStores } from '../store/react';
import { Dialogue } from './Dialogue';
import { showSketch } from './documents';
import { theStorage } from './storage';

const when = (at: number): string =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short' }).format(at);

/** Sketches kept on this computer, and the past states of the open one. */
export function MySketches() {
  const stores = useStores();
  const [heads, setHeads] = useState<readonly SketchHead[] | null>(null);
  const [states, setStates] = useState<readonly StoredState[]>([]);
  const open = stores.sketch.getState().sketch;
  useEffect(() => {
    const storage = theStorage();
    void storage?.list().then(setHeads);
    void storage?.history(open.id).then(setStates);
  }, [open.id]);

  const show = async (id: string): Promise<void> => {
    const stored = await theStorage()?.latest(id);
    if (stored) showSketch(stores, stored.document);
  };
  if (!theStorage())
    return (
      <Dialogue title="Sketches on this computer">
        <p>This browser does not let the page store anything. Save sketches as files instead.</p>
      </Dialogue>
    );
  return (
    <Dialogue title="Sketches on this computer">
      <ul className="sketch-list">
        {heads?.map((head) => (
          <li key={head.id}>
            <button type="button" className="link plain" onClick={() => void show(head.id)}>
              {head.title || 'Untitled sketch'}
            </button>
            <span className="muted">
              {head.id === open.id ? 'open now, ' : ''}
              {when(head.at)}
            </span>
          </li>
        ))}
      </ul>
      {heads?.length === 0 ? <p className="muted">None yet. Every edit is kept here by itself.</p> : null}
      <h3>Past states of this sketch</h3>
      <ul className="sketch-list">
        {states.map((state) => (
          <li key={state.counter}>
            <span>
              {when(state.at)} <span className="muted">{state.label}</span>
            </span>
            <button
              type="button"
              className="button line"
              onClick={() => {
                stores.sketch.apply(`bring back the state of ${when(state.at)}`, () => state.document);
                stores.session.setState({ over: 'none' });
              }}
            >
              Bring back
            </button>
          </li>
        ))}
      </ul>
    </Dialogue>
  );
}
