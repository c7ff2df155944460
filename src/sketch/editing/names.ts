import type { StreamId, UnitId } from '../../engine/ids';
import { word } from '../findings';
import type { Sketch } from '../types';
import { type Edit, refuse, streamOf, unitOf, withStream, withText, withUnit } from './edited';

/** A unit's tag: unique, since results and messages are keyed by it. */
export function setTag(sketch: Sketch, id: UnitId, text: string): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const tag = text.trim();
  if (tag === '') return refuse('edit/empty-text');
  if (sketch.units.some((u) => u.id !== id && u.tag === tag))
    return refuse('edit/tag-taken', word('tag', tag));
  const next = withUnit(sketch, id, (u) => (u.tag === tag ? u : { ...u, tag }));
  return { ok: true, sketch: next, label: `rename ${unit.tag} to ${tag}` };
}

/** A stream's number: unique text ("7", "7a"). */
export function setNumber(sketch: Sketch, id: StreamId, text: string): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  const number = text.trim();
  if (number === '') return refuse('edit/empty-text');
  if (sketch.streams.some((s) => s.id !== id && s.number === number))
    return refuse('edit/number-taken', word('number', number));
  const next = withStream(sketch, id, (s) => (s.number === number ? s : { ...s, number }));
  return { ok: true, sketch: next, label: `number stream ${stream.number} as ${number}` };
}

/** A unit's service name; blank takes it away. */
export function setUnitName(sketch: Sketch, id: UnitId, text: string): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  return {
    ok: true,
    sketch: withUnit(sketch, id, (u) => withText(u, 'name', text)),
    label: `name ${unit.tag}`,
  };
}

/** A unit's material of construction; blank takes it away. */
export function setMaterial(sketch: Sketch, id: UnitId, text: string): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const next = withUnit(sketch, id, (u) => withText(u, 'material', text));
  return { ok: true, sketch: next, label: `material of ${unit.tag}` };
}

/** A stream's description; blank returns to the one made from where it comes from. */
export function setStreamName(sketch: Sketch, id: StreamId, text: string): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  const next = withStream(sketch, id, (s) => withText(s, 'name', text));
  return { ok: true, sketch: next, label: `name stream ${stream.number}` };
}
