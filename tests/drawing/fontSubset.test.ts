import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pdfmake from 'pdfmake';
import { afterAll, describe, expect, test } from 'vitest';
import { fontSubset } from '../../src/drawing/fontSubset';
import { glyphOf, needed, tablesOf } from '../../src/drawing/trueType';
import { FONTS, readPdf } from '../report/readPdf';

const FACES = Object.entries(FONTS);
/** Plain letters, composite ones, signs, and two that the font lacks. */
const TEXT = 'E-101 Ätherdämpfe ½ m³/h °C 10⁻³ (a) –CO₂ éç 漢𝛼';
const LACKING = ['漢', '𝛼'];

const dir = mkdtempSync(join(tmpdir(), 'subset-'));
afterAll(() => rmSync(dir, { recursive: true }));

const advanceOf = (font: Uint8Array, char: string): number => {
  const tables = tablesOf(font);
  const glyph = glyphOf(needed(tables, 'cmap'), char.codePointAt(0) ?? 0);
  if (glyph === 0) return 0;
  const long = needed(tables, 'hhea').getUint16(34);
  return needed(tables, 'hmtx').getUint16(4 * Math.min(glyph, long - 1));
};

describe.each(FACES)('the %s face with the glyphs of one text', (_, file) => {
  const whole = new Uint8Array(readFileSync(file));
  const small = fontSubset(whole, TEXT);

  test('has every character of the text as wide as before, and no other', () => {
    for (const char of TEXT) expect([char, advanceOf(small, char)]).toEqual([char, advanceOf(whole, char)]);
    for (const char of LACKING) expect(advanceOf(small, char)).toBe(0);
    for (const char of 'QXyZ?') expect([char, advanceOf(small, char)]).toEqual([char, 0]);
  });

  test('is small, and the same twice whatever the order of the characters', () => {
    expect(small.length).toBeLessThan(whole.length / 25);
    const again = fontSubset(whole, [...TEXT].reverse());
    expect(Buffer.from(again).equals(Buffer.from(small))).toBe(true);
  });

  test('has the checksums that the format asks for', () => {
    const view = new DataView(small.buffer, small.byteOffset, small.byteLength);
    let sum = 0;
    for (let at = 0; at < small.length; at += 4) sum = (sum + view.getUint32(at)) >>> 0;
    // OpenType, table head: the whole file sums to this.
    expect(sum).toBe(0xb1b0afba);
    expect(small.length % 4).toBe(0);
  });

  test('is a font to an independent reader: set in a PDF its text reads back', async () => {
    const path = join(dir, 'small.ttf');
    writeFileSync(path, small);
    const words = TEXT.split(' ').slice(0, -1);
    const linesWith = async (font: string) => {
      pdfmake.setUrlAccessPolicy(() => false);
      if ('setLocalAccessPolicy' in pdfmake) pdfmake.setLocalAccessPolicy((p) => p === font);
      pdfmake.setFonts({ One: { normal: font, bold: font, italics: font, bolditalics: font } });
      const bytes = await pdfmake
        .createPdf({
          content: words.map((text) => ({ text })),
          defaultStyle: { font: 'One', fontSize: 20 },
        })
        .getBuffer();
      const { pages } = await readPdf(bytes);
      return pages[0]?.texts ?? [];
    };
    const [before, after] = [await linesWith(file), await linesWith(path)];
    expect(after.map((t) => t.text).join('')).toBe(words.join(''));
    expect(before.map((t) => t.text).join('')).toBe(words.join(''));
  });
});

test('a font with nothing to set is still a font', () => {
  const none = fontSubset(new Uint8Array(readFileSync(FONTS.normal)), '');
  expect(advanceOf(none, 'A')).toBe(0);
  expect(needed(tablesOf(none), 'maxp').getUint16(4)).toBe(1);
});
