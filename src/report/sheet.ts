import { labelRows, linkTexts, remarksOf } from '../drawing/labelText';
import { measuresOf } from '../drawing/measures';
import { buildScene } from '../drawing/scene';
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

/** The same scene as on the canvas, with the clean answer's numbers. */
export function reportScene(input: ReportInput): Scene {
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
    ...(input.kinds ? { kinds: input.kinds } : {}),
  });
}
