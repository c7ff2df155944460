import { describe, expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition, FlashAnswer, FlashWarm } from '../../src/engine/equilibrium/types';
import { bankModel } from '../robust/bankModels';

/** Off-gas of an aromatic condensate, a moist gas, and a liquid: single phases [mole fractions; K, Pa]. */
const SINGLE = {
  'off-gas': [
    { methane: 0.55, ethane: 0.2, propane: 0.1, 'n-pentane': 0.08, benzene: 0.05, 'm-xylene': 0.02 },
    330,
    115e3,
  ],
  'moist gas': [{ methane: 0.8, ethane: 0.1, propane: 0.08, water: 0.02 }, 330, 5e5],
  'aromatic liquid': [{ 'n-hexane': 0.1, benzene: 0.4, toluene: 0.3, 'm-xylene': 0.2 }, 320, 5e5],
} as const;

async function asker(parts: Readonly<Record<string, number>>) {
  const ids = Object.keys(parts);
  const model = (await bankModel(ids)).of(ids.map((_, i) => i));
  const work = makeFlashWork(model);
  const z = Float64Array.from(Object.values(parts));
  return (at: Condition, warm?: FlashWarm): FlashAnswer => {
    const outcome = flash(model, z, at, work, warm);
    if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
    return outcome.value;
  };
}

describe('evaluations of the model', () => {
  // Derived: Newton on one phase from 8 K away takes 3 or 4; one more for its start and one for its plane.
  test.each(Object.entries(SINGLE))(
    '%s: an enthalpy or entropy costs one stability test, as a temperature does',
    async (_name, [parts, T_K, P_Pa]) => {
      const ask = await asker(parts);
      const there = ask({ T_K, P_Pa });
      expect(there.phases).toHaveLength(1);
      for (const at of [
        { P_Pa, h_J_mol: there.h_J_mol },
        { P_Pa, s_J_molK: there.s_J_molK },
      ]) {
        const found = ask(at, { T_K: T_K + 8 });
        expect(Math.abs(found.T_K - T_K)).toBeLessThan(1e-9 * T_K);
        expect(found.iterations).toBeLessThanOrEqual(there.iterations + 8);
      }
    },
  );

  test('water and n-hexane that part are not followed as the liquid they are not', async () => {
    const ask = await asker({ water: 0.5, 'n-hexane': 0.5 });
    const there = ask({ T_K: 325, P_Pa: 101325 });
    expect(there.liquidsTogether).toBe(true);
    const found = ask({ P_Pa: 101325, h_J_mol: there.h_J_mol });
    expect(Math.abs(found.T_K - 325)).toBeLessThan(1e-6);
    // Snapshot: 77; as one liquid they would be looked for at 21 K, in 1,500.
    expect(found.iterations).toBeLessThan(120);
  });
});
