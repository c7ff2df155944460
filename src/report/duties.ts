import { columnResults } from '../drawing/columnProfiles';
import { displayUnit, formatDecimals, parseQuantity } from '../quantity';
import type { UtilityLevel } from '../sketch/documentTypes';
import type { SketchUnit } from '../sketch/types';
import { capital, kindWord } from '../wording';
import { absent, decimalsFor, left, number, right, text } from './cells';
import { measuresOf, type ReportInput, solvedStream } from './input';
import type { Cell, Row, Table } from './types';

/** Heat that one part of a unit takes in (positive) or gives away, and between which process temperatures. */
export interface Duty {
  readonly unit: SketchUnit;
  /** "condenser"; empty where the unit has one duty only. */
  readonly part: string;
  readonly heat_W: number;
  readonly from_K?: number;
  readonly to_K?: number;
}

/** Least temperature difference to a utility when the sketch names none [K]; common practice. */
export const USUAL_APPROACH_K = 10;

export function dutiesOf(input: ReportInput, unit: SketchUnit): readonly Duty[] {
  const result = input.units.get(unit.id);
  if (result?.state !== 'solved') return [];
  const column = columnResults(result.results);
  if (column) {
    const end = (
      part: string,
      heat_W: number | undefined,
      from_K: number | undefined,
      to_K: number | undefined,
    ): Duty[] =>
      heat_W === undefined ? [] : [{ unit, part, heat_W, ...(from_K && to_K ? { from_K, to_K } : {}) }];
    return [
      ...end('condenser', column.condenserDuty_W, column.topT_K, column.condenser?.T_K),
      ...end('reboiler', column.reboilerDuty_W, column.bottomT_K, column.reboiler?.T_K),
    ];
  }
  if (!result.heat_W) return [];
  const temperatures = (end: 'from' | 'to'): number[] =>
    input.sketch.streams.flatMap((stream) => {
      const solved = stream[end]?.[0] === unit.id ? solvedStream(input.streams.get(stream.id)) : undefined;
      return solved ? [solved.T_K] : [];
    });
  const into = temperatures('to');
  const out = temperatures('from');
  const to_K = out[0];
  const from_K = into.length === 1 && unit.kind !== 'chamber' && unit.kind !== 'reactor' ? into[0] : to_K;
  return [{ unit, part: '', heat_W: result.heat_W, ...(from_K && to_K ? { from_K, to_K } : {}) }];
}

/** A level as SI; undefined where its temperature is missing or cannot be read. */
function levelOf(level: UtilityLevel): { readonly supply_K: number; readonly back_K: number } | undefined {
  const read = (value: UtilityLevel['supply']): number | undefined => {
    const parsed = value === undefined ? undefined : parseQuantity(value, ['temperature']);
    return parsed?.ok ? parsed.si : undefined;
  };
  const supply_K = read(level.supply);
  return supply_K === undefined ? undefined : { supply_K, back_K: read(level.back) ?? supply_K };
}

export function approachOf(input: ReportInput): number {
  const given = input.sketch.designBasis?.approach;
  const read = given === undefined ? undefined : parseQuantity(given, ['temperatureDifference']);
  return read?.ok ? read.si : USUAL_APPROACH_K;
}

/**
 * The mildest of the sketch's levels that serves a duty with the approach at both ends, counter-current; in words what is
 * needed where none does.
 */
export function utilityText(input: ReportInput, duty: Duty): string {
  const { from_K, to_K } = duty;
  if (from_K === undefined || to_K === undefined) return '–';
  const approach = approachOf(input);
  const heats = duty.heat_W > 0;
  const [cold_K, hot_K] = [Math.min(from_K, to_K), Math.max(from_K, to_K)];
  const levels = (input.sketch.designBasis?.utilities ?? []).filter(
    (level) => level.use === (heats ? 'heating' : 'cooling'),
  );
  const fitting = levels
    .flatMap((level) => {
      const si = levelOf(level);
      if (!si) return [];
      const serves = heats
        ? si.supply_K >= hot_K + approach && si.back_K >= cold_K + approach
        : si.supply_K <= cold_K - approach && si.back_K <= hot_K - approach;
      return serves ? [{ name: level.name, supply_K: si.supply_K }] : [];
    })
    .sort((a, b) => (heats ? a.supply_K - b.supply_K : b.supply_K - a.supply_K));
  if (fitting[0]) return fitting[0].name;
  const unit = displayUnit('temperature', measuresOf(input));
  const edge = unit.toDisplay(heats ? hot_K + approach : cold_K - approach);
  const need = `${heats ? 'at least' : 'at most'} ${formatDecimals(edge, 1)} ${unit.label}`;
  return levels.length > 0 ? `none of the levels given: ${need}` : `level not given: ${need}`;
}

const drawn = (input: ReportInput): readonly SketchUnit[] =>
  input.sketch.units.filter((unit) => unit.kind !== 'feed' && unit.kind !== 'product');

