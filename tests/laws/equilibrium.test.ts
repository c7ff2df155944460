import { describe, expect, test } from 'vitest';
import { type FlashWork, flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition, FlashAnswer } from '../../src/engine/equilibrium/types';
import type { ModelSpec, ThermoModel } from '../../src/engine/thermo/types';
import { bankModel } from '../robust/bankModels';
import { missOf } from '../robust/flashes';
import { faultOf } from '../robust/referee';

interface Mixture {
  readonly name: string;
  readonly kind: ModelSpec['kind'];
  readonly changes?: Partial<ModelSpec>;
  readonly ids: readonly string[];
  readonly z: readonly number[];
  /** [K, Pa] of states, at least one of them of two phases. */
  readonly states: readonly (readonly [number, number])[];
}

/** A mixture or a model joins all laws by one entry. */
const MIXTURES: readonly Mixture[] = [
  {
    name: 'gas condensate, Peng-Robinson',
    kind: 'peng-robinson',
    ids: ['methane', 'ethane', 'propane', 'n-butane', 'n-hexane', 'n-decane'],
    z: [0.3, 0.1, 0.15, 0.2, 0.15, 0.1],
    states: [
      [250, 1e6],
      [300, 2e6],
      [350, 5e6],
      [420, 5e5],
      [260, 3e7],
      [600, 1e5],
    ],
  },
  {
    name: 'traces in a gas, Peng-Robinson 1978',
    kind: 'peng-robinson',
    changes: { alpha: '1978' },
    ids: ['nitrogen', 'methane', 'ethane', 'n-octane', 'n-decane'],
    z: [0.1, 0.85 - 2e-9, 0.05, 1e-9, 1e-9],
    states: [
      [120, 5e5],
      [150, 2e6],
      [180, 3e5],
      [300, 1e7],
    ],
  },
  {
    name: 'close boilers, Peng-Robinson',
    kind: 'peng-robinson',
    ids: ['propylene', 'propane'],
    z: [0.6, 0.4],
    states: [
      [300, 1.16e6],
      [280, 2e6],
      [320, 5e5],
    ],
  },
  {
    name: 'aromatics, Raoult by the slope of the vapour pressure',
    kind: 'raoult',
    ids: ['benzene', 'toluene', 'o-xylene'],
    z: [0.4, 0.35, 0.25],
    states: [
      [375, 1e5],
      [385, 1.2e5],
      [320, 1e5],
      [450, 1e5],
    ],
  },
  {
    name: 'aromatics, Raoult by heats of vaporisation',
    kind: 'raoult',
    changes: { liquidH: 'hvap' },
    ids: ['benzene', 'toluene', 'o-xylene'],
    z: [0.4, 0.35, 0.25],
    states: [
      [375, 1e5],
      [385, 1.2e5],
      [320, 1e5],
    ],
  },
  {
    name: 'pure propane, Peng-Robinson',
    kind: 'peng-robinson',
    ids: ['propane'],
    z: [1],
    states: [
      [250, 1e6],
      [300, 5e5],
      [420, 6e6],
    ],
  },
];

interface Tried {
  readonly model: ThermoModel;
  readonly z: Float64Array;
  readonly work: FlashWork;
  readonly at: (condition: Condition) => FlashAnswer;
}

async function make({ ids, z, kind, changes }: Mixture): Promise<Tried> {
  const model = (await bankModel(ids, kind, changes)).of(ids.map((_, i) => i));
  const work = makeFlashWork(model);
  const fractions = Float64Array.from(z);
  const at = (condition: Condition): FlashAnswer => {
    const outcome = flash(model, fractions, condition, work);
    if (outcome.state !== 'solved')
      throw new Error(`${outcome.findings[0].code} at ${JSON.stringify(condition)}`);
    return outcome.value;
  };
  return { model, z: fractions, work, at };
}

const close = (a: number, b: number, relative: number): void => {
  expect(Math.abs(a - b)).toBeLessThanOrEqual(relative * Math.max(Math.abs(a), Math.abs(b)));
};

