/** Columns as problems, for tests. Scenarios and figures are made up. */
import type { ChemicalData } from '../../src/engine/chemicals/types';
import { makeStream, type StreamCondition } from '../../src/engine/equilibrium/stream';
import type { StreamState } from '../../src/engine/equilibrium/types';
import type { UnitId } from '../../src/engine/ids';
import type { Outcome } from '../../src/engine/outcome';
import type { Model, ModelSpec } from '../../src/engine/thermo/types';
import type { ColumnResults } from '../../src/engine/units/column/results';
import type { ColumnSettings } from '../../src/engine/units/column/settings';
import { column } from '../../src/engine/units/column/solve';
import type { Answer, Call, Work } from '../../src/engine/units/types';
import { bankModel } from '../robust/bankModels';

export const SITE = { pressure_Pa: 101325, ambient_K: 293.15, coolingWater_K: 301.15 };

export const freshWork = (): Work => ({ flash: new Map() });

export function streamOf(
  model: Model,
  parts: readonly number[],
  total: number,
  at: StreamCondition,
): StreamState {
  const sum = parts.reduce((a, b) => a + b, 0);
  const made = makeStream(
    model,
    Float64Array.from(parts, (x) => (x / sum) * total),
    at,
    freshWork(),
  );
  if (made.state !== 'solved') throw new Error(`no feed: ${made.findings[0].code}`);
  return made.value;
}

export function callOf(
  model: Model,
  inlets: Readonly<Record<string, StreamState>>,
  settings: ColumnSettings,
  more: Partial<Call<ColumnSettings>> = {},
): Call<ColumnSettings> {
  const top = settings.top.distillate === 'liquid' ? 'liquidDistillate' : 'vapourDistillate';
  return {
    unit: 'c' as UnitId,
    in: inlets,
    outPorts: [top, 'bottoms', ...Object.keys(settings.sides ?? {})],
    settings,
    model,
    site: SITE,
    work: freshWork(),
    ...more,
  };
}

export type ColumnAnswer = Answer<ColumnResults>;

export function answerOf(outcome: Outcome<ColumnAnswer>): ColumnAnswer {
  if (outcome.state !== 'solved')
    throw new Error(outcome.findings.map((f) => `${f.code} ${JSON.stringify(f.evidence)}`).join('; '));
  return outcome.value;
}

export const solveCall = (call: Call<ColumnSettings>): ColumnAnswer => answerOf(column.solve(call));

export const molar = (n_mol_s: number) => ({ is: 'molar', n_mol_s }) as const;
export const share = (share: number, basis: 'mole' | 'mass' = 'mole') =>
  ({ is: 'share', share, of: 'feed', basis }) as const;

export interface Scenario {
  readonly name: string;
  readonly model: Model;
  readonly chemicals: readonly ChemicalData[];
  readonly call: Call<ColumnSettings>;
}

export const AROMATICS = [
  'methane',
  'ethane',
  'propane',
  'n-butane',
  'n-pentane',
  'n-hexane',
  'benzene',
  'toluene',
  'ethylbenzene',
  'm-xylene',
];
export const LIGHT = [
  'methane',
  'ethane',
  'propane',
  'isobutane',
  'n-butane',
  'isopentane',
  'n-pentane',
  'n-hexane',
  'n-heptane',
];

const plain = { distillate: 'vapour' } as const;
const total = { distillate: 'liquid' } as const;
const reboiled = { reboiler: true } as const;

type Build = (
  name: string,
  ids: readonly string[],
  feeds: Readonly<Record<string, { parts: readonly number[]; total: number; at: StreamCondition }>>,
  settings: ColumnSettings,
  kind?: ModelSpec['kind'],
  changes?: Partial<ModelSpec>,
) => Promise<Scenario>;

const build: Build = async (name, ids, feeds, settings, kind, changes) => {
  const model = await bankModel(ids, kind, changes);
  const inlets = Object.fromEntries(
    Object.entries(feeds).map(([port, f]) => [port, streamOf(model, f.parts, f.total, f.at)]),
  );
  return { name, model, chemicals: model.chemicals, call: callOf(model, inlets, settings) };
};

