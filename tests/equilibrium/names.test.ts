import { describe, expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { FlashAnswer } from '../../src/engine/equilibrium/types';
import { bankModel } from '../robust/bankModels';

async function at(
  ids: readonly string[],
  z: readonly number[],
  T_K: number,
  P_Pa: number,
): Promise<FlashAnswer> {
  const model = (await bankModel(ids)).of(ids.map((_, i) => i));
  const outcome = flash(model, Float64Array.from(z), { T_K, P_Pa }, makeFlashWork(model));
  if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
  return outcome.value;
}

describe('names of phases', () => {
  test.each([
    ['cold and compressed', 200, 1e7, 'liquid', 0],
    ['warm and thin', 400, 1e5, 'vapour', 1],
    ['above both critical values, thin', 600, 6e6, 'dense', 1],
    ['above both critical values, thick', 375, 3e7, 'dense', 0],
  ] as const)('propane %s', async (_name, T_K, P_Pa, kind, vapourFraction) => {
    const answer = await at(['propane'], [1], T_K, P_Pa);
    expect(answer.phases[0]!.kind).toBe(kind);
    expect(answer.vapourFraction).toBe(vapourFraction);
  });

  test('a name that follows the rule only is marked; one of two roots is not', async () => {
    const single = await at(['propane'], [1], 450, 2e5);
    expect(single.phases[0]!.byConvention).toBe(true);
    // At 240 K and 1.2 bar the equation has a liquid root besides: the Gibbs energy decides, not the rule.
    const two = await at(['propane'], [1], 240, 1.2e5);
    expect(two.phases[0]).toMatchObject({ kind: 'vapour' });
    expect(two.phases[0]!.byConvention).toBeUndefined();
  });

  test('the gas over a heavy oil is the vapour although a mole of the oil takes more room', async () => {
    const { phases } = await at(['hydrogen', 'n-octadecane'], [0.6, 0.4], 320, 1.2e7);
    expect(phases.map((phase) => phase.kind)).toEqual(['vapour', 'liquid']);
    expect(phases[0]!.x[0]).toBeGreaterThan(0.99);
    expect(phases[0]!.v_m3_mol).toBeLessThan(phases[1]!.v_m3_mol);
  });
});
