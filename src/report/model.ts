import { revisionInForce } from '../sketch/revision';
import { stateWord } from '../wording';
import { basisTable, holdTable, revisionTable, utilityTable } from './basisTables';
import { columnReports } from './columns';
import { dutyTable, powerTable } from './duties';
import { measuresOf, type ReportInput } from './input';
import { assumptionTable, closureTable, limitsTable, pairTable } from './otherTables';
import { requirementTable } from './requirements';
import { streamTable } from './streamTable';
import type { ReportModel, TitleEntry } from './types';
import { unitTable } from './unitTable';
import { modelText } from './words';

export const PRELIMINARY = 'PRELIMINARY – NOT FOR CONSTRUCTION';

/** Purposes that take the warning away: an issue that others may build or design in detail from. */
const BINDING = /\b(for construction|for detailed design|as[- ]built)\b/i;

/** The warning of every page, unless the purpose says otherwise. */
export const warningOf = (purpose: string | undefined): string =>
  BINDING.test(purpose ?? '') && !/\bnot\b/i.test(purpose ?? '') ? '' : PRELIMINARY;

/** Builds the one model behind every table on screen, in CSV and in PDF. */
export function buildReport(input: ReportInput): ReportModel {
  const { sketch, basis } = input;
  const { title } = sketch;
  const revision = revisionInForce(sketch);
  const entries: TitleEntry[] = [
    { label: 'Project', text: title.project ?? '' },
    { label: 'Area', text: title.area ?? '' },
    { label: 'Title', text: title.title ?? 'Untitled sketch' },
    { label: 'Sheet number', text: title.number ?? '' },
    { label: 'Revision', text: revision ?? 'draft' },
    { label: 'Purpose', text: title.purpose ?? '' },
    { label: 'Author', text: title.author ?? '' },
    { label: 'Checked', text: title.checked ?? '' },
    { label: 'Approved', text: title.approved ?? '' },
    { label: 'Date', text: title.date ?? input.day },
    { label: 'Thermodynamic model', text: modelText(basis.model) },
  ];
  const predicted = basis.model.pairs.filter((p) => p.origin === 'predicted').length;
  const missing = basis.model.pairs.filter((p) => p.origin === 'none').length;
  return {
    title: entries,
    strip: {
      warning: warningOf(title.purpose),
      purpose: title.purpose?.trim() ?? '',
      margin: 'No design margin included',
      fingerprint: input.fingerprint,
      measures: `Measures: ${measuresOf(input).set}; pressures (a) or (g) as marked`,
      version: `Splitwright ${input.version}`,
      number: [title.number, revision ? `Rev ${revision}` : 'draft', title.date ?? input.day]
        .filter(Boolean)
        .join(', '),
    },
    streams: streamTable(input),
    units: unitTable(input),
    duties: dutyTable(input),
    powers: powerTable(input),
    columns: columnReports(input),
    closure: closureTable(input),
    requirements: requirementTable(input),
    limits: limitsTable(input),
    basis: basisTable(input),
    utilities: utilityTable(input),
    assumptions: assumptionTable(input),
    holds: holdTable(input),
    revisions: revisionTable(input),
    pairs: pairTable(input),
    sources: sourcesOf(input),
    cautions: [
      ...(input.severalAnswers
        ? [
            'Several answers: solving from nothing gave another answer than the one on the screen; the answer from nothing is printed.',
          ]
        : []),
      ...(basis.model.pairs.length > 0
        ? [
            `Of ${basis.model.pairs.length} pairs ${predicted} are predicted by a group-contribution method and ${missing} have no value (0 used). Check those that matter against data.`,
          ]
        : []),
      ...(basis.model.kind === 'peng-robinson'
        ? [
            'Heat capacities of liquids come from the cubic equation, commonly 3 to 13 % off (most for aromatics, which it puts too low): so are duties that only warm or cool a liquid.',
          ]
        : []),
      'Closure shows arithmetic, not that the model is right.',
      'The limits are screening checks with common-practice thresholds, not a hazard review. Relief, materials, hydrates, corrosion and flammability need the responsible licensed engineer and the local codes.',
      'Early-design figures: not for construction, purchase or operation.',
    ],
    state: stateOf(input),
  };
}

function stateOf(input: ReportInput): ReportModel['state'] {
  const open = input.sketch.units.filter((unit) => input.units.get(unit.id)?.state !== 'solved');
  if (input.sketch.units.length === 0) return { solved: false, text: 'Nothing to solve yet' };
  if (open.length === 0) return { solved: true, text: 'Solved from nothing' };
  const names = open
    .slice(0, 4)
    .map((unit) => `${unit.tag} ${stateWord(input.units.get(unit.id)?.state ?? 'waiting')}`);
  return {
    solved: false,
    text: `Not solved: ${names.join(', ')}${open.length > 4 ? ` and ${open.length - 4} more` : ''}`,
  };
}

/** Citations behind the constants and correlations of the sketch's chemicals, each once. */
function sourcesOf(input: ReportInput): string[] {
  const tags = new Map<string, Set<string>>();
  const note = (tag: string | undefined, chemical: string): void => {
    if (!tag) return;
    const known = tags.get(tag) ?? new Set<string>();
    tags.set(tag, known.add(chemical));
  };
  for (const chemical of input.basis.chemicals) {
    for (const tag of Object.values(chemical.sources)) note(tag, chemical.name);
    for (const rows of Object.values(chemical.corr)) for (const row of rows) note(row.source, chemical.name);
  }
  return [...tags].map(
    ([tag, names]) =>
      `${tag}: ${input.citations[tag] ?? tag} (${names.size === input.basis.chemicals.length ? 'all chemicals' : [...names].join(', ')})`,
  );
}
