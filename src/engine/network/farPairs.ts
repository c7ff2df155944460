import type { StreamId } from '../ids';
import { type Evidence, type Finding, saw } from '../outcome';
import type { Model } from '../thermo/types';
import { PAIR_FAR } from '../units/limits/pairs';
import { finding, type Overrides, thresholdOf } from '../units/limits/rule';

/** Both chemicals of a pair reach this share of a stream [-]. */
const BOTH = 0.005;

/** A stream's mole fractions, full list. */
export interface Shares {
  readonly id: StreamId;
  readonly z: Float64Array;
}

/**
 * Predicted pairs far from zero whose chemicals meet: the prediction is for 25 degC, and such a pair changes with temperature
 * more than others. One finding names them all, the largest first, at the stream where that one matters most.
 */
export function farPairs(model: Model, streams: readonly Shares[], overrides: Overrides): Finding[] {
  const limit = thresholdOf(PAIR_FAR, overrides);
  const met = model.spec.pairs
    .filter(({ origin, kij }) => origin === 'predicted' && Math.abs(kij) > limit)
    .flatMap(({ i, j, kij }) => {
      let best: { readonly id: StreamId; readonly share: number } | undefined;
      for (const { id, z } of streams) {
        const share = Math.min(z[i]!, z[j]!);
        if (share >= BOTH && share > (best?.share ?? 0)) best = { id, share };
      }
      return best ? [{ i, j, kij, ...best }] : [];
    })
    .sort((a, b) => Math.abs(b.kij) - Math.abs(a.kij));
  const [first] = met;
  if (!first) return [];
  const name = (i: number): string => model.chemicals[i]!.id;
  const pairs = met.map(
    ({ i, j, kij }): Evidence => ({
      name: 'pair',
      value: kij,
      dim: 'number',
      text: `${name(i)} + ${name(j)}`,
    }),
  );
  return [finding(PAIR_FAR, { stream: first.id }, [...pairs, saw('kij', first.kij, 'number')], overrides)];
}
