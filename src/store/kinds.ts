import { createContext, useContext } from 'react';
import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue } from '../engine/units/types';

type Kinds = Readonly<Record<string, KindCatalogue>>;

/** The kinds of unit the page knows: the catalogue, unless a test brings its own. */
const Context = createContext<Kinds>(CATALOGUE);
export const KindsProvider = Context.Provider;
export const useKinds = (): Kinds => useContext(Context);

/** One kind; undefined for one that is not known. */
export function useKind(kind: string): KindCatalogue | undefined {
  const kinds = useKinds();
  return Object.hasOwn(kinds, kind) ? kinds[kind] : undefined;
}
