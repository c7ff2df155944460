/** A sheet of paper and what is set on it [pt]. */
export interface Paper {
  readonly name: 'A3' | 'A4';
  readonly width: number;
  readonly height: number;
  readonly margin: {
    readonly left: number;
    readonly top: number;
    readonly right: number;
    readonly bottom: number;
  };
  /** Width and height between the margins. */
  readonly inner: { readonly w: number; readonly h: number };
  /** Font sizes. */
  readonly heading: number;
  readonly text: number;
  readonly streams: number;
  readonly strip: number;
  /** Room for the drawing on the first page, and for what stands below it. */
  readonly sheet: number;
  readonly foot: number;
}

function paper(
  name: 'A3' | 'A4',
  width: number,
  height: number,
  sizes: Pick<Paper, 'heading' | 'text' | 'streams' | 'strip' | 'foot'>,
): Paper {
  const margin = { left: 28, top: 26, right: 28, bottom: 50 };
  const inner = { w: width - margin.left - margin.right, h: height - margin.top - margin.bottom };
  return { name, width, height, margin, inner, ...sizes, sheet: inner.h - sizes.foot - 10 };
}

/** Landscape, ISO 216. */
export const PAPERS: Readonly<Record<'A3' | 'A4', Paper>> = {
  A3: paper('A3', 1190.55, 841.89, { heading: 15, text: 8.5, streams: 7.8, strip: 8, foot: 128 }),
  A4: paper('A4', 841.89, 595.28, { heading: 12.5, text: 7.6, streams: 7, strip: 6.4, foot: 104 }),
};

/** What a line of Source Sans 3 takes of its font size: ascent 1.024 and descent 0.4 em, as its head table says. */
export const LINE = 1.424;
