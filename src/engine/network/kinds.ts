import { CATALOGUE } from '../units/catalogue';
import { type AnyKind, SOLVERS } from '../units/solvers';
import type { KindCatalogue } from '../units/types';

/** The kinds a network can solve: what they are and how. An argument, so that a kind can be added without touching a list. */
export interface Kinds {
  readonly catalogue: Readonly<Record<string, KindCatalogue>>;
  readonly solvers: Readonly<Record<string, AnyKind>>;
}

/** The kinds of this version. */
export const KNOWN_KINDS: Kinds = { catalogue: CATALOGUE, solvers: SOLVERS };

/** What a kind is; undefined for one that is not known (names like "constructor" included). */
export const catalogueOf = (kinds: Kinds, kind: string): KindCatalogue | undefined =>
  Object.hasOwn(kinds.catalogue, kind) ? kinds.catalogue[kind] : undefined;

/** How a kind is solved; undefined for one that is not known. */
export const solverOf = (kinds: Kinds, kind: string): AnyKind | undefined =>
  Object.hasOwn(kinds.solvers, kind) ? kinds.solvers[kind] : undefined;

/** Feeds and products bound the sketch: nothing passes through them, so they have no closure of their own. */
export const isBoundary = (kinds: Kinds, kind: string): boolean =>
  catalogueOf(kinds, kind)?.group === 'boundary';