/** One of every sort: ends, phases, several feeds, draws, efficiencies, subcooling, both models. */
export async function scenarios(): Promise<readonly Scenario[]> {
  const aromaticFeed = {
    parts: [0.5, 2, 3, 2.5, 4, 4.6, 36, 29, 5, 15],
    total: 45,
    at: { T_K: 355, P_Pa: 3.2e5 },
  };
  const lightFeed = {
    parts: [0.8, 21.2, 34, 9, 17, 6, 5.5, 4.5, 2],
    total: 177.8,
    at: { T_K: 318, P_Pa: 27.4e5 },
  };
  const noMethane = { parts: [0, 0, 20, 13, 30, 12, 11, 9, 5], total: 100, at: { T_K: 350, P_Pa: 8e5 } };
  const BTX = ['benzene', 'toluene', 'ethylbenzene', 'm-xylene'];
  const btx = { parts: [40, 30, 12, 18], total: 60, at: { T_K: 375, P_Pa: 1.6e5 } };
  return Promise.all([
    build(
      'light ends off, vapour distillate',
      AROMATICS,
      { feed1: aromaticFeed },
      {
        stages: 26,
        top: plain,
        bottom: reboiled,
        feeds: { feed1: { stage: 11 } },
        pressure: { condenser: 2.6e5, top: 2.75e5, bottom: 3.05e5 },
        fixedBy: [
          { fix: 'refluxRatio', value: 2.4 },
          { fix: 'flow', product: 'vapourDistillate', value: share(0.14) },
        ],
      },
    ),
    build(
      'ethane off, a purity in the bottoms',
      LIGHT,
      { feed1: lightFeed },
      {
        stages: 28,
        top: plain,
        bottom: reboiled,
        feeds: { feed1: { stage: 10 } },
        pressure: { condenser: 26.6e5, top: 26.8e5, bottom: 27.2e5 },
        fixedBy: [
          { fix: 'refluxRatio', value: 2.5 },
          { fix: 'purity', product: 'bottoms', chemical: 1, value: 0.02, basis: 'mole' },
        ],
      },
    ),
    build(
      'two purities, one by mass, subcooled reflux, chemicals absent',
      LIGHT,
      { feed1: noMethane },
      {
        stages: 36,
        top: total,
        bottom: reboiled,
        feeds: { feed1: { stage: 17 } },
        pressure: { condenser: 6.6e5, top: 6.8e5, bottom: 7.3e5, reboiler: 7.35e5 },
        subcooling: 6,
        fixedBy: [
          { fix: 'purity', product: 'liquidDistillate', chemical: 4, value: 0.012, basis: 'mass' },
          { fix: 'purity', product: 'bottoms', chemical: 3, value: 0.009, basis: 'mole' },
        ],
      },
    ),
    build(
      'two feeds, liquid and vapour draws, efficiencies',
      BTX,
      { feed1: btx, feed3: { parts: [10, 40, 20, 30], total: 25, at: { P_Pa: 1.7e5, vapourFraction: 0.3 } } },
      {
        stages: 32,
        top: total,
        bottom: reboiled,
        feeds: { feed1: { stage: 10 }, feed3: { stage: 20 } },
        pressure: { condenser: 1.1e5, top: 1.15e5, perStage: 800 },
        sides: {
          side1: { stage: 16, phase: 'liquid', flow: molar(4) },
          side2: { stage: 25, phase: 'vapour', flow: { is: 'mass', m_kg_s: 0.3 } },
        },
        murphree: [
          { from: 2, to: 14, value: 0.7 },
          { from: 15, to: 31, value: 0.85 },
        ],
        fixedBy: [
          { fix: 'refluxRatio', value: 2.5 },
          { fix: 'recovery', product: 'liquidDistillate', chemical: 0, value: 0.97 },
        ],
      },
    ),
    build(
      'under Raoult with the heat of vaporisation correlated',
      BTX,
      { feed1: btx },
      {
        stages: 20,
        top: total,
        bottom: reboiled,
        feeds: { feed1: { stage: 10 } },
        pressure: { top: 1.1e5, bottom: 1.3e5 },
        fixedBy: [
          { fix: 'boilup', value: 3 },
          { fix: 'flow', product: 'bottoms', value: { is: 'mass', m_kg_s: 3.6 } },
        ],
      },
      'raoult',
      { liquidH: 'hvap' },
    ),
    build(
      'stripper: a reboiler only',
      LIGHT,
      {
        feed1: {
          parts: [1, 10, 30, 10, 20, 10, 9, 6, 4],
          total: 80,
          at: { P_Pa: 14e5, vapourFraction: 0.05 },
        },
      },
      {
        stages: 12,
        top: { distillate: 'none' },
        bottom: reboiled,
        feeds: { feed1: { stage: 1 } },
        pressure: { top: 13.5e5, bottom: 13.8e5 },
        fixedBy: [{ fix: 'purity', product: 'bottoms', chemical: 1, value: 0.004, basis: 'mole' }],
      },
    ),
    build(
      'rectifier: a condenser only',
      BTX,
      { feed1: { parts: [40, 30, 12, 18], total: 60, at: { P_Pa: 1.4e5, vapourFraction: 1 } } },
      {
        stages: 10,
        top: total,
        bottom: { reboiler: false },
        feeds: { feed1: { stage: 10 } },
        pressure: { top: 1.1e5, bottom: 1.3e5 },
        fixedBy: [{ fix: 'refluxRatio', value: 1.5 }],
      },
    ),
    build(
      'absorber: no ends, lean oil against gas',
      ['methane', 'ethane', 'propane', 'n-butane', 'n-decane'],
      {
        feed1: { parts: [0, 0, 0, 0.01, 1], total: 60, at: { T_K: 300, P_Pa: 20.5e5 } },
        feed2: { parts: [70, 12, 10, 8, 0], total: 100, at: { T_K: 305, P_Pa: 20.6e5 } },
      },
      {
        stages: 8,
        top: { distillate: 'none' },
        bottom: { reboiler: false },
        feeds: { feed1: { stage: 1 }, feed2: { stage: 8 } },
        pressure: { top: 20e5, bottom: 20.3e5 },
        fixedBy: [],
      },
    ),
    build(
      'a temperature and a distillate by mass',
      BTX,
      { feed1: btx },
      {
        stages: 24,
        top: total,
        bottom: reboiled,
        feeds: { feed1: { stage: 12 } },
        pressure: { top: 1.1e5, bottom: 1.3e5 },
        fixedBy: [
          { fix: 'temperature', stage: 5, value: 360 },
          { fix: 'flow', product: 'liquidDistillate', value: share(0.33, 'mass') },
        ],
      },
    ),
    build(
      'a duty and a reflux',
      BTX,
      { feed1: btx },
      {
        stages: 24,
        top: total,
        bottom: reboiled,
        feeds: { feed1: { stage: 12 } },
        pressure: { top: 1.1e5, bottom: 1.3e5 },
        fixedBy: [
          { fix: 'duty', at: 'condenser', value: -2.4e6 },
          { fix: 'reflux', value: molar(50) },
        ],
      },
    ),
  ]);
}
