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

function withDistillate(unit: SketchUnit, distillate: string, port: string): SketchUnit {
  let settings = withValue(unit.settings, 'top.distillate', distillate);
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
