import { beforeAll, describe, expect, test } from 'vitest';
import type { ReportInput } from '../../src/report/input';
import { writePdf } from '../../src/report/pdf/write';
import { type Generated, solvedGenerated } from './generated';
import { FONTS, inside, linesOf, type Placed, type ReadPage, readPdf, wordsOf } from './readPdf';
import { solvedExample } from './solved';

/** The strip at the foot of a page lies below this [pt]. */
const STRIP = 48;
const body = (page: ReadPage): Placed[] => inside(page).filter((t) => t.y > STRIP);

/** Pairs of texts of a page that lie over each other. */
function overlaps(page: ReadPage): string[] {
  const found: string[] = [];
  const texts = inside(page).sort((a, b) => b.y - a.y);
  texts.forEach((a, k) => {
    for (let j = k + 1; j < texts.length; j += 1) {
      const b = texts[j]!;
      if (a.y - b.y > a.size) break;
      const across = Math.min(a.right, b.right) - Math.max(a.x, b.x);
      // Letters without tails reach 0.7 em above their baseline; hairline touches are none.
      const down = b.y + 0.6 * b.size - a.y;
      if (across > 0.6 && down > 0.3)
        found.push(`${a.text} | ${b.text} at ${a.x.toFixed(0)},${a.y.toFixed(0)}`);
    }
  });
  return found;
}

const CASES: readonly (Generated & { readonly paper: 'A3' | 'A4' })[] = [
  { streams: 6, chemicals: 4, paper: 'A3' },
  { streams: 6, chemicals: 40, long: true, paper: 'A4' },
  { streams: 22, chemicals: 4, paper: 'A4' },
  { streams: 22, chemicals: 40, long: true, paper: 'A3' },
  { streams: 80, chemicals: 4, long: true, paper: 'A4' },
  { streams: 80, chemicals: 40, paper: 'A3' },
];

describe.each(CASES)('pages for $streams streams and $chemicals chemicals on $paper', (what) => {
  let input: ReportInput;
  let pages: readonly ReadPage[];
  beforeAll(async () => {
    const solved = await solvedGenerated(what);
    const title = what.long
      ? {
          ...solved.sketch.title,
          project: LONG_WORD,
          author: LONG_WORD,
          number: LONG_WORD,
          purpose: LONG_WORD,
        }
      : solved.sketch.title;
    input = { ...solved, sketch: { ...solved.sketch, title, documents: { paper: what.paper } } };
    pages = (await readPdf(await writePdf(input, FONTS))).pages;
  }, 120_000);

  test('nothing lies over anything else', () => {
    // The drawing has its own laws; below it stands what this document adds.
    const faults = pages.flatMap((page, k) =>
      k === 0 ? [] : overlaps(page).map((f) => `page ${k + 1}: ${f}`),
    );
    expect(faults).toEqual([]);
  });

  test('nothing is clipped: every text stays inside the border', () => {
    for (const [k, { width, height, texts }] of pages.entries())
      for (const t of texts) {
        const isMark =
          /^[A-F1-8]$/.test(t.text) && (t.x < 20 || t.right > width - 18 || t.y < 18 || t.y > height - 18);
        const isIn = t.x > 20 && t.right < width - 20 && t.y > 20 && t.y < height - 20;
        expect([k + 1, t, isMark || isIn]).toEqual([k + 1, t, true]);
      }
  });

  test('nothing is orphaned: no page ends in a heading or holds a heading alone', () => {
    const heading = what.paper === 'A3' ? 15 : 12.5;
    for (const [k, page] of pages.entries()) {
      const lines = linesOf({ ...page, texts: body(page) });
      expect([k + 1, lines.length > 2]).toEqual([k + 1, true]);
      const last = lines.at(-1)?.[0];
      expect([k + 1, last?.text, (last?.size ?? 0) < heading - 0.5]).toEqual([k + 1, last?.text, true]);
    }
  });

  test('every stream stands in the summary, every page says who it belongs to', () => {
    const summary = pages.filter((page) => wordsOf(page).includes('Stream summary (heat'));
    const diamonds = new Set(
      summary.flatMap((page) =>
        body(page).flatMap((t) => (/^\d+$/.test(t.text) && t.size > 5 ? [t.text] : [])),
      ),
    );
    for (const stream of input.sketch.streams) expect(diamonds).toContain(stream.number);
    pages.forEach((page, k) => {
      expect(wordsOf(page)).toContain(`Page ${k + 1} of ${pages.length}`);
      expect(wordsOf(page)).toContain('PRELIMINARY – NOT FOR CONSTRUCTION');
    });
  });
});

describe.each([
  ['aromatic-condensate.sketch.json', 'A3', 'US'],
  ['aromatic-condensate.sketch.json', 'A4', 'metric'],
  ['nitrogen-loop.sketch.json', 'A4', 'US'],
  ['condensate-flash.sketch.json', 'A4', 'SI'],
] as const)('%s on %s in %s measures', (file, paper, set) => {
  test('has nothing over anything else and nothing outside the border', async () => {
    const input = await solvedExample(file, (sketch) => ({
      ...sketch,
      documents: { paper },
      display: { ...sketch.display, set },
    }));
    const { pages } = await readPdf(await writePdf(input, FONTS));
    expect(
      pages.flatMap((page, k) => (k === 0 ? [] : overlaps(page).map((f) => `page ${k + 1}: ${f}`))),
    ).toEqual([]);
    for (const { width, texts } of pages)
      for (const t of texts) expect([t.text, t.right < width && t.x >= 0 && t.y > 0]).toEqual([t.text, true]);
  }, 60_000);
});

const LONG_WORD =
  'Reconditioningofintermediatehydrocarbonsfromthesecondstageseparator to the downstream conditioning section';
