import { cleanup, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { afterEach } from 'vitest';
import { DrawerHost } from '../../src/drawers/DrawerHost';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { StreamResult } from '../../src/engine/network/types';
import { CATALOGUE } from '../../src/engine/units/catalogue';
import type { KindCatalogue } from '../../src/engine/units/types';
import { openSketch } from '../../src/sketch/read';
import type { Json, Sketch } from '../../src/sketch/types';
import { BankProvider } from '../../src/store/bank';
import { createCompiledStore } from '../../src/store/compiledStore';
import { KindsProvider } from '../../src/store/kinds';
import { type Stores, StoresProvider } from '../../src/store/react';
import { createResultsStore } from '../../src/store/resultsStore';
import { createSession } from '../../src/store/session';
import { createSketchStore } from '../../src/store/sketchStore';

afterEach(cleanup);

export const unitId = (id: string): UnitId => id as UnitId;
export const streamId = (id: string): StreamId => id as StreamId;

/** Invented: molar masses rounded. */
const BANK = [
  { id: 'methane', name: 'Methane', formula: 'CH4', cas: '74-82-8', MW_g_mol: 16.04 },
  { id: 'n-butane', name: 'n-Butane', formula: 'C4H10', cas: '106-97-8', MW_g_mol: 58.12 },
  { id: 'n-decane', name: 'n-Decane', formula: 'C10H22', cas: '124-18-5', MW_g_mol: 142.28 },
  { id: '1,3-butadiene', name: '1,3-Butadiene', formula: 'C4H6', cas: '106-99-0', MW_g_mol: 54.09 },
];

/** A feed, a valve and a drum, as a file would have them. */
export const letDown = {
  format: 'splitwright.sketch',
  version: 1,
  id: 'test',
  chemicals: ['methane', 'n-butane', 'n-decane'],
  model: { kind: 'peng-robinson' },
  units: [
    {
      id: 'u1',
      tag: 'FEED-1',
      kind: 'feed',
      settings: {
        state: { T: '40 degC', P: '30 bar' },
        flow: '100 kmol/h',
        composition: { basis: 'mole', parts: { methane: '30 %', 'n-butane': '40 %', 'n-decane': '30 %' } },
      },
    },
    { id: 'u2', tag: 'PV-101', kind: 'valve', settings: { p: { P: '5 bar' } } },
    { id: 'u3', tag: 'V-101', kind: 'drum', settings: {} },
  ],
  streams: [
    { id: 's1', number: '1', from: ['u1', 'out'], to: ['u2', 'in'] },
    { id: 's2', number: '2', from: ['u2', 'out'], to: ['u3', 'in1'] },
    { id: 's3', number: '3', from: ['u3', 'vapour'] },
    { id: 's4', number: '4', from: ['u3', 'liquid'] },
  ],
} as const;

export interface Page {
  readonly stores: Stores;
  readonly kinds: Readonly<Record<string, KindCatalogue>>;
}

/** Stores of their own, with a document opened like a file. */
export function makePage(document: unknown = letDown, kinds: Page['kinds'] = CATALOGUE): Page {
  const opened = openSketch(structuredClone(document), { registry: kinds });
  if (!opened.ok) throw new Error(opened.problems.map((p) => `${p.path} ${p.code}`).join('; '));
  const stores = {
    sketch: createSketchStore(opened.sketch),
    results: createResultsStore(),
    session: createSession(),
    compiled: createCompiledStore(),
  };
  return { stores, kinds };
}

export function show({ stores, kinds }: Page, what: ReactNode = <DrawerHost />) {
  return render(
    <StoresProvider value={stores}>
      <KindsProvider value={kinds}>
        <BankProvider value={{ index: BANK }}>{what}</BankProvider>
      </KindsProvider>
    </StoresProvider>,
  );
}

export const settingsOf = ({ stores }: Page, id: string): { readonly [key: string]: Json } =>
  stores.sketch.getState().sketch.units.find((unit) => unit.id === id)?.settings ?? {};
export const sketchOf = ({ stores }: Page): Sketch => stores.sketch.getState().sketch;
export const undoLabels = ({ stores }: Page): readonly string[] =>
  stores.sketch.getState().past.map((entry) => entry.label);

/** A field by its path in the sketch. */
export function field(path: string): HTMLInputElement {
  const found = document.querySelector<HTMLInputElement>(`[data-field="${path}"]`);
  if (!found) throw new Error(`no field ${path}`);
  return found;
}

/** A solved stream; figures are invented and only shown. */
export const solvedStream = (
  over: Partial<Extract<StreamResult, { state: 'solved' }>> = {},
): Extract<StreamResult, { state: 'solved' }> => ({
  state: 'solved',
  T_K: 313.15,
  P_Pa: 5e5,
  n_mol_s: 100 / 3.6,
  m_kg_s: 2,
  MW_g_mol: 72,
  H_W: -5e6,
  HfromIdeal_W: -2e5,
  h_J_mol: -180000,
  vapourFraction: 0,
  vapourMassFraction: 0,
  z: Float64Array.of(0.00005, 0.99995, 0),
  volume_m3_s: 0.003,
  phases: [],
  ...over,
});
