import { scaleLinear } from 'd3-scale';
import { cutText, measureText } from './metrics';
import { type NameRequest, placeNames } from './profileNames';
import type { Box, PathShape, Point, TextShape } from './types';

/** A place in a column: a stage counted from 1 at the top, or an end by its name. */
export type ProfilePlace = number | 'condenser' | 'reboiler';

/** One quantity over the stages, in the units it is shown in. */
export interface ProfileLine {
  readonly key: string;
  /** Stands beside the line. */
  readonly name: string;
  /** Stages 1 to N. */
  readonly values: ArrayLike<number>;
  /** At the ends; left out where there is no such end, or nothing of the quantity. */
  readonly condenser?: number;
  readonly reboiler?: number;
}

export interface ProfilePlot {
  readonly key: string;
  /** "Temperature, °C". */
  readonly title: string;
  readonly lines: readonly ProfileLine[];
  /** The scale begins at zero. */
  readonly fromZero?: true;
}

export interface ProfileData {
  readonly stages: number;
  readonly condenser: boolean;
  readonly reboiler: boolean;
  readonly plots: readonly ProfilePlot[];
  /** Where something enters or is drawn: dotted through all plots. */
  readonly marks: readonly { readonly at: ProfilePlace; readonly text: string }[];
}

/** Where a line's values came to lie; for what points at them. */
export interface DrawnLine {
  readonly key: string;
  readonly points: readonly { readonly at: ProfilePlace; readonly point: Point }[];
}
export interface DrawnPlot {
  readonly key: string;
  /** The field between the axes. */
  readonly box: Box;
  readonly lines: readonly DrawnLine[];
}

export interface ProfilePicture {
  readonly width: number;
  readonly height: number;
  readonly plots: readonly DrawnPlot[];
  readonly paths: readonly PathShape[];
  readonly texts: readonly TextShape[];
}

/** How far the ends stand off the first and last stage [px]. */
export const END_OFFSET = 13;
const [TITLE, LABEL] = [11.5, 11];
const [TOP, FOOT, GAP, RING, SIDE] = [22, 17, 18, 2.6, 8];
const LABEL_STEP = 12;
/** Lines are told apart by their dashes, in this order. */
export const DASHES: readonly (string | undefined)[] = [
  undefined,
  '6 3',
  '1.6 2.4',
  '9 2.5 1.6 2.5',
  '3 2',
  '12 3',
];

/**
 * Plots side by side over one vertical axis: the top of the column on top, the ends off the stages as rings joined by dots.
 * Paths and texts in px, origin at the top left; screen and paper draw the same.
 *
 * @param size  of the whole picture [px]
 */
export function profilePicture(
  given: ProfileData,
  size: { readonly width: number; readonly height: number },
): ProfilePicture {
  const places = placesOf(given);
  const data = { ...given, marks: given.marks.filter((mark) => places.includes(mark.at)) };
  const field = { top: TOP, bottom: size.height - FOOT };
  const y = heights(data, field);
  const axis = Math.max(...places.map((at) => measureText(placeWord(at), LABEL, 600))) + 8;
  const count = Math.max(1, data.plots.length);
  const w = (size.width - axis - SIDE - GAP * (count - 1)) / count;
  const paths: PathShape[] = [];
  const texts: TextShape[] = [...placeTexts(data, y, axis - 8)];
  const boxes = data.plots.map(
    (_, k): Box => ({ x: axis + k * (w + GAP), y: field.top, w, h: field.bottom - field.top }),
  );
  const last = boxes.at(-1);
  for (const at of new Set(data.marks.map((mark) => mark.at)))
    if (last) paths.push(line(`M${px(axis)} ${px(y(at))}H${px(last.x + last.w)}`, 'ink3', 1, '1 3'));
  const plots = data.plots.map((plot, k): DrawnPlot => {
    const drawn = drawPlot(plot, boxes[k]!, data, y, k === 0);
    paths.push(...drawn.paths);
    texts.push(...drawn.texts);
    return { key: plot.key, box: boxes[k]!, lines: drawn.lines };
  });
  return { ...size, plots, paths, texts };
}

const px = (value: number): string => `${Math.round(value * 100) / 100}`;

