import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { sameBox } from './boxes';
import { groundOf, type Made, sameGround } from './ground';
import { type Layout, layOut } from './layout';
import { keepSame, sameValue } from './same';
import type { LabelRow, LabelShape, Omitted, Scene, SceneInput, UnitShape } from './types';
import { shapeOf } from './units';

interface Kept extends Made {
  readonly layout: Layout;
}
const kept = new WeakMap<Scene, Kept>();

/**
 * Everything on the sheet, placed: symbols, lines, diamonds, tags, duties and labels, in sheet px. Pure: the same sketch
 * and input give the same scene.
 *
 * @param before an earlier scene: while all stands where it stood nothing is placed anew, and its shapes are handed on as
 *   the same objects wherever nothing changed
 */
export function buildScene(sketch: Sketch, input: SceneInput, before?: Scene): Scene {
  const made = before && kept.get(before);
  const ground = groundOf(sketch, input, made);
  const stands = made !== undefined && sameGround(ground, made.ground);
  const layout = stands ? made.layout : layOut(ground, made?.layout);

  const old = stands ? before : undefined;
  const now: Made = { sketch, input, ground };
  const units = ground.standing.map((u, k) => {
    const was = before?.units[k];
    const placed = stands || (made && sameValue(layout.texts[k], made.layout.texts[k]));
    return was && placed && drawnAlike(u.unit.id, k, now, made!) ? was : shapeOf(u, input, layout.texts[k]!);
  });
  const sources = new Map(sketch.streams.map((stream) => [stream.id, stream.from?.[0]]));
  const labels = layout.labels.map((place, k): LabelShape => {
    const rows = input.labels.get(place.stream)!;
    const source = sources.get(place.stream);
    const stale = source !== undefined && input.states.get(source) === 'out-of-date';
    const was = old?.labels[k];
    return was && was.stale === stale && sameRows(was.rows, rows) ? was : { ...place, rows, stale };
  });

  const next: Scene = {
    box: layout.box,
    textScale: ground.textScale,
    units,
    lines: layout.lines,
    labels,
    notes: layout.notes,
    omitted: omittedOf(layout, input),
  };
  const scene = before ? keepScene(next, before) : next;
  kept.set(scene, { ...now, layout });
  return scene;
}

/** Whether everything stands where it stood in the other scene; marks of limits and texts may differ. */
export const sameLayout = (a: Scene, b: Scene): boolean => {
  const layout = kept.get(a)?.layout;
  return a === b || (layout !== undefined && layout === kept.get(b)?.layout);
};

/** What the sheet has no room for: labels that fold, tags and remarks, and duties that somebody asked for. */
function omittedOf(layout: Layout, input: SceneInput): readonly Omitted[] {
  const labels = layout.labels.filter((label) => label.folded);
  const duties = layout.lost.filter(({ unit, link }) => input.duties.get(unit)?.[link] !== undefined);
  return [
    ...labels.map(({ stream }): Omitted => ({ what: 'label', stream })),
    ...layout.omitted,
    ...duties.map(({ unit, link }): Omitted => ({ what: 'duty', unit, link })),
  ];
}

/** Whether the input says the same of a unit that stands where it stood, drawn from the same record. */
function drawnAlike(id: UnitId, k: number, { input, ground }: Made, before: Made): boolean {
  const [u, v] = [ground.standing[k]!, before.ground.standing[k]];
  if (u !== v && !(u.unit === v?.unit && u.symbol === v.symbol && sameValue(u.pose, v.pose))) return false;
  return (
    input.states.get(id) === before.input.states.get(id) &&
    input.limits.get(id) === before.input.limits.get(id) &&
    sameValue(input.duties.get(id), before.input.duties.get(id)) &&
    sameValue(input.remarks?.get(id), before.input.remarks?.get(id))
  );
}

const sameRows = (a: readonly LabelRow[], b: readonly LabelRow[]): boolean =>
  a === b ||
  (a.length === b.length && a.every((row, k) => row.number === b[k]!.number && row.unit === b[k]!.unit));

function keepScene(next: Scene, before: Scene): Scene {
  const units = keepSame<UnitShape>(next.units, before.units, (u) => u.unit);
  const lines = keepSame(next.lines, before.lines, (l) => l.stream);
  const labels = keepSame(next.labels, before.labels, (l) => l.stream);
  const notes = keepSame(next.notes, before.notes, (note) => note.id);
  const omitted = sameValue(next.omitted, before.omitted) ? before.omitted : next.omitted;
  const { textScale } = next;
  const isSame = sameBox(next.box, before.box);
  const isAll =
    isSame &&
    textScale === before.textScale &&
    units === before.units &&
    lines === before.lines &&
    labels === before.labels &&
    notes === before.notes &&
    omitted === before.omitted;
  return isAll
    ? before
    : { box: isSame ? before.box : next.box, textScale, units, lines, labels, notes, omitted };
}
