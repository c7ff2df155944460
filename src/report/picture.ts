import { sceneToSvg } from '../drawing/svg';
import { PRINT } from '../drawing/tokens';
import type { ReportInput } from './input';
import { reportScene } from './sheet';

/** The drawing alone as SVG on white paper, with the clean answer's numbers. */
export const sheetSvg = (input: ReportInput): string =>
  sceneToSvg(reportScene(input), PRINT, { ground: true });
