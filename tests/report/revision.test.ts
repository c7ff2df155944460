import { describe, expect, test } from 'vitest';
import { buildReport } from '../../src/report/model';
import { sheetSvg } from '../../src/report/picture';
import { setRevisions } from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';
import { printedTitle, revisionInForce } from '../../src/sketch/revision';
import type { Sketch } from '../../src/sketch/types';
import { writeSketch } from '../../src/sketch/write';
import { example, solvedExample } from './solved';

const FILE = 'condensate-flash.sketch.json';

/** The example says "A" in its title block and has no revision table. */
const issued =
  (...marks: readonly string[]) =>
  (sketch: Sketch): Sketch => {
    const edit = setRevisions(
      sketch,
      marks.map((mark) => ({ mark })),
    );
    if (!edit.ok) throw new Error(edit.code);
    return edit.sketch;
  };

describe('the revision in force', () => {
  test('is the newest entry of the table where it has one, else what the title block says, else none', () => {
    const plain = example(FILE);
    expect(plain.title.revision).toBe('A');
    expect(revisionInForce(plain)).toBe('A');
    expect(revisionInForce(issued('B', 'A')(plain))).toBe('B');
    expect(revisionInForce({ title: { revision: ' ' } })).toBeUndefined();
    expect(revisionInForce({ title: {}, revisions: [{ mark: '0' }] })).toBe('0');
    expect(printedTitle({ title: { title: 'T' } })).toEqual({ title: 'T' });
  });

  test('is the same in the title block, in the strip of every page and in the drawing, and older ones stand in the table', async () => {
    const input = await solvedExample(FILE, issued('B', 'A'));
    const report = buildReport(input);
    expect(report.title.find((entry) => entry.label === 'Revision')?.text).toBe('B');
    expect(report.strip.number).toContain('Rev B');
    expect(report.strip.number).not.toContain('Rev A');
    expect(report.revisions.rows).toHaveLength(2);
    const cells = (revision: string): number => sheetSvg(input).split(`>${revision}</text>`).length;
    // Zone letters A to F stand on both borders: the mark makes one more B than there are A.
    expect(cells('B') - cells('A')).toBe(1);
  });

  test('is "draft" without a table and without a word in the title block', async () => {
    const report = buildReport(
      await solvedExample(FILE, ({ title: { revision: _, ...title }, ...sketch }) => ({ ...sketch, title })),
    );
    expect(report.title.find((entry) => entry.label === 'Revision')?.text).toBe('draft');
    expect(report.strip.number).toContain('draft');
  });

  test('leaves the word of an older file as it is: it is kept, and counts again when the table is emptied', () => {
    const both = issued('B')(example(FILE));
    const opened = openSketch(writeSketch(both));
    if (!opened.ok) throw new Error('does not open');
    expect(opened.sketch.title.revision).toBe('A');
    expect(revisionInForce(opened.sketch)).toBe('B');
    expect(revisionInForce(issued()(opened.sketch))).toBe('A');
  });
});
