import type { ClosureEntry } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import type { ModelSpec } from '../engine/thermo/types';
import { displayUnit } from '../quantity';
import type { Dimension } from '../quantity/dimension';
import type { Assumption } from '../sketch/types';
import { settingWord, weightWord } from '../wording';
import { absent, decimalsFor, difference, left, number, right, text } from './cells';
import { measuresOf, type ReportInput } from './input';
import type { Row, Table } from './types';
import { assumedWords, findingWords, modelText } from './words';

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
        difference(entry.relative),
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

/** A limit of a stream or of a column leads to where its figures stand. */
function linkOf({ at }: Finding, { sketch }: ReportInput): { readonly link?: string } {
  if (at.stream) return { link: `stream.${at.stream}` };
  return sketch.units.some((unit) => unit.id === at.unit && unit.kind === 'column')
    ? { link: `column.${at.unit}` }
    : {};
}

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
        ...linkOf(finding, input),
        mark: finding.weight,
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
    columns: [left('where', 'Where'), left('value', 'Value used'), left('why', 'Why'), left('hold', 'HOLD')],
    rows: input.assumptions.map((a): Row => {
      const where = whereOf(a);
      const hold = input.sketch.holds?.find((h) => h.path === a.path && h.unit === a.unit);
      return {
        key: a.no,
        label: a.no,
        cells: [
          text(where),
          text(assumedWords(a, where)),
          text(a.reason),
          text(hold ? `HOLD ${hold.no}` : ''),
        ],
      };
    }),
    notes:
      input.assumptions.length === 0
        ? ['No value was assumed.']
        : ['Each was used because the sketch gave none.'],
  };
}

/** The model that the pairs belong to, and whose liquid densities are shown. */
function modelNote(model: ModelSpec): string {
  if (model.kind !== 'peng-robinson') return `${modelText(model)}: no pair parameters.`;
  const density =
    model.liquidVolume === 'corrected' ? 'corrected, for density only' : 'those of the equation';
  return `${modelText(model)}; liquid volumes ${density}. Attraction of a pair: √(a₁ a₂) (1 − k).`;
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
    notes: [modelNote(model)],
  };
}
