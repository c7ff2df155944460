import { expect, test } from 'vitest';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { StreamResult, UnitResult } from '../../src/engine/network/types';
import { createResultsStore } from '../../src/store/resultsStore';

const waiting: StreamResult = { state: 'waiting' };
const unit: UnitResult = { kind: 'valve', state: 'waiting' };

test('what is gone takes away a unit or a stream, never the other of the same id', () => {
  const store = createResultsStore();
  const [s, u] = ['7' as StreamId, '7' as UnitId];
  store.take(1, true, { streams: [[s, waiting]], units: [[u, unit]], gone: [], findings: [] }, 1);
  store.take(2, true, { streams: [], units: [], gone: [{ unit: u }], findings: [] }, 1);
  expect(store.getState().units.has(u)).toBe(false);
  expect(store.getState().streams.get(s)).toEqual({ latest: waiting });
  store.take(3, true, { streams: [], units: [], gone: [{ stream: s }], findings: [] }, 1);
  expect(store.getState().streams.has(s)).toBe(false);
});
