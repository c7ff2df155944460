import type { BankEntry } from '../../store/bank';

const plain = (text: string): string => text.toLowerCase().replace(/[\s,\-–()]/g, '');

/** How well an entry answers a search: 0 best; undefined when it does not. */
function rank(entry: BankEntry, wanted: string): number | undefined {
  const names = [plain(entry.name), plain(entry.id)];
  if (names.includes(wanted) || entry.formula?.toLowerCase() === wanted || plain(entry.cas ?? '') === wanted)
    return 0;
  if (names.some((name) => name.startsWith(wanted))) return 1;
  if (names.some((name) => name.includes(wanted))) return 2;
  if (entry.formula?.toLowerCase().startsWith(wanted) || plain(entry.cas ?? '').startsWith(wanted)) return 3;
  return undefined;
}

/** Entries by name, formula or CAS number, the best first; within a rank the bank's order stays. */
export function searchBank(index: readonly BankEntry[], text: string, most = 30): readonly BankEntry[] {
  const wanted = plain(text.trim());
  if (wanted === '') return [];
  return index
    .flatMap((entry, k) => {
      const r = rank(entry, wanted);
      return r === undefined ? [] : [{ entry, r, k }];
    })
    .sort((a, b) => a.r - b.r || a.k - b.k)
    .slice(0, most)
    .map(({ entry }) => entry);
}
