import { sceneToSvg } from '../drawing/svg';
import { FONT, PRINT } from '../drawing/tokens';
import type { ReportInput } from './input';
import { reportScene } from './sheet';

/** Where the shipped font is not known by its own name, it may be by its usual one; else any plain one will do. */
const FAMILIES = `${FONT}, 'Source Sans 3', sans-serif`;

/** The drawing alone as SVG on white paper, with the clean answer's numbers. */
export const sheetSvg = (input: ReportInput): string =>
  sceneToSvg(reportScene(input), PRINT, { ground: true }).replaceAll(
    `font-family="${FONT}"`,
    `font-family="${FAMILIES}"`,
  );
