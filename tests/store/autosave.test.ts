import 'fake-indexeddb/auto';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { Sketch } from '../../src/sketch/types';
import { KEEP_DELETED_MS, SketchStorage, statesToDrop } from '../../src/store/autosave';

const sketch = (id: string, title: string): Sketch => ({
  format: 'splitwright.sketch',
  version: 1,
  id,
  title: { title },
  site: {},
  chemicals: ['methane'],
  model: { kind: 'peng-robinson', bankPairs: true, pairs: [] },
  units: [],
  streams: [],
  display: { set: 'metric', labels: [] },
  notes: [],
});

let storage: SketchStorage;
let run = 0;
beforeEach(async () => {
  run += 1;
  storage = await SketchStorage.open(`test-${run}`);
});
afterEach(() => storage.close());

describe('sketches on this computer', () => {
  test('come back as they were last saved', async () => {
    const first = await storage.save(sketch('a', 'one'), 0, 'new', 1000);
    expect(first).toEqual({ ok: true, counter: 1 });
    await storage.save(sketch('a', 'two'), 1, 'rename', 2000);
    expect((await storage.latest('a'))?.document.title.title).toBe('two');
  });

  test('are put on the disk afterwards as they stand, also one that is not there', async () => {
    const open = vi.spyOn(IDBDatabase.prototype, 'transaction');
    await storage.save(sketch('a', 'one'), 0, 'new', 1000, 'relaxed');
    await storage.flush('a');
    await storage.flush('b');
    const asked = open.mock.calls.map(([, , options]) => options?.durability);
    open.mockRestore();
    expect(asked).toEqual(['relaxed', 'strict', 'strict']);
    expect((await storage.list()).map((head) => [head.id, head.counter])).toEqual([['a', 1]]);
    expect((await storage.latest('a'))?.document.title.title).toBe('one');
  });

  test('are not overwritten by a tab that has not seen the newest state', async () => {
    await storage.save(sketch('a', 'one'), 0, 'new', 1000);
    await storage.save(sketch('a', 'two'), 1, 'rename', 2000);
    expect(await storage.save(sketch('a', 'stale'), 1, 'rename', 3000)).toMatchObject({
      ok: false,
      why: 'newer-elsewhere',
    });
    expect((await storage.latest('a'))?.document.title.title).toBe('two');
  });

  test('keep the last twenty states and one an hour', async () => {
    for (let k = 0; k < 60; k += 1) await storage.save(sketch('a', `t${k}`), k, 'edit', k * 600_000);
    const kept = await storage.history('a');
    expect(kept.slice(0, 20).map((state) => state.counter)).toEqual(
      Array.from({ length: 20 }, (_, k) => 60 - k),
    );
    // Sixty states at ten-minute steps span ten hours; states 41..60 cover the last ones.
    const older = kept.slice(20).map((state) => state.counter);
    expect(older).toEqual([36, 30, 24, 18, 12, 6]);
  });

  test('are listed with the most recent first, and are gone when removed', async () => {
    await storage.save(sketch('a', 'A'), 0, 'new', 1);
    await storage.save(sketch('b', 'B'), 0, 'new', 2);
    expect((await storage.list()).map((head) => head.id)).toEqual(['b', 'a']);
    await storage.remove('b');
    expect((await storage.list()).map((head) => head.id)).toEqual(['a']);
    expect(await storage.history('b')).toEqual([]);
  });
});

describe('deleting', () => {
  test('takes a sketch off the list; it comes back with all its states', async () => {
    await storage.save(sketch('a', 'one'), 0, 'new', 1);
    await storage.save(sketch('a', 'two'), 1, 'rename', 2);
    await storage.markDeleted('a', 10);
    expect(await storage.list()).toEqual([]);
    expect((await storage.deleted()).map((head) => [head.id, head.gone])).toEqual([['a', 10]]);
    await storage.bringBack('a');
    expect((await storage.list()).map((head) => head.title)).toEqual(['two']);
    expect(await storage.deleted()).toEqual([]);
    expect(await storage.history('a')).toHaveLength(2);
  });

  test('is for good once a month has passed, and not before', async () => {
    await storage.save(sketch('a', 'A'), 0, 'new', 1);
    await storage.save(sketch('b', 'B'), 0, 'new', 2);
    await storage.markDeleted('a', 1000);
    await storage.tidy(1000 + KEEP_DELETED_MS);
    expect(await storage.deleted()).toHaveLength(1);
    await storage.tidy(1001 + KEEP_DELETED_MS);
    expect(await storage.deleted()).toEqual([]);
    expect(await storage.history('a')).toEqual([]);
    expect((await storage.list()).map((head) => head.id)).toEqual(['b']);
  });

  test('an edit to a deleted sketch puts it back on the list', async () => {
    await storage.save(sketch('a', 'one'), 0, 'new', 1);
    await storage.markDeleted('a', 2);
    expect(await storage.save(sketch('a', 'two'), 1, 'rename', 3)).toEqual({ ok: true, counter: 2 });
    expect((await storage.list()).map((head) => head.title)).toEqual(['two']);
  });
});

describe('a store that fails', () => {
  afterEach(() => {
    vi.restoreAllMocks();
  });

  test('full: says so, and keeps what was stored before', async () => {
    await storage.save(sketch('a', 'one'), 0, 'new', 1);
    vi.spyOn(IDBObjectStore.prototype, 'put').mockImplementation(() => {
      throw new DOMException('no room', 'QuotaExceededError');
    });
    expect(await storage.save(sketch('a', 'two'), 1, 'rename', 2)).toEqual({
      ok: false,
      why: 'storage-full',
      detail: 'no room',
    });
    vi.restoreAllMocks();
    expect((await storage.latest('a'))?.document.title.title).toBe('one');
    expect(await storage.save(sketch('a', 'two'), 1, 'rename', 3)).toEqual({ ok: true, counter: 2 });
  });

  test('closed under our hands: answers, and throws nothing', async () => {
    storage.close();
    expect(await storage.save(sketch('a', 'one'), 0, 'new', 1)).toMatchObject({
      ok: false,
      why: 'storage-denied',
    });
  });

  test('one that never answers counts as none', async () => {
    vi.spyOn(indexedDB, 'open').mockImplementation(() => new IDBOpenDBRequest());
    await expect(SketchStorage.open('silent', 20)).rejects.toThrow('does not answer');
  });
});

test('nothing is dropped while there are twenty states or fewer', () => {
  expect(statesToDrop(Array.from({ length: 20 }, (_, k) => ({ counter: k, at: k })))).toEqual([]);
});
