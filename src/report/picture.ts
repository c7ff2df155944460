import { sheetFrame } from '../drawing/sheetFrame';
import { sceneToSvg } from '../drawing/svg';
import { FONT, PRINT } from '../drawing/tokens';
import { printedTitle } from '../sketch/revision';
import type { ReportInput } from './input';
import { warningOf } from './model';
import { reportScene } from './sheet';

/** Where the shipped font is not known by its own name, it may be by its usual one; else any plain one will do. */
const FAMILIES = `${FONT}, 'Source Sans 3', sans-serif`;

/** The drawing alone as SVG on white paper, in its frame with title block, with the clean answer's numbers. */
export function sheetSvg(input: ReportInput): string {
  const { documents } = input.sketch;
  const title = printedTitle(input.sketch);
  const scene = reportScene(input);
  const frame = sheetFrame(scene.box, documents?.paper ?? 'A3', title, warningOf(title.purpose));
  return sceneToSvg(scene, PRINT, { ground: true, frame }).replaceAll(
    `font-family="${FONT}"`,
    `font-family="${FAMILIES}"`,
  );
}
