import type { UnitId } from '../engine/ids';
import { BoxIndex, boxAround, type Entry, pieceBoxes } from './boxes';
import { DIAMOND } from './diamonds';
import { leaderBoxes } from './leaders';
import { scaledAbout } from './near';
import { solidBoxesOf, textBoxesOf } from './shapeBoxes';
import { WEIGHT } from './tokens';
import type { Box, LabelShape, Point, Scene } from './types';

export const HALF_LINE = WEIGHT.material / 2;
/** Half the width of an arrowhead [px]. */
const HALF_HEAD = 4;

/** A label as it is seen at a text scale. */
export const seenBox = ({ box, hold }: LabelShape, scale: number): Box => scaledAbout(box, hold, scale);

/** Its leader line as it is seen, as small boxes. */
export function seenLeader({ leader, hold }: LabelShape, scale: number): readonly Box[] {
  if (!leader) return [];
  const [a, b] = leader.map(
    ([x, y]): Point => [hold[0] + (x - hold[0]) * scale, hold[1] + (y - hold[1]) * scale],
  );
  return leaderBoxes([a!, b!]);
}

interface Filed {
  readonly index: BoxIndex;
  readonly entry: Entry;
}

/**
 * Everything on a sheet by its place, made once a scene. What is under the hand is taken out and put in elsewhere for one
 * step of the hand, then all is put back: a step costs what it changes.
 */
export class HandGround {
  /** Symbols, texts, lines (owner: index of the line) and diamonds (owner: `diamond` and the index). */
  readonly taken = new BoxIndex();
  /** Open labels and their leader lines, by the index of their line. */
  readonly labels = new BoxIndex();
  /** Lines and middles of diamonds, by the index of their line: what a label could be taken to belong to. */
  readonly lines = new BoxIndex();
  readonly middles = new BoxIndex();
  readonly scale: number;
  private readonly files = new Map<string, Filed[]>();
  private journal: { readonly undo: () => void }[] = [];

  constructor({ units, lines, labels, notes, textScale }: Scene) {
    this.scale = textScale;
    for (const shape of units)
      this.putUnit(shape.unit, [...solidBoxesOf(shape, textScale), ...textBoxesOf(shape, textScale)]);
    for (const note of notes)
      if (note.texts.length > 0)
        this.taken.add(scaledAbout(note.box, note.hold, Math.min(textScale, note.upTo)));
    const rank = new Map(lines.map((line, k) => [line.stream, k]));
    lines.forEach((line, k) => {
      this.putLine(k, line.points);
      this.putDiamond(k, line.diamond);
    });
    for (const label of labels) this.putLabel(rank.get(label.stream)!, label);
    this.journal = [];
  }

  putUnit(unit: UnitId, boxes: readonly Box[]): void {
    this.file(
      `unit ${unit}`,
      boxes.map((box) => [this.taken, box, unit]),
    );
  }

  putLine(k: number, points: readonly Point[]): void {
    const pieces = pieceBoxes(points, HALF_LINE);
    this.file(`line ${k}`, [
      ...pieces.flatMap((box): Put[] => [
        [this.taken, box, k],
        [this.lines, box, k],
      ]),
      [this.taken, boxAround(points.at(-1)!, HALF_HEAD), k],
    ]);
  }

  putDiamond(k: number, at: Point | undefined): void {
    if (!at) return;
    this.file(`diamond ${k}`, [
      [this.taken, boxAround(at, DIAMOND * this.scale), `diamond ${k}`],
      [this.middles, boxAround(at, 0.01), k],
    ]);
  }

  putLabel(k: number, label: LabelShape): void {
    if (label.folded) return;
    this.file(`label ${k}`, [
      [this.labels, seenBox(label, this.scale), k],
      ...seenLeader(label, this.scale).map((box): Put => [this.labels, box, k]),
    ]);
  }

  takeOut(what: 'unit' | 'line' | 'diamond' | 'label', which: UnitId | number): void {
    const name = `${what} ${which}`;
    const filed = this.files.get(name);
    if (!filed) return;
    for (const { index, entry } of filed) index.remove(entry);
    this.files.delete(name);
    this.journal.push({
      undo: () =>
        this.files.set(
          name,
          filed.map(({ index, entry: { box, owner } }) => ({ index, entry: index.add(box, owner) })),
        ),
    });
  }

  /** As it was before the step. */
  putBack(): void {
    for (const { undo } of this.journal.reverse()) undo();
    this.journal = [];
  }

  private file(name: string, puts: readonly Put[]): void {
    const filed = puts.map(([index, box, owner]) => ({ index, entry: index.add(box, owner) }));
    this.files.set(name, filed);
    this.journal.push({
      undo: () => {
        for (const { index, entry } of filed) index.remove(entry);
        this.files.delete(name);
      },
    });
  }
}

type Put = readonly [index: BoxIndex, box: Box, owner: unknown];
