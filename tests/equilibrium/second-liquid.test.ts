import { describe, expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition, FlashAnswer } from '../../src/engine/equilibrium/types';
import type { Outcome } from '../../src/engine/outcome';
import { sayFinding } from '../../src/wording';
import { bankModel } from '../robust/bankModels';

async function ask(
  ids: readonly string[],
  z: readonly number[],
  at: Condition,
): Promise<Outcome<FlashAnswer>> {
  const model = (await bankModel(ids)).of(ids.map((_, i) => i));
  return flash(model, Float64Array.from(z), at, makeFlashWork(model));
}
const got = (outcome: Outcome<FlashAnswer>): FlashAnswer => {
  if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
  return outcome.value;
};

const said = (outcome: Outcome<FlashAnswer>): string =>
  sayFinding(outcome.findings[0]!, { measures: 'metric' }).sentence;

describe('a second liquid is never hidden', () => {
  test('water with as much n-hexane at room temperature is liquid, and two of them', async () => {
    const outcome = await ask(['water', 'n-hexane'], [0.5, 0.5], { T_K: 298.15, P_Pa: 101325 });
    const answer = got(outcome);
    expect(answer.vapourFraction).toBe(0);
    expect(answer.phases.map((phase) => phase.kind)).toEqual(['liquid']);
    expect(answer.liquidsTogether).toBe(true);
    expect(outcome.findings.map((finding) => [finding.code, finding.weight])).toEqual([
      ['equilibrium/second-liquid', 'caution'],
    ]);
    expect(said(outcome)).toContain(
      'those of both liquids together, and the composition is that of the whole',
    );
    // The enthalpy is that of the two pure liquids, nearly: they hardly mix. Derived from two more flashes.
    const alone = await Promise.all(
      ['water', 'n-hexane'].map(async (id) => got(await ask([id], [1], { T_K: 298.15, P_Pa: 101325 }))),
    );
    expect(Math.abs(answer.h_J_mol - (alone[0]!.h_J_mol + alone[1]!.h_J_mol) / 2)).toBeLessThan(50);
  });

  test('gas over oil and water: vapour and liquid, with the water said', async () => {
    const outcome = await ask(['methane', 'n-hexane', 'n-decane', 'water'], [0.3, 0.3, 0.3, 0.1], {
      T_K: 310,
      P_Pa: 1e6,
    });
    const answer = got(outcome);
    expect(answer.phases.map((phase) => phase.kind)).toEqual(['vapour', 'liquid']);
    expect(answer.hiddenLiquid![3]).toBeGreaterThan(0.99);
    expect(outcome.findings[0]!.evidence[0]!.text).toBe('water');
    expect(answer.liquidsTogether).toBeUndefined();
    expect(said(outcome)).toContain('the numbers are for one liquid');
  });

  test.each([
    ['hydrocarbons', ['methane', 'propane', 'n-hexane', 'n-decane'], 300],
    ['hot water vapour with hydrocarbons', ['water', 'n-hexane', 'n-decane', 'methane'], 520],
    ['aromatics and paraffins', ['benzene', 'n-hexane', 'cyclohexane', 'n-heptane'], 350],
  ])('%s: nothing is said where nothing parts', async (_name, ids, T_K) => {
    const outcome = await ask(ids, [0.25, 0.25, 0.25, 0.25], { T_K, P_Pa: 2e5 });
    expect(got(outcome).hiddenLiquid).toBeUndefined();
    expect(outcome.findings).toEqual([]);
  });

  test('a trace of water in oil is said once it is more than dissolves', async () => {
    const isSaid = async (water: number): Promise<boolean> => {
      const at = { T_K: 298.15, P_Pa: 1e6 };
      const outcome = await ask(['n-octane', 'n-decane', 'water'], [0.5, 0.5 - water, water], at);
      return got(outcome).hiddenLiquid !== undefined;
    };
    expect(await isSaid(1e-9)).toBe(false);
    expect(await isSaid(1e-2)).toBe(true);
  });

  // Derived: along all compositions some dense liquid lies below the tangent plane of the single one, so that it must part.
  test.each([
    ['carbon-dioxide', 'n-decane', 302, 64.6e5, 0.85],
    ['carbon-dioxide', 'n-decane', 308, 72.94e5, 0.85],
    ['carbon-dioxide', 'n-decane', 314, 82.32e5, 0.85],
    ['ethane', 'naphthalene', 308, 50.09e5, 0.8],
    ['ethane', 'benzonitrile', 308, 50.08e5, 0.85],
  ])('%s and %s at %d K, on the brink of parting, are said to part', async (a, b, T_K, P_Pa, x) => {
    const z = Float64Array.of(x, 1 - x);
    const model = (await bankModel([a, b])).of([0, 1]);
    const props = model.makeProps();
    const potentials = (y: Float64Array): Float64Array => {
      model.evaluate('liquid', T_K, P_Pa, y, 0, props);
      return y.map((v, i) => Math.log(v) + props.lnPhi[i]!);
    };
    const plane = potentials(z);
    let least = 0;
    for (let k = 1; k < 200; k++) {
      const y = Float64Array.of(k / 200, 1 - k / 200);
      const distance = potentials(y).reduce((sum, v, i) => sum + y[i]! * (v - plane[i]!), 0);
      if (props.v_m3_mol < 0.75 * model.pseudoCritical(y).v_m3_mol) least = Math.min(least, distance);
    }
    expect(least).toBeLessThan(-1e-4);
    expect(got(await ask([a, b], [...z], { T_K, P_Pa })).hiddenLiquid).toBeDefined();
  });

  test('heating through the three-phase point of water and n-hexane is continuous in enthalpy', async () => {
    const ids = ['water', 'n-hexane'];
    const z = [0.5, 0.5];
    const low = got(await ask(ids, z, { T_K: 325, P_Pa: 101325 }));
    const high = got(await ask(ids, z, { T_K: 345, P_Pa: 101325 }));
    let T = 0;
    let vapour = -1;
    for (let k = 0; k <= 20; k++) {
      const h_J_mol = low.h_J_mol + (k / 20) * (high.h_J_mol - low.h_J_mol);
      const answer = got(await ask(ids, z, { P_Pa: 101325, h_J_mol }));
      expect(Math.abs(answer.h_J_mol - h_J_mol)).toBeLessThan(1e-6);
      expect(answer.T_K).toBeGreaterThan(T - 1e-6);
      expect(answer.vapourFraction).toBeGreaterThanOrEqual(vapour - 1e-9);
      T = answer.T_K;
      vapour = answer.vapourFraction;
    }
  });
});
