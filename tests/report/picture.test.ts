import { readdirSync, readFileSync } from 'node:fs';
import { afterEach, beforeAll, describe, expect, test, vi } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { makeDocument } from '../../src/documents/make';
import { glyphOf, needed, tablesOf } from '../../src/drawing/trueType';
import type { ReportInput } from '../../src/report/input';
import { type FontFiles, selfContained, sheetSvg, sheetSvgFile } from '../../src/report/picture';
import { paperScene } from '../../src/report/sheet';
import type { Sketch } from '../../src/sketch/types';
import { generatedSketch } from './generated';
import { FONTS } from './readPdf';
import { EXAMPLES, solvedExample } from './solved';

const FILES: FontFiles = {
  normal: readFileSync(FONTS.normal),
  bold: readFileSync(FONTS.bold),
  italics: readFileSync(FONTS.italics),
};

const attribute = (tag: string, name: string): string | undefined =>
  new RegExp(` ${name}="([^"]*)"`).exec(tag)?.[1];
const plain = (text: string): string =>
  text.replaceAll('&lt;', '<').replaceAll('&gt;', '>').replaceAll('&quot;', '"').replaceAll('&amp;', '&');
const textsOf = (svg: string) =>
  [...svg.matchAll(/<text([^>]*)>([^<]*)<\/text>/g)].map(([, tag = '', content = '']) => ({
    tag,
    text: plain(content),
    face: `${attribute(tag, 'font-weight') ?? '400'} ${attribute(tag, 'font-style') ?? 'normal'}`,
  }));

/** Fonts that the file carries, by weight and style. */
const carried = (svg: string): Map<string, Uint8Array> =>
  new Map(
    [...svg.matchAll(/font-weight:(\d+);font-style:(\w+);src:url\(data:font\/ttf;base64,([^)]*)\)/g)].map(
      ([, weight, style, data = '']) => [`${weight} ${style}`, new Uint8Array(Buffer.from(data, 'base64'))],
    ),
  );

/** Advance of a text in a font file [px], straight from its tables. */
function widthIn(font: Uint8Array, text: string, size: number): number {
  const tables = tablesOf(font);
  const long = needed(tables, 'hhea').getUint16(34);
  const perEm = needed(tables, 'head').getUint16(18);
  let sum = 0;
  for (const char of text) {
    const glyph = glyphOf(needed(tables, 'cmap'), char.codePointAt(0) ?? 0);
    if (glyph === 0) return Number.NaN;
    sum += needed(tables, 'hmtx').getUint16(4 * Math.min(glyph, long - 1));
  }
  return (sum * size) / perEm;
}

describe.each(readdirSync(EXAMPLES).filter((f) => f.endsWith('.sketch.json')))(
  'the drawing of %s as a file',
  (file) => {
    let input: ReportInput;
    let svg: string;
    beforeAll(async () => {
      input = await solvedExample(file);
      svg = sheetSvgFile(input, FILES);
    });

    test('carries a glyph for every letter that it writes, in the face that it writes it with', () => {
      const fonts = carried(svg);
      expect([...fonts.keys()].sort()).toEqual([...new Set(textsOf(svg).map((t) => t.face))].sort());
      for (const { text, face } of textsOf(svg)) {
        const font = fonts.get(face) ?? new Uint8Array();
        const map = needed(tablesOf(font), 'cmap');
        for (const char of text)
          expect([text, char, glyphOf(map, char.codePointAt(0) ?? 0) > 0]).toEqual([text, char, true]);
      }
    });

    test('sets every text to the width that its own font gives it, so no other font can be wider', () => {
      const fonts = carried(svg);
      const texts = textsOf(svg);
      expect(texts.length).toBeGreaterThan(10);
      for (const { tag, text, face } of texts) {
        const width = widthIn(fonts.get(face) ?? new Uint8Array(), text, Number(attribute(tag, 'font-size')));
        expect(attribute(tag, 'lengthAdjust')).toBe('spacingAndGlyphs');
        // Advances are kept to a thousandth of an em.
        expect(Math.abs(Number(attribute(tag, 'textLength')) - width)).toBeLessThan(
          0.01 * text.length + 0.01,
        );
      }
    });

    test('asks for nothing from elsewhere, stays small, and comes out the same twice', () => {
      for (const [, address = ''] of svg.matchAll(/(?:href="|url\()([^")]*)/g))
        expect(address.slice(0, 10)).toBe('data:font/');
      expect(svg.length).toBeLessThan(150_000);
      expect(sheetSvgFile(input, FILES)).toBe(svg);
    });

    test('draws what the painter of pictures is given, text for text', () => {
      const bare = (of: string): string[] =>
        of
          .replace(/<style>.*<\/style>/, '')
          .replaceAll(/ (font-family|textLength|lengthAdjust)="[^"]*"/g, '')
          .split(/(?=<)/);
      const painted = sheetSvg(input);
      expect(bare(svg)).toEqual(bare(painted));
      expect(painted).not.toMatch(/<style>|textLength/);
    });
  },
);

