import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue } from '../engine/units/types';
import { capital, kindWord } from '../wording';

export interface ShelfItem {
  readonly kind: string;
  readonly word: string;
}
export interface ShelfGroup {
  readonly group: KindCatalogue['group'];
  readonly word: string;
  readonly items: readonly ShelfItem[];
}

const GROUPS: readonly (readonly [KindCatalogue['group'], string])[] = [
  ['boundary', 'Boundary'],
  ['lines', 'Lines'],
  ['rotating', 'Rotating'],
  ['heat', 'Heat'],
  ['vessels', 'Vessels'],
  ['separation', 'Separation'],
];

/** The shelf: every kind that can be solved, by group, in the catalogue's order; what was typed filters by word, kind or tag. */
export function shelfGroups(
  typed: string,
  kinds: Readonly<Record<string, KindCatalogue>> = CATALOGUE,
): readonly ShelfGroup[] {
  const wanted = typed.trim().toLowerCase();
  return GROUPS.map(([group, word]) => ({
    group,
    word,
    items: Object.values(kinds)
      .filter((kind) => kind.group === group)
      .map((kind) => ({ kind: kind.kind, word: capital(kindWord(kind.kind)), letters: kind.tag.letters }))
      .filter(
        ({ kind, word: name, letters }) =>
          wanted === '' ||
          `${kind} ${name}`.toLowerCase().includes(wanted) ||
          letters.toLowerCase() === wanted,
      )
      .map(({ kind, word: name }) => ({ kind, word: name })),
  })).filter(({ items }) => items.length > 0);
}
