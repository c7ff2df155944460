import { piecesOf } from './nudge';
import type { Point } from './types';

/** Points where each line meets others at right angles. */
export function crossingsOf(lines: readonly (readonly Point[])[]): readonly (readonly Point[])[] {
  const out: Point[][] = lines.map(() => []);
  const pieces = piecesOf(lines);
  const downs = pieces.filter((p) => !p.across);
  for (const a of pieces) {
    if (!a.across) continue;
    for (const d of downs) {
      if (d.line === a.line || d.at < a.lo || d.at > a.hi || a.at < d.lo || a.at > d.hi) continue;
      out[a.line]!.push([d.at, a.at]);
      out[d.line]!.push([d.at, a.at]);
    }
  }
  return out;
}
