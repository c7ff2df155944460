import type { Note, Sketch } from '../sketch/types';
import { cutText, measureText } from './metrics';
import { TEXT } from './tokens';
import type { Box, TextShape } from './types';

/** Width of a note that has no size of its own, and room between its border and its text [px]. */
const WIDTH = 176;
const PAD = 6;
const LINE = 16;

/** A note or an area as it is drawn: its box, and its text in lines. */
export interface NoteShape {
  readonly note: string;
  readonly kind: NonNullable<Note['kind']>;
  readonly box: Box;
  readonly texts: readonly TextShape[];
}

/** Lines of a text within a width; a word that is wider than the width is cut. */
export function wrapText(text: string, width: number, size: number): readonly string[] {
  return text.split(/\r?\n/).flatMap((paragraph) => {
    const lines: string[] = [];
    let line = '';
    for (const word of paragraph.split(/\s+/).filter(Boolean)) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (measureText(longer, size) <= width) line = longer;
      else {
        if (line !== '') lines.push(line);
        line = cutText(word, width, size);
      }
    }
    return [...lines, line];
  });
}

/** A note with a place on the sheet, as it is drawn: an area's name stands in its upper left corner. */
export function noteShape(note: Note): NoteShape | undefined {
  if (!note.at) return undefined;
  const [x, y] = note.at;
  const isArea = note.kind === 'area';
  const w = note.size?.[0] ?? WIDTH;
  const lines = isArea
    ? [cutText(note.text, w - 2 * PAD, TEXT.tag, 600)]
    : wrapText(note.text, w - 2 * PAD, TEXT.tag);
  const h = Math.max(note.size?.[1] ?? 0, lines.length * LINE + 2 * PAD);
  return {
    note: note.id,
    kind: isArea ? 'area' : 'text',
    box: { x, y, w, h },
    texts: lines.map((text, k) => ({
      at: [x + PAD, y + PAD + 12 + k * LINE],
      text,
      size: TEXT.tag,
      weight: isArea ? 600 : 400,
      anchor: 'start',
      ink: isArea ? 'ink2' : 'ink',
    })),
  };
}

/** All notes and areas of the sheet, as they are drawn; areas first, for they lie behind the rest. */
export const noteShapes = ({ notes }: Pick<Sketch, 'notes'>): readonly NoteShape[] =>
  notes
    .flatMap((note) => noteShape(note) ?? [])
    .sort((a, b) => Number(a.kind === 'text') - Number(b.kind === 'text'));
