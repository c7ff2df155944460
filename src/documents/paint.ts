/** What painting needs of a canvas; a real one, or a recorder in tests. */
export interface Painter {
  save(): void;
  restore(): void;
  translate(x: number, y: number): void;
  rotate(angle: number): void;
  scale(x: number, y: number): void;
  setLineDash(segments: number[]): void;
  fillText(text: string, x: number, y: number): void;
  fill(path: Path2D): void;
  stroke(path: Path2D): void;
  fillStyle: string | CanvasGradient | CanvasPattern;
  strokeStyle: string | CanvasGradient | CanvasPattern;
  lineWidth: number;
  lineJoin: CanvasLineJoin;
  lineCap: CanvasLineCap;
  font: string;
  textAlign: CanvasTextAlign;
  globalAlpha: number;
}

type Attributes = ReadonlyMap<string, string>;

interface Piece {
  readonly tag: string;
  readonly attributes: Attributes;
  readonly closes: boolean;
  readonly text: string;
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&lt;': '<',
  '&gt;': '>',
  '&quot;': '"',
  '&apos;': "'",
  '&amp;': '&',
};
const unescaped = (text: string): string => text.replace(/&(lt|gt|quot|apos|amp);/g, (e) => ENTITIES[e] ?? e);

/** Tags of our own SVG one after the other, each with the text behind it. */
function piecesOf(svg: string): Piece[] {
  return [...svg.matchAll(/<(\/?)(\w+)([^>]*?)(\/?)>([^<]*)/g)].map(
    ([, close, tag = '', inside = '', , text = '']) => ({
      tag,
      closes: close === '/',
      attributes: new Map(
        [...inside.matchAll(/([\w-]+)="([^"]*)"/g)].map(([, name = '', value = '']) => [
          name,
          unescaped(value),
        ]),
      ),
      text: unescaped(text),
    }),
  );
}

const numberOf = (of: Attributes, name: string, otherwise: number): number => {
  const value = Number(of.get(name) ?? otherwise);
  return Number.isFinite(value) ? value : otherwise;
};

function transform(to: Painter, text: string | undefined): void {
  for (const [, how, inside = ''] of (text ?? '').matchAll(/(\w+)\(([^)]*)\)/g)) {
    const [a = 0, b] = inside.split(/[\s,]+/).map(Number);
    if (how === 'translate') to.translate(a, b ?? 0);
    else if (how === 'rotate') to.rotate((a * Math.PI) / 180);
    else if (how === 'scale') to.scale(a, b ?? a);
    else throw new Error(`no painting of the transform ${how}`);
  }
}

function inks(to: Painter, of: Attributes): { readonly fills: boolean; readonly strokes: boolean } {
  const fill = of.get('fill') ?? '#000000';
  const stroke = of.get('stroke') ?? 'none';
  to.fillStyle = fill;
  to.strokeStyle = stroke;
  to.lineWidth = numberOf(of, 'stroke-width', 1);
  to.lineJoin = (of.get('stroke-linejoin') ?? 'miter') as CanvasLineJoin;
  to.lineCap = (of.get('stroke-linecap') ?? 'butt') as CanvasLineCap;
  to.setLineDash(
    (of.get('stroke-dasharray') ?? '')
      .split(/[\s,]+/)
      .filter(Boolean)
      .map(Number),
  );
  to.globalAlpha = numberOf(of, 'opacity', 1) * numberOf(of, 'fill-opacity', 1);
  return { fills: fill !== 'none', strokes: stroke !== 'none' };
}

const ANCHORS: Readonly<Record<string, CanvasTextAlign>> = { start: 'left', middle: 'center', end: 'right' };

/** Size that an SVG of ours states. */
export function sizeOf(svg: string): { readonly width: number; readonly height: number } {
  const root = piecesOf(svg.slice(0, 2000))[0]?.attributes ?? new Map<string, string>();
  return { width: numberOf(root, 'width', 0), height: numberOf(root, 'height', 0) };
}

/**
 * Paints an SVG as drawing/svg.ts writes it: paths, texts and groups with explicit attributes, nothing else. A tag or
 * transform that it does not know is a mistake of ours and thrown, never left out of the picture.
 *
 * @param width    of the picture [px]
 * @param makePath path from its description, `(d) => new Path2D(d)`
 */
export function paintSvg(svg: string, width: number, to: Painter, makePath: (d: string) => Path2D): void {
  for (const { tag, attributes: of, closes, text } of piecesOf(svg)) {
    if (closes) {
      if (tag === 'g') to.restore();
    } else if (tag === 'svg') {
      const [x = 0, y = 0, w = 1] = (of.get('viewBox') ?? '').split(/[\s,]+/).map(Number);
      to.scale(width / w, width / w);
      to.translate(-x, -y);
    } else if (tag === 'g') {
      to.save();
      transform(to, of.get('transform'));
    } else if (tag === 'path') {
      to.save();
      transform(to, of.get('transform'));
      const { fills, strokes } = inks(to, of);
      const path = makePath(of.get('d') ?? '');
      if (fills) to.fill(path);
      if (strokes) to.stroke(path);
      to.restore();
    } else if (tag === 'text') {
      to.save();
      transform(to, of.get('transform'));
      inks(to, of);
      const style = of.get('font-style') === 'italic' ? 'italic ' : '';
      to.font = `${style}${of.get('font-weight') ?? '400'} ${of.get('font-size') ?? '12'}px ${of.get('font-family') ?? 'sans-serif'}`;
      to.textAlign = ANCHORS[of.get('text-anchor') ?? 'start'] ?? 'left';
      to.fillText(text, numberOf(of, 'x', 0), numberOf(of, 'y', 0));
      to.restore();
    } else if (tag !== 'title') throw new Error(`no painting of the tag ${tag}`);
  }
}
