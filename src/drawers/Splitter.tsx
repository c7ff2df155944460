import { useState, useSyncExternalStore } from 'react';
import { remember, remembered, type WindowClass, windowClass } from '../store/remembered';

const [LEAST, MOST, USUAL, SMALL] = [320, 560, 368, 304];

const onResize = (then: () => void): (() => void) => {
  window.addEventListener('resize', then);
  return () => window.removeEventListener('resize', then);
};

/** Drawers that begin with a width of their own have a place of their own in what is remembered. */
const keyOf = (at: WindowClass, usual: number): string =>
  usual === USUAL ? `drawer-width.${at}` : `drawer-width.${usual}.${at}`;

function stored(at: WindowClass, usual: number): number {
  const px = Number(remembered(keyOf(at, usual)));
  return px >= LEAST && px <= MOST ? px : usual;
}

export interface DrawerWidth {
  readonly px: number;
  /** What a double click goes back to. */
  readonly usual: number;
  /** Undefined on small screens, where the width is fixed. */
  readonly set: ((px: number) => void) | undefined;
}

/**
 * The drawer's width, remembered on this computer for each class of window width; fixed in small windows.
 *
 * @param usual  where it begins [px]
 */
export function useDrawerWidth(usual = USUAL): DrawerWidth {
  const at = useSyncExternalStore(onResize, () => windowClass(window.innerWidth));
  const key = keyOf(at, usual);
  const [chosen, setChosen] = useState({ key: '', px: 0 });
  if (at === 'small') return { px: SMALL, usual, set: undefined };
  return {
    px: chosen.key === key ? chosen.px : stored(at, usual),
    usual,
    set: (next) => {
      const px = Math.round(Math.min(MOST, Math.max(LEAST, next)));
      setChosen({ key, px });
      remember(key, String(px));
    },
  };
}

/** The drawer's inner edge: dragged, or stepped with the arrows. */
export function Splitter({ width }: { readonly width: DrawerWidth }) {
  const { set, px, usual } = width;
  if (!set) return null;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a splitter that moves has a value, which a rule has not
    <div
      className="splitter"
      role="separator"
      aria-orientation="vertical"
      aria-label="Width of the drawer"
      aria-valuenow={px}
      aria-valuemin={LEAST}
      aria-valuemax={MOST}
      tabIndex={0}
      onKeyDown={(event) => {
        const by = { ArrowLeft: 16, ArrowRight: -16 }[event.key];
        if (by === undefined) return;
        event.preventDefault();
        set(px + by);
      }}
      onDoubleClick={() => set(usual)}
      onPointerDown={(event) => {
        event.preventDefault();
        const element = event.currentTarget;
        const from = event.clientX + px;
        element.setPointerCapture?.(event.pointerId);
        const move = (e: PointerEvent): void => set(from - e.clientX);
        const up = (): void => element.removeEventListener('pointermove', move);
        element.addEventListener('pointermove', move);
        element.addEventListener('pointerup', up, { once: true });
        element.addEventListener('pointercancel', up, { once: true });
      }}
    />
  );
}
