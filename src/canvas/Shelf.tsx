import { useEffect, useState } from 'react';
import { plainSymbol } from '../drawing/symbols/registry';
import { useSession, useSketch, useStores } from '../store/react';
import './shelf.css';
import { drop, dropAt, place } from './drop';
import { sheetOf } from './handle';
import { follow } from './pointer';
import { Paths } from './Shapes';
import { ShelfIcon } from './ShelfIcon';
import { shelfGroups } from './shelfItems';

/** Pixels before a press becomes a drag. */
const SLACK = 4;
const NARROW = '(max-width: 1099px)';

interface Ghost {
  readonly kind: string;
  readonly x: number;
  readonly y: number;
}

function useNarrow(): boolean {
  const [narrow, setNarrow] = useState(() => matches(NARROW));
  useEffect(() => {
    const query = window.matchMedia?.(NARROW);
    if (!query) return;
    const read = (): void => setNarrow(query.matches);
    query.addEventListener('change', read);
    return () => query.removeEventListener('change', read);
  }, []);
  return narrow;
}

const matches = (query: string): boolean =>
  typeof window !== 'undefined' &&
  typeof window.matchMedia === 'function' &&
  window.matchMedia(query).matches;

/** Beside a wide drawer the shelf shows symbols alone, so that the sheet keeps at least so much [px]. */
const SHEET_AND_SHELF = 1040;

/** What can be put on the sheet: dragged there, or by a click or Enter beside what is selected. */
export function Shelf() {
  const stores = useStores();
  const narrow = useNarrow();
  const foldedByHand = useSession((state) => state.shelfFolded);
  const writable = useSketch((state) => state.writable);
  const isTight = useSession(
    ({ drawerPx }) => drawerPx > 0 && window.innerWidth - drawerPx < SHEET_AND_SHELF,
  );
  const folded = narrow || foldedByHand || isTight;
  const [typed, setTyped] = useState('');
  const [ghost, setGhost] = useState<Ghost | null>(null);
  const groups = shelfGroups(folded ? '' : typed);

  const put = (kind: string): void => {
    const unit = place(stores, kind);
    if (unit) setTimeout(() => sheetOf(stores)?.focus({ unit }), 0);
  };

  const press = (kind: string, event: React.PointerEvent): void => {
    if (event.button !== 0 || !writable) return;
    event.preventDefault();
    (event.currentTarget as HTMLElement).focus();
    const [x0, y0] = [event.clientX, event.clientY];
    let dragging = false;
    const show = ({ clientX: x, clientY: y }: PointerEvent): void => {
      if (!dragging && Math.hypot(x - x0, y - y0) < SLACK) return;
      dragging = true;
      const sheet = sheetOf(stores);
      const at = sheet?.toSheet(x, y);
      sheet?.store.setState({ dropping: at ? dropAt(stores, sheet.store, kind, at, sheet.zoom()) : null });
      setGhost(at ? null : { kind, x, y });
    };
    follow(show, (kept, last) => {
      if (kept && last) show(last);
      setGhost(null);
      const sheet = sheetOf(stores);
      const dropping = sheet?.store.getState().dropping;
      sheet?.store.setState({ dropping: null });
      if (!kept) return;
      if (!dragging) put(kind);
      else if (dropping) {
        const unit = drop(stores, dropping);
        if (unit) setTimeout(() => sheetOf(stores)?.focus({ unit }), 0);
      }
    });
  };

  return (
    <nav className="shelf folds" aria-label="Shelf" data-folded={folded || undefined}>
      {folded ? null : (
        <input
          className="shelf-find"
          type="search"
          placeholder="Find a unit"
          aria-label="Find a unit on the shelf"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
          onKeyDown={(event) => {
            const first = groups[0]?.items[0];
            if (event.key === 'Enter' && first) {
              put(first.kind);
              setTyped('');
            } else if (event.key === 'Escape') setTyped('');
          }}
        />
      )}
      {groups.map(({ group, word, items }) => (
        <section key={group} aria-label={word}>
          <h2>{word}</h2>
          {items.map((item) => (
            <button
              key={item.kind}
              type="button"
              className="shelf-row"
              data-shelf={item.kind}
              data-active={ghost?.kind === item.kind || undefined}
              disabled={!writable}
              title={folded ? item.word : undefined}
              aria-label={folded ? item.word : undefined}
              onPointerDown={(event) => press(item.kind, event)}
              // A pointer's click is handled when it is let go; this one comes from Enter, Space or assistive tools.
              onClick={(event) => {
                if (event.detail === 0) put(item.kind);
              }}
            >
              <ShelfIcon kind={item.kind} />
              <span>{item.word}</span>
            </button>
          ))}
        </section>
      ))}
      {groups.length === 0 ? <p className="shelf-none">No unit has this name.</p> : null}
      {ghost ? (
        <svg className="shelf-ghost" style={{ left: ghost.x, top: ghost.y }} aria-hidden="true">
          <Paths shapes={plainSymbol(ghost.kind).paths} />
        </svg>
      ) : null}
    </nav>
  );
}
