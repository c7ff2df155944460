/**
 * The bank of chemicals: a small index at once, everything else when it is asked for.
 *
 * The data are JSON files beside this one, made by convert.ts; they load by dynamic import, so a page fetches only
 * the families that a sketch names.
 */
import type { ChemicalData } from '../engine/chemicals/types';
import { type GroupInteraction, makeGroupTable } from '../engine/thermo/pairs/ppr78';
import {
  type FittedPair,
  fittedTable,
  type PairChoice,
  type PairTables,
  resolvePairs,
} from '../engine/thermo/pairs/resolve';
import type { PairKij } from '../engine/thermo/types';
import index from './bank/index.json';
import { type Chunk, chunkOf, type IndexEntry } from './families';

export type { IndexEntry } from './families';

/** The bank of chemicals; its parts are loaded when they are asked for. */
export interface Bank {
  /** Every chemical, in the order of the bank: gases, water, then by family. */
  readonly index: readonly IndexEntry[];
  /** Data of the chemicals asked for; an id that the bank does not know is absent from the map. */
  chemicals(ids: Iterable<string>): Promise<ReadonlyMap<string, ChemicalData>>;
  /** Every pair i < j of these chemicals, resolved by `choice`. */
  pairsFor(chemicals: readonly ChemicalData[], choice: PairChoice): Promise<PairKij[]>;
  /** Source tag -> full citation. */
  sources(): Promise<Readonly<Record<string, string>>>;
}

// The JSON is written by convert.ts and checked by tests; its inferred type would be wider than what it holds.
const list = async (file: Promise<{ default: unknown }>): Promise<readonly ChemicalData[]> =>
  (await file).default as readonly ChemicalData[];

const LOAD: Readonly<Record<Chunk, () => Promise<readonly ChemicalData[]>>> = {
  light: () => list(import('./bank/chemicals-light.json')),
  paraffins: () => list(import('./bank/chemicals-paraffins.json')),
  unsaturates: () => list(import('./bank/chemicals-unsaturates.json')),
  oxygenates: () => list(import('./bank/chemicals-oxygenates.json')),
  others: () => list(import('./bank/chemicals-others.json')),
};

const entries: readonly IndexEntry[] = index;
const byId = new Map(entries.map((entry) => [entry.id, entry]));

/** The index of all chemicals. */
export const loadIndex = (): readonly IndexEntry[] => entries;

/** Data of several chemicals, in the order asked for. Throws on an id that is not in the index. */
export async function loadChemicals(ids: readonly string[]): Promise<ChemicalData[]> {
  const found = await bank.chemicals(ids);
  return ids.map((id) => {
    const chemical = found.get(id);
    if (!chemical) throw new Error(`no chemical "${id}" in the bank`);
    return chemical;
  });
}

interface PairRow extends FittedPair {
  readonly use: boolean;
  readonly status: string;
}
interface InteractionRow extends GroupInteraction {
  readonly status: string;
}

/** The tables that pairs are looked up in; rows marked as not to be used are left out. */
export async function loadPairTables(): Promise<PairTables> {
  const [pairs, groups, citations] = await Promise.all([
    import('./bank/pairs-pr.json'),
    import('./bank/ppr78.json'),
    bank.sources(),
  ]);
  const rows = pairs.default as unknown as readonly PairRow[];
  const interactions = groups.default.interactions as readonly InteractionRow[];
  return {
    fitted: fittedTable(
      rows.filter((row) => row.use).map((row) => ({ ...row, source: citations[row.source] ?? row.source })),
    ),
    groups: makeGroupTable(interactions.filter((row) => row.status !== 'do-not-use')),
  };
}

let tables: Promise<PairTables> | undefined;

/** The bank as one object, for compiling a sketch. */
export const bank: Bank = {
  index: entries,
  async chemicals(ids) {
    const wanted = [...new Set(ids)].flatMap((id) => byId.get(id) ?? []);
    const chunks = [...new Set(wanted.map((entry) => chunkOf(entry.family)))];
    const loaded = (await Promise.all(chunks.map((chunk) => LOAD[chunk]()))).flat();
    const names = new Set(wanted.map((entry) => entry.id));
    return new Map(loaded.filter((c) => names.has(c.id)).map((c) => [c.id, c]));
  },
  async pairsFor(chemicals, choice) {
    tables ??= loadPairTables();
    return resolvePairs(chemicals, choice, await tables);
  },
  async sources() {
    return (await import('./bank/sources.json')).default as Readonly<Record<string, string>>;
  },
};
