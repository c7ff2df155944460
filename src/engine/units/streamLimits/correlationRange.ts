import type { ChemicalData, CorrProperty } from '../../chemicals/types';
import { type Finding, named, saw } from '../../outcome';
import { outside_K } from '../../thermo/pure/curve';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import { totalOf } from '../total';
import { flowing, type StreamContext } from './context';

/** Distance outside a correlation's own range [K]: any, from the first threshold, from the second. */
const OUTSIDE = rule('stream/outside-correlation', 'note', 0, 'temperatureDifference', 'table-range');
const WELL_OUTSIDE = rule(
  'stream/well-outside-correlation',
  'caution',
  10,
  'temperatureDifference',
  'table-range',
);
const FAR_OUTSIDE = rule(
  'stream/far-outside-correlation',
  'beyond-limit',
  50,
  'temperatureDifference',
  'table-range',
);

/** Thresholds of the limits in this file. */
export const CORRELATION_RULES: readonly Rule[] = [OUTSIDE, WELL_OUTSIDE, FAR_OUTSIDE];

/** Less than this of a chemical moves nothing that is shown [-]. */
const COUNTS = 1e-4;
/** Less than this of a chemical in a liquid moves its density by less than the method is off anyway [-]. */
const WEIGHS = 1e-2;

/** What the model reads at the stream's temperature. Raoult's law stands on vapour pressures, equations of state do not. */
function propertiesRead(c: StreamContext): readonly CorrProperty[] {
  if (c.model.spec.kind !== 'raoult') return ['ideal_gas_cp'];
  const both: CorrProperty[] = ['ideal_gas_cp', 'vapor_pressure'];
  return c.model.spec.liquidH === 'hvap' ? [...both, 'enthalpy_of_vaporization'] : both;
}

/** Densities are read for a liquid, unless an equation of state takes its own. */
const readsDensity = ({ model: { spec } }: StreamContext): boolean =>
  spec.kind === 'raoult' || spec.liquidVolume === 'corrected';

interface Outside {
  readonly id: string;
  readonly property: CorrProperty;
  readonly distance_K: number;
}

/** The worst of the correlations that a stream reads; undefined when all hold. */
function worstOf(c: StreamContext): Outside | undefined {
  const { stream, model } = c;
  const total = totalOf(stream.n_mol_s);
  const gasOnly = stream.phases.every((p) => p.kind === 'vapour');
  const properties = gasOnly ? (['ideal_gas_cp'] as const) : propertiesRead(c);
  const liquid = readsDensity(c) ? flowing(stream, 'liquid') : undefined;
  let worst: Outside | undefined;
  const look = (chemical: ChemicalData, property: CorrProperty): void => {
    const distance_K = outside_K(chemical.corr[property] ?? [], stream.T_K);
    if (distance_K > (worst?.distance_K ?? 0)) worst = { id: chemical.id, property, distance_K };
  };
  model.chemicals.forEach((chemical, i) => {
    if (stream.n_mol_s[i]! < COUNTS * total || stream.n_mol_s[i] === 0) return;
    for (const property of properties) look(chemical, property);
    // A gas dissolved above its critical temperature has no density as a liquid that could be missed.
    const hasLiquid = !(chemical.Tc_K !== undefined && stream.T_K >= chemical.Tc_K);
    if (liquid && hasLiquid && liquid.x[i]! >= WEIGHS) look(chemical, 'liquid_density');
  });
  return worst;
}

/**
 * The correlation that is farthest outside its own range, of those that the model reads for this stream: a note, a caution or
 * beyond limit by the distance [K]. A gas alone reads no vapour pressure and no liquid density.
 */
export function correlationRange(c: StreamContext): Finding[] {
  const { stream, overrides, at } = c;
  const worst = worstOf(c);
  if (!worst || worst.distance_K <= thresholdOf(OUTSIDE, overrides)) return [];
  const distance = worst.distance_K;
  const at_least = (r: Rule): boolean => distance >= thresholdOf(r, overrides);
  const broken = at_least(FAR_OUTSIDE) ? FAR_OUTSIDE : at_least(WELL_OUTSIDE) ? WELL_OUTSIDE : OUTSIDE;
  const seen = [
    saw('temperature', stream.T_K, 'temperature'),
    saw('distance', distance, 'temperatureDifference'),
    named('chemical', worst.id),
    named('property', worst.property),
  ];
  return [finding(broken, at, seen, overrides)];
}
