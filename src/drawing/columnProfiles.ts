import type { ColumnResults, EndResults, Profile } from '../engine/units/column/results';
import { displayUnit, type Measures } from '../quantity';
import type { ProfileData, ProfileLine, ProfilePlace } from './profiles';

export type { ColumnResults } from '../engine/units/column/results';

/** The results of a column with its stages; undefined for anything else. */
export function columnResults(
  results: Readonly<Record<string, unknown>> | undefined,
): ColumnResults | undefined {
  const stages = results?.stages;
  const isColumn =
    typeof stages === 'object' && stages !== null && 'T_K' in stages && stages.T_K instanceof Float64Array;
  return isColumn ? (results as unknown as ColumnResults) : undefined;
}

/** Liquid fractions of a chemical from the top to the bottom, ends included where the column has them. */
function liquidFractions({ stages, condenser, reboiler }: ColumnResults, id: string): number[] {
  const ends = (end: EndResults | undefined): number[] => (end ? [end.x[id] ?? 0] : []);
  return [...ends(condenser), ...(stages.x[id] ?? []), ...ends(reboiler)];
}

/** The chemicals whose liquid fraction changes most between any two places, in the order of the results. */
export function keyChemicals(results: ColumnResults, most = 3): readonly string[] {
  const ids = Object.keys(results.stages.x);
  const spans = new Map(
    ids.map((id) => {
      const x = liquidFractions(results, id);
      return [
        id,
        x.reduce((a, b) => Math.max(a, b), -Infinity) - x.reduce((a, b) => Math.min(a, b), Infinity),
      ];
    }),
  );
  const span = (id: string): number => spans.get(id) ?? 0;
  const chosen = ids
    .filter((id) => span(id) > 0)
    .sort((a, b) => span(b) - span(a))
    .slice(0, most);
  return ids.filter((id) => chosen.includes(id));
}

/** Chemicals that are in the column at all, in the order of the results. */
export const presentChemicals = (results: ColumnResults): readonly string[] =>
  Object.keys(results.stages.x).filter((id) => liquidFractions(results, id).some((x) => x > 0));

export interface StageRow {
  readonly at: ProfilePlace;
  readonly T_K: number;
  readonly P_Pa: number;
  /** What leaves the place as liquid and vapour, draws not included; absent where there is none [mol/s]. */
  readonly L_mol_s?: number;
  readonly V_mol_s?: number;
  x(id: string): number | undefined;
  /** Of a total condenser nothing leaves as vapour. */
  y(id: string): number | undefined;
}

/** Places from the top to the bottom, with the ends where the column has them. */
export function stageRows(results: ColumnResults): readonly StageRow[] {
  const { stages, condenser, reboiler } = results;
  const at = (of: Profile, k: number) => (id: string) => of[id]?.[k];
  const inner = Array.from(
    stages.T_K,
    (T_K, k): StageRow => ({
      at: k + 1,
      T_K,
      P_Pa: stages.P_Pa[k] ?? Number.NaN,
      L_mol_s: stages.L_mol_s[k] ?? Number.NaN,
      V_mol_s: stages.V_mol_s[k] ?? Number.NaN,
      x: at(stages.x, k),
      y: at(stages.y, k),
    }),
  );
  const isTotal = condenser?.distillate === 'liquid';
  return [
    ...(condenser
      ? [
          {
            at: 'condenser' as const,
            T_K: condenser.T_K,
            P_Pa: condenser.P_Pa,
            L_mol_s: condenser.reflux_mol_s,
            ...(isTotal ? {} : { V_mol_s: condenser.distillate_mol_s }),
            x: (id: string) => condenser.x[id],
            y: (id: string) => (isTotal ? undefined : condenser.y[id]),
          },
        ]
      : []),
    ...inner,
    ...(reboiler
      ? [
          {
            at: 'reboiler' as const,
            T_K: reboiler.T_K,
            P_Pa: reboiler.P_Pa,
            L_mol_s: reboiler.bottoms_mol_s,
            V_mol_s: reboiler.boilup_mol_s,
            x: (id: string) => reboiler.x[id],
            y: (id: string) => reboiler.y[id],
          },
        ]
      : []),
  ];
}

/**
 * Temperature, flows and liquid fractions over the stages, in the measures asked for.
 *
 * @param chosen  ids of the chemicals whose fractions are shown
 * @param nameOf  what a chemical is called
 */
export function columnProfiles(
  results: ColumnResults,
  measures: Measures,
  chosen: readonly string[],
  nameOf: (id: string) => string,
): ProfileData {
  const rows = stageRows(results);
  const { condenser, reboiler, stages } = results;
  const T = displayUnit('temperature', measures);
  const n = displayUnit('molarFlow', measures);
  const lineOf = (key: string, name: string, value: (row: StageRow) => number | undefined): ProfileLine => {
    const end = (at: 'condenser' | 'reboiler') => {
      const row = rows.find((r) => r.at === at);
      const there = row && value(row);
      return there === undefined ? {} : { [at]: there };
    };
    const values = rows.filter((row) => typeof row.at === 'number').map((row) => value(row) ?? Number.NaN);
    return { key, name, values, ...end('condenser'), ...end('reboiler') };
  };
  const flow = (of: number | undefined): number | undefined =>
    of === undefined ? undefined : n.toDisplay(of);
  return {
    stages: stages.T_K.length,
    condenser: condenser !== undefined,
    reboiler: reboiler !== undefined,
    plots: [
      {
        key: 'T',
        title: `Temperature, ${T.label}`,
        lines: [lineOf('T', 'temperature', (row) => T.toDisplay(row.T_K))],
      },
      {
        key: 'flow',
        title: `Flow, ${n.label}`,
        fromZero: true,
        lines: [
          lineOf('L', 'liquid', (row) => flow(row.L_mol_s)),
          lineOf('V', 'vapour', (row) => flow(row.V_mol_s)),
        ],
      },
      {
        key: 'x',
        title: 'Liquid, mol/mol',
        fromZero: true,
        lines: chosen.map((id) => lineOf(id, nameOf(id), (row) => row.x(id))),
      },
    ],
    marks: [
      ...stages.feed.map(({ stage }) => ({ at: stage, text: 'feed' })),
      ...stages.draw.map(({ stage }) => ({ at: stage, text: 'side draw' })),
    ],
  };
}
