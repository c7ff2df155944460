import type { StreamId, UnitId } from '../../engine/ids';
import { word } from '../findings';
import { KNOWN_KINDS, type Registry } from '../registry';
import type { Sketch, SketchStream } from '../types';
import { connect, disconnect, type End } from './connect';
import { type Edit, refuse, streamOf, unitOf, without } from './edited';
import { deleteUnits } from './units';

/** The one stream that comes to a unit and the one that goes on from it; undefined when it is not so simple. */
export function passingThrough(
  sketch: Sketch,
  id: UnitId,
): { readonly before: SketchStream; readonly after: SketchStream } | undefined {
  const entering = sketch.streams.filter((s) => s.to?.[0] === id && s.from && s.from[0] !== id);
  const leaving = sketch.streams.filter((s) => s.from?.[0] === id && s.to && s.to[0] !== id);
  const [before, after] = [entering[0], leaving[0]];
  if (entering.length !== 1 || leaving.length !== 1 || !before || !after) return undefined;
  return before.from?.[0] === after.to?.[0] ? undefined : { before, after };
}

/** Deletes a unit and joins its line: what came to it goes on to where its stream went, under its own number. */
export function deleteAndJoin(sketch: Sketch, id: UnitId, registry: Registry = KNOWN_KINDS): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const through = passingThrough(sketch, id);
  if (!through) return refuse('edit/nothing-to-join', word('tag', unit.tag));
  const { before, after } = through;
  const left = deleteUnits(sketch, new Set([id]), registry);
  if (!left.ok) return left;
  const streams = left.sketch.streams.map((s): SketchStream => {
    if (s.id !== before.id || !after.to) return s;
    return { ...without(s, 'via'), to: after.to };
  });
  return {
    ok: true,
    sketch: { ...left.sketch, streams },
    label: `delete ${unit.tag} and join its line`,
    stream: before.id,
  };
}

/** Takes a stream's target end to another inlet; it keeps its number and its source. */
export function reconnect(sketch: Sketch, id: StreamId, to: End, registry: Registry = KNOWN_KINDS): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  if (!stream.from) return refuse('edit/nothing-to-part', word('stream', stream.number));
  if (stream.to && stream.to[0] === to[0] && stream.to[1] === to[1])
    return { ok: true, sketch, label: `lead stream ${stream.number} elsewhere` };
  const loose = disconnect(sketch, id);
  if (!loose.ok) return loose;
  const made = connect(loose.sketch, stream.from, to, registry);
  if (!made.ok) return made;
  const tag = unitOf(sketch, to[0])?.tag ?? '';
  return { ...made, label: `lead stream ${stream.number} to ${tag}` };
}
