import { describe, expect, test } from 'vitest';
import { setDesignBasis, setDocuments, setHolds, setRevisions } from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';
import { schemaText, sketchSchema } from '../../src/sketch/schema';
import type { Sketch } from '../../src/sketch/types';
import { writeSketch } from '../../src/sketch/write';
import { example } from '../report/solved';
import { faults } from './validator';

const letDown = example('let-down.sketch.json');
const WHOLE = {
  revisions: [{ mark: 'A', date: '2026-01-10', what: 'First issue', by: 'N. N.', tomorrow: 1 }],
  designBasis: {
    cases: [{ name: 'Winter', text: 'feed at 5 °C' }],
    requirements: [{ stream: 's3', of: 'fraction', chemical: 'methane', basis: 'mole', min: '80 %' }],
    utilities: [{ name: 'Low-pressure steam', use: 'heating', supply: '150 degC' }],
    approach: '8 K',
    conditions: 'coastal',
    notes: 'none',
    later: true,
  },
  holds: [{ no: '1', what: 'Feed pressure', owner: 'Process', date: '2026-02-01' }],
  documents: { paper: 'A4', withoutRows: ['normal'], withoutStreams: ['s2'], pictureWidth: 1600 },
};
const withWhole = (change: object = {}): unknown => ({
  ...JSON.parse(writeSketch(letDown)),
  ...WHOLE,
  ...change,
});

describe('what documents need in the sketch file', () => {
  test('is kept through opening and writing, unknown fields too', () => {
    const opened = openSketch(withWhole());
    expect(opened.ok).toBe(true);
    if (opened.ok) expect(JSON.parse(writeSketch(opened.sketch))).toMatchObject(WHOLE);
  });

  test('agrees with the published schema', () => {
    expect(faults(sketchSchema(), withWhole())).toEqual([]);
    expect(schemaText()).toContain('"requirements"');
    expect(faults(sketchSchema(), withWhole({ holds: [{ no: '1' }] }))).not.toEqual([]);
  });

  test.each([
    [{ revisions: [{ date: '2026-01-10' }] }, 'revisions.0.mark'],
    [{ revisions: 'A' }, 'revisions'],
    [{ designBasis: { requirements: [{ stream: 's1', of: 'colour' }] } }, 'designBasis.requirements.0.of'],
    [{ designBasis: { requirements: [{ of: 'pressure' }] } }, 'designBasis.requirements.0.stream'],
    [{ designBasis: { utilities: [{ name: 'x', use: 'drying' }] } }, 'designBasis.utilities.0.use'],
    [{ designBasis: { approach: [1] } }, 'designBasis.approach'],
    [{ holds: [{ no: '1', what: 3 }] }, 'holds.0.what'],
    [{ documents: { paper: 'B5' } }, 'documents.paper'],
    [{ documents: { withoutRows: [1] } }, 'documents.withoutRows.0'],
    [{ documents: { pictureWidth: -1 } }, 'documents.pictureWidth'],
    [{ title: { purpose: 1 } }, 'title.purpose'],
  ])('is refused with its place: %j', (change, path) => {
    const opened = openSketch(withWhole(change));
    expect(opened.ok ? 'opened' : opened.problems.map((p) => p.path)).toContain(path);
  });
});

describe('edits of what documents need', () => {
  const edited = (edit: ReturnType<typeof setHolds>): Sketch => {
    if (!edit.ok) throw new Error(edit.code);
    return edit.sketch;
  };

  test('make a new document, share the rest, and name themselves for undo', () => {
    const edit = setRevisions(letDown, [{ mark: 'A', what: '' }]);
    expect(edit.ok && edit.label).toBe('revision table');
    expect(edited(edit).revisions).toEqual([{ mark: 'A' }]);
    expect(edited(edit).units).toBe(letDown.units);
    expect(letDown.revisions).toBeUndefined();
  });

  test('change nothing when nothing changes', () => {
    const once = edited(setHolds(letDown, WHOLE.holds));
    expect(edited(setHolds(once, structuredClone(WHOLE.holds)))).toBe(once);
    expect(edited(setDocuments(letDown, {}))).toBe(letDown);
  });

  test('take an emptied part away', () => {
    const once = edited(setDesignBasis(letDown, { notes: 'x' }));
    expect(once.designBasis).toEqual({ notes: 'x' });
    expect('designBasis' in edited(setDesignBasis(once, { notes: '' }))).toBe(false);
    const chosen = edited(setDocuments(letDown, { withoutRows: ['Z'] }));
    expect('documents' in edited(setDocuments(chosen, { withoutRows: [] }))).toBe(false);
  });
});
