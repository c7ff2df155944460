import {
  type ColumnResults,
  columnProfiles,
  columnResults,
  keyChemicals,
  presentChemicals,
  stageRows,
} from '../drawing/columnProfiles';
import { displayUnit } from '../quantity';
import type { Dimension } from '../quantity/dimension';
import type { SketchUnit } from '../sketch/types';
import { capital, fixingText, flowText, placeText, portWord, stagesText, stateWord } from '../wording';
import { absent, decimalsFor, number, text } from './cells';
import { measuresOf, type ReportInput } from './input';
import type { ColumnReport, Row, Table } from './types';

/** One entry for each column of the sketch, in its order; without a solution only what was set. */
export function columnReports(input: ReportInput): readonly ColumnReport[] {
  return input.sketch.units
    .filter((unit) => unit.kind === 'column')
    .map((unit): ColumnReport => {
      const result = input.units.get(unit.id);
      const results = result?.state === 'solved' ? columnResults(result.results) : undefined;
      const title = `${unit.tag}${unit.name ? ` ${unit.name}` : ''}`;
      const measures = measuresOf(input);
      return {
        key: unit.id,
        title,
        settings: settingsTable(input, unit, title),
        ...(results
          ? {
              figures: figureTable(input, results, unit, title),
              stages: stageTable(input, results, unit, title),
              profiles: columnProfiles(results, measures, keyChemicals(results), (id) => nameOf(input, id)),
            }
          : {}),
      };
    });
}

const nameOf = (input: ReportInput, id: string): string =>
  input.basis.chemicals.find((chemical) => chemical.id === id)?.name ?? id;

type Typed = Readonly<Record<string, unknown>>;
const isTyped = (value: unknown): value is Typed => typeof value === 'object' && value !== null;

/** What was set, in words: stages and ends, what enters and is drawn where, what fixes the column, efficiencies. */
function settingsTable(input: ReportInput, unit: SketchUnit, title: string): Table {
  const { sketch } = input;
  const settings: Typed = unit.settings;
  const names = {
    number: (id: string) => sketch.streams.find((stream) => stream.id === id)?.number,
    chemical: (id: string) => nameOf(input, id),
  };
  const state = input.units.get(unit.id)?.state ?? 'waiting';
  const rows: Row[] = [];
  const add = (label: string, value: string): void => {
    rows.push({ key: String(rows.length), label, cells: [text(value)] });
  };
  add('Stages', stagesText(settings));
  if (state !== 'solved') add('State', stateWord(state));
  const ports = (dir: 'from' | 'to', stem: string) =>
    sketch.streams.flatMap((stream) => {
      const end = stream[dir];
      return end?.[0] === unit.id && end[1].startsWith(stem)
        ? [
            {
              port: end[1],
              label: `${capital(portWord('column', end[1]))}, stream ${stream.number}`,
            },
          ]
        : [];
    });
  const at = (map: unknown, port: string): Typed => {
    const entry = isTyped(map) ? map[port] : undefined;
    return isTyped(entry) ? entry : {};
  };
  for (const { port, label } of ports('to', 'feed'))
    add(label, `to ${placeText(at(settings.feeds, port).stage)}`);
  for (const { port, label } of ports('from', 'side')) {
    const { stage, phase, flow } = at(settings.sides, port);
    add(
      label,
      `${typeof phase === 'string' ? phase : '…'} from ${placeText(stage)}, ${flowText(flow, names)}`,
    );
  }
  const fixed: readonly unknown[] = Array.isArray(settings.fixedBy) ? settings.fixedBy : [];
  fixed.forEach((item, k) => {
    add(k === 0 ? 'Fixed by' : '', fixingText(item, names));
  });
  if (fixed.length === 0) add('Fixed by', 'feeds, stages and pressures alone');
  if (
    typeof settings.subcooling === 'string' &&
    isTyped(settings.top) &&
    settings.top.distillate === 'liquid'
  )
    add('Reflux', `${settings.subcooling} below its bubble point`);
  const stretches: readonly unknown[] = Array.isArray(settings.murphree) ? settings.murphree : [];
  add(
    'Murphree efficiency',
    stretches.length === 0
      ? 'not set: equilibrium stages'
      : `${stretches.map((s) => (isTyped(s) ? `${String(s.value)} on stages ${String(s.from)} to ${String(s.to)}` : '')).join('; ')}; elsewhere 100 %`,
  );
  add('Real trays', 'stages / overall efficiency (not set)');
  return {
    key: `column.${unit.id}.settings`,
    title: `Column ${title}: settings`,
    short: [unit.tag, 'settings'],
    columns: [{ key: 'value', head: 'As set', align: 'left' }],
    rows,
    notes: [],
  };
}

