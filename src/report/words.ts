import type { Finding } from '../engine/outcome';
import type { ModelSpec } from '../engine/thermo/types';
import { CATALOGUE } from '../engine/units/catalogue';
import { DIMENSIONS, type Dimension, parseQuantity, unitLabel } from '../quantity';
import type { Assumption, Quantity } from '../sketch/types';
import { resultWord as labelOf, modelWord as nameOfModel, type Said, sayFinding } from '../wording';
import { measuresOf, type ReportInput } from './input';

/** A finding in words, with the sketch's own tags, numbers and component names. */
export function findingWords(finding: Finding, input: ReportInput): Said {
  const { sketch, basis } = input;
  return sayFinding(finding, {
    measures: measuresOf(input),
    tag: (id) => sketch.units.find((unit) => unit.id === id)?.tag,
    kind: (id) => sketch.units.find((unit) => unit.id === id)?.kind,
    number: (id) => sketch.streams.find((stream) => stream.id === id)?.number,
    chemical: (id) => basis.chemicals.find((chemical) => chemical.id === id)?.name,
  });
}

/** Label and dimension of a result that is meant to be shown; undefined for hidden and unknown ones. */
export function resultWord(
  kind: string,
  key: string,
  kinds: NonNullable<ReportInput['kinds']> = CATALOGUE,
): { readonly label: string; readonly dim: Dimension; readonly percent: boolean } | undefined {
  const results = Object.hasOwn(kinds, kind) ? kinds[kind]?.results : undefined;
  const spec = results && Object.hasOwn(results, key) ? results[key] : undefined;
  return spec && !spec.hidden
    ? { label: labelOf(kind, key), dim: spec.dim, percent: spec.percent === true }
    : undefined;
}

/** "Peng–Robinson, 1976 alpha" */
export const modelText = (model: ModelSpec): string =>
  model.kind === 'peng-robinson'
    ? `${nameOfModel(model.kind)}, ${model.alpha} alpha`
    : nameOfModel(model.kind);

/** A quantity as typed, its unit as it is shown: "28 degC" as "28 °C", pressures with (a) or (g); other text as it is. */
export function typedWords(value: Quantity, dims: Dimension | readonly Dimension[]): string {
  const read = parseQuantity(value, dims);
  return read.ok ? `${read.number} ${unitLabel(read.unit, read.dim)}`.trim() : String(value);
}

/** What was assumed, as it would be typed. A unit of pressure is shared by drops, which count from nothing: their names say so. */
export const assumedWords = ({ unitText, value }: Assumption, where: string): string =>
  unitText === ''
    ? String(value)
    : typedWords(unitText, [
        where.endsWith('drop') ? 'pressureDifference' : 'pressure',
        'temperature',
        ...DIMENSIONS,
      ]);
