/** Time of flashes, in microseconds and in evaluations of the Peng-Robinson equation with first derivatives. */
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition } from '../../src/engine/equilibrium/types';
import { bankModel } from '../robust/bankModels';

/** Gas and its condensate, in the order of boiling points: the first n are the mixture of n chemicals. */
const TWENTY = [
  'methane',
  'n-butane',
  'propane',
  'n-heptane',
  'ethane',
  'n-pentane',
  'isobutane',
  'n-hexane',
  'isopentane',
  'n-octane',
  'carbon-dioxide',
  'nitrogen',
  'benzene',
  'toluene',
  'cyclohexane',
  'methylcyclohexane',
  'n-nonane',
  'n-decane',
  'ethylbenzene',
  'n-dodecane',
];

/** [K, Pa]: two-phase states from cold to hot, and single phases on both sides. */
const STATES: readonly (readonly [number, number])[] = [
  [300, 2e6],
  [300, 5e5],
  [330, 1e6],
  [280, 3e6],
  [360, 3e6],
  [340, 5e6],
  [500, 2e5],
  [450, 1e5],
  [480, 5e5],
  [250, 3e7],
  [300, 4e7],
];

export interface FlashTiming {
  readonly chemicals: number;
  /** TP flash from nothing, mean over the states, best of the rounds [µs]. */
  readonly tp_us: number;
  /** PH flash from 300 K without other start values [µs]. */
  readonly ph_us: number;
  /** PH flash from a temperature 1 K off [µs]. */
  readonly phWarm_us: number;
  /** One evaluation with first derivatives in the same run, both sides in turn, temperature changing [µs]. */
  readonly evaluation_us: number;
  /** In evaluations. */
  readonly tp: number;
  readonly ph: number;
  readonly phWarm: number;
}

export async function timeFlashes(
  now: () => number,
  sizes: readonly number[] = [5, 10, 20],
  rounds = 60,
): Promise<FlashTiming[]> {
  const out: FlashTiming[] = [];
  for (const n of sizes) {
    const ids = TWENTY.slice(0, n);
    const model = (await bankModel(ids)).of(ids.map((_, i) => i));
    const work = makeFlashWork(model);
    const z = new Float64Array(n).fill(1 / n);
    const heats = STATES.map(([T_K, P_Pa]): { T_K: number; at: Condition } => {
      const state = flash(model, z, { T_K, P_Pa }, work);
      if (state.state !== 'solved') throw new Error(`no state at ${T_K} K, ${P_Pa} Pa`);
      return { T_K, at: { P_Pa, h_J_mol: state.value.h_J_mol } };
    });
    const props = model.makeProps();
    // Short batches, and the best of many: another process on the machine then spoils few of them.
    const batch = 20;
    const best = (what: (k: number) => void): number => {
      let us = Number.POSITIVE_INFINITY;
      for (let round = 0; round < rounds; round++) {
        const start = now();
        for (let k = 0; k < batch; k++) what(k);
        us = Math.min(us, ((now() - start) / batch) * 1e3);
      }
      return us;
    };
    const mean = (whats: readonly ((k: number) => void)[]): number => {
      for (const what of whats) for (let k = 0; k < 400; k++) what(k);
      let sum = 0;
      for (const what of whats) sum += best(what);
      return sum / whats.length;
    };
    const tp_us = mean(
      STATES.map(([T, P_Pa]) => (k: number) => {
        flash(model, z, { T_K: T + 1e-4 * k, P_Pa }, work);
      }),
    );
    const ph_us = mean(
      heats.map(({ at }) => () => {
        flash(model, z, at, work, { T_K: 300 });
      }),
    );
    const phWarm_us = mean(
      heats.map(({ at, T_K }) => () => {
        flash(model, z, at, work, { T_K: T_K + 1 });
      }),
    );
    const evaluation_us =
      mean([
        (k) => {
          for (let i = 0; i < 10; i++) {
            model.evaluate(i & 1 ? 'vapour' : 'liquid', 330 + 1e-4 * (10 * k + i), 8e5, z, 2, props);
          }
        },
      ]) / 10;
    out.push({
      chemicals: n,
      tp_us,
      ph_us,
      phWarm_us,
      evaluation_us,
      tp: tp_us / evaluation_us,
      ph: ph_us / evaluation_us,
      phWarm: phWarm_us / evaluation_us,
    });
  }
  return out;
}
