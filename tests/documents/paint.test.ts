import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { type Painter, paintSvg, sizeOf } from '../../src/documents/paint';
import { sheetSvg } from '../../src/report/picture';
import { EXAMPLES, solvedExample } from '../report/solved';

interface Drawn {
  readonly what: 'fill' | 'stroke' | 'text';
  readonly content: string;
  readonly at: readonly [number, number];
  readonly style: string;
}

/** A canvas that writes down what is painted, with its own account of the transforms. */
function recorder(): { readonly painter: Painter; readonly drawn: Drawn[] } {
  const drawn: Drawn[] = [];
  type Matrix = readonly [number, number, number, number, number, number];
  let now: Matrix = [1, 0, 0, 1, 0, 0];
  const stack: Matrix[] = [];
  const times = ([a, b, c, d, e, f]: Matrix): void => {
    const [A, B, C, D, E, F] = now;
    now = [A * a + C * b, B * a + D * b, A * c + C * d, B * c + D * d, A * e + C * f + E, B * e + D * f + F];
  };
  const placed = (x: number, y: number): [number, number] => [
    now[0] * x + now[2] * y + now[4],
    now[1] * x + now[3] * y + now[5],
  ];
  const painter: Painter = {
    fillStyle: '',
    strokeStyle: '',
    lineWidth: 1,
    lineJoin: 'miter',
    lineCap: 'butt',
    font: '',
    textAlign: 'left',
    globalAlpha: 1,
    save: () => stack.push(now),
    restore: () => {
      const last = stack.pop();
      if (!last) throw new Error('restored too often');
      now = last;
    },
    translate: (x, y) => times([1, 0, 0, 1, x, y]),
    scale: (x, y) => times([x, 0, 0, y, 0, 0]),
    rotate: (t) => times([Math.cos(t), Math.sin(t), -Math.sin(t), Math.cos(t), 0, 0]),
    setLineDash: () => undefined,
    fill: (path) =>
      drawn.push({ what: 'fill', content: String(path), at: placed(0, 0), style: String(painter.fillStyle) }),
    stroke: (path) =>
      drawn.push({
        what: 'stroke',
        content: String(path),
        at: placed(0, 0),
        style: String(painter.strokeStyle),
      }),
    fillText: (text, x, y) =>
      drawn.push({
        what: 'text',
        content: text,
        at: placed(x, y),
        style: `${painter.font} ${painter.textAlign}`,
      }),
  };
  return { painter, drawn };
}
const asText = (d: string): Path2D => d as unknown as Path2D;

describe('painting the drawing', () => {
  test.each(readdirSync(EXAMPLES).filter((f) => f.endsWith('.sketch.json')))(
    'of %s paints every path and text of the SVG once, inside the picture',
    async (file) => {
      const svg = sheetSvg(await solvedExample(file));
      const { painter, drawn } = recorder();
      paintSvg(svg, 1600, painter, asText);
      const count = (pattern: RegExp): number => svg.match(pattern)?.length ?? 0;
      expect(drawn.filter((d) => d.what === 'text').length).toBe(count(/<text /g));
      expect(drawn.filter((d) => d.what === 'stroke').length).toBe(count(/<path [^>]*stroke="#/g));
      expect(drawn.filter((d) => d.what === 'fill').length).toBe(count(/<path [^>]*fill="#/g));
      const { width, height } = sizeOf(svg);
      for (const { content, at, what } of drawn)
        if (what === 'text') {
          expect([content, at[0] >= 0 && at[0] <= 1600]).toEqual([content, true]);
          expect([content, at[1] >= 0 && at[1] <= (1600 * height) / width]).toEqual([content, true]);
        }
    },
  );

  test('keeps places, turns, fonts, inks and letters', () => {
    const { painter, drawn } = recorder();
    paintSvg(
      '<svg xmlns="x" width="100" height="50" viewBox="-10 -20 100 50"><path d="M0 0H5" fill="none" stroke="#123456" stroke-width="2"/>' +
        '<g transform="translate(40 10) rotate(90)"><text x="3" y="0" font-family="SourceSans3" font-size="11" font-weight="600" text-anchor="end" fill="#000000">a &lt; b &amp; c</text></g></svg>',
      200,
      painter,
      asText,
    );
    expect(drawn[0]).toMatchObject({ what: 'stroke', content: 'M0 0H5', at: [20, 40], style: '#123456' });
    // Derived: (40, 10) plus (3, 0) turned by 90° is (40, 13); from the corner (-10, -20), times 2.
    expect(drawn[1]?.at[0]).toBeCloseTo(100, 9);
    expect(drawn[1]?.at[1]).toBeCloseTo(66, 9);
    expect(drawn[1]).toMatchObject({ content: 'a < b & c', style: '600 11px SourceSans3 right' });
  });

  test('leaves nothing out silently', () => {
    const { painter } = recorder();
    const svg = (inside: string): string => `<svg width="9" height="9" viewBox="0 0 9 9">${inside}</svg>`;
    expect(() => paintSvg(svg('<circle r="3"/>'), 9, painter, asText)).toThrow('circle');
    expect(() => paintSvg(svg('<g transform="skewX(3)"></g>'), 9, painter, asText)).toThrow('skewX');
  });
});

test('the page itself loads no PDF maker and no spreadsheet writer: their worker does', () => {
  const app = join(import.meta.dirname, '../../src');
  const faults = readdirSync(app, { recursive: true, encoding: 'utf8' })
    .map((name) => name.replaceAll('\\', '/'))
    .filter((name) => /\.tsx?$/.test(name) && !/^(report|documents|cli)\//.test(name))
    .filter((name) =>
      /from '[^']*(pdfmake|write-excel-file|report\/pdf\/|report\/xlsx)|import\('[^']*(pdfmake|write-excel-file|report\/pdf\/|report\/xlsx)/.test(
        readFileSync(join(app, name), 'utf8'),
      ),
    );
  expect(faults).toEqual([]);
});
