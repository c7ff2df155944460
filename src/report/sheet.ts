import { labelRows, linkTexts, omittedSentence, remarksOf } from '../drawing/labelText';
import { measuresOf } from '../drawing/measures';
import { buildScene } from '../drawing/scene';
import { textScaleFor } from '../drawing/textScale';
import { TEXT } from '../drawing/tokens';
import type { DrawnState, LabelRow, LinkTexts, Scene } from '../drawing/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Weight } from '../engine/outcome';
import { type ReportInput, solvedStream } from './input';

const RANK: Readonly<Record<Weight, number>> = { note: 0, caution: 1, 'beyond-limit': 2 };

/** The worst limit of each unit. */
export function worstByUnit(input: ReportInput): ReadonlyMap<UnitId, Weight> {
  const worst = new Map<UnitId, Weight>();
  for (const { at, weight } of input.findings) {
    const known = at.unit ? worst.get(at.unit) : undefined;
    if (at.unit && (known === undefined || RANK[weight] > RANK[known])) worst.set(at.unit, weight);
  }
  return worst;
}

/** The same scene as on the canvas at a text scale, with the clean answer's numbers. */
export function reportScene(input: ReportInput, textScale = 1): Scene {
  const { sketch } = input;
  const measures = measuresOf(sketch);
  const labels = new Map<StreamId, readonly LabelRow[]>();
  for (const stream of sketch.streams) {
    const result = solvedStream(input.streams.get(stream.id));
    if (result) labels.set(stream.id, labelRows(result, sketch.display.labels, measures));
  }
  const states = new Map<UnitId, DrawnState>();
  const duties = new Map<UnitId, LinkTexts>();
  const remarks = new Map<UnitId, readonly string[]>();
  for (const unit of sketch.units) {
    const result = input.units.get(unit.id);
    states.set(unit.id, result?.state ?? 'waiting');
    if (result?.state === 'solved') duties.set(unit.id, linkTexts(unit.kind, result, measures, input.kinds));
    const lines = remarksOf(unit, result?.state === 'solved' ? result : undefined);
    if (lines.length > 0) remarks.set(unit.id, lines);
  }
  return buildScene(sketch, {
    states,
    limits: worstByUnit(input),
    labels,
    duties,
    remarks,
    textScale,
    ...(input.kinds ? { kinds: input.kinds } : {}),
  });
}

/** Labels on paper are no smaller than this, as far as the text scales go [pt]. */
const LEAST_PT = 6;

/**
 * The scene for a sheet of paper: where a wide drawing would make its labels too small to read, they are drawn larger, as on a
 * canvas that is zoomed out. What then has no room is in the scene's list of what was left off.
 *
 * @param ptPerPx  how large a scene comes out on the paper
 */
export function paperScene(input: ReportInput, ptPerPx: (scene: Scene) => number): Scene {
  let scene = reportScene(input);
  // Larger labels make the drawing larger, and so themselves smaller.
  for (let pass = 0; pass < 3; pass++) {
    const textScale = textScaleFor(LEAST_PT / (TEXT.label * ptPerPx(scene)));
    if (textScale <= scene.textScale) break;
    scene = reportScene(input, textScale);
  }
  return scene;
}

/** What the drawing on paper leaves off, and where to find it; empty when all of it has room. */
export const leftOffPaper = ({ omitted }: Scene): string =>
  omitted.length === 0 ? '' : `${omittedSentence(omitted)}: see the stream summary.`;
