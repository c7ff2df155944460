import 'fake-indexeddb/auto';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { createHolding } from '../../src/app/holding';
import { type Keeping, keepSketches } from '../../src/app/keeping';
import { openStored } from '../../src/app/stored';
import { emptySketch } from '../../src/sketch/fresh';
import type { Sketch } from '../../src/sketch/types';
import { SketchStorage } from '../../src/store/autosave';
import { createCompiledStore } from '../../src/store/compiledStore';
import type { Stores } from '../../src/store/react';
import { createResultsStore } from '../../src/store/resultsStore';
import { createSession } from '../../src/store/session';
import { createSketchStore } from '../../src/store/sketchStore';
import { fakeBrowser } from '../app/tabs';

interface Tab extends Keeping {
  readonly stores: Stores;
  name(): string | undefined;
  rename(title: string): boolean;
  state(): string;
  readonly remembered: string[];
}

let storage: SketchStorage;
let means: ReturnType<typeof fakeBrowser>;
let run = 0;
beforeEach(async () => {
  run += 1;
  storage = await SketchStorage.open(`tabs-${run}`);
  means = fakeBrowser();
});
afterEach(() => storage.close());

const named =
  (title: string) =>
  (sketch: Sketch): Sketch => ({ ...sketch, title: { ...sketch.title, title } });
const first: Sketch = { ...emptySketch('a'), chemicals: ['methane'], title: { title: 'zero' } };

/** A tab that shows a sketch: the one given, or the stored one. */
async function tab(
  show: Sketch | 'stored' = 'stored',
  { asleep = false, over = storage }: { asleep?: boolean; over?: SketchStorage } = {},
): Promise<Tab> {
  const stored = show === 'stored' ? await storage.latest('a') : undefined;
  const opened = stored && openStored(stored);
  const sketch = opened?.ok ? opened.sketch : show === 'stored' ? emptySketch('fresh') : show;
  const stores: Stores = {
    sketch: createSketchStore(sketch),
    results: createResultsStore(),
    session: createSession(),
    compiled: createCompiledStore(),
  };
  const remembered: string[] = [];
  const keeping = keepSketches(
    stores,
    over,
    (holder) => createHolding(holder, means(asleep)),
    (id) => remembered.push(id),
  );
  await keeping.settled();
  return {
    ...keeping,
    stores,
    remembered,
    name: () => stores.sketch.getState().sketch.title.title,
    rename: (title) => stores.sketch.apply(`rename to ${title}`, named(title)),
    state: () => stores.session.getState().saved.state,
  };
}
const labels = async (): Promise<string[]> =>
  (await storage.history('a')).map((state) => state.label).reverse();

describe('two tabs on one sketch', () => {
  test('the second may read it; opening it there writes nothing', async () => {
    const one = await tab(first);
    one.rename('one');
    await one.settled();
    const two = await tab();
    expect([two.name(), two.state(), two.rename('mine')]).toEqual(['one', 'read-only', false]);
    one.rename('two');
    await one.settled();
    expect(one.state()).toBe('saved');
    expect(await labels()).toEqual(['open', 'rename to one', 'rename to two']);
  });

  test('taking over shows what the other stored last, also what was under its hand, and both go on from there', async () => {
    const one = await tab(first);
    const two = await tab();
    one.rename('one');
    one.stores.sketch.begin('slide');
    one.stores.sketch.change(named('under the hand'));
    await two.takeOver();
    expect(two.name()).toBe('under the hand');
    expect([one.state(), one.rename('x')]).toEqual(['read-only', false]);
    two.rename('two');
    await two.settled();
    expect(two.state()).toBe('saved');
    await one.takeOver();
    expect(one.name()).toBe('two');
    one.rename('three');
    await one.settled();
    expect([one.state(), two.state()]).toEqual(['saved', 'read-only']);
    expect((await storage.latest('a'))?.document.title.title).toBe('three');
  });

  test('from a tab that does not answer it is taken by force; what that tab does later overwrites nothing', async () => {
    const one = await tab(first, { asleep: true });
    const two = await tab();
    await two.takeOver();
    two.rename('two');
    await two.settled();
    await vi.waitFor(() => expect(one.state()).toBe('read-only'));
    expect(one.rename('late')).toBe(false);
    expect((await storage.latest('a'))?.document.title.title).toBe('two');
  });

  test('opened from the list where another tab holds it, it stays read only, and stays its own again afterwards', async () => {
    const one = await tab(first);
    const two = await tab({ ...emptySketch('b'), chemicals: ['ethane'] });
    const stored = await storage.latest('a');
    const opened = stored && openStored(stored);
    if (!opened?.ok) throw new Error('does not open');
    two.stores.sketch.open(opened.sketch);
    await two.settled();
    expect(two.state()).toBe('read-only');
    // And once more, which makes the document writable for a moment.
    two.stores.sketch.open({ ...opened.sketch });
    await two.settled();
    expect([two.state(), two.rename('mine')]).toEqual(['read-only', false]);
    one.rename('one');
    await one.settled();
    expect(one.state()).toBe('saved');
  });

  test('a stored state that another tab passed between reading and holding is not put back', async () => {
    const one = await tab(first);
    const before = await storage.latest('a');
    const opened = before && openStored(before);
    if (!opened?.ok) throw new Error('does not open');
    one.rename('newer');
    await one.settled();
    one.stores.sketch.open({ ...emptySketch('c'), chemicals: ['ethane'] });
    await one.settled();
    const two = await tab(opened.sketch);
    expect([two.name(), two.state()]).toEqual(['newer', 'saved']);
    two.rename('on top');
    await two.settled();
    expect(await labels()).toEqual(['open', 'rename to newer', 'rename to on top']);
  });
});

describe('what cannot be written', () => {
  /** A store that fails as long as it is told to. */
  const failing = (how: { why: 'storage-full' | 'throws' | '' }): SketchStorage =>
    new Proxy(storage, {
      get: (target, key) => {
        const value: unknown = Reflect.get(target, key, target);
        if (typeof value !== 'function') return value;
        if (key === 'save' && how.why === 'storage-full')
          return () => Promise.resolve({ ok: false, why: 'storage-full', detail: 'no room' });
        if (key === 'latest' && how.why === 'throws') return () => Promise.reject(new Error('gone'));
        return value.bind(target);
      },
    });

  test('is said once with the next steps, stays on the screen, and is written with the next edit that can be', async () => {
    const how: { why: 'storage-full' | 'throws' | '' } = { why: '' };
    const one = await tab(first, { over: failing(how) });
    how.why = 'storage-full';
    one.rename('one');
    await one.settled();
    expect(one.state()).toBe('failed');
    const { notice } = one.stores.session.getState();
    expect(notice?.steps?.map((step) => step.label)).toEqual(['Save as a file', 'Try again']);
    one.stores.session.dismiss();
    one.rename('two');
    await one.settled();
    expect(one.stores.session.getState().notice).toBeNull();
    expect([one.name(), one.state()]).toEqual(['two', 'failed']);
    how.why = '';
    notice?.steps?.[1]?.run();
    await one.settled();
    expect(one.state()).toBe('saved');
    expect((await storage.latest('a'))?.document.title.title).toBe('two');
  });

  test('a store that breaks while a sketch is opened is told, and does not end the saving for good', async () => {
    const how: { why: 'storage-full' | 'throws' | '' } = { why: 'throws' };
    const one = await tab(first, { over: failing(how) });
    expect(one.state()).toBe('failed');
    how.why = '';
    one.rename('one');
    await one.settled();
    expect(one.state()).toBe('saved');
    expect((await storage.latest('a'))?.document.title.title).toBe('one');
  });
});
