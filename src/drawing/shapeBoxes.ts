import { boxAround, boxOfPiece } from './boxes';
import { measureText } from './metrics';
import { scaledAbout } from './near';
import { type Pose, portOnSheet, toSheet } from './transform';
import type { Box, Point, TextShape, UnitShape } from './types';

/** Half the room of a heat or shaft link with its end marks, and half a limit's mark [px]. */
const HALF_LINK = 4;
const HALF_MARK = 8;
/** Height of a tag with its state mark under it, and of a text, as shares of their size [-]. */
const TAG_HEIGHT = 18;
const [ABOVE, HEIGHT] = [0.75, 0.95];

const shifted = (box: Box, [dx, dy]: Point): Box => ({ ...box, x: box.x + dx, y: box.y + dy });

function boxOfText({ at: [x, y], text, size, weight, anchor }: TextShape): Box {
  const w = measureText(text, size, weight);
  const left = anchor === 'start' ? x : anchor === 'end' ? x - w : x - w / 2;
  return { x: left, y: y - size * ABOVE, w, h: size * HEIGHT };
}

/** Links of a unit, as lines keep off them. */
export const linkBoxesOf = ({ symbol }: UnitShape, pose: Pose): readonly Box[] =>
  (symbol.links ?? []).map(({ from, to }) => boxOfPiece(toSheet(pose, from), toSheet(pose, to), HALF_LINK));

/** What a drawn unit covers: its symbol, a flag as large as it is on the screen, and its links. */
export function solidBoxesOf(shape: UnitShape, textScale: number, by: Point = [0, 0]): readonly Box[] {
  const { symbol, box, flagUpTo } = shape;
  const port = symbol.nameInside ? (symbol.ports('out') ?? symbol.ports('in')) : undefined;
  const own = port ? scaledAbout(box, portOnSheet(shape, port).at, Math.min(textScale, flagUpTo)) : box;
  return [own, ...linkBoxesOf(shape, shape)].map((one) => shifted(one, by));
}

/** Texts that stand beside a drawn unit: tag with the room of its state, limit mark, remarks, duties, a name outside. */
export function textBoxesOf(shape: UnitShape, textScale: number, by: Point = [0, 0]): readonly Box[] {
  const { tagText, limit, links, symbol, texts, remarks, hold, tagUpTo } = shape;
  const held = [
    ...(tagText ? [{ ...boxOfText(tagText), h: TAG_HEIGHT }] : []),
    ...(limit ? [boxAround(limit.at, HALF_MARK)] : []),
    ...remarks.map(boxOfText),
  ].map((box) => scaledAbout(box, hold, Math.min(textScale, tagUpTo)));
  const duties = links.flatMap(({ text }) =>
    text ? [scaledAbout(boxOfText(text), text.at, textScale)] : [],
  );
  const names = symbol.nameInside ? [] : texts.map(boxOfText);
  return [...held, ...duties, ...names].map((one) => shifted(one, by));
}
