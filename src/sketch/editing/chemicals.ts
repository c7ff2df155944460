import type { Finding } from '../../engine/outcome';
import { parseQuantity } from '../../quantity';
import { chemicalId } from '../compiling/air';
import { finding, word } from '../findings';
import { isObject, type JsonObject, sameJson } from '../json';
import { KNOWN_KINDS, kindOf, type Registry } from '../registry';
import type { Json, Sketch, SketchChemical, SketchUnit } from '../types';
import { type Edit, refuse } from './edited';
import { type Here, isAbout, stepInto, topOf } from './named';

/**
 * Sets the list of chemicals; its order is the order everywhere. A chemical that settings still name cannot be taken off the
 * list, unless `cleanUp` is wanted: then those entries go too, each with a note. Entries of zero always go.
 */
export function setChemicals(
  sketch: Sketch,
  chemicals: readonly SketchChemical[],
  options: { readonly cleanUp?: boolean; readonly registry?: Registry } = {},
): Edit {
  const { registry = KNOWN_KINDS } = options;
  const ids = chemicals.map(chemicalId);
  const twice = ids.find((id, k) => ids.indexOf(id) !== k);
  if (twice !== undefined) return refuse('edit/chemical-twice', word('chemical', twice));
  if (sameJson(sketch.chemicals as unknown as Json, chemicals as unknown as Json))
    return { ok: true, sketch, label: 'set chemicals' };
  const before = sketch.chemicals.map(chemicalId);
  const removed = new Set(before.filter((id) => !ids.includes(id)));
  const added = ids.filter((id) => !before.includes(id));
  const notes: Finding[] = [];
  const units = sketch.units.map((unit): SketchUnit => {
    const gone: string[] = [];
    const settings =
      removed.size === 0
        ? unit.settings
        : strip(unit.settings, removed, '', gone, topOf(kindOf(registry, unit.kind)));
    for (const path of gone)
      notes.push(finding('sketch/parts-removed', 'note', { unit: unit.id, path }, word('tag', unit.tag)));
    return settings === unit.settings ? unit : { ...unit, settings };
  });
  if (notes.length > 0 && !options.cleanUp)
    return refuse(
      'edit/chemical-in-use',
      ...notes.map((n) => word('place', `${n.evidence[0]?.text}.${n.at.path}`)),
    );
  const label =
    added.length === 1 && removed.size === 0
      ? `add ${added[0]}`
      : removed.size === 1 && added.length === 0
        ? `remove ${[...removed][0]}`
        : 'set chemicals';
  const next: Sketch = {
    ...sketch,
    chemicals,
    units: units.every((u, k) => u === sketch.units[k]) ? sketch.units : units,
  };
  return { ok: true, sketch: next, label, notes };
}

/** Settings without entries about these chemicals; the places of those that were not zero are listed. */
function strip(
  value: JsonObject,
  ids: ReadonlySet<string>,
  path: string,
  gone: string[],
  at: Here,
): JsonObject {
  let same = true;
  const entries = Object.entries(value).flatMap(([key, v]): [string, Json][] => {
    const here = path === '' ? key : `${path}.${key}`;
    if (isAbout(ids, at, key, v)) {
      same = false;
      if (!isZero(v)) gone.push(here);
      return [];
    }
    const next = stripInside(v, ids, here, gone, stepInto(at, key));
    if (next !== v) same = false;
    return [[key, next]];
  });
  return same ? value : Object.fromEntries(entries);
}

function stripInside(value: Json, ids: ReadonlySet<string>, path: string, gone: string[], at: Here): Json {
  if (isObject(value)) return strip(value, ids, path, gone, at);
  if (!Array.isArray(value)) return value;
  const items = value as readonly Json[];
  const next = items.map((item, k) => stripInside(item, ids, `${path}.${k}`, gone, stepInto(at, String(k))));
  return next.every((item, k) => item === items[k]) ? value : next;
}

function isZero(value: Json): boolean {
  if (typeof value !== 'string' && typeof value !== 'number') return false;
  const read = parseQuantity(value, ['fraction', 'molarFlow', 'massFlow']);
  return read.ok && read.si === 0;
}
