import { deflateSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { type LinkFault, linkOf, readLink } from '../../src/app/share/link';
import { openSketch } from '../../src/sketch/read';
import { writeSketch } from '../../src/sketch/write';
import { makeRandom } from '../robust/random';
import { exampleText, opened } from '../sketch/help';

const fault = (hash: string): LinkFault['code'] | 'none' => {
  const read = readLink(hash);
  return read.ok ? 'none' : read.fault.code;
};
const link = linkOf(opened(exampleText('let-down')));

describe('a sketch in a link', () => {
  test.each(['let-down', 'aromatic-condensate', 'nitrogen-loop'])(
    '%s comes back letter by letter',
    (name) => {
      const sketch = opened(exampleText(name));
      const read = readLink(linkOf(sketch));
      expect(read.ok && writeSketch(opened(read.text))).toBe(writeSketch(sketch));
    },
  );

  test('holds only what an address may carry as it is (RFC 3986, unreserved)', () => {
    expect(link).toMatch(/^#sketch=1\.[0-9a-z]+\.[0-9a-z]+\.[A-Za-z0-9_-]+$/);
  });

  test('texts of every script survive', () => {
    const sketch = { ...opened(exampleText('let-down')), title: { title: '蒸留 №1 “±” \ud83c\udf0a' } };
    const read = readLink(linkOf(sketch));
    expect(read.ok && opened(read.text).title.title).toBe(sketch.title.title);
  });

  test('that was cut anywhere is told from a whole one', () => {
    for (let length = '#sketch='.length; length < link.length; length += 1)
      expect(['cut', 'damaged']).toContain(fault(link.slice(0, length)));
    expect(fault(link.slice(0, -1))).toBe('cut');
  });

  test('with one letter altered or a piece added is refused (500 of seed 11)', () => {
    const random = makeRandom(11);
    const letters = [...'ABCXYZabcxyz0189-_'];
    for (let k = 0; k < 500; k += 1) {
      const at = random.whole('#sketch='.length, link.length - 1);
      const letter = random.of(letters);
      if (letter === link[at]) continue;
      expect(fault(link.slice(0, at) + letter + link.slice(at + 1))).not.toBe('none');
    }
    expect(fault(`${link}.`)).toBe('damaged');
    expect(fault(`${link}&utm=1`)).toBe('damaged');
  });

  test('of a later form says so', () => {
    expect(readLink('#sketch=2.a.b.c')).toEqual({ ok: false, fault: { code: 'form', found: '2' } });
  });

  test('that would fill the memory is given up (64 MB of blanks in a small link)', () => {
    const bytes = deflateSync(new Uint8Array(64 * 1024 * 1024).fill(32), { level: 9 });
    const data = Buffer.from(bytes).toString('base64url');
    let [a, b] = [1, 0];
    for (const c of data) {
      a = (a + c.charCodeAt(0)) % 65521;
      b = (b + a) % 65521;
    }
    const sum = (b * 65536 + a).toString(36);
    expect(data.length).toBeLessThan(100_000);
    expect(fault(`#sketch=1.${data.length.toString(36)}.${sum}.${data}`)).toBe('too-large');
  });

  test('whose content is no sketch is refused where files are', () => {
    const read = readLink(link);
    expect(read.ok && openSketch(read.text.replace('splitwright.sketch', 'other')).ok).toBe(false);
  });
});