/** Pressures, duties, ratios and temperatures of a solved column. */
function figureTable(input: ReportInput, results: ColumnResults, unit: SketchUnit, title: string): Table {
  const measures = measuresOf(input);
  const { condenser, reboiler, stages } = results;
  const rows: Row[] = [];
  const add = (
    label: string,
    si: number | undefined,
    dim: Dimension,
    [figures, least, most]: readonly [number, number, number],
  ): void => {
    if (si === undefined) return;
    const unitOf = displayUnit(dim, measures);
    const value = unitOf.toDisplay(si);
    rows.push({
      key: label,
      label,
      unit: dim === 'number' ? 'mol/mol' : unitOf.label,
      cells: [number(value, decimalsFor([value], figures, least, most))],
    });
  };
  const PRESSURE = [5, 2, 5] as const;
  const last = stages.P_Pa.length;
  add('Condenser pressure', condenser?.P_Pa, 'pressure', PRESSURE);
  add('Pressure of stage 1', stages.P_Pa[0], 'pressure', PRESSURE);
  if (last > 1) add(`Pressure of stage ${last}`, stages.P_Pa[last - 1], 'pressure', PRESSURE);
  add('Reboiler pressure', reboiler?.P_Pa, 'pressure', PRESSURE);
  for (const [end, duty_W] of [
    ['Condenser', results.condenserDuty_W],
    ['Reboiler', results.reboilerDuty_W],
  ] as const)
    add(
      `${end} duty, ${(duty_W ?? 0) < 0 ? 'removed' : 'added'}`,
      duty_W === undefined ? undefined : Math.abs(duty_W),
      'power',
      [5, 1, 4],
    );
  add('Reflux ratio', results.refluxRatio, 'number', [5, 2, 5]);
  add('Boil-up ratio', results.boilup, 'number', [5, 2, 5]);
  const TEMPERATURE = [5, 2, 3] as const;
  add('Condenser temperature', condenser?.T_K, 'temperature', TEMPERATURE);
  add('Temperature of stage 1', results.topT_K, 'temperature', TEMPERATURE);
  if (last > 1) add(`Temperature of stage ${last}`, results.bottomT_K, 'temperature', TEMPERATURE);
  add('Reboiler temperature', reboiler?.T_K, 'temperature', TEMPERATURE);
  return {
    key: `column.${unit.id}.figures`,
    title: `Column ${title}: results`,
    short: [unit.tag, 'results'],
    columns: [{ key: 'value', head: 'Value', align: 'right' }],
    rows,
    notes: [],
  };
}

/** Every place from the top: temperature, pressure, flows, then the fractions of what is in the column at all. */
function stageTable(input: ReportInput, results: ColumnResults, unit: SketchUnit, title: string): Table {
  const measures = measuresOf(input);
  const T = displayUnit('temperature', measures);
  const P = displayUnit('pressure', measures);
  const n = displayUnit('molarFlow', measures);
  const present = presentChemicals(results);
  const flow = (value: number | undefined) => (value === undefined ? absent : number(n.toDisplay(value), 3));
  const head = (key: string, name: string, sub: string) => ({
    key,
    head: name,
    sub,
    align: 'right' as const,
  });
  return {
    key: `column.${unit.id}.stages`,
    title: `Column ${title}: stages`,
    short: [unit.tag, 'stages'],
    columns: [
      head('T', 'T', T.label),
      head('P', 'P', P.label),
      head('L', 'L', n.label),
      head('V', 'V', n.label),
      ...present.map((id) => head(`x ${id}`, `x ${nameOf(input, id)}`, 'mol/mol')),
      ...present.map((id) => head(`y ${id}`, `y ${nameOf(input, id)}`, 'mol/mol')),
    ],
    rows: stageRows(results).map(
      (row): Row => ({
        key: String(row.at),
        label: typeof row.at === 'number' ? String(row.at) : row.at,
        cells: [
          number(T.toDisplay(row.T_K), 2),
          number(P.toDisplay(row.P_Pa), 4),
          flow(row.L_mol_s),
          flow(row.V_mol_s),
          ...present.map((id) => number(row.x(id), 5)),
          ...present.map((id) => number(row.y(id), 5)),
        ],
      }),
    ),
    notes: [
      'L and V leave the stage, draws not included; at the ends reflux, distillate vapour, boil-up and bottoms. x liquid, y vapour.',
    ],
  };
}
