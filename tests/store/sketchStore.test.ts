import { describe, expect, test } from 'vitest';
import type { Sketch } from '../../src/sketch/types';
import { createSketchStore } from '../../src/store/sketchStore';

const blank: Sketch = {
  format: 'splitwright.sketch',
  version: 1,
  id: 'a',
  title: { title: 'zero' },
  site: {},
  chemicals: [],
  model: { kind: 'peng-robinson', bankPairs: true, pairs: [] },
  units: [],
  streams: [],
  display: { set: 'metric', labels: [] },
  notes: [],
};
const named =
  (title: string) =>
  (sketch: Sketch): Sketch => ({ ...sketch, title: { ...sketch.title, title } });
const title = (store: ReturnType<typeof createSketchStore>) => store.getState().sketch.title.title;

describe('the sketch store', () => {
  test('undoes and redoes one entry at a time and names what it undoes', () => {
    const store = createSketchStore(blank);
    store.apply('rename to one', named('one'));
    store.apply('rename to two', named('two'));
    expect(store.undo()).toBe('rename to two');
    expect(title(store)).toBe('one');
    expect(store.undo()).toBe('rename to one');
    expect(store.undo()).toBeUndefined();
    expect(title(store)).toBe('zero');
    expect(store.redo()).toBe('rename to one');
    expect(title(store)).toBe('one');
  });

  test('drops what was undone once something new is done', () => {
    const store = createSketchStore(blank);
    store.apply('one', named('one'));
    store.undo();
    store.apply('two', named('two'));
    expect(store.redo()).toBeUndefined();
    expect(title(store)).toBe('two');
  });

  test('keeps a gesture as one entry, whatever number of steps it took', () => {
    const edits: number[] = [];
    const store = createSketchStore(blank, (edit) => edits.push(edit));
    store.begin('slide');
    for (const step of ['a', 'b', 'c']) store.change(named(step));
    store.commit();
    expect(store.getState().past.map((entry) => entry.label)).toEqual(['slide']);
    expect(edits).toEqual([2, 3, 4]);
    store.undo();
    expect(title(store)).toBe('zero');
  });

  test('goes back to the document before a cancelled gesture and leaves no entry', () => {
    const store = createSketchStore(blank);
    store.begin('slide');
    store.change(named('a'));
    store.cancel();
    expect(title(store)).toBe('zero');
    expect(store.getState().past).toEqual([]);
  });

  test('leaves no entry for an edit that changes nothing', () => {
    const store = createSketchStore(blank);
    expect(store.apply('nothing', (sketch) => sketch)).toBe(false);
    expect(store.getState()).toMatchObject({ edit: 1, past: [] });
  });

  test('refuses edits while another tab holds the sketch', () => {
    const store = createSketchStore(blank);
    store.setWritable(false);
    expect(store.apply('one', named('one'))).toBe(false);
    expect(title(store)).toBe('zero');
  });
});
