import { useCallback, useSyncExternalStore } from 'react';
import { type SheetState, type SheetStore, useSheetStore } from './sheetStore';

/** Fields of the sheet that hold one thing for each unit or stream. */
type Items = {
  [K in keyof SheetState]: SheetState[K] extends ReadonlyMap<string, unknown> ? K : never;
}[keyof SheetState];
type Item<K extends Items> = SheetState[K] extends ReadonlyMap<infer Id, infer T> ? readonly [Id, T] : never;
type Tell = () => void;

/**
 * Tells only those whose own thing changed. With hundreds of units and streams a step of the hand would otherwise ask every
 * view of the sheet whether it is concerned.
 */
class Watch {
  private readonly byField = new Map<keyof SheetState, Set<Tell>>();
  private readonly byItem = new Map<Items, Map<string, Set<Tell>>>();

  constructor(sheet: SheetStore) {
    sheet.subscribe((now, before) => {
      for (const [field, tells] of this.byField)
        if (now[field] !== before[field]) for (const tell of [...tells]) tell();
      for (const [field, items] of this.byItem) {
        if (now[field] === before[field]) continue;
        const [after, was] = [now[field], before[field]] as [
          ReadonlyMap<string, unknown>,
          ReadonlyMap<string, unknown>,
        ];
        for (const [id, tells] of items)
          if (after.get(id) !== was.get(id)) for (const tell of [...tells]) tell();
      }
    });
  }

  field(field: keyof SheetState, tell: Tell): Tell {
    return added(this.byField, field, tell);
  }
  item(field: Items, id: string, tell: Tell): Tell {
    const items = this.byItem.get(field) ?? new Map<string, Set<Tell>>();
    this.byItem.set(field, items);
    return added(items, id, tell);
  }
}

function added<K>(sets: Map<K, Set<Tell>>, key: K, tell: Tell): Tell {
  const tells = sets.get(key) ?? new Set<Tell>();
  sets.set(key, tells);
  tells.add(tell);
  return () => {
    tells.delete(tell);
    if (tells.size === 0) sets.delete(key);
  };
}

const watches = new WeakMap<SheetStore, Watch>();
function watchOf(sheet: SheetStore): Watch {
  const watch = watches.get(sheet) ?? new Watch(sheet);
  watches.set(sheet, watch);
  return watch;
}

/** One unit's or stream's thing: its shape, line, label or name. Only its own changes are heard. */
export function useItem<K extends Items>(field: K, id: Item<K>[0]): Item<K>[1] | undefined {
  const sheet = useSheetStore();
  const subscribe = useCallback(
    (tell: Tell) => watchOf(sheet).item(field, id as string, tell),
    [sheet, field, id],
  );
  const read = (): Item<K>[1] | undefined =>
    (sheet.getState()[field] as ReadonlyMap<unknown, Item<K>[1]>).get(id);
  return useSyncExternalStore(subscribe, read);
}

/** What a view reads of one field of the sheet; it is asked only when that field changes. */
export function useField<K extends keyof SheetState, T>(field: K, read: (value: SheetState[K]) => T): T {
  const sheet = useSheetStore();
  const subscribe = useCallback((tell: Tell) => watchOf(sheet).field(field, tell), [sheet, field]);
  return useSyncExternalStore(subscribe, () => read(sheet.getState()[field]));
}