const line = (d: string, stroke: PathShape['stroke'], width: number, dash?: string): PathShape => ({
  d,
  width,
  stroke,
  fill: 'none',
  ...(dash === undefined ? {} : { dash }),
});

const placesOf = ({ stages, condenser, reboiler }: ProfileData): ProfilePlace[] => [
  ...(condenser ? (['condenser'] as const) : []),
  ...Array.from({ length: stages }, (_, k) => k + 1),
  ...(reboiler ? (['reboiler'] as const) : []),
];

const placeWord = (at: ProfilePlace): string =>
  at === 'condenser' ? 'cond' : at === 'reboiler' ? 'reb' : String(at);

/** Height of a place: stages evenly apart, ends a fixed way off them; a single stage stands in the middle. */
function heights(
  { stages, condenser, reboiler }: ProfileData,
  { top, bottom }: { readonly top: number; readonly bottom: number },
): (at: ProfilePlace) => number {
  const inset = RING + 2;
  const first = top + inset + (condenser ? END_OFFSET : 0);
  const last = bottom - inset - (reboiler ? END_OFFSET : 0);
  const one = (first + last) / 2;
  return (at) => {
    if (at === 'condenser') return (stages === 1 ? one : first) - END_OFFSET;
    if (at === 'reboiler') return (stages === 1 ? one : last) + END_OFFSET;
    return stages === 1 ? one : first + ((last - first) * (at - 1)) / (stages - 1);
  };
}

/** Names of places along the axis: ends, first and last, what enters or leaves, then round numbers where room is left. */
function placeTexts(data: ProfileData, y: (at: ProfilePlace) => number, right: number): TextShape[] {
  const { stages, condenser, reboiler, marks } = data;
  const round = scaleLinear([1, stages], [0, 1]).ticks(Math.min(6, stages));
  const marked = new Set(marks.map((mark) => mark.at));
  const wanted: readonly ProfilePlace[] = [
    ...(condenser ? (['condenser'] as const) : []),
    ...(reboiler ? (['reboiler'] as const) : []),
    1,
    ...marked,
    stages,
    ...round.filter((at) => Number.isInteger(at) && at > 1 && at < stages),
  ];
  const placed = new Map<ProfilePlace, number>();
  for (const at of wanted) {
    const here = y(at);
    if ([...placed.values()].every((other) => Math.abs(other - here) >= LABEL_STEP)) placed.set(at, here);
  }
  return [...placed].map(
    ([at, here]): TextShape => ({
      at: [right, here + 3.8],
      text: placeWord(at),
      size: LABEL,
      weight: marked.has(at) ? 600 : 400,
      anchor: 'end',
      ink: marked.has(at) ? 'ink' : 'ink2',
    }),
  );
}

interface Drawing {
  readonly paths: readonly PathShape[];
  readonly texts: readonly TextShape[];
  readonly lines: readonly DrawnLine[];
}

function drawPlot(
  plot: ProfilePlot,
  box: Box,
  data: ProfileData,
  y: (at: ProfilePlace) => number,
  isFirst: boolean,
): Drawing {
  const ends: readonly ('condenser' | 'reboiler')[] = ['condenser', 'reboiler'];
  const x = horizontal(plot, box);
  const [ticks, labels] = ticksOf(x, box);
  const bottom = box.y + box.h;
  const paths: PathShape[] = ticks.map((at) =>
    line(`M${px(x(at))} ${px(box.y)}V${px(bottom)}`, 'rule', at === 0 ? 0 : 0.8),
  );
  paths.push(line(`M${px(box.x)} ${px(box.y)}V${px(bottom)}H${px(box.x + box.w)}`, 'hair', 1));
  const rings: PathShape[] = [];
  const lines = plot.lines.map((of, k): DrawnLine => {
    const stages = Array.from({ length: data.stages }, (_, j) => [j + 1, of.values[j]] as const).flatMap(
      ([at, value]) => (isNumber(value) ? [{ at, point: [x(value), y(at)] as const }] : []),
    );
    const dash = DASHES[k % DASHES.length];
    if (stages.length > 0) paths.push(line(joined(stages.map((s) => s.point)), 'ink', 1.4, dash));
    const drawn: { at: ProfilePlace; point: Point }[] = [...stages];
    for (const end of ends) {
      const value = of[end];
      if (!data[end] || !isNumber(value)) continue;
      const point: Point = [x(value), y(end)];
      const next = end === 'condenser' ? stages[0] : stages.at(-1);
      if (next) paths.push(line(joined([point, next.point]), 'ink', 1, '1 2.4'));
      rings.push(ring(point));
      if (end === 'condenser') drawn.unshift({ at: end, point });
      else drawn.push({ at: end, point });
    }
    return { key: of.key, points: drawn };
  });
  const title: TextShape = {
    at: [box.x, 12],
    text: cutText(plot.title, box.w + GAP - 6, TITLE, 600),
    size: TITLE,
    weight: 600,
    anchor: 'start',
    ink: 'ink',
  };
  const dotted = [...new Set(data.marks.map((mark) => y(mark.at)))];
  const names = placeNames(requests(plot, lines, data, y, isFirst), box, lines, dotted);
  return { paths: [...paths, ...rings], texts: [title, ...labels, ...names], lines };
}

