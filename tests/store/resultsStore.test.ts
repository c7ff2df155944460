import { expect, test } from 'vitest';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { StreamResult, UnitResult } from '../../src/engine/network/types';
import { createResultsStore, drawnState, shownStream } from '../../src/store/resultsStore';

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

const solvedStream = (T_K: number) => ({ state: 'solved', T_K }) as unknown as StreamResult;
const solvedUnit: UnitResult = { kind: 'valve', state: 'solved' };
const ids = { s: 's' as StreamId, t: 't' as StreamId, u: 'u' as UnitId, v: 'v' as UnitId };
const batch = (streams: readonly (readonly [StreamId, StreamResult])[] = []) => ({
  streams,
  units: [],
  gone: [],
  findings: [],
});

/** Two streams and two units, solved as edit 1. */
function solvedOnce() {
  const store = createResultsStore();
  const [before, other] = [solvedStream(300), solvedStream(310)];
  store.take(
    1,
    true,
    {
      streams: [
        [ids.s, before],
        [ids.t, other],
      ],
      units: [
        [ids.u, solvedUnit],
        [ids.v, solvedUnit],
      ],
      gone: [],
      findings: [],
    },
    1,
  );
  return { store, before, other };
}
const streamOf = (store: ReturnType<typeof createResultsStore>, id: StreamId) =>
  shownStream(store.getState().streams.get(id));

test('results of the edit before stand for a short while, and are out of date as soon as a solve is slow', () => {
  const { store, before } = solvedOnce();
  expect(streamOf(store, ids.s)).toEqual({ result: before, outOfDate: false });
  store.at(2, ids.u);
  expect(streamOf(store, ids.s)).toEqual({ result: before, outOfDate: true });
  expect(drawnState(store.getState().units.get(ids.u))).toBe('out-of-date');
  expect(store.getState().closure).toBeNull();
});

test('what a slow solve has answered already is not out of date, and what it leaves unnamed stands again at its end', () => {
  const { store, other } = solvedOnce();
  const entry = store.getState().streams.get(ids.t);
  const now = solvedStream(320);
  store.take(2, false, batch([[ids.s, now]]), 1);
  store.at(2, ids.u);
  store.at(2, ids.v);
  expect(streamOf(store, ids.s)).toEqual({ result: now, outOfDate: false });
  expect(streamOf(store, ids.t)).toEqual({ result: other, outOfDate: true });
  store.take(2, true, batch(), 1);
  expect(streamOf(store, ids.s)).toEqual({ result: now, outOfDate: false });
  // The same record: nothing that shows it is drawn for nothing.
  expect(store.getState().streams.get(ids.t)).toBe(entry);
  expect(drawnState(store.getState().units.get(ids.v))).toBe('solved');
});

test('what was answered for an edit that was overtaken is out of date for the next slow one', () => {
  const { store } = solvedOnce();
  const now = solvedStream(320);
  store.take(2, false, batch([[ids.s, now]]), 1);
  store.at(3, ids.u);
  expect(streamOf(store, ids.s)).toEqual({ result: now, outOfDate: true });
  store.take(3, true, { ...batch(), gone: [{ stream: ids.t }] }, 1);
  expect(streamOf(store, ids.s)).toEqual({ result: now, outOfDate: false });
  expect(streamOf(store, ids.t)).toBeUndefined();
});

test.each(['stop', 'broke'] as const)(
  'after %s no older result passes for one of the newest edit, and the next answer brings them back',
  (end) => {
    const { store, before } = solvedOnce();
    for (const edit of [2, 3]) {
      store.take(edit, false, batch([[ids.t, solvedStream(330)]]), 1);
      store[end]('the column hangs');
      expect(streamOf(store, ids.s)).toEqual({ result: before, outOfDate: true });
      expect(streamOf(store, ids.t)?.outOfDate).toBe(true);
      expect(store.getState()).toMatchObject(
        end === 'stop' ? { stopped: true } : { trouble: 'the column hangs' },
      );
      store.take(edit, true, batch(), 1);
      expect(streamOf(store, ids.s)).toEqual({ result: before, outOfDate: false });
      expect(streamOf(store, ids.t)?.outOfDate).toBe(false);
      expect(store.getState()).toMatchObject({ stopped: false, trouble: null });
    }
  },
);
