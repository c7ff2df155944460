import { named } from '../../outcome';
import type { KindCatalogue, SettingSpec } from '../types';
import { COLUMN_FINDINGS } from './findings';
import { countMiss, type FixedView } from './free';

const record = (fields: Readonly<Record<string, SettingSpec>>): SettingSpec => ({ is: 'record', fields });
const flow: SettingSpec = { is: 'flow' };
const product: SettingSpec = { is: 'product' };
const chemical: SettingSpec = { is: 'chemical' };
const ratio: SettingSpec = { is: 'quantity', dim: 'number', min: 0 };
const part: SettingSpec = { is: 'quantity', dim: 'fraction', min: 0, max: 1 };
const pressure = { is: 'quantity', dim: 'pressure', min: 0 } as const;

/** What fixes a column, one of these a row. */
const fixing: SettingSpec = {
  is: 'cases',
  by: 'fix',
  cases: {
    refluxRatio: record({ value: ratio }),
    boilup: record({ value: ratio }),
    flow: record({ product, value: flow }),
    reflux: record({ value: flow }),
    purity: record({
      product,
      chemical,
      value: part,
      basis: {
        is: 'option',
        values: ['mole', 'mass'],
        otherwise: { value: 'mole', text: 'mole', why: 'No basis was given for a purity.' },
      },
    }),
    recovery: record({ product, chemical, value: part }),
    temperature: record({
      stage: { is: 'stage', ends: true },
      value: { is: 'quantity', dim: 'temperature', min: 0 },
    }),
    duty: record({
      at: { is: 'option', values: ['condenser', 'reboiler'] },
      value: { is: 'quantity', dim: 'power' },
    }),
  },
};

/** Equilibrium stages between two ends, each of which may be missing: distillation, absorber, stripper. */
export const column: KindCatalogue = {
  kind: 'column',
  group: 'separation',
  tag: { letters: 'C', drawn: true },
  ports: [
    { name: 'feed', dir: 'in', numbered: { min: 1, max: 12 } },
    {
      name: 'liquidDistillate',
      dir: 'out',
      optional: true,
      when: { path: 'top.distillate', is: ['liquid'] },
    },
    {
      name: 'vapourDistillate',
      dir: 'out',
      optional: true,
      when: { path: 'top.distillate', is: ['vapour', 'none'] },
    },
    { name: 'bottoms', dir: 'out' },
    { name: 'side', dir: 'out', numbered: { min: 0, max: 12 }, optional: true },
  ],
  settings: {
    stages: { is: 'whole', min: 1, max: 400 },
    top: record({ distillate: { is: 'option', values: ['liquid', 'vapour', 'none'] } }),
    bottom: record({ reboiler: { is: 'yesNo' } }),
    feeds: { is: 'map', keys: 'port', of: record({ stage: { is: 'stage', ends: true } }) },
    pressure: {
      is: 'record',
      fields: {
        condenser: {
          ...pressure,
          optional: true,
          sameAs: {
            key: 'top',
            unless: { path: 'top.distillate', is: 'none' },
            why: 'No condenser pressure was given: that of the top stage.',
          },
        },
        top: pressure,
        bottom: { ...pressure, optional: true },
        perStage: { is: 'quantity', dim: 'pressureDifference', min: 0, optional: true },
        reboiler: {
          ...pressure,
          optional: true,
          sameAs: {
            key: 'bottom',
            unless: { path: 'bottom.reboiler', is: false },
            why: 'No reboiler pressure was given: that of the bottom stage.',
          },
        },
      },
      choose: [{ keys: ['bottom', 'perStage'], count: 1 }],
    },
    fixedBy: { is: 'list', of: fixing, min: 0, max: 3, optional: true },
    sides: {
      is: 'map',
      keys: 'port',
      of: record({
        stage: { is: 'stage', ends: false },
        phase: { is: 'option', values: ['liquid', 'vapour'] },
        flow,
      }),
      optional: true,
    },
    murphree: {
      is: 'list',
      of: record({
        from: { is: 'stage', ends: false },
        to: { is: 'stage', ends: false },
        value: { is: 'quantity', dim: 'fraction', min: 0.01, max: 1 },
      }),
      min: 0,
      optional: true,
    },
    subcooling: { is: 'quantity', dim: 'temperatureDifference', min: 0, optional: true },
  },
  missing: (settings, ports) => {
    const view = settings as FixedView & { readonly feeds?: object; readonly sides?: object };
    const count = countMiss(view);
    const given = (map: object | undefined, port: string): boolean => map !== undefined && port in map;
    return [
      ...(count?.code === 'column/fixed-too-few' ? [count] : []),
      ...ports
        .filter((port) => port.startsWith('feed') && !given(view.feeds, port))
        .map((port) => needsStage(port, `feeds.${port}.stage`)),
      ...ports
        .filter((port) => port.startsWith('side') && !given(view.sides, port))
        .map((port) => needsStage(port, `sides.${port}.stage`)),
    ];
  },
  results: {
    refluxRatio: { dim: 'number' },
    boilup: { dim: 'number' },
    condenserDuty_W: { dim: 'power' },
    reboilerDuty_W: { dim: 'power' },
    duty_W: { dim: 'power', hidden: true },
    topT_K: { dim: 'temperature' },
    bottomT_K: { dim: 'temperature' },
    stages: { dim: 'number', hidden: true },
    condenser: { dim: 'number', hidden: true },
    reboiler: { dim: 'number', hidden: true },
  },
  findings: COLUMN_FINDINGS,
  fresh: { top: { distillate: 'liquid' }, bottom: { reboiler: true } },
};

const needsStage = (port: string, path: string) =>
  ({
    code: 'column/port-without-stage',
    weight: 'beyond-limit',
    at: { port, path },
    evidence: [named('port', port)],
  }) as const;
