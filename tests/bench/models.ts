/** Time of one Peng-Robinson evaluation: the yardstick for flashes and columns. */
import { makeModel } from '../../src/engine/thermo/model';
import type { Level, ModelSpec } from '../../src/engine/thermo/types';
import { chemical } from '../laws/thermoCases';

const FORTY = [
  'methane',
  'ethane',
  'propane',
  'isobutane',
  'n-butane',
  'isopentane',
  'n-pentane',
  'n-hexane',
  'n-heptane',
  'n-octane',
  'n-nonane',
  'n-decane',
  'ethylene',
  'propylene',
  '1-butene',
  'benzene',
  'toluene',
  'ethylbenzene',
  'o-xylene',
  'm-xylene',
  'p-xylene',
  'cyclohexane',
  'methylcyclohexane',
  'cyclopentane',
  'styrene',
  'cumene',
  'n-dodecane',
  'n-tetradecane',
  'n-hexadecane',
  'isooctane',
  'hydrogen',
  'nitrogen',
  'oxygen',
  'carbon-monoxide',
  'carbon-dioxide',
  'hydrogen-sulfide',
  'water',
  'argon',
  'ammonia',
  'naphthalene',
];

export interface ModelTiming {
  readonly chemicals: number;
  readonly level: Level;
  /** Best of the rounds [µs]. */
  readonly us: number;
}

/**
 * Microseconds of one evaluation, JIT warm, at a temperature that changes every time (nothing is reused), vapour and
 * liquid in turn.
 *
 * @param now  clock in milliseconds
 */
export function timeModels(
  now: () => number,
  sizes: readonly number[] = [5, 10, 20, 40],
  rounds = 9,
): ModelTiming[] {
  const spec = (n: number): ModelSpec => ({
    kind: 'peng-robinson',
    alpha: '1976',
    liquidH: 'psat-slope',
    liquidVolume: 'corrected',
    poynting: false,
    pairs: Array.from({ length: n - 1 }, (_, i) => ({
      i,
      j: n - 1,
      kij: 0.01,
      origin: 'given' as const,
      source: '',
    })),
  });
  return sizes.flatMap((n) => {
    const chemicals = FORTY.slice(0, n).map(chemical);
    const model = makeModel(spec(n), chemicals).of(chemicals.map((_, i) => i));
    const out = model.makeProps();
    const x = new Float64Array(n).fill(1 / n);
    return ([0, 1, 2] as const).map((level) => {
      let us = Number.POSITIVE_INFINITY;
      const count = Math.ceil(60_000 / n);
      for (let round = 0; round < rounds; round++) {
        const start = now();
        for (let k = 0; k < count; k++)
          model.evaluate(k & 1 ? 'vapour' : 'liquid', 330 + 0.001 * k, 8e5, x, level, out);
        us = Math.min(us, ((now() - start) / count) * 1e3);
      }
      return { chemicals: n, level, us };
    });
  });
}
