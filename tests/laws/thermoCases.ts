/** Cases that every law of thermodynamics is tried on. A new thermodynamic model joins by one line in MODELS. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { ChemicalData } from '../../src/engine/chemicals/types';
import { makeModel } from '../../src/engine/thermo/model';
import type { ModelSpec, Side, ThermoModel } from '../../src/engine/thermo/types';

const BANK = join(import.meta.dirname, '../../src/data/bank');
const all = new Map<string, ChemicalData>();
for (const part of ['light', 'paraffins', 'unsaturates', 'oxygenates', 'others'])
  for (const chem of JSON.parse(readFileSync(join(BANK, `chemicals-${part}.json`), 'utf8')) as ChemicalData[])
    all.set(chem.id, chem);

export function chemical(id: string): ChemicalData {
  const found = all.get(id);
  if (!found) throw new Error(`no ${id} in the bank`);
  return found;
}

/** Pairs from a fixed rule of no physical meaning: laws hold for any k_ij. */
export const somePairs = (n: number): ModelSpec['pairs'] =>
  Array.from({ length: n }, (_, i) =>
    Array.from({ length: n - 1 - i }, (_, k) => ({
      i,
      j: i + 1 + k,
      kij: 0.01 * (((i + 3 * (i + 1 + k)) % 7) - 2),
      origin: 'given' as const,
      source: '',
    })),
  ).flat();

export const specOf = (given: Partial<ModelSpec> & Pick<ModelSpec, 'kind'>): ModelSpec => ({
  alpha: '1976',
  liquidH: 'psat-slope',
  liquidVolume: 'corrected',
  poynting: false,
  pairs: [],
  ...given,
});

interface ModelCase {
  readonly spec: (n: number) => ModelSpec;
  /** v is the volume that d ln phi/dP implies, in the liquid too. */
  readonly liquidHasVolume: boolean;
  /** h of the liquid is the one that ln phi implies. */
  readonly enthalpyFromLnPhi: boolean;
  /** Quantities that rest on a second derivative taken as a difference are known to this relative accuracy only. */
  readonly cpTolerance: number;
}

export const MODELS: Readonly<Record<string, ModelCase>> = {
  'Peng-Robinson 1976': {
    spec: (n) => specOf({ kind: 'peng-robinson', pairs: somePairs(n) }),
    liquidHasVolume: true,
    enthalpyFromLnPhi: true,
    cpTolerance: 1e-7,
  },
  'Peng-Robinson 1978': {
    spec: (n) => specOf({ kind: 'peng-robinson', alpha: '1978', pairs: somePairs(n) }),
    liquidHasVolume: true,
    enthalpyFromLnPhi: true,
    cpTolerance: 1e-7,
  },
  "Raoult's law": {
    spec: () => specOf({ kind: 'raoult' }),
    liquidHasVolume: false,
    enthalpyFromLnPhi: true,
    cpTolerance: 1e-6,
  },
  "Raoult's law with Poynting": {
    spec: () => specOf({ kind: 'raoult', poynting: true }),
    liquidHasVolume: true,
    enthalpyFromLnPhi: true,
    cpTolerance: 1e-6,
  },
  "Raoult's law with the correlated heat": {
    spec: () => specOf({ kind: 'raoult', liquidH: 'hvap' }),
    liquidHasVolume: false,
    enthalpyFromLnPhi: false,
    cpTolerance: 1e-6,
  },
};

export interface StateCase {
  readonly ids: readonly string[];
  readonly x: readonly number[];
  readonly side: Side;
  readonly T: number;
  readonly P: number;
}

const light = ['methane', 'propane', 'n-butane', 'n-decane'];
const wide = ['hydrogen', 'nitrogen', 'carbon-dioxide', 'benzene', 'n-hexadecane', 'water'];
export const STATES: readonly StateCase[] = [
  { ids: ['propane'], x: [1], side: 'liquid', T: 280, P: 2e6 },
  { ids: ['n-hexane'], x: [1], side: 'vapour', T: 450, P: 3e5 },
  { ids: light, x: [0.3, 0.3, 0.25, 0.15], side: 'vapour', T: 480, P: 8e5 },
  { ids: light, x: [0.05, 0.2, 0.35, 0.4], side: 'liquid', T: 310, P: 2.5e6 },
  { ids: light, x: [0, 0.5, 0.5, 0], side: 'liquid', T: 290, P: 1e6 },
  { ids: light, x: [0.6, 0.2, 0.1, 0.1], side: 'stable', T: 420, P: 3e7 },
  { ids: wide, x: [0.2, 0.2, 0.2, 0.2, 0.05, 0.15], side: 'vapour', T: 620, P: 1e6 },
  { ids: wide, x: [0.01, 0.01, 0.08, 0.5, 0.35, 0.05], side: 'liquid', T: 350, P: 4e6 },
  { ids: wide, x: [0.1, 0.6, 0.1, 1e-9, 0, 0.2 - 1e-9], side: 'vapour', T: 1900, P: 1.1e5 },
  { ids: ['methane', 'carbon-dioxide'], x: [0.4, 0.6], side: 'stable', T: 260, P: 1.2e7 },
];

const made = new Map<string, ThermoModel>();
/** The named model over the case's chemicals. */
export function modelFor(name: string, ids: readonly string[]): ThermoModel {
  const key = `${name}|${ids.join('|')}`;
  let model = made.get(key);
  if (!model) {
    model = makeModel(MODELS[name]!.spec(ids.length), ids.map(chemical)).of(ids.map((_, i) => i));
    made.set(key, model);
  }
  return model;
}

/** Every model with every state, with a title. */
export const CASES = Object.keys(MODELS).flatMap((name) =>
  STATES.map((state): [string, string, StateCase] => [
    `${name}, ${state.side} of ${state.ids.join(' + ')} at ${state.T} K, ${state.P / 1e5} bar`,
    name,
    state,
  ]),
);
