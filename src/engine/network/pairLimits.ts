import type { ChemicalData } from '../chemicals/types';
import type { StreamState } from '../equilibrium/types';
import type { StreamId } from '../ids';
import { type Finding, named, saw } from '../outcome';
import type { Model } from '../thermo/types';
import { PAIR_NONE, PAIR_PREDICTED } from '../units/limits/pairs';
import { finding, type Overrides, thresholdOf } from '../units/limits/rule';
import { totalOf } from '../units/total';
import { farPairs, type Shares } from './farPairs';

/** Dissolved gases and water tell on phase equilibrium at a tenth of the share. */
const isTelling = (family: string | undefined): boolean => family === 'inorganic-gas' || family === 'water';
const TELLING = 0.1;

interface Present {
  readonly chemical: ChemicalData;
  /** Mole fraction [-]. */
  readonly share: number;
}

/** Two chemicals that count in one stream; `first` is the one that is closer to what it has to reach. */
interface Met {
  readonly first: Present;
  readonly second: Present;
  /** What `first` had to reach [-], and how many times over it does. */
  readonly least: number;
  readonly times: number;
}

/** Both reach `least`, or a gas or water a tenth of it beside any that reaches `least`; undefined where they do not. */
function meeting(one: Present, two: Present, least: number): Met | undefined {
  const needs = (tells: Present): number => (isTelling(tells.chemical.family) ? least * TELLING : least);
  const ways = [
    { first: one, second: two, least: needs(one), other: least },
    { first: two, second: one, least: needs(two), other: least },
  ].filter((way) => way.first.share >= way.least && way.second.share >= way.other);
  let best: Met | undefined;
  for (const { first, second, least: need, other } of ways) {
    const [near, far] = [first.share / need, second.share / other];
    const met =
      near <= far
        ? { first, second, least: need, times: near }
        : { first: second, second: first, least: other, times: far };
    if (met.times > (best?.times ?? 0)) best = met;
  }
  return best;
}

function meetAnywhere(shares: readonly Shares[], i: number, j: number): boolean {
  for (let k = 0; k < shares.length; k++) if (shares[k]!.z[i]! > 0 && shares[k]!.z[j]! > 0) return true;
  return false;
}

/**
 * Pairs of the cubic equation that nothing is known of, each once, at the stream where they matter most; predicted pairs far
 * from zero; and how many of the pairs that meet are predicted.
 *
 * @param streams  solved ones
 */
export function pairLimits(
  model: Model,
  streams: readonly (readonly [StreamId, StreamState])[],
  overrides: Overrides,
): Finding[] {
  const unsure = model.spec.pairs.filter((p) => p.origin === 'none' || p.origin === 'predicted');
  if (unsure.length === 0) return [];
  const shares = streams.map(([id, s]) => {
    const total = totalOf(s.n_mol_s);
    return { id, z: total > 0 ? s.n_mol_s.map((n) => n / total) : s.n_mol_s };
  });
  const found: Finding[] = [];
  let predicted = 0;
  const least = thresholdOf(PAIR_NONE, overrides);
  for (const { i, j, origin } of unsure) {
    if (origin === 'predicted') {
      if (meetAnywhere(shares, i, j)) predicted++;
      continue;
    }
    const [a, b] = [model.chemicals[i]!, model.chemicals[j]!];
    let worst: (Met & { readonly id: StreamId }) | undefined;
    for (const { id, z } of shares) {
      if (Math.min(z[i]!, z[j]!) < least * TELLING) continue;
      const met = meeting({ chemical: a, share: z[i]! }, { chemical: b, share: z[j]! }, least);
      if (met && met.times > (worst?.times ?? 0)) worst = { ...met, id };
    }
    if (!worst) continue;
    const seen = [
      named('first', worst.first.chemical.id),
      named('second', worst.second.chemical.id),
      saw('fraction', worst.first.share, 'fraction'),
      saw('other', worst.second.share, 'fraction'),
    ];
    // The limit told is the one that the share told has passed.
    found.push(
      finding(PAIR_NONE, { stream: worst.id }, seen, { ...overrides, [PAIR_NONE.code]: worst.least }),
    );
  }
  found.push(...farPairs(model, shares, overrides));
  if (predicted > 0) found.push(finding(PAIR_PREDICTED, {}, [saw('count', predicted, 'number')], overrides));
  return found;
}
