import { BoxIndex, boxOfPiece } from '../drawing/boxes';
import { measureText } from '../drawing/metrics';
import { GRID } from '../drawing/tokens';
import type { Box, Point, Scene, TextShape } from '../drawing/types';

/** What a note may come to take once it says something, the most first [px]. */
const ROOMS: readonly Point[] = [
  [240, 48],
  [160, 32],
  [80, 16],
];
/** Kept clear around it [px]. */
const CLEAR = 8;
/** Places that are tried stand so far apart, and go so far out [px, count]. */
const STEP = 3 * GRID;
const REACH = 30;

const STEPS: readonly Point[] = Array.from(
  { length: (2 * REACH + 1) ** 2 },
  (_, k): Point => [(k % (2 * REACH + 1)) - REACH, Math.floor(k / (2 * REACH + 1)) - REACH],
).sort((a, b) => Math.hypot(...a) - Math.hypot(...b));

function textBox({ at: [x, y], text, size, weight, anchor }: TextShape): Box {
  const w = measureText(text, size, weight);
  const left = anchor === 'start' ? x : anchor === 'end' ? x - w : x - w / 2;
  return { x: left, y: y - size, w, h: 1.3 * size };
}

/** Everything that is drawn: symbols with their tags and links, lines, labels, other notes and the names of areas. */
function drawn({ units, lines, labels, notes }: Scene): BoxIndex {
  const taken = new BoxIndex();
  for (const { box, tagText, remarks, links } of units) {
    taken.add(box);
    for (const text of [...(tagText ? [tagText] : []), ...remarks, ...links.flatMap((l) => l.text ?? [])])
      taken.add(textBox(text));
  }
  for (const { points } of lines)
    for (let k = 0; k + 1 < points.length; k += 1) taken.add(boxOfPiece(points[k]!, points[k + 1]!, 1));
  for (const { box, folded } of labels) if (!folded) taken.add(box);
  for (const { kind, box, texts } of notes)
    for (const part of kind === 'text' ? [box] : texts.map(textBox)) taken.add(part);
  return taken;
}

/**
 * Where a new note stands on nothing, its upper left corner on the grid: the place nearest to a point that has the most room.
 * Without any room near, the point itself.
 */
export function noteRoom(scene: Scene, [mx, my]: Point): Point {
  const taken = drawn(scene);
  const onGrid = (value: number): number => Math.round(value / GRID) * GRID;
  for (const [w, h] of ROOMS) {
    const [x, y] = [onGrid(mx - w / 2), onGrid(my - h / 2)];
    const step = STEPS.find(([dx, dy]) => !taken.hits({ x: x + dx * STEP, y: y + dy * STEP, w, h }, CLEAR));
    if (step) return [x + step[0] * STEP, y + step[1] * STEP];
  }
  return [onGrid(mx), onGrid(my)];
}
