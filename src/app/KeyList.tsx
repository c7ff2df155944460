import { useState } from 'react';
import type { Action } from '../store/action';
import { useStores } from '../store/react';
import { Dialogue } from './Dialogue';

const GROUPS: Readonly<Record<Action['group'], string>> = {
  sketch: 'Sketch',
  edit: 'Edit',
  sheet: 'On the sheet',
  result: 'Results',
  view: 'View',
  help: 'Help',
};

/** All actions and their keys; typing filters, a click runs. */
export function KeyList({ actions }: { readonly actions: readonly Action[] }) {
  const stores = useStores();
  const [filter, setFilter] = useState('');
  const wanted = filter.toLowerCase();
  const shown = actions.filter((a) => `${a.label} ${a.keys.join(' ')}`.toLowerCase().includes(wanted));
  return (
    <Dialogue title="All actions and their keys">
      <label className="field-line">
        Find{' '}
        <input
          type="search"
          className="plain-field"
          value={filter}
          onChange={(event) => setFilter(event.target.value)}
        />
      </label>
      <div className="key-list">
        {(Object.keys(GROUPS) as Action['group'][]).map((group) => {
          const rows = shown.filter((a) => a.group === group);
          return rows.length === 0 ? null : (
            <section key={group}>
              <h3>{GROUPS[group]}</h3>
              <ul>
                {rows.map((action) => (
                  <li key={action.id}>
                    <button
                      type="button"
                      className="link plain"
                      onClick={() => {
                        stores.session.setState({ over: 'none' });
                        if (action.when?.(stores) ?? true) action.run(stores);
                      }}
                    >
                      {action.label}
                    </button>
                    <kbd>{action.keys.join(' or ')}</kbd>
                  </li>
                ))}
              </ul>
            </section>
          );
        })}
        {shown.length === 0 ? <p className="muted">No action has these words.</p> : null}
      </div>
    </Dialogue>
  );
}
