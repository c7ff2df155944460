import { withReference } from '../drawing/measures';
import { displayUnit, type Measures } from '../quantity';
import { describeStream } from '../sketch/describe';
import type { SketchStream } from '../sketch/types';
import { absent, decimalsFor, number, text } from './cells';
import { measuresOf, type ReportInput, type SolvedStream, solvedStream } from './input';
import { streamNotes } from './streamNotes';
import {
  CONDITION_ROWS,
  ENERGY_ROWS,
  FLOW_ROWS,
  hasBlock,
  LIQUID_ROWS,
  LIQUID2_ROWS,
  phaseWord,
  type RowRule,
  VAPOUR_ROWS,
} from './streamRows';
import type { Cell, Row, Table } from './types';
import { vapourAsGas } from './volumeFlows';

const byNumber = new Intl.Collator('en', { numeric: true });
/** Streams in the order of their numbers: 2 before 10. */
export const inOrder = (streams: readonly SketchStream[]): readonly SketchStream[] =>
  [...streams].sort((a, b) => byNumber.compare(a.number, b.number));

/** Heat and material balance: one column a stream, rows in the trade's order. Totals come from unrounded values. */
export function streamTable(input: ReportInput): Table {
  const choices = input.sketch.documents ?? {};
  const whole = allStreams(input, (stream) => !choices.withoutStreams?.includes(stream.id));
  const table = { ...whole, rows: withoutRows(whole.rows, choices.withoutRows ?? []) };
  return { ...table, notes: streamNotes(input, table) };
}

/** Rows that may be left out, by name; composition and component flows only as a whole. */
export function rowChoices(input: ReportInput): readonly { readonly key: string; readonly text: string }[] {
  let block = '';
  return allStreams(input, () => true).rows.flatMap((row) => {
    if (row.style === 'group') {
      block = row.label;
      return ['composition', 'componentFlows'].includes(row.key) ? [{ key: row.key, text: row.label }] : [];
    }
    if (/^[zm]\./.test(row.key)) return [];
    const unit = row.unit && row.label === 'Pressure' ? `, ${row.unit}` : '';
    const prefix = /^(vapour|liquid|liquid2)\./.test(row.key)
      ? `${block}: ${row.label.toLowerCase()}`
      : row.label;
    return [{ key: row.key, text: `${prefix}${unit}` }];
  });
}

/** Rows without those named; a group's name takes all of the group, and a group without rows goes too. */
function withoutRows(rows: readonly Row[], names: readonly string[]): Row[] {
  let groupGone = false;
  const kept = rows.filter((row) => {
    if (row.style === 'group') groupGone = names.includes(row.key);
    return !(groupGone && !FREE.includes(row.key)) && !names.includes(row.key);
  });
  return kept.filter((row, k) => {
    const next = kept[k + 1];
    return row.style !== 'group' || (next !== undefined && next.style !== 'group');
  });
}

/** Rows that stand between groups and belong to none. */
const FREE = ['liquid2'];

function allStreams(input: ReportInput, isShown: (stream: SketchStream) => boolean): Table {
  const { sketch } = input;
  const measures = measuresOf(input);
  const streams = inOrder(sketch.streams).filter(isShown);
  const results = streams.map((stream) => solvedStream(input.streams.get(stream.id)));
  const unitTag = new Map(
    sketch.units.map((unit) => [unit.id, unit.name && isBoundary(unit.kind) ? unit.name : unit.tag]),
  );
  const end = (of: SketchStream['from']): Cell => text(of ? (unitTag.get(of[0]) ?? '') : '–');

  const rows: Row[] = [
    { key: 'from', label: 'From', cells: streams.map((s) => end(s.from)) },
    { key: 'to', label: 'To', cells: streams.map((s) => end(s.to)) },
    {
      key: 'phase',
      label: 'Phase',
      cells: results.map((r, k) => (r ? text(phaseWord(r)) : text(stateWord(input, streams[k])))),
    },
    ...CONDITION_ROWS.map((rule) => ruled(rule, results, measures)),
    group('flows', 'Flows'),
    ...FLOW_ROWS.map((rule) => ruled(rule, results, measures)),
    ...ENERGY_ROWS.map((rule) => ruled(rule, results, measures)),
    group('vapour', 'Vapour'),
    ...VAPOUR_ROWS.map((rule) => ruled(rule, results, measures)),
    group('liquid', 'Liquid'),
    ...LIQUID_ROWS.map((rule) => ruled(rule, results, measures)),
    { key: 'liquid2', label: 'Second liquid', cells: results.map(secondLiquid) },
    ...(results.some((r) => r && hasBlock(r, 'liquid2'))
      ? [
          group('liquid2.block', 'Second liquid'),
          ...LIQUID2_ROWS.map((rule) => ruled(rule, results, measures)),
        ]
      : []),
    ...composition(input, results),
    ...componentFlows(input, results, measures),
  ];
  return {
    key: 'streams',
    title: 'Stream summary (heat and material balance)',
    columns: streams.map((s) => ({
      key: s.id,
      head: s.number,
      sub: s.name ?? describeStream(sketch, s),
      align: 'right',
    })),
    rows,
    notes: [],
  };
}

