import { bank, loadPairTables } from '../data/bank';
import { type BankData, neededChemicals } from './compile';
import { KNOWN_KINDS, type Registry } from './registry';
import type { Sketch } from './types';

/** Loads what a sketch needs of the bank. Ids that the bank does not know stay absent; compiling names them. */
export async function loadBankData(sketch: Sketch, registry: Registry = KNOWN_KINDS): Promise<BankData> {
  const [chemicals, pairs] = await Promise.all([
    bank.chemicals(neededChemicals(sketch, registry)),
    loadPairTables(),
  ]);
  return { chemicals, pairs };
}
