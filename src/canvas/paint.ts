import type { CSSProperties } from 'react';
import type { Ink, PathShape } from '../drawing/types';

/** Inks of the drawing as the theme's custom properties. */
const PROPERTY: Readonly<Record<Ink, string>> = {
  ink: 'var(--ink)',
  ink2: 'var(--ink2)',
  ink3: 'var(--ink3)',
  hair: 'var(--hair)',
  rule: 'var(--rule)',
  paper: 'var(--paper)',
  accent: 'var(--accent)',
  caution: 'var(--caution)',
  'caution-wash': 'var(--cautionw)',
  beyond: 'var(--beyond)',
  'on-beyond': 'var(--onb)',
};

export const inkOf = (ink: Ink | 'none'): string => (ink === 'none' ? 'none' : PROPERTY[ink]);

/** Strokes keep about their weight on the screen while the sheet gets small: --back is 1 / zoom. */
const strokeWidth = (width: number): string =>
  width === 0 ? '0' : `max(${width}px, calc(${Math.min(width, 1.2)}px * var(--back, 1)))`;

export const pathStyle = (shape: PathShape): CSSProperties => ({
  fill: inkOf(shape.fill),
  stroke: shape.width === 0 ? 'none' : inkOf(shape.stroke),
  strokeWidth: strokeWidth(shape.width),
  ...(shape.dash ? { strokeDasharray: shape.dash } : {}),
});
