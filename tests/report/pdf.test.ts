import { createHash } from 'node:crypto';
import { join } from 'node:path';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { beforeAll, describe, expect, test } from 'vitest';
import { printed } from '../../src/report/cells';
import type { ReportInput } from '../../src/report/input';
import { buildReport, PRELIMINARY } from '../../src/report/model';
import { writePdf } from '../../src/report/pdf/write';
import { solvedExample } from './solved';

const font = (name: string): string => join(import.meta.dirname, '../../public/fonts', name);
const FONTS = {
  normal: font('SourceSans3-Regular.ttf'),
  bold: font('SourceSans3-SemiBold.ttf'),
  italics: font('SourceSans3-Italic.ttf'),
};

interface Placed {
  readonly text: string;
  readonly x: number;
  readonly right: number;
  readonly y: number;
}
/** Texts of each page with their places, as an independent reader of PDF gives them. */
async function pagesOf(bytes: Uint8Array): Promise<Placed[][]> {
  const document = await getDocument({ data: new Uint8Array(bytes), verbosity: 0 }).promise;
  const pages: Placed[][] = [];
  for (let k = 1; k <= document.numPages; k += 1) {
    const { items } = await (await document.getPage(k)).getTextContent();
    pages.push(
      items.flatMap((item) =>
        'str' in item && item.str.trim() !== ''
          ? [
              {
                text: item.str,
                x: item.transform[4],
                right: item.transform[4] + item.width,
                y: item.transform[5],
              },
            ]
          : [],
      ),
    );
  }
  return pages;
}

/** Figures one after the other; the space that groups digits may be a break between texts. */
const squeezed = (texts: readonly string[]): string => texts.join('|').replace(/[\s|\u2009]+/g, '');
const lineAt = (page: readonly Placed[], y: number): string[] =>
  page
    .filter((t) => Math.abs(t.y - y) < 1)
    .sort((a, b) => a.x - b.x)
    .map((t) => t.text);

let input: ReportInput;
let bytes: Uint8Array;
let pages: Placed[][];
beforeAll(async () => {
  input = await solvedExample('condensate-flash.sketch.json');
  bytes = await writePdf(input, FONTS);
  pages = await pagesOf(bytes);
}, 30_000);

describe('the stream summary as PDF', () => {
  test('reads back as the figures of the results, row by row, to the printed digits', () => {
    const { streams } = buildReport(input);
    for (const key of [
      'T',
      'P',
      'Pg',
      'n',
      'm',
      'H',
      'liquid.density',
      'z.methane',
      'm.n-decane',
      'm.total',
    ]) {
      const row = streams.rows.find((r) => r.key === key);
      const wanted = squeezed(row?.cells.map(printed) ?? []);
      // Words come one by one: a row is what stands on one line of one page, the figures last.
      const lines = pages
        .slice(1)
        .flatMap((page) =>
          page.filter((t) => t.x < 40 && row?.label.startsWith(t.text)).map((t) => lineAt(page, t.y)),
        );
      const isThere = lines.some((line) => squeezed(line).endsWith(wanted));
      expect([key, isThere]).toEqual([key, true]);
    }
  });

  test('carries purpose, margin, fingerprint and page number on every page', () => {
    pages.forEach((page, k) => {
      const all = page.map((t) => t.text).join(' ');
      for (const part of [
        PRELIMINARY,
        'No design margin included',
        input.fingerprint,
        `Page ${k + 1} of ${pages.length}`,
      ])
        expect([k, part, all.includes(part)]).toEqual([k, part, true]);
    });
  });

  test('keeps every text inside the page', () => {
    for (const page of pages)
      for (const t of page)
        expect([t.text, t.x >= 0 && t.right <= 1190.55 && t.y >= 0 && t.y <= 841.89]).toEqual([t.text, true]);
  });

  test('draws the sheet in vectors with its tags, and says what closure is not', () => {
    const first = pages[0]?.map((t) => t.text) ?? [];
    for (const tag of ['V-101', 'PV-103', 'E-101']) expect(first).toContain(tag);
    expect(first.join(' ')).toContain('Closure shows arithmetic, not that the model is right.');
  });

  test('comes out the same byte for byte', async () => {
    const digest = (data: Uint8Array): string => createHash('sha256').update(data).digest('hex');
    expect(digest(await writePdf(input, FONTS))).toBe(digest(bytes));
  });
});
