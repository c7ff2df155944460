import type { Note } from '../sketch/types';
import type { BoxIndex } from './boxes';
import { measureText, wrapText } from './metrics';
import { scaledAbout } from './near';
import { TEXT } from './tokens';
import type { Box, NoteShape, PathShape, TextShape } from './types';

/** A text without a size of its own is broken at this width, and no narrower than a word [px]. */
const WIDEST = 240;
const LINE = 16;
/** First baseline below the upper edge [px]. */
const ASCENT = 11;
/** An area without a size of its own, and the room of its name at its upper left corner [px]. */
const AREA = { w: 320, h: 200 } as const;
const INSET = 8;
/** A note grows on a smaller sheet as far as it meets nothing: tried from the full scale down [-]. */
const SHARES = [1, 0.75, 0.5, 0.25] as const;
const CLEAR = 3;

/** A note that is on the drawing, where it stands at 100 %. */
export interface StandingNote {
  readonly id: string;
  readonly kind: 'text' | 'area';
  /** Of an area: its border. */
  readonly box: Box;
  /** What its text takes. */
  readonly textBox: Box;
  readonly texts: readonly TextShape[];
}

const stood = new WeakMap<Note, StandingNote>();

/** Notes that have a place, as texts and areas; the same note gives the same object. */
export function standingNotes(notes: readonly Note[]): readonly StandingNote[] {
  return notes.flatMap((note) => {
    if (!note.at) return [];
    let now = stood.get(note);
    if (!now) {
      now = note.kind === 'area' ? areaOf(note, note.at) : textOf(note, note.at);
      stood.set(note, now);
    }
    return [now];
  });
}

const linesAt = (
  rows: readonly string[],
  x: number,
  y: number,
  style: Pick<TextShape, 'weight' | 'ink'>,
): readonly TextShape[] =>
  rows.map((text, k) => ({
    ...style,
    at: [x, y + ASCENT + k * LINE],
    text,
    size: TEXT.note,
    anchor: 'start',
  }));

const widthOf = (texts: readonly TextShape[]): number =>
  Math.max(0, ...texts.map(({ text, size, weight }) => measureText(text, size, weight)));

function textOf({ id, text, size }: Note, [x, y]: readonly [number, number]): StandingNote {
  const rows = wrapText(text, size?.[0] ?? WIDEST, TEXT.note);
  const texts = linesAt(rows, x, y, { weight: 400, ink: 'ink' });
  const box = {
    x,
    y,
    w: Math.max(size?.[0] ?? 0, widthOf(texts)),
    h: Math.max(size?.[1] ?? 0, rows.length * LINE),
  };
  return { id, kind: 'text', box, textBox: { x, y, w: widthOf(texts), h: rows.length * LINE }, texts };
}

function areaOf({ id, text, size }: Note, [x, y]: readonly [number, number]): StandingNote {
  const [w, h] = size ?? [AREA.w, AREA.h];
  const rows = text.trim() === '' ? [] : wrapText(text, Math.max(w - 2 * INSET, 1), TEXT.note, 600);
  const texts = linesAt(rows, x + INSET, y + INSET, { weight: 600, ink: 'ink2' });
  const textBox = { x: x + INSET, y: y + INSET, w: widthOf(texts), h: rows.length * LINE };
  return { id, kind: 'area', box: { x, y, w, h }, textBox, texts };
}

const sidesOf = ({ x, y, w, h }: Box): readonly Box[] => [
  { x: x - 0.5, y: y - 0.5, w: w + 1, h: 1 },
  { x: x - 0.5, y: y + h - 0.5, w: w + 1, h: 1 },
  { x: x - 0.5, y: y - 0.5, w: 1, h: h + 1 },
  { x: x + w - 0.5, y: y - 0.5, w: 1, h: h + 1 },
];

const border = ({ x, y, w, h }: Box): PathShape => ({
  d: `M${x} ${y}H${x + w}V${y + h}H${x}Z`,
  width: 1,
  stroke: 'hair',
  fill: 'none',
  dash: '6 4',
});

/**
 * Notes as they are drawn. The text of a note grows about its upper left corner as far as it meets nothing; what it takes is
 * added to `taken`, so that labels and tags keep off it, and off an area's border; lines pass it, and diamonds stand on it.
 */
export function placeNotes(
  notes: readonly StandingNote[],
  taken: BoxIndex,
  scale: number,
): readonly { readonly shape: NoteShape; readonly room: Box }[] {
  return notes.map((note) => {
    const hold = [note.textBox.x, note.textBox.y] as const;
    const tries = scale === 1 ? [] : SHARES.map((share) => 1 + share * (scale - 1));
    const upTo = tries.find((k) => !taken.hits(scaledAbout(note.textBox, hold, k), CLEAR)) ?? 1;
    const room = scaledAbout(note.textBox, hold, upTo);
    if (note.texts.length > 0) taken.add(room);
    if (note.kind === 'area') for (const side of sidesOf(note.box)) taken.add(side);
    const { id, kind, box, texts } = note;
    const shape = { id, kind, box, texts, hold, upTo, ...(kind === 'area' ? { border: border(box) } : {}) };
    return { shape, room };
  });
}
