import { useEffect, useRef, useState } from 'react';
import { Segmented } from '../parts/Segmented';
import { type Action, actingKeys, labelOf } from '../store/action';
import { useSession, useStores } from '../store/react';
import { setSingleKeys, WHAT_IS_OFF } from './actions/singleKeys';
import { Dialogue } from './Dialogue';
import { WhyNot } from './WhyNot';
import './keyList.css';

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
  const singleKeys = useSession((state) => state.singleKeys);
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
  const shown = actions.filter((a) =>
    `${labelOf(a, stores)} ${a.keys.join(' ')}`.toLowerCase().includes(wanted),
  );
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
      <SingleKeys are={singleKeys} />
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
                      {labelOf(action, stores)}
                      <WhyNot action={action} />
                    </button>
                    <Keys action={action} singleKeys={singleKeys} />
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

/** Keys that are turned off are named as such: one still finds what is there. */
function Keys({ action, singleKeys }: { readonly action: Action; readonly singleKeys: boolean }) {
  const acting = actingKeys(action, singleKeys);
  if (acting.length > 0 || action.keys.length === 0) return <kbd>{acting.join(' or ')}</kbd>;
  return <kbd>{action.keys.join(' or ')}: off</kbd>;
}

/** Whether letters, figures and marks run actions (WCAG 2.2, 2.1.4). */
function SingleKeys({ are }: { readonly are: boolean }) {
  const { session } = useStores();
  return (
    <div className="single-keys">
      <span aria-hidden="true">Single keys act</span>
      <Segmented
        label="Single keys act"
        options={[
          { value: 'on', text: 'on' },
          { value: 'off', text: 'off' },
        ]}
        value={are ? 'on' : 'off'}
        onChange={(value) => setSingleKeys(session, value === 'on')}
      />
      <p className="muted" role="status">
        {are
          ? 'Letters, figures and marks run actions without Ctrl or Alt. Kept in this browser.'
          : WHAT_IS_OFF}
      </p>
    </div>
  );
}
