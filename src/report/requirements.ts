import { displayUnit, formatSignificant, parseQuantity, unitLabel } from '../quantity';
import type { Dimension } from '../quantity/dimension';
import type { Requirement, RequirementKind } from '../sketch/documentTypes';
import type { Quantity } from '../sketch/types';
import { left, text } from './cells';
import { measuresOf, type ReportInput, type SolvedStream, solvedStream } from './input';
import type { Row, Table } from './types';

export { REQUIREMENT_KINDS } from '../sketch/documentTypes';

export const REQUIREMENT_DIMS: Readonly<Record<RequirementKind, Dimension>> = {
  fraction: 'fraction',
  recovery: 'fraction',
  molarFlow: 'molarFlow',
  massFlow: 'massFlow',
  temperature: 'temperature',
  pressure: 'pressure',
  vapourFraction: 'fraction',
};

/** What the solver itself may be off, relative: a purity that was set is met by the answer it gives. */
const SOLVER = 1e-8;

export type Judged =
  | { readonly is: 'met' | 'missed'; readonly value: number; readonly by: number }
  | { readonly is: 'open'; readonly why: string };

/** What judging needs to know. */
export type JudgeInput = Pick<ReportInput, 'sketch' | 'basis' | 'streams' | 'sitePressure_Pa'>;

/** A requirement against the results [SI]. `by`: how far it is missed, 0 when met. */
export function judged(input: JudgeInput, requirement: Requirement): Judged {
  const { sketch } = input;
  if (!sketch.streams.some((stream) => stream.id === requirement.stream))
    return { is: 'open', why: 'the stream is not in the sketch any more' };
  const stream = solvedStream(input.streams.get(requirement.stream));
  if (!stream) return { is: 'open', why: 'the stream is not solved' };
  const value = resultOf(input, requirement, stream);
  if (typeof value === 'string') return { is: 'open', why: value };
  const min = limitOf(input, requirement, requirement.min);
  const max = limitOf(input, requirement, requirement.max);
  if (min === 'unreadable' || max === 'unreadable') return { is: 'open', why: 'the limit cannot be read' };
  if (min === undefined && max === undefined) return { is: 'open', why: 'no limit is given' };
  const slack = (limit: number): number => SOLVER * Math.max(Math.abs(limit), Math.abs(value));
  if (min !== undefined && value < min - slack(min)) return { is: 'missed', value, by: min - value };
  if (max !== undefined && value > max + slack(max)) return { is: 'missed', value, by: value - max };
  return { is: 'met', value, by: 0 };
}

function limitOf(
  input: JudgeInput,
  { of }: Requirement,
  limit: Quantity | undefined,
): number | 'unreadable' | undefined {
  if (limit === undefined) return undefined;
  const read = parseQuantity(limit, [REQUIREMENT_DIMS[of]], { P_Pa: input.sitePressure_Pa });
  return read.ok ? read.si : 'unreadable';
}

/** Fractions are of what flows. */
const PER_FLOW: ReadonlySet<RequirementKind> = new Set(['fraction', 'vapourFraction']);
const UNKNOWN = 'the component is not in the sketch';

/** What the stream has of it, or why that cannot be told. */
function resultOf(input: JudgeInput, requirement: Requirement, stream: SolvedStream): number | string {
  const { of } = requirement;
  if (PER_FLOW.has(of) && stream.n_mol_s === 0) return 'nothing flows in the stream';
  const at = input.basis.chemicals.findIndex((chemical) => chemical.id === requirement.chemical);
  const z = stream.z[at];
  switch (of) {
    case 'fraction': {
      if (z === undefined) return UNKNOWN;
      return requirement.basis === 'mass' ? (z * input.basis.chemicals[at]!.MW_g_mol) / stream.MW_g_mol : z;
    }
    case 'recovery':
      return z === undefined ? UNKNOWN : recoveryOf(input, at, stream.n_mol_s * z);
    case 'molarFlow':
      return stream.n_mol_s;
    case 'massFlow':
      return stream.m_kg_s;
    case 'temperature':
      return stream.T_K;
    case 'pressure':
      return stream.P_Pa;
    case 'vapourFraction':
      return stream.vapourFraction;
  }
}

