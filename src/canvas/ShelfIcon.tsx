import { memo } from 'react';
import { fitIcon, iconOf } from '../drawing/symbols/icon';
import { Paths } from './Shapes';

const W = 30;
const H = 26;

/** A kind's symbol at the shelf's size. */
export const ShelfIcon = memo(function ShelfIcon({ kind }: { readonly kind: string }) {
  const icon = iconOf(kind);
  const { scale, view } = fitIcon(icon, W, H);
  return (
    <svg
      className="shelf-icon"
      viewBox={`${view.x} ${view.y} ${view.w} ${view.h}`}
      aria-hidden="true"
      style={{ '--back': 1 / scale } as React.CSSProperties}
    >
      <Paths shapes={icon.paths} />
    </svg>
  );
});
