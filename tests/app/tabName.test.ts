// @vitest-environment jsdom
import { expect, test } from 'vitest';
import { nameTab } from '../../src/app/tabName';

test('the tab goes by the name of its sketch, and by the page’s own where that has none', () => {
  document.title = 'Splitwright';
  const named = (sketch: string | undefined): string => {
    nameTab(sketch);
    return document.title;
  };
  expect([named('Let-down'), named(' '), named(undefined), named('Train 2')]).toEqual([
    'Let-down – Splitwright',
    'Splitwright',
    'Splitwright',
    'Train 2 – Splitwright',
  ]);
});
