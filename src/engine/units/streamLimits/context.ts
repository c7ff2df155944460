import { GASES } from '../../chemicals/gases';
import type { Phase, StreamState } from '../../equilibrium/types';
import type { Place } from '../../outcome';
import type { Model } from '../../thermo/types';
import type { Overrides } from '../limits/rule';
import { totalOf } from '../total';

/** What a stream's limits look at. */
export interface StreamContext {
  readonly stream: StreamState;
  readonly at: Place;
  readonly model: Model;
  readonly overrides: Overrides;
  /** A material was chosen for the unit that the stream leaves, so cold has been thought of. */
  readonly materialNoted: boolean;
}

/** The phase of that kind which carries flow. */
export const flowing = (stream: StreamState, kind: Phase['kind']): Phase | undefined =>
  stream.phases.find((p) => p.kind === kind && p.fraction > 0);

/** Overall mole fraction of chemical i [-]. */
export function fractionOf(stream: StreamState, i: number): number {
  const total = totalOf(stream.n_mol_s);
  return total > 0 ? stream.n_mol_s[i]! / total : 0;
}

/** Overall mole fraction of the chemicals with one of these CAS numbers [-]. */
export function fractionByCas(c: StreamContext, cas: ReadonlySet<string>): number {
  let sum = 0;
  c.model.chemicals.forEach((chemical, i) => {
    if (chemical.cas !== undefined && cas.has(chemical.cas)) sum += fractionOf(c.stream, i);
  });
  return sum;
}

/** CAS numbers of what limits look for. */
export const CAS_WATER = GASES.H2O.cas;
export const CAS_CO2 = GASES.CO2.cas;
