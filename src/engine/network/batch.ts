import type { StreamId, UnitId } from '../ids';
import type { Found, Memory } from './memory';
import type { Gone, SolveBatch, StreamResult, UnitResult } from './types';

/**
 * What changed since the last hand-out, told by identity. On the last batch also what is no more.
 * Mutates: memory.posted.
 */
export function batchOf(found: Found, memory: Memory, last = false): SolveBatch {
  const { posted } = memory;
  const streams: (readonly [StreamId, StreamResult])[] = [];
  const units: (readonly [UnitId, UnitResult])[] = [];
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
  const gone: readonly Gone[] = last
    ? [
        ...dropped(posted.streams, found.streams).map((stream) => ({ stream })),
        ...dropped(posted.units, found.units).map((unit) => ({ unit })),
      ]
    : [];
  return { streams, units, gone, findings: [] };
}

/** Takes out what is not found any more, and says which. Mutates: posted. */
function dropped<K>(posted: Map<K, unknown>, found: ReadonlyMap<K, unknown>): readonly K[] {
  const ids = [...posted.keys()].filter((id) => !found.has(id));
  for (const id of ids) posted.delete(id);
  return ids;
}
