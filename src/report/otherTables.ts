import type { ClosureEntry } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import { displayUnit, formatDifference, show } from '../quantity';
import type { Dimension } from '../quantity/dimension';
import type { Assumption } from '../sketch/types';
import { kindWord, settingWord, stateWord, weightWord } from '../wording';
import { absent, decimalsFor, number, text } from './cells';
import { measuresOf, type ReportInput } from './input';
import type { Cell, Row, Table } from './types';
import { findingWords, resultWord } from './words';

const left = (key: string, head: string) => ({ key, head, align: 'left' as const });
const right = (key: string, head: string) => ({ key, head, align: 'right' as const });

/** Every drawn unit: state, heat and power, and what its kind reports. */
export function unitTable(input: ReportInput): Table {
  const measures = measuresOf(input);
  const power = displayUnit('power', measures);
  const shown = input.sketch.units.filter((unit) => unit.kind !== 'feed' && unit.kind !== 'product');
  const watts = shown.map((unit) => {
    const result = input.units.get(unit.id);
    return { heat: result?.heat_W, power: result?.power_W };
  });
  const decimals = decimalsFor(
    watts.flatMap((w) => [w.heat, w.power].map((v) => (v === undefined ? v : power.toDisplay(v)))),
    5,
    1,
    4,
  );
  const duty = (value: number | undefined): Cell =>
    value === undefined || value === 0 ? absent : number(power.toDisplay(value), decimals);
  return {
    key: 'units',
    title: 'Units, duties and powers',
    columns: [
      left('kind', 'Kind'),
      left('name', 'Service'),
      left('state', 'State'),
      right('heat', `Heat in, ${power.label}`),
      right('power', `Power in, ${power.label}`),
      left('results', 'Results'),
    ],
    rows: shown.map((unit, k): Row => {
      const result = input.units.get(unit.id);
      return {
        key: unit.id,
        label: unit.tag,
        cells: [
          text(kindWord(unit.kind, unit.settings.service)),
          text(unit.name ?? ''),
          text(stateText(result?.state)),
          duty(watts[k]?.heat),
          duty(watts[k]?.power),
          text(resultText(input, unit.kind, result?.results)),
        ],
      };
    }),
    notes: ['Heat and power into a unit are positive; heat removed is negative. No design margin included.'],
  };
}

const stateText = (state: string | undefined): string => stateWord(state ?? 'waiting');

function resultText(
  input: ReportInput,
  kind: string,
  results: Readonly<Record<string, unknown>> | undefined,
): string {
  if (!results) return '';
  const measures = measuresOf(input);
  return Object.entries(results)
    .flatMap(([key, value]) => {
      const word = resultWord(kind, key, input.kinds);
      if (!word || typeof value !== 'number' || key === 'duty_W' || key === 'power_W') return [];
      const { number: figure, unit } = show(value, word.dim, measures);
      return [`${word.label} ${figure}${unit ? ` ${unit}` : ''}`];
    })
    .join('; ');
}

/** Mass, energy, chemicals and elements over the whole sketch. */
export function closureTable(input: ReportInput): Table {
  const { closure } = input;
  const measures = measuresOf(input);
  const rows: Row[] = [];
  const add = (label: string, entry: ClosureEntry, dim: Dimension): void => {
    const unit = displayUnit(dim, measures);
    const values = [entry.in, entry.out, entry.made].map((v) => unit.toDisplay(v));
    const places = decimalsFor(values, 8, 2, 6);
    rows.push({
      key: label,
      label,
      unit: unit.label,
      cells: [
        number(values[0], places),
        number(values[1], places),
        values[2] === 0 ? absent : number(values[2], places),
        text(formatDifference(entry.relative)),
      ],
    });
  };
  if (closure?.complete) {
    add('Mass', closure.mass, 'massFlow');
    // What comes in as heat and power counts as coming in, so that both sides can be compared.
    const { energy } = closure;
    add('Energy, with heat and power', { ...energy, in: energy.in + energy.made, made: 0 }, 'power');
    for (const [i, entry] of closure.chemicals.entries())
      add(input.basis.chemicals[i]?.name ?? String(i), entry, 'molarFlow');
    for (const [element, entry] of Object.entries(closure.elements))
      add(`Element ${element}`, entry, 'molarFlow');
  }
  return {
    key: 'closure',
    title: 'Overall balance and closure',
    columns: [right('in', 'In'), right('out', 'Out'), right('made', 'Made'), right('relative', 'Relative')],
    rows,
    notes: closure?.complete
      ? ['Closure shows arithmetic, not that the model is right.']
      : ['The closure is open: not every unit is solved. No overall figures are printed.'],
  };
}

const RANK = ['beyond-limit', 'caution', 'note'] as const;
const worstFirst = (findings: readonly Finding[]): Finding[] =>
  RANK.flatMap((weight) => findings.filter((finding) => finding.weight === weight));

export function limitsTable(input: ReportInput): Table {
  return {
    key: 'limits',
    title: 'Limits',
    columns: [
      left('weight', 'Weight'),
      left('what', 'What was seen'),
      left('basis', 'Basis'),
      left('next', 'Next step'),
    ],
    rows: worstFirst(input.findings).map((finding, k): Row => {
      const words = findingWords(finding, input);
      return {
        key: String(k),
        label: words.where || 'sketch',
        title: `${words.title}, ${weightWord(finding.weight)}`,
        cells: [
          text(weightWord(finding.weight)),
          text(words.sentence),
          text(words.basis ?? ''),
          text(words.next ?? ''),
        ],
      };
    }),
    notes:
      input.findings.length === 0 ? ['None of the built-in checks fired. That is no proof of safety.'] : [],
  };
}

export function assumptionTable(input: ReportInput): Table {
  const units = new Map(input.sketch.units.map((unit) => [unit.id, unit]));
  const whereOf = ({ unit: id, path }: Assumption): string => {
    const unit = id && units.get(id);
    const tag = unit ? (unit.kind === 'feed' && unit.name ? unit.name : unit.tag) : '';
    return `${tag} ${settingWord(unit?.kind ?? '', path)}`.trim();
  };
  return {
    key: 'assumptions',
    title: 'Assumption register',
    columns: [left('where', 'Where'), left('value', 'Value used'), left('why', 'Why')],
    rows: input.assumptions.map(
      (a): Row => ({
        key: a.no,
        label: a.no,
        cells: [text(whereOf(a)), text(a.unitText || String(a.value)), text(a.reason)],
      }),
    ),
    notes:
      input.assumptions.length === 0
        ? ['No value was assumed.']
        : ['Each was used because the sketch gave none.'],
  };
}

export function pairTable(input: ReportInput): Table {
  const { chemicals, model } = input.basis;
  return {
    key: 'pairs',
    title: 'Pair parameters in force',
    columns: [right('kij', 'k'), left('origin', 'Origin'), left('source', 'Source')],
    rows: model.pairs.map(
      (pair): Row => ({
        key: `${pair.i}-${pair.j}`,
        label: `${chemicals[pair.i]?.name ?? ''} + ${chemicals[pair.j]?.name ?? ''}`,
        cells: [
          number(pair.kij, 4),
          text(pair.origin === 'none' ? 'none: 0 used' : pair.origin),
          text(pair.source),
        ],
      }),
    ),
    notes: [],
  };
}
