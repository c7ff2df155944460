import type { Omitted, Scene } from '../drawing/types';
import type { Quiet } from './sheetStore';

export { steadyScale } from '../drawing/textScale';

/** Below this zoom only symbols, tags and lines stay. */
export const SMALL = 0.3;

const ALL_CLEAR: Quiet = { labels: new Set(), diamonds: new Set(), duties: false };

/** What steps back at a zoom: under 30 % everything but symbols, tags and lines. Above, the scene itself leaves off what has no room. */
export function quietAt(scene: Scene, zoom: number): Quiet {
  if (zoom >= SMALL) return ALL_CLEAR;
  const all = new Set(scene.lines.map((line) => line.stream));
  return { labels: all, diamonds: all, duties: true };
}

/** Of what the scene leaves off for want of room: what would be shown at this zoom, had it room. */
export const missed = (omitted: readonly Omitted[], { labels, duties }: Quiet): readonly Omitted[] =>
  omitted.filter((one) => {
    if (one.what === 'label') return !labels.has(one.stream);
    return one.what === 'tag' || !duties;
  });
