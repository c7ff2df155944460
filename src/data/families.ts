/** Which file of the bank holds which family: a page fetches only the files that a sketch needs. */
export type Chunk = 'light' | 'paraffins' | 'unsaturates' | 'oxygenates' | 'others';

const CHUNK_OF: Readonly<Record<string, Chunk>> = {
  'inorganic-gas': 'light',
  water: 'light',
  alkane: 'paraffins',
  naphthene: 'paraffins',
  olefin: 'unsaturates',
  diene: 'unsaturates',
  alkyne: 'unsaturates',
  aromatic: 'unsaturates',
  acid: 'oxygenates',
  alcohol: 'oxygenates',
  aldehyde: 'oxygenates',
  anhydride: 'oxygenates',
  ester: 'oxygenates',
  ether: 'oxygenates',
  glycol: 'oxygenates',
  ketone: 'oxygenates',
  phenol: 'oxygenates',
};

/** Which file holds a family. */
export const chunkOf = (family: string): Chunk => CHUNK_OF[family] ?? 'others';

/** What a search or a list needs of a chemical. */
export interface IndexEntry {
  readonly id: string;
  readonly name: string;
  readonly formula: string;
  readonly cas: string;
  readonly family: string;
  readonly MW_g_mol: number;
}
