import type { UnitId } from '../../engine/ids';
import { parseQuantity } from '../../quantity';
import { readJson } from '../file/text';
import { word } from '../findings';
import { isObject, type JsonObject, sameJson } from '../json';
import { KNOWN_KINDS, kindOf, type Registry } from '../registry';
import type { Json, Sketch } from '../types';
import { type Edit, refuse, unitOf, withUnit } from './edited';
import { withSettings } from './outlets';
import { pathKeys, pathText, type SettingPath, specsAt, valueAt, withoutValueAt, withValueAt } from './path';

/**
 * Gives a setting a value, as typed. What the value means is judged on compiling; a place that the kind does not have is
 * refused here.
 */
export function setSetting(
  sketch: Sketch,
  id: UnitId,
  path: SettingPath,
  value: Json,
  registry: Registry = KNOWN_KINDS,
): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const kind = kindOf(registry, unit.kind);
  if (!kind) return refuse('edit/unknown-kind', word('kind', unit.kind), word('tag', unit.tag));
  const keys = pathKeys(path);
  if (specsAt(kind, keys).length === 0)
    return refuse(
      'edit/no-such-setting',
      word('tag', unit.tag),
      word('path', pathText(path)),
      word('known', Object.keys(kind.settings).join(', ')),
    );
  const label = `set ${unit.tag} ${pathText(path)}`;
  if (sameJson(valueAt(unit.settings, keys), value)) return { ok: true, sketch, label };
  const isList = (depth: number): boolean => specsAt(kind, keys.slice(0, depth)).some((s) => s.is === 'list');
  const settings = withValueAt(unit.settings, keys, value, isList);
  if (settings === undefined || !isObject(settings))
    return refuse('edit/bad-path', word('tag', unit.tag), word('path', pathText(path)));
  return { ok: true, sketch: withSettings(sketch, unit, settings, registry), label };
}

/** Takes a setting away; a group without anything left goes too. */
export function clearSetting(
  sketch: Sketch,
  id: UnitId,
  path: SettingPath,
  registry: Registry = KNOWN_KINDS,
): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const settings = withoutValueAt(unit.settings, pathKeys(path));
  const next = settings === unit.settings ? sketch : withSettings(sketch, unit, settings, registry);
  return { ok: true, sketch: next, label: `clear ${unit.tag} ${pathText(path)}` };
}

/** Replaces all settings of a unit, e.g. with pasted ones. */
export function setSettings(
  sketch: Sketch,
  id: UnitId,
  settings: JsonObject,
  registry: Registry = KNOWN_KINDS,
): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const next = sameJson(unit.settings, settings) ? sketch : withSettings(sketch, unit, settings, registry);
  return { ok: true, sketch: next, label: `set ${unit.tag}` };
}

/**
 * `TAG.path` and a value, as on a command line: split at the first dot after a known tag (the longest that fits, since a tag
 * may hold dots); the value is JSON if it parses, else text.
 */
export function setByPath(
  sketch: Sketch,
  place: string,
  valueText: string,
  registry: Registry = KNOWN_KINDS,
): Edit {
  const fitting = sketch.units.filter((u) => place.startsWith(`${u.tag}.`));
  const unit = fitting.sort((a, b) => b.tag.length - a.tag.length)[0];
  if (!unit) return refuse('edit/unknown-tag', word('place', place));
  const path = place.slice(unit.tag.length + 1);
  return setSetting(sketch, unit.id, path, jsonOrText(valueText), registry);
}

/** JSON if it parses (and is no number beyond all bounds), else the text itself. */
function jsonOrText(text: string): Json {
  const read = readJson(text);
  if (!read.ok) return text;
  const value = read.value as Json;
  return typeof value === 'number' && !Number.isFinite(value) ? text : value;
}

/** Scales the parts of a composition so that they sum to 1; units and order stay as typed. */
export function normaliseParts(sketch: Sketch, id: UnitId, path: SettingPath): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const parts = valueAt(unit.settings, pathKeys(path));
  const read = isObject(parts)
    ? Object.entries(parts).map(([key, value]) => {
        const quantity =
          typeof value === 'string' || typeof value === 'number'
            ? parseQuantity(value, 'fraction')
            : undefined;
        return { key, value, quantity };
      })
    : [];
  let sum = 0;
  for (const { quantity } of read) sum += quantity?.ok ? quantity.si : Number.NaN;
  if (!(sum > 0))
    return refuse('edit/nothing-to-normalise', word('tag', unit.tag), word('path', pathText(path)));
  const scaled = read.map(({ key, value, quantity }): [string, Json] => {
    if (!quantity?.ok) return [key, value];
    // Twelve figures carry every composition that anybody types.
    const n = Number((Number(quantity.number.replace('−', '-')) / sum).toPrecision(12));
    return [key, typeof value === 'number' ? n : `${n} ${quantity.unit}`.trim()];
  });
  const next = withValueAt(unit.settings, pathKeys(path), Object.fromEntries(scaled), () => false);
  if (!isObject(next)) return refuse('edit/bad-path', word('tag', unit.tag), word('path', pathText(path)));
  const label = `normalise ${unit.tag} ${pathText(path)}`;
  return { ok: true, sketch: withUnit(sketch, id, (u) => ({ ...u, settings: next })), label };
}
