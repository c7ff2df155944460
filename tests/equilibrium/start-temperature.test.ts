import { expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import { bankModel } from '../robust/bankModels';

test("under Raoult's law an enthalpy just below the dew point is met from every start temperature", async () => {
  // From 478 to 480 K each step ended where the last drop vanished, and moved the temperature by less than the one before.
  const ids = ['n-pentane', 'n-hexane', 'benzene', 'toluene'];
  const model = (await bankModel(ids, 'raoult')).of([0, 1, 2, 3]);
  const amounts = [0.158702, 0.193883, 0.26467, 0.382744];
  const total = amounts.reduce((a, b) => a + b, 0);
  const z = Float64Array.from(amounts, (v) => v / total);
  const work = makeFlashWork(model);
  const at = { P_Pa: 1388317.2, h_J_mol: 11211.79 };
  for (let T_K = 440; T_K <= 520; T_K += 0.5) {
    const outcome = flash(model, z, at, work, { T_K });
    if (outcome.state !== 'solved') throw new Error(`from ${T_K} K: ${outcome.findings[0].code}`);
    expect(Math.abs(outcome.value.h_J_mol - at.h_J_mol)).toBeLessThan(2e-8);
    // Snapshot of the temperature that all starts agree on.
    expect(outcome.value.T_K).toBeCloseTo(482.754531218, 8);
    expect(outcome.value.iterations).toBeLessThan(200);
  }
});