describe('a self-contained picture', () => {
  const of = (text: string, more = ''): string =>
    selfContained(
      `<svg width="9"><text x="1" y="2" font-family="SourceSans3" font-size="10"${more} fill="#000000">${text}</text></svg>`,
      FILES,
    );

  test('measures and carries letters, not their names', () => {
    const svg = of('a &lt; b &amp; c');
    const [text] = textsOf(svg);
    expect(text?.text).toBe('a < b & c');
    expect(Number(attribute(text?.tag ?? '', 'textLength'))).toBeCloseTo(
      widthIn(FILES.normal, 'a < b & c', 10),
      1,
    );
    const map = needed(tablesOf(carried(svg).get('400 normal') ?? new Uint8Array()), 'cmap');
    expect(glyphOf(map, '<'.charCodeAt(0))).toBeGreaterThan(0);
    expect(glyphOf(map, ';'.charCodeAt(0))).toBe(0);
  });

  test('carries only the faces that it uses', () => {
    expect([...carried(of('a')).keys()]).toEqual(['400 normal']);
    expect([...carried(of('a', ' font-weight="600"')).keys()]).toEqual(['600 normal']);
    expect([...carried(of('a', ' font-style="italic"')).keys()]).toEqual(['400 italic']);
    expect(of('')).not.toContain('textLength');
  });
});

describe('the order of a drawing in the worker', () => {
  afterEach(() => vi.unstubAllGlobals());

  test('brings the shipped font along', async () => {
    const files: Readonly<Record<string, Uint8Array>> = {
      'SourceSans3-Regular.ttf': FILES.normal,
      'SourceSans3-SemiBold.ttf': FILES.bold,
      'SourceSans3-Italic.ttf': FILES.italics,
    };
    vi.stubGlobal(
      'fetch',
      async (address: string) => new Response(files[address.replace('shipped/', '')] as BodyInit),
    );
    const input = await solvedExample('let-down.sketch.json');
    const { bytes, type } = await makeDocument({ what: 'svg', input, fonts: 'shipped' }, () => undefined);
    expect(type).toBe('image/svg+xml');
    expect(new TextDecoder().decode(bytes)).toBe(sheetSvgFile(input, FILES));
  });
});

describe('lettering on paper', () => {
  const PT_PER_MM = 72 / 25.4;
  const onA4 = (sketch: Sketch): Sketch => ({ ...sketch, documents: { ...sketch.documents, paper: 'A4' } });
  /** Size in which the numbers of labels come out on an A4 sheet [pt]. */
  const lettering = (input: ReportInput): { readonly pt: number; readonly svg: string } => {
    const svg = sheetSvg(input);
    const [, , width] = /viewBox="[-\d.]+ ([-\d.]+) ([\d.]+) [\d.]+"/.exec(svg) ?? [];
    const [before = '', after = ''] = svg.split('>185.0</text>');
    const label = Number(/font-size="([\d.]+)"[^>]*$/.exec(before)?.[1]);
    // The group that the label stands in may be drawn larger.
    const grown = Number(/.* scale\(([\d.]+)\)/s.exec(before)?.[1] ?? 1);
    expect(after).not.toBe('');
    return { pt: ((label * grown) / Number(width)) * 297 * PT_PER_MM, svg };
  };

  test('of a wide train on A4 is set larger until it is read', async () => {
    // ISO 216: A4 is 297 mm wide.
    const { pt, svg } = lettering(await solvedExample('aromatic-condensate.sketch.json', onA4));
    expect(pt).toBeGreaterThan(5.7);
    expect(pt).toBeLessThan(8);
    // Every stream keeps its number, whatever has room besides.
    for (let k = 1; k <= 20; k++) expect(svg).toMatch(new RegExp(`>${k}</text>`));
  });

  test('with more streams than have room for labels, says on the sheet how many are left off', async () => {
    const sketch = onA4(await generatedSketch({ streams: 80, chemicals: 4 }));
    const { input } = await solveSketch(sketch);
    const svg = sheetSvg(input);
    const drawn = [...svg.matchAll(/>kmol\/h<\/text>/g)].length;
    const left = Number(/>(\d+) labels?\b[^<]* no room here: see the stream summary\.</.exec(svg)?.[1] ?? 0);
    expect(drawn + left).toBe(80);
    expect(left).toBe(paperScene(input, () => 0.26).omitted.filter((o) => o.what === 'label').length);
  });
});
