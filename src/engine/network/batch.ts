import type { StreamId, UnitId } from '../ids';
import type { Found, Memory } from './memory';
import type { SolveBatch, StreamResult, UnitResult } from './types';

/**
 * What changed since the last hand-out, told by identity. On the last batch also the ids that are no more.
 * Mutates: memory.posted.
 */
export function batchOf(found: Found, memory: Memory, last = false): SolveBatch {
  const { posted } = memory;
  const streams: (readonly [StreamId, StreamResult])[] = [];
  const units: (readonly [UnitId, UnitResult])[] = [];
  const gone: string[] = [];
  for (const [id, result] of found.streams) {
    if (posted.streams.get(id) === result) continue;
    posted.streams.set(id, result);
    streams.push([id, result]);
  }
  for (const [id, result] of found.units) {
    if (posted.units.get(id) === result) continue;
    posted.units.set(id, result);
    units.push([id, result]);
  }
  if (last) {
    for (const kept of [posted.streams, posted.units] as const) {
      const wanted: ReadonlyMap<string, unknown> = kept === posted.streams ? found.streams : found.units;
      for (const id of kept.keys())
        if (!wanted.has(id)) {
          gone.push(id);
          (kept as Map<string, unknown>).delete(id);
        }
    }
  }
  return { streams, units, gone, findings: [] };
}
