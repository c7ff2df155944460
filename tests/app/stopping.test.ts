import { readFileSync } from 'node:fs';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { startSolving } from '../../src/app/solving';
import type { UnitId } from '../../src/engine/ids';
import type { SolveBatch } from '../../src/engine/network/types';
import type { FromWorker } from '../../src/protocol/messages';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import { createCompiledStore } from '../../src/store/compiledStore';
import type { Stores } from '../../src/store/react';
import { createResultsStore, drawnState } from '../../src/store/resultsStore';
import { createSession } from '../../src/store/session';
import { createSketchStore } from '../../src/store/sketchStore';
import type { SolverClient } from '../../src/store/solverClient';
import { Puppet } from '../store/puppet';

const valve = 'u2' as UnitId;
let stores: Stores;
let worker: Puppet;
let client: SolverClient;

beforeEach(async () => {
  vi.stubGlobal('window', {});
  vi.stubGlobal('document', { documentElement: { dataset: {} }, getElementById: () => null });
  vi.stubGlobal('requestAnimationFrame', () => 0);
  const opened = openSketch(readFileSync('public/examples/let-down.sketch.json', 'utf8'));
  if (!opened.ok) throw new Error('the example does not open');
  stores = {
    sketch: createSketchStore(opened.sketch),
    results: createResultsStore(),
    session: createSession(),
    compiled: createCompiledStore(),
  };
  worker = new Puppet();
  client = startSolving(stores, () => worker);
  await vi.waitFor(() => expect(solves()).toBe(1));
  worker.say(answer(1, { kind: 'valve', state: 'solved' }));
});
afterEach(() => client.close());

const solves = (): number => worker.got.filter(({ say }) => say === 'solve').length;
function answer(edit: number, result?: SolveBatch['units'][number][1]): FromWorker {
  const units: SolveBatch['units'] = result ? [[valve, result]] : [];
  return { say: 'results', edit, last: true, streams: [], units, gone: [], findings: [] };
}
const set = (P: string) => (sketch: Sketch) => ({
  ...sketch,
  units: sketch.units.map((u) => (u.kind === 'valve' ? { ...u, settings: { p: { P } } } : u)),
});
const moveLabel = (sketch: Sketch) => ({
  ...sketch,
  units: sketch.units.map((u) => ({ ...u, at: [u.at[0] + 8, u.at[1]] as const })),
});
const state = () => drawnState(stores.results.getState().units.get(valve));

test('a label that is moved while a solve runs makes no answer out of the one before', () => {
  stores.sketch.apply('pressure', set('6 bar'));
  expect(solves()).toBe(2);
  stores.sketch.apply('move', moveLabel);
  expect(solves()).toBe(2);
  expect(stores.results.getState().solvedEdit).toBe(1);
  worker.say(answer(2));
  expect(stores.results.getState().solvedEdit).toBe(3);
  stores.sketch.apply('move', moveLabel);
  expect(stores.results.getState().solvedEdit).toBe(4);
});

test('a solve that is stopped stays so until it is asked for again', () => {
  stores.sketch.apply('pressure', set('6 bar'));
  worker.say({ say: 'at', edit: 2, unit: valve });
  stores.results.stop();
  expect(worker.got.at(-1)).toEqual({ say: 'stop' });
  // What was on its way already.
  worker.say({ say: 'at', edit: 2, unit: valve });
  expect(stores.results.getState()).toMatchObject({ stopped: true, at: null, solvedEdit: 1 });
  expect(state()).toBe('out-of-date');
  stores.sketch.apply('move', moveLabel);
  expect(stores.results.getState()).toMatchObject({ stopped: true, solvedEdit: 1 });
  expect(solves()).toBe(2);

  stores.results.resume();
  expect(solves()).toBe(3);
  worker.say(answer(2));
  expect(stores.results.getState()).toMatchObject({ stopped: false, solvedEdit: 3 });
  expect(state()).toBe('solved');
});

test('the next edit solves on without being asked, and an answer that was too fast to be stopped counts', () => {
  stores.sketch.apply('pressure', set('6 bar'));
  stores.results.stop();
  stores.sketch.apply('pressure', set('5 bar'));
  expect(solves()).toBe(3);
  expect(stores.results.getState().stopped).toBe(false);

  stores.results.stop();
  worker.say(answer(3));
  expect(stores.results.getState()).toMatchObject({ stopped: false, solvedEdit: 3 });
  expect(state()).toBe('solved');
  expect(solves()).toBe(3);
});