/** Every duty with its direction in words, its process temperatures and the utility level; totals by direction. */
export function dutyTable(input: ReportInput): Table {
  const measures = measuresOf(input);
  const power = displayUnit('power', measures);
  const T = displayUnit('temperature', measures);
  const duties = drawn(input).flatMap((unit) => dutiesOf(input, unit));
  const places = decimalsFor(
    duties.map((duty) => power.toDisplay(duty.heat_W)),
    5,
    1,
    4,
  );
  const heat = (si: number, bold = false): Cell =>
    si === 0 ? absent : number(power.toDisplay(si), places, bold);
  const degree = (si: number | undefined): Cell => (si === undefined ? absent : number(T.toDisplay(si), 1));
  const sum = (sign: 1 | -1): number => duties.reduce((so, duty) => so + Math.max(0, sign * duty.heat_W), 0);
  const rows = duties.map(
    (duty): Row => ({
      key: `${duty.unit.id}.${duty.part}`,
      label: duty.unit.tag,
      ...(duty.unit.kind === 'column' ? { link: `column.${duty.unit.id}` } : {}),
      cells: [
        text(capital(duty.part ? `${duty.part} duty` : kindWord(duty.unit.kind, duty.unit.settings.service))),
        text(duty.unit.name ?? ''),
        heat(Math.max(0, duty.heat_W)),
        heat(Math.max(0, -duty.heat_W)),
        degree(duty.from_K),
        degree(duty.to_K),
        text(utilityText(input, duty)),
      ],
    }),
  );
  const total: Row = {
    key: 'total',
    label: 'Total',
    style: 'total',
    cells: [absent, absent, heat(sum(1), true), heat(sum(-1), true), absent, absent, absent].map((cell, k) =>
      k === 2 || k === 3 ? cell : text(''),
    ),
  };
  const approach = displayUnit('temperatureDifference', measures);
  const given = input.sketch.designBasis?.approach !== undefined;
  return {
    key: 'duties',
    title: 'Duties and utility levels',
    columns: [
      left('what', 'Duty'),
      left('name', 'Service'),
      right('added', `Heat added, ${power.label}`),
      right('removed', `Heat removed, ${power.label}`),
      right('from', `Process from, ${T.label}`),
      right('to', `to, ${T.label}`),
      left('utility', 'Utility level'),
    ],
    rows: rows.length > 0 ? [...rows, total] : [],
    notes:
      rows.length > 0
        ? [
            `A level serves where it keeps ${formatDecimals(approach.toDisplay(approachOf(input)), 1)} ${approach.label} to the process at both ends${given ? '' : ' (not given; common practice)'}; the mildest that serves is named. No design margin included.`,
          ]
        : ['No heat is added or removed by any solved unit.'],
  };
}

/** Shaft power of every machine, and electric power where the drive's efficiency was given. */
export function powerTable(input: ReportInput): Table {
  const power = displayUnit('power', measuresOf(input));
  const machines = drawn(input).flatMap((unit) => {
    const result = input.units.get(unit.id);
    return result?.state === 'solved' && result.power_W
      ? [{ unit, shaft_W: result.power_W, electric_W: result.results?.electric_W }]
      : [];
  });
  const places = decimalsFor(
    machines.map((m) => power.toDisplay(m.shaft_W)),
    5,
    2,
    4,
  );
  const kW = (si: unknown, bold = false): Cell =>
    typeof si !== 'number' || si === 0 ? absent : number(power.toDisplay(si), places, bold);
  const sum = (sign: 1 | -1): number => machines.reduce((so, m) => so + Math.max(0, sign * m.shaft_W), 0);
  return {
    key: 'powers',
    title: 'Powers',
    columns: [
      left('what', 'Machine'),
      left('name', 'Service'),
      right('added', `Shaft power added, ${power.label}`),
      right('taken', `Shaft power taken off, ${power.label}`),
      right('electric', `Electric power, ${power.label}`),
    ],
    rows:
      machines.length === 0
        ? []
        : [
            ...machines.map(
              ({ unit, shaft_W, electric_W }): Row => ({
                key: unit.id,
                label: unit.tag,
                cells: [
                  text(capital(kindWord(unit.kind, unit.settings.service))),
                  text(unit.name ?? ''),
                  kW(Math.max(0, shaft_W)),
                  kW(Math.max(0, -shaft_W)),
                  kW(electric_W),
                ],
              }),
            ),
            {
              key: 'total',
              label: 'Total',
              style: 'total',
              cells: [text(''), text(''), kW(sum(1), true), kW(sum(-1), true), text('')],
            },
          ],
    notes:
      machines.length === 0
        ? ['No shaft power in any solved unit.']
        : ['Electric power needs the efficiency of motor and drive; “–” where it was not given.'],
  };
}
