import { memo } from 'react';
import { plainSymbol, SYMBOLS } from '../drawing/symbols/registry';
import { Paths } from './Shapes';

const W = 30;
const H = 26;

/** A kind's symbol at the shelf's size. */
export const ShelfIcon = memo(function ShelfIcon({ kind }: { readonly kind: string }) {
  const icon = Object.hasOwn(SYMBOLS, kind) ? SYMBOLS[kind]?.icon : undefined;
  const symbol = plainSymbol(kind);
  const box = icon ? { x: -32, y: -26, w: 64, h: 52 } : symbol.box;
  const scale = Math.min(W / box.w, H / box.h, 0.75);
  const [cx, cy] = [box.x + box.w / 2, box.y + box.h / 2];
  return (
    <svg className="shelf-icon" viewBox={`${-W / 2} ${-H / 2} ${W} ${H}`} aria-hidden="true">
      <g
        transform={`scale(${scale}) translate(${-cx} ${-cy})`}
        style={{ '--back': 1 / scale } as React.CSSProperties}
      >
        <Paths shapes={icon ?? symbol.paths} />
      </g>
    </svg>
  );
});
