import { createContext, useContext } from 'react';

/** One chemical of the bank as a search shows it. */
export interface BankEntry {
  readonly id: string;
  readonly name: string;
  readonly formula?: string;
  readonly cas?: string;
  readonly MW_g_mol: number;
}

/** The bank's list, handed down by the app: screens never load data themselves. */
export interface BankList {
  readonly index: readonly BankEntry[];
}

const empty: BankList = { index: [] };
export const BankContext = createContext<BankList>(empty);

/** Hands the bank's list down. */
export const BankProvider = BankContext.Provider;

/** The bank's list; empty where nobody hands one down. */
export const useBank = (): BankList => useContext(BankContext);
