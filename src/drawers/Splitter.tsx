import { useState, useSyncExternalStore } from 'react';
import { remember, remembered, type WindowClass, windowClass } from '../store/remembered';

const [LEAST, MOST, USUAL, SMALL] = [320, 560, 368, 304];

const onResize = (then: () => void): (() => void) => {
  window.addEventListener('resize', then);
  return () => window.removeEventListener('resize', then);
};

function stored(at: WindowClass): number {
  const px = Number(remembered(`drawer-width.${at}`));
  return px >= LEAST && px <= MOST ? px : USUAL;
}

export interface DrawerWidth {
  readonly px: number;
  /** Undefined on small screens, where the width is fixed. */
  readonly set: ((px: number) => void) | undefined;
}

/** The drawer's width, remembered on this computer for each class of window width; fixed in small windows. */
export function useDrawerWidth(): DrawerWidth {
  const at = useSyncExternalStore(onResize, () => windowClass(window.innerWidth));
  const [chosen, setChosen] = useState(() => ({ at, px: stored(at) }));
  if (at === 'small') return { px: SMALL, set: undefined };
  return {
    px: chosen.at === at ? chosen.px : stored(at),
    set: (next) => {
      const px = Math.round(Math.min(MOST, Math.max(LEAST, next)));
      setChosen({ at, px });
      remember(`drawer-width.${at}`, String(px));
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