/** Share of all that the feeds bring of a chemical [-]. */
function recoveryOf({ sketch, streams }: JudgeInput, at: number, n_mol_s: number): number | string {
  const feeds = new Set(sketch.units.filter((unit) => unit.kind === 'feed').map((unit) => unit.id));
  let fed = 0;
  for (const { id, from } of sketch.streams) {
    if (!from || !feeds.has(from[0])) continue;
    const feed = solvedStream(streams.get(id));
    if (!feed) return 'a feed is not solved';
    fed += feed.n_mol_s * feed.z[at]!;
  }
  return fed > 0 ? n_mol_s / fed : 'no feed brings the component';
}

const KIND_WORDS: Readonly<Record<RequirementKind, string>> = {
  fraction: 'fraction',
  recovery: 'recovery',
  molarFlow: 'molar flow',
  massFlow: 'mass flow',
  temperature: 'temperature',
  pressure: 'pressure',
  vapourFraction: 'vapour fraction',
};
export const requirementKindWord = (of: RequirementKind): string => KIND_WORDS[of];

/** "Benzene, mol", "recovery of Benzene", "temperature". */
export function requirementWords(input: Pick<ReportInput, 'basis'>, requirement: Requirement): string {
  const { of, basis, chemical } = requirement;
  const name = input.basis.chemicals.find((c) => c.id === chemical)?.name ?? chemical ?? '…';
  if (of === 'fraction') return `${name}, ${basis === 'mass' ? 'mass' : 'mol'}`;
  return of === 'recovery' ? `recovery of ${name} from all feeds` : KIND_WORDS[of];
}

const asTyped = (limit: Quantity | undefined, of: RequirementKind): string => {
  if (limit === undefined) return '–';
  const read = parseQuantity(limit, [REQUIREMENT_DIMS[of]]);
  return read.ok ? `${read.number} ${unitLabel(read.unit, read.dim)}`.trim() : String(limit);
};

/** A result or a difference of it in the measures, six and three figures: "99.87 %", "38.00 °C". */
function said(input: JudgeInput, { of }: Requirement, si: number, isDifference: boolean): string {
  const figures = isDifference ? 3 : 6;
  if (REQUIREMENT_DIMS[of] === 'fraction') return `${formatSignificant(100 * si, figures)} %`;
  const unit = displayUnit(REQUIREMENT_DIMS[of], measuresOf(input));
  const shown = isDifference ? unit.toDisplay(si) - unit.toDisplay(0) : unit.toDisplay(si);
  // A difference of temperatures or pressures counts from nothing.
  const label = isDifference ? unit.label.replace(/\([ag]\)$/, '') : unit.label;
  return `${formatSignificant(shown, figures)} ${label}`;
}

/** What a stream has of it; "–" where that is not known. */
export const resultWords = (input: JudgeInput, requirement: Requirement, verdict: Judged): string =>
  verdict.is === 'open' ? '–' : said(input, requirement, verdict.value, false);

/** "met", "missed by 0.12 %", "not known: the stream is not solved". */
export function verdictWords(input: JudgeInput, requirement: Requirement, verdict: Judged): string {
  if (verdict.is === 'open') return `not known: ${verdict.why}`;
  return verdict.is === 'met' ? 'met' : `missed by ${said(input, requirement, verdict.by, true)}`;
}

/** What each product must keep, what it has, and whether that is met; limits as typed. */
export function requirementTable(input: ReportInput): Table {
  const requirements = input.sketch.designBasis?.requirements ?? [];
  return {
    key: 'requirements',
    title: 'Product requirements',
    columns: [
      left('what', 'Of'),
      left('min', 'At least'),
      left('max', 'At most'),
      left('value', 'Result'),
      left('verdict', 'Verdict'),
      left('note', 'Note'),
    ],
    rows: requirements.map((requirement, k): Row => {
      const verdict = judged(input, requirement);
      const number = input.sketch.streams.find((s) => s.id === requirement.stream)?.number;
      return {
        key: String(k),
        label: number === undefined ? 'stream gone' : `Stream ${number}`,
        ...(number === undefined ? {} : { link: `stream.${requirement.stream}` }),
        cells: [
          text(requirementWords(input, requirement)),
          text(asTyped(requirement.min, requirement.of)),
          text(asTyped(requirement.max, requirement.of)),
          text(resultWords(input, requirement, verdict)),
          text(verdictWords(input, requirement, verdict), { bold: verdict.is !== 'met' }),
          text(requirement.note ?? ''),
        ],
      };
    }),
    notes:
      requirements.length === 0
        ? ['No product requirement is given.']
        : ['Judged on unrounded results. No design margin included.'],
  };
}