describe.each(MIXTURES)('equilibrium of $name', (mixture) => {
  test('every answer has equal fugacities, closes the balance and passes an independent stability test', async () => {
    const { model, z, at } = await make(mixture);
    for (const [T_K, P_Pa] of mixture.states) expect(faultOf(model, z, at({ T_K, P_Pa }))).toBeUndefined();
  });

  test('enthalpy and entropy lead back to the temperature they came from', async () => {
    const { model, z, at } = await make(mixture);
    for (const [T_K, P_Pa] of mixture.states) {
      const first = at({ T_K, P_Pa });
      for (const condition of [
        { P_Pa, h_J_mol: first.h_J_mol },
        { P_Pa, s_J_molK: first.s_J_molK },
      ]) {
        const again = at(condition);
        expect(Math.abs(again.T_K - T_K)).toBeLessThan(1e-7 * T_K);
        expect(Math.abs(again.vapourFraction - first.vapourFraction)).toBeLessThan(1e-6);
        expect(missOf(condition, again)).toBeLessThanOrEqual(1);
        expect(faultOf(model, z, again)).toBeUndefined();
      }
    }
  });

  test('every vapour fraction is met exactly, and pressure and temperature lead to each other', async () => {
    const { model, z, at } = await make(mixture);
    const { P_Pa: high } = model.pseudoCritical(z);
    const P_Pa = Math.min(2e5, 0.2 * high);
    let before = 0;
    for (const vapourFraction of [0, 1e-6, 0.25, 0.6, 1 - 1e-6, 1]) {
      const byP = at({ P_Pa, vapourFraction });
      expect(byP.vapourFraction).toBe(vapourFraction);
      expect(byP.phases.map((phase) => phase.kind)).toEqual(['vapour', 'liquid']);
      expect(byP.phases[1]!.fraction).toBe(1 - vapourFraction);
      expect(faultOf(model, z, byP)).toBeUndefined();
      expect(byP.T_K).toBeGreaterThanOrEqual(before);
      before = byP.T_K;
      const byT = at({ T_K: byP.T_K, vapourFraction });
      close(byT.P_Pa, P_Pa, 1e-8);
      // A flash just inside the two-phase region finds the same split (a pure chemical has no inside).
      if (vapourFraction > 0.1 && vapourFraction < 0.9 && model.n > 1) {
        close(at({ T_K: byP.T_K, P_Pa }).vapourFraction, vapourFraction, 1e-7);
      }
    }
  });

  test('on both sides of bubble and dew point there is one phase', async () => {
    const { at } = await make(mixture);
    const bubble = at({ P_Pa: 2e5, vapourFraction: 0 });
    const dew = at({ P_Pa: 2e5, vapourFraction: 1 });
    const below = at({ T_K: bubble.T_K - 0.01, P_Pa: 2e5 });
    const above = at({ T_K: dew.T_K + 0.01, P_Pa: 2e5 });
    expect(below.phases.map((phase) => phase.kind)).toEqual(['liquid']);
    expect(above.phases.map((phase) => phase.kind)).toEqual(['vapour']);
    expect([below.vapourFraction, above.vapourFraction]).toEqual([0, 1]);
    // Nothing jumps at the boundary but what the hundredth of a kelvin explains.
    expect(Math.abs(below.h_J_mol - bubble.h_J_mol)).toBeLessThan(20);
    expect(Math.abs(above.h_J_mol - dew.h_J_mol)).toBeLessThan(20);
  });

  test('enthalpy and entropy rise with temperature at constant pressure, also through the two-phase region', async () => {
    const { at } = await make(mixture);
    let h = Number.NEGATIVE_INFINITY;
    let s = Number.NEGATIVE_INFINITY;
    for (let T_K = 150; T_K < 650; T_K += 7) {
      const answer = at({ T_K, P_Pa: 3e5 });
      expect(answer.h_J_mol).toBeGreaterThan(h);
      expect(answer.s_J_molK).toBeGreaterThan(s);
      h = answer.h_J_mol;
      s = answer.s_J_molK;
    }
  });

  test('a phase of an answer, flashed again, stays what it is', async () => {
    const { model, at } = await make(mixture);
    for (const [T_K, P_Pa] of mixture.states) {
      const answer = at({ T_K, P_Pa });
      if (answer.phases.length < 2) continue;
      for (const phase of answer.phases) {
        const outcome = flash(model, phase.x, { T_K, P_Pa }, makeFlashWork(model));
        if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
        const main = outcome.value.phases.reduce((a, b) => (a.fraction > b.fraction ? a : b));
        expect(main.fraction).toBeGreaterThan(1 - 1e-6);
        close(main.h_J_mol, phase.h_J_mol, 1e-6);
        close(main.v_m3_mol, phase.v_m3_mol, 1e-6);
      }
    }
  });

  test('a used workspace gives the same bits, and start values do not change the answer', async () => {
    const { model, z, at } = await make(mixture);
    for (const [T_K, P_Pa] of mixture.states) {
      const first = at({ T_K, P_Pa });
      at({ P_Pa: 1e5, vapourFraction: 0.5 });
      at({ P_Pa: 3e5, h_J_mol: first.h_J_mol });
      expect(at({ T_K, P_Pa })).toEqual(first);
      const fresh = flash(model, z, { T_K, P_Pa }, makeFlashWork(model));
      expect(fresh.state === 'solved' && fresh.value).toEqual(first);
      const condition = { P_Pa, h_J_mol: first.h_J_mol };
      for (const warmT of [T_K - 5, T_K + 40]) {
        const warm = flash(model, z, condition, makeFlashWork(model), { T_K: warmT });
        if (warm.state !== 'solved') throw new Error(warm.findings[0].code);
        expect(Math.abs(warm.value.T_K - T_K)).toBeLessThan(1e-7 * T_K);
      }
      if (first.phases.length === 2) {
        const K = first.phases[0]!.x.map((y, i) => y / first.phases[1]!.x[i]!);
        const warm = flash(model, z, { T_K: T_K + 0.5, P_Pa }, makeFlashWork(model), { K });
        const cold = at({ T_K: T_K + 0.5, P_Pa });
        if (warm.state !== 'solved') throw new Error(warm.findings[0].code);
        expect(warm.value.phases.length).toBe(cold.phases.length);
        expect(Math.abs(warm.value.vapourFraction - cold.vapourFraction)).toBeLessThan(1e-8);
      }
    }
  });

  test('all ten pairs of conditions lead to the same state', async () => {
    const { at, model, z } = await make(mixture);
    const state = at({ P_Pa: 2e5, vapourFraction: 0.4 });
    const { T_K, P_Pa, h_J_mol, s_J_molK, vapourFraction } = state;
    const pairs: Condition[] = [
      { P_Pa, h_J_mol },
      { P_Pa, s_J_molK },
      { P_Pa, vapourFraction },
      { T_K, vapourFraction },
      { T_K, h_J_mol },
      { T_K, s_J_molK },
      { vapourFraction, h_J_mol },
      { vapourFraction, s_J_molK },
      { h_J_mol, s_J_molK },
    ];
    if (model.n > 1) pairs.push({ T_K, P_Pa });
    for (const pair of pairs) {
      const answer = at(pair);
      expect(faultOf(model, z, answer)).toBeUndefined();
      if (answer.P_Pa < 0.99 * P_Pa) {
        // Several states can have the same fraction and enthalpy: the one of the lowest pressure is told.
        expect('vapourFraction' in pair && ('h_J_mol' in pair || 's_J_molK' in pair)).toBe(true);
        expect(missOf(pair, answer)).toBeLessThan(10);
        continue;
      }
      close(answer.T_K, T_K, 1e-7);
      close(answer.P_Pa, P_Pa, 1e-5);
      expect(Math.abs(answer.vapourFraction - vapourFraction)).toBeLessThan(1e-6);
    }
  });
});
