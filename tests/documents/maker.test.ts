import { readFileSync } from 'node:fs';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { CANCELLED, createMaker, type DocumentWorker } from '../../src/app/export/maker';
import { makeDocument } from '../../src/documents/make';
import type { DocumentOrder, FromDocuments, ToDocuments } from '../../src/documents/messages';
import { readXlsx } from '../report/readXlsx';
import { solvedExample } from '../report/solved';

class StandIn implements DocumentWorker {
  onmessage: DocumentWorker['onmessage'] = null;
  onerror: DocumentWorker['onerror'] = null;
  readonly heard: ToDocuments[] = [];
  ended = false;
  postMessage(message: ToDocuments): void {
    this.heard.push(message);
  }
  terminate(): void {
    this.ended = true;
  }
  say(message: FromDocuments): void {
    this.onmessage?.({ data: message } as MessageEvent<FromDocuments>);
  }
}
const order = { what: 'csv', fonts: '' } as unknown as DocumentOrder;
const nothing = (): void => undefined;

function maker() {
  const workers: StandIn[] = [];
  const made = createMaker(() => {
    const worker = new StandIn();
    workers.push(worker);
    return worker;
  });
  return { workers, made };
}

describe('the page’s side of the documents’ worker', () => {
  test('keeps one worker for many orders and gives each its own answer', async () => {
    const { workers, made } = maker();
    const shares: number[] = [];
    const one = made.make(order, (_, share) => shares.push(share));
    const two = made.make(order, nothing);
    expect(workers.length).toBe(1);
    workers[0]?.say({ say: 'progress', job: 1, doing: 'x', share: 0.5 });
    workers[0]?.say({ say: 'made', job: 2, bytes: new Uint8Array([2]), type: 'b' });
    workers[0]?.say({ say: 'made', job: 1, bytes: new Uint8Array([1]), type: 'a' });
    expect((await one.made).type).toBe('a');
    expect((await two.made).type).toBe('b');
    expect(shares).toEqual([0.5]);
  });

  test('cancelling ends the worker, and the next order starts another', async () => {
    const { workers, made } = maker();
    const one = made.make(order, nothing);
    one.cancel();
    await expect(one.made).rejects.toThrow(CANCELLED);
    expect(workers[0]?.ended).toBe(true);
    const two = made.make(order, nothing);
    workers[0]?.say({ say: 'made', job: 2, bytes: new Uint8Array(), type: 'late' });
    workers[1]?.say({ say: 'made', job: 2, bytes: new Uint8Array(), type: 'new' });
    expect((await two.made).type).toBe('new');
  });

  test('cancelling one order begins the others again in the next worker', async () => {
    const { workers, made } = maker();
    const one = made.make(order, nothing);
    const two = made.make({ ...order, what: 'json' }, nothing);
    one.cancel();
    await expect(one.made).rejects.toThrow(CANCELLED);
    expect(workers[1]?.heard).toEqual([{ say: 'make', job: 2, order: { ...order, what: 'json' } }]);
    workers[1]?.say({ say: 'made', job: 2, bytes: new Uint8Array([2]), type: 'b' });
    expect((await two.made).type).toBe('b');
  });

  test('cancelling what is made already leaves the worker alone', async () => {
    const { workers, made } = maker();
    const one = made.make(order, nothing);
    workers[0]?.say({ say: 'made', job: 1, bytes: new Uint8Array(), type: 'a' });
    await one.made;
    one.cancel();
    expect(workers[0]?.ended).toBe(false);
  });

  test('a failure is told with its reason, a broken worker is replaced', async () => {
    const { workers, made } = maker();
    const one = made.make(order, nothing);
    workers[0]?.say({ say: 'failed', job: 1, message: 'no font' });
    await expect(one.made).rejects.toThrow('no font');
    const two = made.make(order, nothing);
    workers[0]?.onerror?.({ message: 'out of memory' } as ErrorEvent);
    await expect(two.made).rejects.toThrow('out of memory');
    made.make(order, nothing).made.catch(nothing);
    expect(workers.length).toBe(2);
  });
});

describe('making a document', () => {
  afterEach(() => vi.unstubAllGlobals());
  /** The folder of the shipped font, as the page serves it. */
  const serveFonts = (): void => {
    vi.stubGlobal(
      'fetch',
      async (address: string) => new Response(readFileSync(`public/${address}`) as BodyInit),
    );
  };

  // First: a font that came once is kept.
  test('a font that does not come is told, not left out of the drawing', async () => {
    vi.stubGlobal('fetch', async () => new Response('', { status: 404 }));
    const input = await solvedExample('let-down.sketch.json');
    await expect(makeDocument({ what: 'svg', input, fonts: 'nowhere' }, nothing)).rejects.toThrow(
      'SourceSans3-Regular.ttf: 404',
    );
  });

  test('gives spreadsheet, CSV, results and drawing of one answer, and says what it is doing', async () => {
    const input = await solvedExample('let-down.sketch.json');
    serveFonts();
    const said: string[] = [];
    const make = (what: DocumentOrder['what']) =>
      makeDocument({ what, input, fonts: 'fonts', seconds: 0.25 }, (doing) => said.push(doing));
    const text = async (what: DocumentOrder['what']) => new TextDecoder().decode((await make(what)).bytes);
    expect(readXlsx((await make('xlsx')).bytes).length).toBeGreaterThan(10);
    expect(await text('csv')).toContain('Stream summary');
    expect(JSON.parse(await text('json'))).toMatchObject({ format: 'splitwright.results', seconds: 0.25 });
    expect(await text('svg')).toContain('PV-1');
    expect(said).toContain('Writing the tables');
  });

  test('an answer goes through the worker’s line unharmed', async () => {
    const input = await solvedExample('let-down.sketch.json');
    const { kinds: _, ...plain } = input;
    const posted = structuredClone(plain);
    const bytes = async (of: typeof plain) =>
      (await makeDocument({ what: 'csv', input: of, fonts: '' }, nothing)).bytes;
    expect(Buffer.from(await bytes(posted)).equals(Buffer.from(await bytes(plain)))).toBe(true);
  });
});
