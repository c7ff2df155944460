import { describe, expect, test } from 'vitest';
import { EQUILIBRIUM_FINDINGS } from '../../src/engine/equilibrium/findings';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition, FlashAnswer } from '../../src/engine/equilibrium/types';
import type { Outcome } from '../../src/engine/outcome';
import { makeModel } from '../../src/engine/thermo/model';
import { bankModel } from '../robust/bankModels';

async function ask(
  ids: readonly string[],
  z: readonly number[],
  at: Condition,
): Promise<Outcome<FlashAnswer>> {
  const model = (await bankModel(ids)).of(ids.map((_, i) => i));
  return flash(model, Float64Array.from(z), at, makeFlashWork(model));
}

describe('what has no answer says why', () => {
  test.each<[string, readonly string[], readonly number[], Condition, string]>([
    [
      'no bubble point above the critical pressure',
      ['propane'],
      [1],
      { P_Pa: 6e6, vapourFraction: 0 },
      'no-such-state',
    ],
    [
      'no vapour pressure above the critical temperature',
      ['propane'],
      [1],
      { T_K: 400, vapourFraction: 1 },
      'no-such-state',
    ],
    [
      'no dew point of a mixture at 50 MPa',
      ['methane', 'propane'],
      [0.5, 0.5],
      { P_Pa: 5e7, vapourFraction: 1 },
      'no-such-state',
    ],
    ['a temperature of 1 K', ['methane', 'propane'], [0.5, 0.5], { T_K: 1, P_Pa: 1e5 }, 'out-of-range'],
    ['a temperature of 1e5 K', ['methane', 'propane'], [0.5, 0.5], { T_K: 1e5, P_Pa: 1e5 }, 'out-of-range'],
    ['no pressure at all', ['methane', 'propane'], [0.5, 0.5], { T_K: 300, P_Pa: 0 }, 'out-of-range'],
    [
      'a vapour fraction of 1.2',
      ['methane', 'propane'],
      [0.5, 0.5],
      { P_Pa: 1e5, vapourFraction: 1.2 },
      'not-a-state',
    ],
    [
      'more enthalpy than the hottest state has',
      ['methane', 'propane'],
      [0.5, 0.5],
      { P_Pa: 1e5, h_J_mol: 1e8 },
      'out-of-range',
    ],
    [
      'less enthalpy than the coldest state has',
      ['propane'],
      [1],
      { P_Pa: 1e5, h_J_mol: -1e8 },
      'out-of-range',
    ],
    ['an enthalpy that is no number', ['propane'], [1], { P_Pa: 1e5, h_J_mol: Number.NaN }, 'not-a-state'],
  ])('%s', async (_name, ids, z, at, code) => {
    const outcome = await ask(ids, z, at);
    expect(outcome.state).toBe('no-solution');
    const [finding] = outcome.findings;
    expect(finding?.code).toBe(`equilibrium/${code}`);
    expect(EQUILIBRIUM_FINDINGS).toContain(finding?.code);
    // What was asked is in the evidence.
    expect(finding?.evidence.length).toBeGreaterThanOrEqual(2);
  });

  test('entropy is refused when a chemical has none, and the chemical is named', async () => {
    const whole = await bankModel(['methane', 'propane']);
    const chemicals = whole.chemicals.map(({ S0_J_molK, ...rest }, i) =>
      i === 0 && S0_J_molK !== undefined ? { ...rest, S0_J_molK } : rest,
    );
    const model = makeModel(whole.spec, chemicals).of([0, 1]);
    const outcome = flash(
      model,
      Float64Array.of(0.5, 0.5),
      { P_Pa: 1e5, s_J_molK: 200 },
      makeFlashWork(model),
    );
    expect(outcome.findings[0]?.code).toBe('equilibrium/no-entropy');
    expect(outcome.findings[0]?.evidence.map((e) => e.text)).toContain('propane');
  });

  test('our own mistakes are errors: absent chemicals, another model, a wrong length', async () => {
    const bank = await bankModel(['methane', 'propane']);
    const model = bank.of([0, 1]);
    const work = makeFlashWork(model);
    const at = { T_K: 300, P_Pa: 1e5 };
    expect(() => flash(model, Float64Array.of(1, 0), at, work)).toThrow('propane');
    expect(() => flash(model, Float64Array.of(1), at, work)).toThrow();
    expect(() => flash(bank.of([0]), Float64Array.of(1), at, work)).toThrow('another model');
  });
});
