import 'fake-indexeddb/auto';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import type { Sketch } from '../../src/sketch/types';
import { SketchStorage, statesToDrop } from '../../src/store/autosave';

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

test('nothing is dropped while there are twenty states or fewer', () => {
  expect(statesToDrop(Array.from({ length: 20 }, (_, k) => ({ counter: k, at: k })))).toEqual([]);
});
