import { useState, useSyncExternalStore } from 'react';

const [LEAST, MOST, USUAL, SMALL] = [320, 560, 368, 304];
const SMALL_SCREEN_PX = 1100;
const KEY = 'splitwright.drawer-width';

const onResize = (then: () => void): (() => void) => {
  window.addEventListener('resize', then);
  return () => window.removeEventListener('resize', then);
};

function stored(): number | undefined {
  try {
    const px = Number(localStorage.getItem(KEY));
    return px >= LEAST && px <= MOST ? px : undefined;
  } catch (error) {
    if (error instanceof DOMException) return undefined;
    throw error;
  }
}

function remember(px: number): void {
  try {
    localStorage.setItem(KEY, String(px));
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
}

export interface DrawerWidth {
  readonly px: number;
  /** Undefined on small screens, where the width is fixed. */
  readonly set: ((px: number) => void) | undefined;
}

/** The drawer's width, remembered on this computer; fixed on small screens. */
export function useDrawerWidth(): DrawerWidth {
  const isSmall = useSyncExternalStore(onResize, () => window.innerWidth <= SMALL_SCREEN_PX);
  const [px, setPx] = useState(() => stored() ?? USUAL);
  if (isSmall) return { px: SMALL, set: undefined };
  return {
    px,
    set: (next) => {
      const within = Math.round(Math.min(MOST, Math.max(LEAST, next)));
      setPx(within);
      remember(within);
    },
  };
}

/** The drawer's inner edge: dragged, or stepped with the arrows. */
export function Splitter({ width }: { readonly width: DrawerWidth }) {
  const { set, px } = width;
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
      onDoubleClick={() => set(USUAL)}
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
