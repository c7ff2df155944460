import { type ElementCounts, sameElements } from './elements';
import type { ChemicalData } from './types';

/** What combustion makes or takes, and what air holds. */
export type GasKey = 'N2' | 'O2' | 'Ar' | 'CO2' | 'H2O' | 'SO2' | 'HCl';

/** How each is known: by its CAS number, else by its atoms. */
export const GASES: Readonly<Record<GasKey, { readonly cas: string; readonly elements: ElementCounts }>> = {
  N2: { cas: '7727-37-9', elements: { N: 2 } },
  O2: { cas: '7782-44-7', elements: { O: 2 } },
  Ar: { cas: '7440-37-1', elements: { Ar: 1 } },
  CO2: { cas: '124-38-9', elements: { C: 1, O: 2 } },
  H2O: { cas: '7732-18-5', elements: { H: 2, O: 1 } },
  SO2: { cas: '7446-09-5', elements: { S: 1, O: 2 } },
  HCl: { cas: '7647-01-0', elements: { H: 1, Cl: 1 } },
};

/** Place of a gas in the full list: by CAS number, else by formula among chemicals without a number; -1 when it is not there. */
export function gasPlace(chemicals: readonly ChemicalData[], key: GasKey): number {
  const { cas, elements } = GASES[key];
  const byCas = chemicals.findIndex((c) => c.cas === cas);
  if (byCas >= 0) return byCas;
  return chemicals.findIndex((c) => c.cas === undefined && c.elements && sameElements(c.elements, elements));
}

/** Places of all these gases in the full list; -1 for each that is not there. */
export const gasPlaces = (chemicals: readonly ChemicalData[]): Readonly<Record<GasKey, number>> => ({
  N2: gasPlace(chemicals, 'N2'),
  O2: gasPlace(chemicals, 'O2'),
  Ar: gasPlace(chemicals, 'Ar'),
  CO2: gasPlace(chemicals, 'CO2'),
  H2O: gasPlace(chemicals, 'H2O'),
  SO2: gasPlace(chemicals, 'SO2'),
  HCl: gasPlace(chemicals, 'HCl'),
});
