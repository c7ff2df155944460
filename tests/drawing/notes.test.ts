import { describe, expect, test } from 'vitest';
import { measureText, wrapText } from '../../src/drawing/metrics';
import { buildScene } from '../../src/drawing/scene';
import { sceneToSvg } from '../../src/drawing/svg';
import type { Note } from '../../src/sketch/types';
import { inputOf, NOTED, RECYCLE, sheetOf } from './sheets';

const sceneOf = (...notes: Note[]) => {
  const sketch = { ...sheetOf([], []), notes };
  return buildScene(sketch, inputOf(sketch));
};

describe('a text note', () => {
  test('is broken between words at its width, and keeps its own line breaks', () => {
    const text = 'Vent to flare header, by others\nTie-in 12';
    const [note] = sceneOf({ id: 'n1', text, at: [80, 40], size: [96, 20] }).notes;
    const rows = note!.texts.map((t) => t.text);
    expect(rows.join(' ').replace(' Tie', '\nTie')).toBe(text);
    expect(rows.length).toBeGreaterThan(2);
    for (const row of rows) expect(measureText(row, 12)).toBeLessThanOrEqual(96);
    // Taller than its given size where the words need it.
    expect(note!.box.h).toBe(rows.length * 16);
  });

  test('breaks a word that is wider than the line', () => {
    expect(wrapText('unbreakable-tie-in-number', 60, 12).every((row) => measureText(row, 12) <= 60)).toBe(
      true,
    );
    expect(wrapText('', 60, 12)).toEqual(['']);
  });

  test('without a place is not on the drawing', () => {
    expect(sceneOf({ id: 'n1', text: 'For the review' }).notes).toEqual([]);
  });
});

test('an area is a dashed border with its name at the upper left corner, inside', () => {
  const [area] = sceneOf({
    id: 'n1',
    text: 'Battery limit',
    at: [0, 0],
    kind: 'area',
    size: [400, 200],
  }).notes;
  expect(area!.border?.d).toBe('M0 0H400V200H0Z');
  expect(area!.border?.dash).toBe('6 4');
  expect(area!.texts.map((t) => t.at)).toEqual([[8, 19]]);
});

test('the sheet reaches around its notes', () => {
  const { box } = sceneOf({ id: 'n1', text: '', at: [-100, -50], kind: 'area', size: [500, 300] });
  expect(box).toEqual({ x: -100, y: -50, w: 500, h: 300 });
});

test('a note moves no line', () => {
  const plain = buildScene(RECYCLE, inputOf(RECYCLE));
  expect(buildScene(NOTED, inputOf(NOTED)).lines.map((line) => line.points)).toEqual(
    plain.lines.map((line) => line.points),
  );
});

test('another word in a note hands everything else on', () => {
  const before = buildScene(NOTED, inputOf(NOTED));
  const sketch = { ...NOTED, notes: NOTED.notes.map((n) => (n.id === 'n2' ? { ...n, text: 'Removed' } : n)) };
  const after = buildScene(sketch, inputOf(sketch), before);
  expect(after).toEqual(buildScene(sketch, inputOf(sketch)));
  expect(after.notes.filter((note, k) => note !== before.notes[k]).map((note) => note.id)).toEqual(['n2']);
});

test('notes are in the SVG, areas behind everything, and not in the small picture', () => {
  const scene = buildScene(NOTED, inputOf(NOTED));
  const svg = sceneToSvg(scene);
  expect(svg).toContain('Battery limit');
  expect(svg.indexOf('dasharray="6 4"')).toBeLessThan(svg.indexOf('<g transform'));
  expect(sceneToSvg(scene, undefined, { bare: true })).not.toContain('dasharray="6 4"');
});
