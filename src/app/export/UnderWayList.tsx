import { useStore } from 'zustand';
import { documentsUnderWay } from './underWay';
import './documents.css';

/** What is being made, how far it is, and a way to give it up; nothing while nothing is. */
export function UnderWayList() {
  const all = useStore(documentsUnderWay, (state) => state.all);
  if (all.length === 0) return null;
  return (
    <section className="under-way" aria-label="Documents being made">
      {all.map(({ key, name, doing, share, askedFrom, cancel }) => (
        <p className="foot-line" key={key} data-making={name}>
          <label>
            {name}: {doing} … <progress value={share} max={1} aria-label={`Making: ${name}`} />
          </label>
          <button
            type="button"
            className="button line"
            title="Cancel (Esc)"
            onClick={() => {
              cancel();
              if (askedFrom instanceof HTMLElement && askedFrom.isConnected) askedFrom.focus();
            }}
          >
            Cancel
          </button>
        </p>
      ))}
    </section>
  );
}
