import { memo, useMemo } from 'react';
import { useViewport } from 'reactflow';
import { frameOf, pageOf, ZONES_ACROSS, ZONES_DOWN } from '../drawing/frame';
import { useSheet } from './sheetStore';

const LETTERS = 'ABCDEF';

interface ZoneMark {
  readonly text: string;
  /** Middle of what is seen of the zone, and its far edge, along the border [screen px]. */
  readonly middle: number;
  readonly edge: number | null;
}

/**
 * Zones along one border of the view. They belong to the page, so they slide along when the sheet is moved; what lies
 * beyond the page belongs to the nearest zone.
 */
export function zonesAlong(
  count: number,
  nameOf: (k: number) => string,
  start: number,
  length: number,
  view: number,
): readonly ZoneMark[] {
  const marks: ZoneMark[] = [];
  for (let k = 0; k < count; k += 1) {
    const from = k === 0 ? 0 : Math.max(0, start + (length * k) / count);
    const to = k === count - 1 ? view : Math.min(view, start + (length * (k + 1)) / count);
    if (to - from < 12) continue;
    marks.push({ text: nameOf(k), middle: (from + to) / 2, edge: to < view ? to : null });
  }
  return marks;
}

/** Border of the sheet with zones 1 to 8 and A to F, standing at the edges of the view. */
export const Frame = memo(function Frame({
  width,
  height,
}: {
  readonly width: number;
  readonly height: number;
}) {
  const { x, y, zoom } = useViewport();
  const box = useSheet((state) => state.scene.box);
  // Before anything is drawn the page is what is seen.
  const isBlank = useSheet((state) => state.scene.units.length === 0);
  const { inner } = useMemo(() => frameOf(pageOf(box)), [box]);
  const [left, wide] = isBlank ? [0, width] : [inner.x * zoom + x, inner.w * zoom];
  const [top, high] = isBlank ? [0, height] : [inner.y * zoom + y, inner.h * zoom];
  const across = zonesAlong(ZONES_ACROSS, (k) => `${k + 1}`, left, wide, width);
  const down = zonesAlong(ZONES_DOWN, (k) => LETTERS[k]!, top, high, height);
  return (
    <div className="frame" aria-hidden="true">
      {(['top', 'bottom'] as const).map((side) => (
        <div key={side} className="zones" data-side={side}>
          {across.map((mark) => (
            <span key={mark.text} style={{ left: mark.middle }}>
              {mark.text}
            </span>
          ))}
          {across.map((mark) =>
            mark.edge === null ? null : <i key={mark.text} style={{ left: mark.edge }} />,
          )}
        </div>
      ))}
      {(['left', 'right'] as const).map((side) => (
        <div key={side} className="zones" data-side={side}>
          {down.map((mark) => (
            <span key={mark.text} style={{ top: mark.middle }}>
              {mark.text}
            </span>
          ))}
          {down.map((mark) => (mark.edge === null ? null : <i key={mark.text} style={{ top: mark.edge }} />))}
        </div>
      ))}
    </div>
  );
});
