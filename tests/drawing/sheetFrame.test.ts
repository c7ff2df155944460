import { describe, expect, test } from 'vitest';
import { overlaps } from '../../src/drawing/boxes';
import { measureText } from '../../src/drawing/metrics';
import { buildScene } from '../../src/drawing/scene';
import { sheetFrame } from '../../src/drawing/sheetFrame';
import { sceneToSvg } from '../../src/drawing/svg';
import type { Box, TextShape } from '../../src/drawing/types';
import { inputOf, RECYCLE } from './sheets';

const TITLE = {
  project: 'Condensate stabilisation',
  area: '100',
  number: 'SK-100-01',
  title: 'Process flow diagram, let-down and stabiliser',
  author: 'R. Example',
  checked: 'S. Sample',
  approved: '',
  revision: 'B',
  date: '2026-12-01',
  purpose: 'For review',
};
const LONG = Object.fromEntries(
  Object.keys(TITLE).map((key) => [
    key,
    'A rather long entry that nobody shortened in time, for reasons of their own, although there were several meetings about it'.repeat(
      2,
    ),
  ]),
);
const WARNING = 'PRELIMINARY – NOT FOR CONSTRUCTION';

const inside = (a: Box, b: Box): boolean =>
  a.x >= b.x - 0.01 && a.y >= b.y - 0.01 && a.x + a.w <= b.x + b.w + 0.01 && a.y + a.h <= b.y + b.h + 0.01;
const boxOf = ({ at: [x, y], text, size, weight, anchor }: TextShape): Box => {
  const w = measureText(text, size, weight);
  return { x: anchor === 'middle' ? x - w / 2 : x, y: y - size * 0.72, w, h: size * 0.92 };
};

describe.each(['A3', 'A4'] as const)('the sheet on %s', (paper) => {
  const boxes: readonly Box[] = [
    { x: 0, y: 0, w: 2400, h: 700 },
    { x: -300, y: 120, w: 600, h: 1900 },
    { x: 0, y: 0, w: 40, h: 20 },
  ];

  test.each(boxes)(
    'holds a drawing of $w x $h above its title block, in the shape of the paper',
    (drawing) => {
      const frame = sheetFrame(drawing, paper, TITLE, { warning: WARNING });
      // ISO 216: 420 x 297 mm and 297 x 210 mm
      expect(frame.page.w / frame.page.h).toBeCloseTo(paper === 'A3' ? 420 / 297 : 297 / 210, 9);
      expect(inside(drawing, frame.drawing)).toBe(true);
      expect(inside(frame.drawing, frame.inner)).toBe(true);
      expect(inside(frame.block, frame.inner)).toBe(true);
      expect(overlaps(frame.drawing, frame.block)).toBe(false);
    },
  );

  test.each([
    ['usual', TITLE],
    ['long', LONG],
    ['empty', {}],
  ])('has %s texts that stay in the sheet and lie on nothing', (_name, title) => {
    const frame = sheetFrame(boxes[0]!, paper, title, { warning: WARNING });
    const texts = frame.texts.map(boxOf);
    texts.forEach((box, k) => {
      expect(inside(box, frame.page), frame.texts[k]!.text).toBe(true);
      for (const other of texts.slice(k + 1)) expect(overlaps(box, other), frame.texts[k]!.text).toBe(false);
    });
  });

  test('cuts what is too long for its cell', () => {
    const { texts } = sheetFrame(boxes[0]!, paper, LONG, { warning: WARNING });
    // The title's cell has the height for all of it.
    expect(texts.filter((t) => t.text.endsWith('…'))).toHaveLength(Object.keys(LONG).length - 1);
    expect(texts.map((t) => t.text)).toContain(WARNING);
  });

  test('sets an entry of usual length smaller, or in two lines, rather than cutting it', () => {
    const title = {
      project: 'Condensate stabilisation, second study for the review in spring',
      number: 'SK-100-01-0004-REV-STUDY',
      title:
        'Light-hydrocarbon train: stabiliser, depropaniser and debutaniser with off-gas to the combustion chamber',
      author: 'A. Verylongname-Example, process',
      purpose: 'For comment and design review',
    };
    const { texts } = sheetFrame(boxes[0]!, paper, title, { warning: WARNING });
    const words = texts.map((t) => t.text).join(' ');
    for (const value of Object.values(title)) expect(words).toContain(value);
    expect(words).not.toContain('…');
  });

  test('says beside the title block what the drawing had no room for', () => {
    const frame = sheetFrame(boxes[0]!, paper, TITLE, { leftOff: '3 labels have no room here' });
    const text = frame.texts.find((t) => t.text.startsWith('3 labels'))!;
    expect(inside(boxOf(text), frame.inner)).toBe(true);
    expect(overlaps(boxOf(text), frame.block)).toBe(false);
    expect(overlaps(boxOf(text), frame.drawing)).toBe(false);
  });

  test('names zones 1 to 8 and A to F at both edges', () => {
    const names = sheetFrame(boxes[0]!, paper, {}).texts.map((t) => t.text);
    for (const zone of ['1', '8', 'A', 'F']) expect(names.filter((n) => n === zone)).toHaveLength(2);
  });
});

test('a small drawing is not blown up: the sheet is larger instead', () => {
  const { scale } = sheetFrame({ x: 0, y: 0, w: 40, h: 20 }, 'A3', TITLE);
  expect(scale).toBe(3.2);
});

test('frames the scene as SVG', () => {
  const scene = buildScene(RECYCLE, inputOf(RECYCLE));
  const frame = sheetFrame(scene.box, 'A4', TITLE, { warning: WARNING });
  const svg = sceneToSvg(scene, undefined, { frame });
  expect(svg).toContain('SK-100-01');
  expect(svg).toContain(WARNING);
  expect(svg).not.toMatch(/NaN|undefined/);
});
