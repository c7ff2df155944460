import { readFileSync } from 'node:fs';
import { describe, expect, test, vi } from 'vitest';
import { inStep } from '../../src/app/inStep';
import { startSolving } from '../../src/app/solving';
import type { SolveBatch } from '../../src/engine/network/types';
import type { FromWorker } from '../../src/protocol/messages';
import { loadBankData } from '../../src/sketch/bank';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import { createCompiledStore } from '../../src/store/compiledStore';
import type { Stores } from '../../src/store/react';
import { createResultsStore } from '../../src/store/resultsStore';
import { createSession } from '../../src/store/session';
import { createSketchStore } from '../../src/store/sketchStore';
import { Puppet } from '../store/puppet';

function example(name: string): Sketch {
  const opened = openSketch(readFileSync(`public/examples/${name}.sketch.json`, 'utf8'));
  if (!opened.ok) throw new Error(name);
  return opened.sketch;
}
const storesOf = (sketch: Sketch): Stores => ({
  sketch: createSketchStore(sketch),
  results: createResultsStore(),
  session: createSession(),
  compiled: createCompiledStore(),
});

/** A bank that gives nothing away before it is told to. */
function slowBank() {
  const waiting: { readonly give: () => void; readonly fail: (why: string) => void }[] = [];
  const load: typeof loadBankData = (sketch, registry) =>
    new Promise((resolve, reject) => {
      waiting.push({
        give: () => void loadBankData(sketch, registry).then(resolve, reject),
        fail: (why) => reject(new Error(why)),
      });
    });
  return { load, waiting };
}

function solving(first: Sketch) {
  vi.stubGlobal('window', {});
  vi.stubGlobal('document', { documentElement: { dataset: {} }, getElementById: () => null });
  vi.stubGlobal('requestAnimationFrame', () => 0);
  const stores = storesOf(first);
  const [worker, bank] = [new Puppet(), slowBank()];
  const client = startSolving(stores, () => worker, bank.load);
  return { stores, worker, bank: bank.waiting, client };
}
const sentBy = ({ got }: Puppet) => got.filter((message) => message.say === 'solve').at(-1);
const answer = (edit: number, unit: string): FromWorker => {
  const { id } = { id: unit } as { id: SolveBatch['units'][number][0] };
  const batch: SolveBatch = {
    streams: [],
    units: [[id, { state: 'waiting' } as SolveBatch['units'][number][1]]],
    gone: [],
    findings: [],
  };
  return { say: 'results', edit, last: true, ...batch };
};

describe('a sketch opened while the data of its chemicals are on their way', () => {
  test('is documented with its own numbers, not with those compiled for the sketch before', async () => {
    const { stores, bank, client } = solving(example('let-down'));
    bank[0]?.give();
    await vi.waitFor(() => expect(stores.compiled.getState().edit).toBe(1));
    expect((await inStep(stores)).sketch.title.number).toBe('EX-D');

    stores.sketch.open(example('nitrogen-loop'));
    let done: Awaited<ReturnType<typeof inStep>> | undefined;
    const waited = inStep(stores).then((got) => {
      done = got;
    });
    await new Promise((go) => setTimeout(go, 20));
    expect(done).toBeUndefined();
    bank[1]?.give();
    await waited;
    expect(done?.sketch.title.number).toBe('EX-C');
    expect(done?.compiled.basis?.chemicals.map((c) => c.id)).toEqual(['nitrogen', 'oxygen', 'n-hexane']);
    client.close();
  });

  test('says so when they cannot be had, on the sheet and to a document that waits', async () => {
    const { stores, bank, client } = solving(example('let-down'));
    const waited = inStep(stores);
    bank[0]?.fail('no network');
    await expect(waited).rejects.toThrow(/could not be fetched.*no network/);
    expect(stores.results.getState().trouble).toMatch(/could not be fetched/);
    client.close();
  });

  test('can be waited for no longer', async () => {
    const { stores, client } = solving(example('let-down'));
    const end = new AbortController();
    const waited = inStep(stores, end.signal);
    end.abort(new Error('cancelled'));
    await expect(waited).rejects.toThrow('cancelled');
    client.close();
  });

  test('takes no late answer to the sketch before, whose units have the same ids', async () => {
    const { stores, worker, bank, client } = solving(example('let-down'));
    bank[0]?.give();
    await vi.waitFor(() => expect(sentBy(worker)).toBeDefined());
    worker.say(answer(1, 'u1'));
    expect(stores.results.getState().units.size).toBe(1);

    stores.results.clear();
    stores.sketch.open(example('nitrogen-loop'));
    worker.say(answer(1, 'u1'));
    expect(stores.results.getState().units.size).toBe(0);
    bank[1]?.give();
    await vi.waitFor(() => expect(sentBy(worker)?.problem.edit).toBe(2));
    worker.say(answer(2, 'u1'));
    expect(stores.results.getState().units.size).toBe(1);
    client.close();
  });

  test('a copy of a sketch is answered though it is the same problem as before', async () => {
    const first = example('let-down');
    const { stores, worker, bank, client } = solving(first);
    bank[0]?.give();
    await vi.waitFor(() => expect(sentBy(worker)).toBeDefined());
    worker.say(answer(1, 'u1'));
    stores.results.clear();
    stores.sketch.open({ ...first, id: 'another' });
    const sent = sentBy(worker);
    if (!sent) throw new Error('nothing was sent');
    worker.say(answer(sent.problem.edit, 'u1'));
    expect(stores.results.getState().units.size).toBe(1);
    client.close();
  });
});
