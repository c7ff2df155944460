import { useEffect, useRef, useState } from 'react';
import type { Action } from '../store/action';
import { useStores } from '../store/react';
import { Dialogue } from './Dialogue';
import { WhyNot } from './WhyNot';

const GROUPS: Readonly<Record<Action['group'], string>> = {
  sketch: 'Sketch',
  edit: 'Edit',
  sheet: 'On the sheet',
  result: 'Results',
  view: 'View',
  help: 'Help',
};

const GROUP_NAMES = Object.keys(GROUPS) as readonly Action['group'][];

/** All actions and their keys; typing filters, Enter runs the first that is left, a click any. */
export function KeyList({ actions }: { readonly actions: readonly Action[] }) {
  const stores = useStores();
  const [filter, setFilter] = useState('');
  const wanted = filter.toLowerCase();
  const search = useRef<HTMLInputElement>(null);
  // Once the dialogue stands: it gives the focus to its first button.
  useEffect(() => search.current?.focus(), []);
  const isReady = (action: Action): boolean => action.when?.(stores) ?? true;
  const choose = (action: Action | undefined): void => {
    if (!action || !isReady(action)) return;
    stores.session.setState({ over: 'none' });
    action.run(stores);
  };
  const shown = actions.filter((a) => `${a.label} ${a.keys.join(' ')}`.toLowerCase().includes(wanted));
  return (
    <Dialogue title="All actions and their keys">
      <label className="field-line">
        Find{' '}
        <input
          type="search"
          className="plain-field"
          ref={search}
          value={filter}
          onChange={(event) => setFilter(event.target.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter' || wanted === '') return;
            event.preventDefault();
            choose(GROUP_NAMES.flatMap((group) => shown.filter((a) => a.group === group))[0]);
          }}
        />
      </label>
      <div className="key-list">
        {GROUP_NAMES.map((group) => {
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
                      disabled={!isReady(action)}
                      onClick={() => choose(action)}
                    >
                      {action.label}
                      <WhyNot action={action} />
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
