import { useEffect, useMemo, useRef, useState } from 'react';
import { sheetOf } from '../../canvas/handle';
import type { Stores } from '../../store/react';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { Dialogue } from '../Dialogue';
import { findThings, type Target, thingsOf } from './things';
import './find.css';

/** Selects what was found, opens its drawer, brings it to the middle of the sheet and gives it the keyboard. */
export function goTo(stores: Stores, target: Target): void {
  const { session } = stores;
  session.setState({ over: 'none' });
  if ('chemical' in target) {
    session.enterDrawer({ is: 'chemicals' });
    return;
  }
  if ('unit' in target) session.select([target.unit]);
  else session.select([], [target.stream]);
  // Once the dialogue has gone, which gives the keyboard back to where it was, and the drawer has taken its width.
  setTimeout(() => {
    session.centre(target);
    sheetOf(stores)?.focus(target);
  });
}

/** Typing narrows the list, Enter takes the first, the arrows walk through it. */
export function FindDialogue() {
  const stores = useStores();
  const sketch = useSketch((state) => state.sketch);
  const chemicals = useCompiled((state) => state.basis?.chemicals);
  const [text, setText] = useState('');
  const things = useMemo(() => thingsOf(sketch, chemicals ?? []), [sketch, chemicals]);
  const found = findThings(things, text);
  const field = useRef<HTMLInputElement>(null);
  // Once the dialogue stands: it gives the focus to its first button.
  useEffect(() => field.current?.focus(), []);

  const walk = (event: React.KeyboardEvent<HTMLElement>): void => {
    if (event.key !== 'ArrowDown' && event.key !== 'ArrowUp') return;
    event.preventDefault();
    const items = [...event.currentTarget.querySelectorAll<HTMLElement>('input, li button')];
    const at = items.indexOf(document.activeElement as HTMLElement);
    items[Math.max(0, Math.min(items.length - 1, at + (event.key === 'ArrowDown' ? 1 : -1)))]?.focus();
  };

  return (
    <Dialogue title="Find on the sheet">
      {/* biome-ignore lint/a11y/noStaticElementInteractions: arrows walk from the field to its answers */}
      <div className="find" onKeyDown={walk}>
        <label className="field-line">
          Tag, stream or component{' '}
          <input
            type="search"
            className="plain-field"
            ref={field}
            value={text}
            onChange={(event) => setText(event.target.value)}
            onKeyDown={(event) => {
              const [first] = found;
              if (event.key !== 'Enter' || text.trim() === '' || !first) return;
              event.preventDefault();
              goTo(stores, first.target);
            }}
          />
        </label>
        <ul className="find-list">
          {found.map(({ target, name, about }) => (
            <li key={Object.entries(target).join()}>
              <button type="button" className="link plain" onClick={() => goTo(stores, target)}>
                {name} <span className="muted">{about}</span>
              </button>
            </li>
          ))}
        </ul>
        <p className="unseen" role="status">
          {text.trim() === '' ? '' : `${found.length} found`}
        </p>
        {found.length === 0 ? (
          <p className="muted">
            {things.length === 0 ? 'There is nothing on the sheet yet.' : 'Nothing here goes by these words.'}
          </p>
        ) : null}
      </div>
    </Dialogue>
  );
}
