import { useRef } from 'react';
import { useStores } from '../store/react';
import { capital, kindWord } from '../wording';
import { offeredKinds, takeOffer } from './pull';
import { ShelfIcon } from './ShelfIcon';
import { type Offer, useSheet, useSheetStore } from './sheetStore';

const PAUSE_MS = 900;

/** A stream let go on empty sheet, or ended by keys at no port: the units it could lead to. */
export function OfferMenu({
  toScreen,
}: {
  readonly toScreen: (at: readonly [number, number]) => { x: number; y: number };
}) {
  const stores = useStores();
  const sheet = useSheetStore();
  const offer = useSheet((state) => state.offer);
  const typed = useRef<{ text: string; at: number; offer: Offer | null }>({ text: '', at: 0, offer: null });
  if (!offer) return null;
  const { x, y } = toScreen(offer.at);
  const kinds = offeredKinds(offer.from.dir);
  const close = (): void => sheet.setState({ offer: null });
  /** Letters choose by the word they begin; a pause begins another word. */
  const find = (from: Element, letter: string): void => {
    const now = Date.now();
    const goesOn = typed.current.offer === offer && now - typed.current.at <= PAUSE_MS;
    const text = goesOn ? typed.current.text + letter : letter;
    typed.current = { text, at: now, offer };
    const items = [...from.querySelectorAll<HTMLElement>('[role=menuitem]')];
    items.find((item) => item.textContent?.toLowerCase().startsWith(text))?.focus();
  };
  const step = (from: Element, by: number): void => {
    const items = [...from.querySelectorAll<HTMLElement>('[role=menuitem]')];
    const at = items.indexOf(document.activeElement as HTMLElement);
    items[(at + by + items.length) % items.length]?.focus();
  };
  return (
    <div
      className="offer nokey nowheel nopan"
      role="menu"
      tabIndex={-1}
      aria-label={offer.from.dir === 'out' ? 'Where the stream leads' : 'Where the stream comes from'}
      style={{
        left: `min(${x}px, calc(100% - 168px))`,
        top: `clamp(0px, ${y}px, calc(100% - ${Math.min(320, 36 + 28 * kinds.length)}px))`,
      }}
      ref={focusFirst}
      onBlur={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget)) close();
      }}
      onKeyDown={(event) => {
        if (event.key === 'Escape') close();
        else if (event.key === 'ArrowDown') step(event.currentTarget, 1);
        else if (event.key === 'ArrowUp') step(event.currentTarget, -1);
        else if (/^[a-z]$/i.test(event.key) && !event.ctrlKey && !event.metaKey)
          find(event.currentTarget, event.key.toLowerCase());
        else return;
        event.preventDefault();
        event.stopPropagation();
      }}
    >
      <p>{offer.from.dir === 'out' ? 'Leads to' : 'Comes from'}</p>
      {kinds.map((kind) => (
        <button
          key={kind}
          type="button"
          role="menuitem"
          onClick={() => takeOffer(stores, sheet, offer, kind)}
        >
          <ShelfIcon kind={kind} />
          {capital(kindWord(kind))}
        </button>
      ))}
    </div>
  );
}

/** Made once, so that the focus moves there when the menu opens, and not with every view of it. */
const focusFirst = (element: HTMLElement | null): void =>
  element?.querySelector<HTMLElement>('[role=menuitem]')?.focus({ preventScroll: true });
