import { fontSubset } from '../drawing/fontSubset';
import { type FontWeight, measureText } from '../drawing/metrics';
import { sheetFrame } from '../drawing/sheetFrame';
import { sceneToSvg } from '../drawing/svg';
import { FONT, PRINT } from '../drawing/tokens';
import type { Scene } from '../drawing/types';
import { printedTitle } from '../sketch/revision';
import type { ReportInput } from './input';
import { warningOf } from './model';
import { leftOffPaper, paperScene } from './sheet';

/** The faces of the shipped font as TrueType files. */
export interface FontFiles {
  readonly normal: Uint8Array;
  readonly bold: Uint8Array;
  readonly italics: Uint8Array;
}

/** Where the shipped font is not known by its own name, it may be by its usual one; else any plain one will do. */
const FAMILIES = `${FONT}, 'Source Sans 3', sans-serif`;

const PT_PER_MM = 72 / 25.4;

/** The drawing alone as SVG on white paper, in its frame with title block, with the clean answer's numbers. */
function drawing(input: ReportInput): string {
  const title = printedTitle(input.sketch);
  const paper = input.sketch.documents?.paper ?? 'A3';
  const framed = (scene: Scene) =>
    sheetFrame(scene.box, paper, title, { warning: warningOf(title.purpose), leftOff: leftOffPaper(scene) });
  const scene = paperScene(input, (plain) => PT_PER_MM / framed(plain).scale);
  const frame = framed(scene);
  return sceneToSvg(scene, PRINT, { ground: true, frame });
}

/** The drawing for a painter that has the shipped font. */
export const sheetSvg = (input: ReportInput): string =>
  drawing(input).replaceAll(`font-family="${FONT}"`, `font-family="${FAMILIES}"`);

/** The drawing as a file of its own: whoever opens it needs no font of ours. */
export const sheetSvgFile = (input: ReportInput, fonts: FontFiles): string =>
  selfContained(drawing(input), fonts);

/**
 * Where a program ignores the font that the drawing carries, a narrow one is better than a wide one: texts are set to
 * their measured lengths, and where a program ignores that too, they stay inside their room.
 */
const ELSEWHERE = `${FONT}, 'Source Sans 3', 'Source Sans Pro', 'Arial Narrow', 'Liberation Sans Narrow', 'Nimbus Sans Narrow', 'DejaVu Sans Condensed', Arial, sans-serif`;

const FACES: readonly {
  readonly file: keyof FontFiles;
  readonly weight: FontWeight;
  readonly italic: boolean;
}[] = [
  { file: 'normal', weight: 400, italic: false },
  { file: 'bold', weight: 600, italic: false },
  { file: 'italics', weight: 400, italic: true },
];
const TEXT_TAG = /<text ([^>]*)>([^<]*)<\/text>/g;
const ENTITIES: Readonly<Record<string, string>> = { lt: '<', gt: '>', quot: '"', amp: '&' };

interface Written {
  readonly text: string;
  readonly size: number;
  readonly face: (typeof FACES)[number] | undefined;
}

/** What a text tag of drawing/svg.ts says, with which face. */
function written(attributes: string, content: string): Written {
  const italic = attributes.includes('font-style="italic"');
  const weight: FontWeight = attributes.includes('font-weight="600"') ? 600 : 400;
  return {
    text: content.replace(/&(lt|gt|quot|amp);/g, (all, name: string) => ENTITIES[name] ?? all),
    size: Number(/font-size="([\d.]+)"/.exec(attributes)?.[1]),
    face: FACES.find((face) => face.italic === italic && (italic || face.weight === weight)),
  };
}

/** An SVG of drawing/svg.ts with the glyphs that it uses inside, and every text set to the length that it was measured with. */
export function selfContained(svg: string, fonts: FontFiles): string {
  const used = new Map(FACES.map((face) => [face, new Set<string>()]));
  const texts = svg.replaceAll(TEXT_TAG, (_, attributes: string, content: string) => {
    const { text, size, face } = written(attributes, content);
    for (const char of text) if (face) used.get(face)?.add(char);
    const length = measureText(text.trim(), size, face?.weight, face?.italic);
    const rest = attributes.replace(`font-family="${FONT}" `, '');
    const set = length > 0 ? ` textLength="${length.toFixed(2)}" lengthAdjust="spacingAndGlyphs"` : '';
    return `<text ${rest}${set}>${content}</text>`;
  });
  const faces = FACES.filter((face) => (used.get(face)?.size ?? 0) > 0).map(
    (face) =>
      `@font-face{font-family:${FONT};font-weight:${face.weight};font-style:${face.italic ? 'italic' : 'normal'};` +
      `src:url(data:font/ttf;base64,${base64(fontSubset(fonts[face.file], used.get(face) ?? []))}) format("truetype")}`,
  );
  return texts.replace('>', ` font-family="${ELSEWHERE}"><style>${faces.join('')}</style>`);
}

function base64(bytes: Uint8Array): string {
  let text = '';
  for (const byte of bytes) text += String.fromCharCode(byte);
  return btoa(text);
}
