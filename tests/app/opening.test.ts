// @vitest-environment jsdom
import { readFileSync } from 'node:fs';
import { expect, test, vi } from 'vitest';
import { openAsNew, openExample, openFileOf } from '../../src/app/documents';
import { setStorage } from '../../src/app/storage';
import { letDown, makePage, sketchOf } from '../drawers/page';

const noticeOf = ({ stores }: ReturnType<typeof makePage>) => stores.session.getState().notice;

function fileOf(text: string, name = 'some.sketch.json'): File {
  const file = new File([text], name);
  file.arrayBuffer = async () => new TextEncoder().encode(text).buffer as ArrayBuffer;
  return file;
}

test('what a file has that this version cannot show is told when it opens, thing by thing', async () => {
  const page = makePage(letDown);
  const text = JSON.stringify({
    ...letDown,
    id: 'other',
    display: { set: 'metric', labels: ['temperature', 'colour'] },
    streams: letDown.streams.slice(0, 3),
  });
  await openFileOf(page.stores, fileOf(text));
  const notice = noticeOf(page);
  expect(notice?.title).toBe('some.sketch.json is open.');
  expect(notice?.lines.join('\n')).toMatch(/label “colour” is not available/);
  // The drum's liquid always has a stream; the file had none there.
  expect(notice?.lines.join('\n')).toMatch(/Stream 4 was added at an outlet/);
  expect(notice?.lines).toHaveLength(2);
});

test('a link or an example is told of alike, and nothing is said of a file that is whole', async () => {
  const page = makePage(letDown);
  openAsNew(
    page.stores,
    JSON.stringify({
      ...letDown,
      units: [...letDown.units, { id: 'u9', tag: 'X-1', kind: 'washer', settings: {} }],
    }),
    'The sketch in the link',
  );
  expect(noticeOf(page)?.title).toBe('The sketch in the link is open.');
  expect(noticeOf(page)?.lines[0]).toMatch(/“washer” is not available in this version; the unit is kept/);
  for (const name of [
    'let-down',
    'aromatic-condensate',
    'nitrogen-loop',
    'light-hydrocarbons',
    'condensate-flash',
  ]) {
    await openFileOf(page.stores, fileOf(readFileSync(`public/examples/${name}.sketch.json`, 'utf8')));
    expect([name, noticeOf(page)]).toEqual([name, null]);
  }
});

test('an example that cannot be had says so, and the sketch that is open stays', async () => {
  const page = makePage(letDown);
  const before = sketchOf(page);
  vi.stubGlobal('fetch', () => Promise.reject(new TypeError('Failed to fetch')));
  await openExample(page.stores, 'let-down.sketch.json');
  expect(noticeOf(page)?.lines).toEqual(['let-down.sketch.json: there is no network (Failed to fetch)']);
  vi.stubGlobal('fetch', async () => ({ ok: false, status: 404 }));
  await openExample(page.stores, 'let-down.sketch.json');
  expect(noticeOf(page)?.lines).toEqual(['let-down.sketch.json: 404']);
  expect(sketchOf(page)).toBe(before);
  vi.unstubAllGlobals();
});

test('a file that is larger than any sketch is not even read; one that cannot be read says so', async () => {
  const page = makePage(letDown);
  const before = sketchOf(page);
  const film = fileOf('', 'film.mp4');
  Object.defineProperty(film, 'size', { value: 3 * 2 ** 30 });
  const read = vi.spyOn(film, 'arrayBuffer');
  await openFileOf(page.stores, film);
  expect(read).not.toHaveBeenCalled();
  expect(noticeOf(page)?.title).toBe('film.mp4 was not opened; your sketch is untouched.');
  expect(noticeOf(page)?.lines).toEqual(['It has 3072 MB; no sketch has more than 16.']);

  const folder = fileOf('', 'folder');
  folder.arrayBuffer = () => Promise.reject(new DOMException('not readable', 'NotReadableError'));
  await openFileOf(page.stores, folder);
  expect(noticeOf(page)?.lines[0]).toMatch(/^The browser could not read it \(not readable\)/);
  expect(sketchOf(page)).toBe(before);
});

test('a store that breaks keeps no file from being opened', async () => {
  const page = makePage(letDown);
  const warned = vi.spyOn(console, 'warn').mockImplementation(() => undefined);
  setStorage({ latest: () => Promise.reject(new Error('broken')) } as never);
  await openFileOf(
    page.stores,
    fileOf(JSON.stringify({ ...letDown, id: 'other', title: { title: 'Mine' } })),
  );
  expect(sketchOf(page).title.title).toBe('Mine');
  expect(warned.mock.calls.flat().join()).toContain('broken');
  warned.mockRestore();
});
