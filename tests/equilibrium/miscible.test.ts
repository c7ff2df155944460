import { describe, expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import { isOneLiquid } from '../../src/engine/equilibrium/miscible';
import { bankModel } from '../robust/bankModels';
import { makeRandom, type Random } from '../robust/random';

const IDS = [
  'ethane',
  'propane',
  'n-butane',
  'n-hexane',
  'benzene',
  'toluene',
  'm-xylene',
  'n-decane',
  'water',
];
const WATER = IDS.indexOf('water');
const model = (await bankModel(IDS)).of(IDS.map((_, i) => i));

/** A liquid of all nine, with so much water [-]. */
function liquid(random: Random, water: number): Float64Array {
  const x = Float64Array.from(IDS, (_, i) => (i === WATER ? 0 : random.logBetween(1e-3, 1)));
  const rest = x.reduce((a, b) => a + b, 0);
  return x.map((v, i) => (i === WATER ? water : (v * (1 - water)) / rest));
}

describe('what is told to be one liquid without a stability test', () => {
  test('has no second liquid when it is tested: 800 mixtures of hydrocarbons with traces of water', () => {
    const random = makeRandom(7);
    const work = makeFlashWork(model);
    let sure = 0;
    for (let k = 0; k < 800; k++) {
      const T_K = random.between(290, 450);
      const z = liquid(random, random.logBetween(1e-12, 0.1));
      if (!isOneLiquid(model, T_K, z)) continue;
      sure++;
      const outcome = flash(model, z, { T_K, P_Pa: 3e7 }, work);
      if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
      expect(outcome.value.hiddenLiquid).toBeUndefined();
    }
    // Neither always nor never: a rule that says one of the two tests nothing.
    expect(sure).toBeGreaterThan(100);
    expect(sure).toBeLessThan(790);
  });

  test('never holds for water that parts from a hydrocarbon', async () => {
    const two = (await bankModel(['water', 'n-hexane'])).of([0, 1]);
    for (const water of [0.01, 0.1, 0.5, 0.9, 0.999])
      expect(isOneLiquid(two, 298.15, Float64Array.of(water, 1 - water))).toBe(false);
  });

  test('holds for neighbours at every composition, and for a trace of gas in them', () => {
    const here = Float64Array.from(IDS, (id) => (id === 'ethane' ? 1e-7 : id === 'toluene' ? 0.6 : 0));
    here[IDS.indexOf('m-xylene')] = 0.4;
    expect(isOneLiquid(model, 400, here)).toBe(true);
  });

  // Both were found among random mixtures; that they part is what a search from many starts says.
  test('does not hold in the cold, where heavy ones part from a light liquid that takes them in when warm', async () => {
    const k = { i: 0, j: 1, kij: 0.0177, origin: 'given', source: '' } as const;
    const two = (await bankModel(['n-decane', 'carbon-dioxide'], 'peng-robinson', { pairs: [k] })).of([0, 1]);
    expect(isOneLiquid(two, 109.4, Float64Array.of(0.0025, 0.9975))).toBe(false);
  });

  test('does not hold where two chemicals draw each other strongly, however small the activity of one', async () => {
    const k = { i: 0, j: 1, kij: -0.205, origin: 'given', source: '' } as const;
    const ids = ['carbon-monoxide', 'methyl-acrylate'];
    const two = (await bankModel(ids, 'peng-robinson', { pairs: [k] })).of([0, 1]);
    expect(isOneLiquid(two, 106.6, Float64Array.of(0.984, 0.016))).toBe(false);
  });
});