const isBoundary = (kind: string): boolean => kind === 'feed' || kind === 'product';
const group = (key: string, label: string, unit?: string): Row => ({
  key,
  label,
  ...(unit ? { unit } : {}),
  cells: [],
  style: 'group',
});
const stateWord = (input: ReportInput, stream: SketchStream | undefined): string =>
  stream && input.streams.get(stream.id)?.state === 'no-solution' ? 'no solution' : 'waiting';
const secondLiquid = (stream: SolvedStream | undefined): Cell => {
  if (!stream) return absent;
  if (hasBlock(stream, 'liquid2')) return text('found: see below');
  if (stream.hiddenLiquid)
    return text(stream.liquidsTogether ? 'found: both told as one' : 'found: one liquid shown');
  return text(hasBlock(stream, 'liquid') ? 'none found' : 'not tested');
};

function ruled(rule: RowRule, results: readonly (SolvedStream | undefined)[], measures: Measures): Row {
  const gas = rule.asGas ? vapourAsGas(measures) : undefined;
  const own = rule.gauge ? withReference(measures, 'gauge') : (gas?.measures ?? measures);
  const unit = displayUnit(rule.dim, own);
  const values = results.map((stream) => {
    const si = stream ? rule.value(stream) : undefined;
    return si === undefined ? undefined : unit.toDisplay(si);
  });
  const decimals = decimalsFor(values, rule.figures, rule.least, rule.most);
  return {
    key: rule.key,
    label: gas?.label ?? rule.label,
    unit: rule.unitLabel ?? unit.label,
    cells: values.map((value) => number(value, decimals, rule.bold === true)),
  };
}

const PERCENT_PLACES = 2;

function composition(input: ReportInput, results: readonly (SolvedStream | undefined)[]): Row[] {
  const percent = (value: number | undefined): Cell => (value === 0 ? absent : number(value, PERCENT_PLACES));
  return [
    group('composition', 'Composition', 'mol %'),
    ...input.basis.chemicals.map(
      (chemical, i): Row => ({
        key: `z.${chemical.id}`,
        label: chemical.name,
        unit: 'mol %',
        cells: results.map((r) => (r ? percent((r.z[i] ?? 0) * 100) : absent)),
      }),
    ),
    {
      key: 'z.total',
      label: 'Total',
      unit: 'mol %',
      style: 'total',
      cells: results.map((r) =>
        r && r.n_mol_s > 0 ? number(100 * r.z.reduce((a, b) => a + b, 0), PERCENT_PLACES, true) : absent,
      ),
    },
  ];
}

function componentFlows(
  input: ReportInput,
  results: readonly (SolvedStream | undefined)[],
  measures: Measures,
): Row[] {
  const unit = displayUnit('massFlow', measures);
  const flow = (r: SolvedStream, i: number): number =>
    unit.toDisplay(((r.z[i] ?? 0) * r.n_mol_s * (input.basis.chemicals[i]?.MW_g_mol ?? 0)) / 1000);
  const totals = results.map((r) => (r ? unit.toDisplay(r.m_kg_s) : undefined));
  const decimals = decimalsFor(totals, 7, 2, 6);
  return [
    group('componentFlows', 'Flow by component', unit.label),
    ...input.basis.chemicals.map(
      (chemical, i): Row => ({
        key: `m.${chemical.id}`,
        label: chemical.name,
        unit: unit.label,
        cells: results.map((r) => {
          const value = r ? flow(r, i) : undefined;
          return value === 0 ? absent : number(value, decimals);
        }),
      }),
    ),
    {
      key: 'm.total',
      label: 'Total',
      unit: unit.label,
      style: 'total',
      cells: totals.map((value) => number(value, decimals, true)),
    },
  ];
}
