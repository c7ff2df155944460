import { displayUnit, formatDecimals, plainNumber } from '../quantity';
import type { Dimension } from '../quantity/dimension';
import type { Sketch } from '../sketch/types';
import { left, text } from './cells';
import { measuresOf, type ReportInput, solvedStream } from './input';
import type { Row, Table } from './types';
import { typedWords } from './words';

/** Each with what counts where the sketch says nothing [SI]. */
const SITE: readonly (readonly [keyof Sketch['site'], string, Dimension, number])[] = [
  ['pressure', 'Site pressure', 'pressure', 101325],
  ['ambient', 'Ambient temperature', 'temperature', 293.15],
  ['coolingWater', 'Cooling water in', 'temperature', 301.15],
];

/** Feed cases, the feeds as they stand, site conditions and notes. */
export function basisTable(input: ReportInput): Table {
  const { sketch } = input;
  const basis = sketch.designBasis ?? {};
  const rows: Row[] = [];
  const add = (label: string, value: string): void => {
    rows.push({ key: String(rows.length), label, cells: [text(value)] });
  };
  for (const { name, text: words } of basis.cases ?? []) add(`Feed case: ${name}`, words ?? '–');
  for (const line of feedLines(input)) add(...line);
  for (const [key, label, dim, usual] of SITE) {
    const value = sketch.site[key];
    const unit = displayUnit(dim, measuresOf(input));
    const shown = `${plainNumber(Number(unit.toDisplay(usual).toPrecision(6)))} ${unit.label}`;
    add(label, value === undefined ? `${shown}, not given: used where needed` : typedWords(value, dim));
  }
  if (basis.conditions) add('Site conditions', basis.conditions);
  if (basis.notes) add('Notes', basis.notes);
  if (sketch.title.notes) add('Notes of the title block', sketch.title.notes);
  return {
    key: 'basis',
    title: 'Design basis',
    columns: [left('value', 'Value')],
    rows,
    notes: [
      ...(basis.cases?.length ? [] : ['No feed case is named: the feeds of the sketch are the only case.']),
      ...(basis.utilities?.length ? [] : ['No utility level is given.']),
      'No design margin included.',
    ],
  };
}

function feedLines(input: ReportInput): (readonly [string, string])[] {
  const measures = measuresOf(input);
  const shown = (si: number, dim: Dimension, decimals: number): string => {
    const unit = displayUnit(dim, measures);
    return `${formatDecimals(unit.toDisplay(si), decimals)} ${unit.label}`;
  };
  return input.sketch.streams.flatMap((stream) => {
    const unit = input.sketch.units.find((u) => u.id === stream.from?.[0] && u.kind === 'feed');
    if (!unit) return [];
    const solved = solvedStream(input.streams.get(stream.id));
    return [
      [
        `Feed ${unit.name ?? unit.tag}, stream ${stream.number}`,
        solved
          ? `${shown(solved.n_mol_s, 'molarFlow', 2)}, ${shown(solved.m_kg_s, 'massFlow', 2)}, ${shown(solved.T_K, 'temperature', 1)}, ${shown(solved.P_Pa, 'pressure', 3)}`
          : 'not solved',
      ] as const,
    ];
  });
}

/** Levels at which heat can be had or given away, as typed. */
export function utilityTable(input: ReportInput): Table {
  const levels = input.sketch.designBasis?.utilities ?? [];
  return {
    key: 'utilities',
    title: 'Utility levels',
    columns: [
      left('use', 'For'),
      left('supply', 'Comes at'),
      left('back', 'Leaves at'),
      left('note', 'Note'),
    ],
    rows: levels.map(
      (level, k): Row => ({
        key: String(k),
        label: level.name,
        cells: [
          text(level.use),
          text(level.supply === undefined ? 'not given: not used' : typedWords(level.supply, 'temperature')),
          text(level.back === undefined ? 'as it comes' : typedWords(level.back, 'temperature')),
          text(level.note ?? ''),
        ],
      }),
    ),
    notes: levels.length === 0 ? ['No utility level is given.'] : [],
  };
}

/** What is not settled: who settles it, by when, and the assumption behind it. */
export function holdTable(input: ReportInput): Table {
  const holds = input.sketch.holds ?? [];
  return {
    key: 'holds',
    title: 'HOLDs',
    columns: [
      left('what', 'What is not settled'),
      left('owner', 'Owner'),
      left('date', 'Due'),
      left('assumption', 'Assumption'),
    ],
    rows: holds.map((hold, k): Row => {
      const behind = input.assumptions.find((a) => a.path === hold.path && a.unit === hold.unit);
      return {
        key: String(k),
        label: `HOLD ${hold.no}`,
        cells: [
          text(hold.what),
          text(hold.owner ?? '–'),
          text(hold.date ?? '–'),
          text(hold.path === undefined ? '–' : (behind?.no ?? 'not assumed any more')),
        ],
      };
    }),
    notes: holds.length === 0 ? ['No HOLD is raised.'] : [],
  };
}

export function revisionTable(input: ReportInput): Table {
  const revisions = input.sketch.revisions ?? [];
  return {
    key: 'revisions',
    title: 'Revisions',
    columns: [
      left('date', 'Date'),
      left('what', 'What changed'),
      left('by', 'By'),
      left('checked', 'Checked'),
      left('approved', 'Approved'),
    ],
    rows: revisions.map(
      (r, k): Row => ({
        key: String(k),
        label: r.mark,
        cells: [r.date, r.what, r.by, r.checked, r.approved].map((value) => text(value || '–')),
      }),
    ),
    notes: revisions.length === 0 ? ['No revision is recorded: this is a draft.'] : [],
  };
}
