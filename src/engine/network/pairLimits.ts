import type { StreamState } from '../equilibrium/types';
import type { StreamId } from '../ids';
import type { Finding } from '../outcome';
import type { Model } from '../thermo/types';
import { PAIR_NONE, PAIR_PREDICTED } from '../units/limits/pairs';
import { finding, named, type Overrides, saw, thresholdOf } from '../units/limits/rule';

/** Dissolved gases and water tell on phase equilibrium at a tenth of the share. */
const isTelling = (family: string | undefined): boolean => family === 'inorganic-gas' || family === 'water';
const TELLING = 0.1;

/**
 * Pairs of the cubic equation that nothing is known of, each once, at the stream where they matter most; and how many of the
 * pairs that meet are predicted.
 */
export function pairLimits(
  model: Model,
  streams: readonly (readonly [StreamId, StreamState])[],
  overrides: Overrides,
): Finding[] {
  const unsure = model.spec.pairs.filter((p) => p.origin === 'none' || p.origin === 'predicted');
  if (unsure.length === 0) return [];
  const shares = streams.map(([id, s]) => {
    let total = 0;
    for (const n of s.n_mol_s) total += n;
    return { id, z: total > 0 ? s.n_mol_s.map((n) => n / total) : s.n_mol_s };
  });
  const found: Finding[] = [];
  let predicted = 0;
  for (const { i, j, origin } of unsure) {
    if (origin === 'predicted') {
      if (shares.some(({ z }) => z[i]! > 0 && z[j]! > 0)) predicted++;
      continue;
    }
    const [a, b] = [model.chemicals[i]!, model.chemicals[j]!];
    const least = thresholdOf(PAIR_NONE, overrides);
    const need_i = isTelling(a.family) ? least * TELLING : least;
    const need_j = isTelling(b.family) ? least * TELLING : least;
    let worst: { id: StreamId; least: number } | undefined;
    for (const { id, z } of shares) {
      if (z[i]! < need_i || z[j]! < need_j) continue;
      const both = Math.min(z[i]!, z[j]!);
      if (both > (worst?.least ?? 0)) worst = { id, least: both };
    }
    if (!worst) continue;
    const seen = [named('first', a.id), named('second', b.id), saw('fraction', worst.least, 'fraction')];
    found.push(finding(PAIR_NONE, { stream: worst.id }, seen, overrides));
  }
  if (predicted > 0) found.push(finding(PAIR_PREDICTED, {}, [saw('count', predicted, 'number')], overrides));
  return found;
}
