import { cutText, type FontWeight, measureText } from '../../drawing/metrics';

/** A hair of room, so that rounding in the PDF maker never breaks a line that was measured to fit. */
const SLACK = 0.4;

/** A word in pieces no wider than `room`. */
function pieces(word: string, room: number, size: number, weight: FontWeight): string[] {
  if (measureText(word, size, weight) <= room) return [word];
  const out: string[] = [];
  let piece = '';
  for (const char of word) {
    if (piece !== '' && measureText(piece + char, size, weight) > room) {
      out.push(piece);
      piece = char;
    } else piece += char;
  }
  return [...out, piece];
}

/**
 * A text in lines no wider than `width` [pt]: broken at spaces, and inside a word only where the word alone is wider. The
 * PDF maker would let such a word run into the next column.
 */
export function linesOf(text: string, width: number, size: number, weight: FontWeight = 400): string[] {
  const room = Math.max(size, width - SLACK);
  const lines: string[] = [];
  for (const paragraph of text.split('\n')) {
    let line = '';
    for (const word of paragraph.split(' ').flatMap((w) => pieces(w, room, size, weight))) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (line !== '' && measureText(longer, size, weight) > room) {
        lines.push(line);
        line = word;
      } else line = longer;
    }
    lines.push(line);
  }
  return lines;
}

export const wrapped = (text: string, width: number, size: number, weight: FontWeight = 400): string =>
  linesOf(text, width, size, weight).join('\n');

/** At most `most` lines, the last with an ellipsis where more was to be said. */
export function fitted(
  text: string,
  width: number,
  size: number,
  most: number,
  weight: FontWeight = 400,
): string {
  const lines = linesOf(text, width, size, weight);
  if (lines.length <= most) return lines.join('\n');
  const kept = lines.slice(0, most);
  kept[most - 1] = cutText(`${kept[most - 1]}…${' '.repeat(0)}`, width - SLACK, size, weight);
  return kept.join('\n');
}
