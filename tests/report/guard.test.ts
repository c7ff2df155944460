import { expect, test } from 'vitest';
import { guarded } from '../../src/report/guard';

// OWASP, "CSV injection": the characters with which a cell must not begin, from memory.
test.each([
  '=1+1',
  '+1',
  '-2+3',
  '@SUM(A1)',
  '\t=1',
  '\r=1',
  '\n=1',
  '\uFF1D1',
  '\uFF0B1',
  '\uFF0D1',
  '\uFF201',
])('the text %j does not begin like a formula any more', (text) => expect(guarded(text)).toBe(`'${text}`));

test.each(['Benzene', '\u2212 14.6 K', '3 = 3', ' =3', '', 'a\n=1'])('the text %j stays as it is', (text) =>
  expect(guarded(text)).toBe(text),
);