/** What asks for room in a plot: its lines' names if there are several, and in the first plot what the dotted lines are. */
function requests(
  plot: ProfilePlot,
  lines: readonly DrawnLine[],
  data: ProfileData,
  y: (at: ProfilePlace) => number,
  isFirst: boolean,
): NameRequest[] {
  const marks = isFirst
    ? [...new Set(data.marks.map((mark) => mark.at))].map((at): NameRequest => {
        const words = data.marks.filter((mark) => mark.at === at).map((mark) => mark.text);
        return { text: [...new Set(words)].join(', '), level: y(at) };
      })
    : [];
  const names = plot.lines.length > 1 ? plot.lines.map((of, k) => ({ text: of.name, line: lines[k]! })) : [];
  return [...names, ...marks];
}

const isNumber = (value: number | undefined): value is number =>
  value !== undefined && Number.isFinite(value);
const joined = (points: readonly Point[]): string =>
  `M${points.map(([x, y]) => `${px(x)} ${px(y)}`).join('L')}`;
const ring = ([x, y]: Point): PathShape => ({
  d: `M${px(x - RING)} ${px(y)}a${RING} ${RING} 0 1 0 ${2 * RING} 0a${RING} ${RING} 0 1 0 ${-2 * RING} 0Z`,
  width: 1.1,
  stroke: 'ink',
  fill: 'paper',
});

/** A linear scale over everything the plot shows, widened to round numbers. */
function horizontal({ lines, fromZero }: ProfilePlot, box: Box) {
  const values = lines
    .flatMap((of) => [...Array.from(of.values), of.condenser, of.reboiler])
    .filter((value) => isNumber(value));
  let low = values.reduce((a, b) => Math.min(a, b), fromZero ? 0 : Infinity);
  let high = values.reduce((a, b) => Math.max(a, b), fromZero ? 0 : -Infinity);
  if (values.length === 0) [low, high] = [0, 1];
  else if (low === high) {
    const half = Math.max(Math.abs(low) * 0.01, 0.5);
    [low, high] = fromZero && low >= 0 ? [0, high === 0 ? 1 : high] : [low - half, high + half];
  }
  return scaleLinear([low, high], [box.x, box.x + box.w]).nice(2);
}

function ticksOf(
  x: ReturnType<typeof horizontal>,
  box: Box,
): readonly [readonly number[], readonly TextShape[]] {
  const count = box.w < 110 ? 2 : 3;
  const ticks = x.ticks(count);
  const format = x.tickFormat(count);
  const ordered = [ticks[0], ticks.at(-1), ...ticks.slice(1, -1)].filter((at) => at !== undefined);
  const taken: [number, number][] = [];
  const texts = ordered.flatMap((at): TextShape[] => {
    const text = at === 0 ? '0' : format(at).replaceAll(',', '\u2009');
    const half = measureText(text, LABEL) / 2 + 2;
    // Kept off the labels of the plots beside it.
    const edge = Math.max(0, half - GAP / 2);
    const middle = Math.min(Math.max(x(at), box.x + edge), box.x + box.w - edge);
    if (taken.some(([from, to]) => middle + half > from && middle - half < to)) return [];
    taken.push([middle - half, middle + half]);
    return [
      { at: [middle, box.y + box.h + 13], text, size: LABEL, weight: 400, anchor: 'middle', ink: 'ink2' },
    ];
  });
  return [ticks, texts];
}
