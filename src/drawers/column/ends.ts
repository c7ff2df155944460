import type { UnitId } from '../../engine/ids';
import { topPort } from '../../engine/units/column/free';
import type { Json, SketchStream, SketchUnit } from '../../sketch/types';
import type { Change } from '../../store/sketchStore';
import { changeUnit, valueAt, withValue } from '../edits';

const TOP_PORTS: readonly string[] = ['vapourDistillate', 'liquidDistillate'];

/**
 * How the distillate leaves, with all that hangs on it in one edit: the stream of the top moves to the port that there is
 * now, and what was fixed of the old product is fixed of the new one.
 */
export const setDistillate =
  (id: UnitId, distillate: string): Change =>
  (sketch) => {
    const port = topPort({ top: { distillate } });
    const streams = movedStreams(sketch.streams, id, port);
    const changed = changeUnit(id, (unit) => withDistillate(unit, distillate, port))(sketch);
    return streams === changed.streams ? changed : { ...changed, streams };
  };

/** A column whose ends are chosen has a list of what fixes it, be it empty: without ends nothing is free. */
const withList = (settings: Json | undefined): Json | undefined =>
  valueAt(settings, 'fixedBy') === undefined ? withValue(settings, 'fixedBy', []) : settings;

/** Whether there is a reboiler. */
export const setReboiler =
  (id: UnitId, reboiler: boolean): Change =>
  (sketch) =>
    changeUnit(id, (unit) => {
      const settings = withList(withValue(unit.settings, 'bottom.reboiler', reboiler));
      return settings === unit.settings ? unit : { ...unit, settings: settings as SketchUnit['settings'] };
    })(sketch);

function withDistillate(unit: SketchUnit, distillate: string, port: string): SketchUnit {
  let settings = withList(withValue(unit.settings, 'top.distillate', distillate));
  const fixed = valueAt(settings, 'fixedBy');
  (Array.isArray(fixed) ? (fixed as readonly Json[]) : []).forEach((item, k) => {
    const product = valueAt(item, 'product');
    if (typeof product === 'string' && TOP_PORTS.includes(product))
      settings = withValue(settings, `fixedBy.${k}.product`, port);
  });
  return settings === unit.settings ? unit : { ...unit, settings: settings as SketchUnit['settings'] };
}

function movedStreams(streams: readonly SketchStream[], id: UnitId, port: string): readonly SketchStream[] {
  const atTop = streams.filter(({ from }) => from?.[0] === id && TOP_PORTS.includes(from[1]));
  const [only, ...others] = atTop;
  // Two streams at the top: which of them goes on is for the user to say.
  if (!only || others.length > 0 || only.from?.[1] === port) return streams;
  return streams.map((stream) => (stream === only ? { ...stream, from: [id, port] as const } : stream));
}
