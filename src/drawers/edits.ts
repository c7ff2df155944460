import type { StreamId, UnitId } from '../engine/ids';
import type { Json, SketchStream, SketchUnit } from '../sketch/types';
import type { Change } from '../store/sketchStore';

type Tree = { readonly [key: string]: Json };
const isTree = (value: Json | undefined): value is Tree =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
const isList = (value: Json | undefined): value is readonly Json[] => Array.isArray(value);

/** Where a value stands: 'feeds.feed1.stage', or its keys one by one where a key may hold a dot. */
export type Path = string | readonly string[];
export const keysOf = (path: Path): readonly string[] =>
  typeof path !== 'string' ? path : path === '' ? [] : path.split('.');

/** What stands at a path of the settings; undefined where nothing does. */
export function valueAt(root: Json | undefined, path: Path): Json | undefined {
  let here: Json | undefined = root;
  for (const key of keysOf(path)) {
    if (isList(here)) here = here[Number(key)];
    else here = isTree(here) && Object.hasOwn(here, key) ? here[key] : undefined;
  }
  return here;
}

/** The tree with one value put or taken away; groups that end up empty go too. The same value gives the same tree. */
export function withValue(root: Json | undefined, path: Path, value: Json | undefined): Json | undefined {
  const [key, ...rest] = keysOf(path);
  if (key === undefined) return value;
  if (isList(root)) {
    const list = [...root];
    const next = withValue(root[Number(key)], rest, value);
    if (next !== undefined) list[Number(key)] = next;
    else if (rest.length > 0) list[Number(key)] = {};
    else list.splice(Number(key), 1);
    return list.length === 0 ? undefined : list;
  }
  const tree: Tree = isTree(root) ? root : {};
  const before = Object.hasOwn(tree, key) ? tree[key] : undefined;
  const next = withValue(before, rest, value);
  if (next === before) return root;
  const entries = Object.entries(tree).filter(([k]) => k !== key || next !== undefined);
  const after = Object.fromEntries(entries.map(([k, v]) => [k, k === key ? (next as Json) : v]));
  if (next !== undefined) after[key] = next;
  return Object.keys(after).length === 0 ? undefined : after;
}

export interface SettingChange {
  readonly path: Path;
  readonly value: Json | undefined;
}

/** Several settings of one unit at once: one edit. */
export const setSettings =
  (id: UnitId, changes: readonly SettingChange[]): Change =>
  (sketch) =>
    changeUnit(id, (unit) => {
      let settings: Json | undefined = unit.settings;
      for (const { path, value } of changes) settings = withValue(settings, path, value);
      return settings === unit.settings ? unit : { ...unit, settings: isTree(settings) ? settings : {} };
    })(sketch);

export const setSetting = (id: UnitId, path: Path, value: Json | undefined): Change =>
  setSettings(id, [{ path, value }]);

export const changeUnit =
  (id: UnitId, change: (unit: SketchUnit) => SketchUnit): Change =>
  (sketch) => {
    const units = replaced(sketch.units, id, change);
    return units === sketch.units ? sketch : { ...sketch, units };
  };

export const changeStream =
  (id: StreamId, change: (stream: SketchStream) => SketchStream): Change =>
  (sketch) => {
    const streams = replaced(sketch.streams, id, change);
    return streams === sketch.streams ? sketch : { ...sketch, streams };
  };

function replaced<T extends { readonly id: string }>(
  records: readonly T[],
  id: string,
  change: (record: T) => T,
): readonly T[] {
  const next = records.map((record) => (record.id === id ? change(record) : record));
  return next.every((record, k) => record === records[k]) ? records : next;
}

/** A record with one of its texts put, or taken away when empty. */
export function withText<T extends object>(record: T, key: keyof T & string, text: string): T {
  const next = text.trim();
  if (((record as Record<string, unknown>)[key] ?? '') === next) return record;
  const rest = Object.fromEntries(Object.entries(record).filter(([k]) => k !== key)) as T;
  return next === '' ? rest : { ...record, [key]: next };
}
