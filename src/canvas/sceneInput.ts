import { labelRows, linkTexts, remarksOf, type SolvedStream } from '../drawing/labelText';
import type { DrawnState, LabelRow, LinkTexts, SceneInput } from '../drawing/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Finding, Weight } from '../engine/outcome';
import { worstWeight } from '../parts/LimitMark';
import { measuresOf } from '../parts/measures';
import type { Measures } from '../quantity';
import type { Sketch } from '../sketch/types';
import { drawnState, type ResultsState, shownStream } from '../store/resultsStore';

interface Kept {
  readonly result: SolvedStream;
  readonly rows: readonly LabelRow[];
}

/**
 * Turns results into what the scene shows. Texts are kept by the record they came from, so that an untouched result is not
 * formatted again.
 */
export function createSceneInput() {
  let display: Sketch['display'] | null = null;
  let site: Sketch['site'] | null = null;
  let measures: Measures = { set: 'metric' };
  let rows = new Map<StreamId, Kept>();

  return (sketch: Sketch, results: ResultsState, gaps: readonly Finding[], textScale = 1): SceneInput => {
    if (sketch.display !== display || sketch.site !== site) {
      display = sketch.display;
      site = sketch.site;
      measures = measuresOf(sketch);
      rows = new Map();
    }
    const kept = new Map<StreamId, Kept>();
    const labels = new Map<StreamId, readonly LabelRow[]>();
    for (const { id } of sketch.streams) {
      const result = shownStream(results.streams.get(id))?.result;
      if (!result) continue;
      const old = rows.get(id);
      const now =
        old?.result === result ? old : { result, rows: labelRows(result, sketch.display.labels, measures) };
      kept.set(id, now);
      labels.set(id, now.rows);
    }
    rows = kept;

    // Before the first answer, what compiling misses is known already.
    const lacking = new Set(gaps.map((gap) => gap.at.unit));
    const states = new Map<UnitId, DrawnState>();
    const duties = new Map<UnitId, LinkTexts>();
    const remarks = new Map<UnitId, readonly string[]>();
    for (const unit of sketch.units) {
      const { id, kind } = unit;
      const entry = results.units.get(id);
      states.set(id, entry ? drawnState(entry) : lacking.has(id) ? 'needs-value' : 'waiting');
      const shown = entry?.latest.state === 'solved' ? entry.latest : entry?.older;
      if (shown) duties.set(id, linkTexts(kind, shown, measures));
      const lines = remarksOf(unit, shown);
      if (lines.length > 0) remarks.set(id, lines);
    }
    return {
      states,
      limits: worstByUnit(results),
      labels,
      duties,
      remarks,
      textScale,
    };
  };
}

function worstByUnit(results: ResultsState): ReadonlyMap<UnitId, Weight> {
  const worst = new Map<UnitId, Weight>();
  for (const finding of results.findings) {
    const unit = finding.at.unit;
    if (!unit) continue;
    const heavier = worstWeight([
      finding,
      ...(worst.has(unit) ? [{ ...finding, weight: worst.get(unit)! }] : []),
    ]);
    if (heavier) worst.set(unit, heavier);
  }
  return worst;
}
