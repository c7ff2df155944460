// @vitest-environment jsdom

import { expect, test } from 'vitest';
import { isMissing, tellMissing, watchLoading, watchMissing } from '../../src/app/missing';
import { createSession } from '../../src/store/session';

test.each([
  'Failed to fetch dynamically imported module: http://localhost/assets/write-x.js',
  'error loading dynamically imported module: http://localhost/assets/write-x.js',
  'Importing a module script failed.',
])('"%s" is a part of the page that could not be had', (message) => {
  expect(isMissing(new TypeError(message))).toBe(true);
});

test('an error of another kind is none', () => {
  expect(isMissing(new Error('font SourceSans3-Bold.ttf: 404'))).toBe(false);
  expect(isMissing('Importing a module script failed.')).toBe(false);
});

test.each([
  ['the build’s loader', () => window.dispatchEvent(new Event('vite:preloadError'))],
  ['a worker', tellMissing],
])('the page is outdated when %s tells of a missing part, until nobody listens any more', (_, tell) => {
  const session = createSession();
  const stop = watchMissing(session);
  expect(session.getState().outdated).toBe(false);
  tell();
  expect(session.getState().outdated).toBe(true);
  session.setState({ outdated: false });
  stop();
  tell();
  expect(session.getState().outdated).toBe(false);
});

test('a worker that is not loaded tells so, one that breaks within does not', () => {
  const session = createSession();
  const stop = watchMissing(session);
  const worker = watchLoading(new EventTarget() as Worker);
  worker.dispatchEvent(Object.assign(new Event('error'), { message: 'x is undefined' }));
  expect(session.getState().outdated).toBe(false);
  worker.dispatchEvent(new Event('error'));
  expect(session.getState().outdated).toBe(true);
  stop();
});
