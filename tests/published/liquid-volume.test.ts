import { describe, expect, test } from 'vitest';
import { LiquidVolume } from '../../src/engine/thermo/liquidVolume';
import { makeModel } from '../../src/engine/thermo/model';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import { isVolumeAssumed, pureVolume } from '../../src/engine/thermo/pureVolume';
import { chemical, modelFor, specOf } from '../laws/thermoCases';

const one = Float64Array.of(1);

describe('liquid volume', () => {
  // Isothermal compressibilities near 25 degC and 1 atm in 1e-10/Pa, CRC Handbook (from memory); the change up to 100 bar
  // by Murnaghan's equation with K' = 10. What is compared is the volume at 100 bar over that at 1 bar.
  test.each([
    ['n-hexane', 16.7],
    ['n-heptane', 14.4],
    ['n-octane', 12.8],
    ['n-decane', 10.9],
    ['benzene', 9.67],
    ['toluene', 9.1],
    ['acetone', 12.6],
    ['water', 4.57],
  ])(
    '%s under 100 bar shrinks as its compressibility (%d e-10/Pa) says, within 0.004 of the volume',
    (id, k) => {
      const volume = new LiquidVolume([chemical(id)]);
      const ratio = volume.at(298.15, 1e7, one, undefined) / volume.at(298.15, 1e5, one, undefined);
      const measured = (1 + 10 * k * 1e-10 * (1e7 - 1e5)) ** -0.1;
      expect(Math.abs(ratio - measured)).toBeLessThan(0.004);
      expect(ratio).toBeLessThan(1);
    },
  );

  // Derived: the one-constant equation by hand for n-hexane, Tc 507.82 K, Pc 30.44115 bar, at 400 K.
  test('a pure saturated liquid with one constant follows the modified Rackett equation', () => {
    const hexane = { ...chemical('n-hexane'), zRA: 0.2635, corr: {} };
    const v = new LiquidVolume([hexane]).at(400, 1e5, one, undefined);
    const [Tc, Pc] = [hexane.Tc_K!, hexane.Pc_Pa!];
    expect(v).toBeCloseTo(((8.314462618 * Tc) / Pc) * 0.2635 ** (1 + (1 - 400 / Tc) ** (2 / 7)), 12);
  });

  test('a chemical listed twice is the same liquid', () => {
    const butane = chemical('n-butane');
    const single = new LiquidVolume([butane]).at(300, 3e6, one, undefined);
    const twice = new LiquidVolume([butane, butane]).at(300, 3e6, Float64Array.of(0.3, 0.7), undefined);
    expect(twice / single).toBeCloseTo(1, 13);
  });

  test('the volume shrinks with pressure and grows with temperature, without a step at saturation', () => {
    const volume = new LiquidVolume([chemical('n-heptane'), chemical('toluene')]);
    const x = Float64Array.of(0.4, 0.6);
    for (let T = 260; T < 540; T += 10) {
      let before = Number.POSITIVE_INFINITY;
      for (let P = 1e4; P < 3e7; P *= 1.02) {
        const v = volume.at(T, P, x, undefined);
        expect(v).toBeLessThanOrEqual(before);
        if (before < 1) expect(1 - v / before).toBeLessThan(0.01);
        before = v;
      }
      expect(volume.at(T + 1, 1e6, x, undefined)).toBeGreaterThan(volume.at(T, 1e6, x, undefined));
    }
  });

  test('a liquid heated at 60 bar through the critical region passes over to the model without a step', () => {
    const model = modelFor('Peng-Robinson 1976', ['propane', 'n-butane']);
    const cubic = makeModel(specOf({ ...model.spec, liquidVolume: 'cubic' }), model.chemicals).of([0, 1]);
    const x = Float64Array.of(0.5, 0.5);
    let before = model.liquidVolume_m3_mol(300, 6e6, x);
    for (let T = 300; T < 480; T += 0.25) {
      const v = model.liquidVolume_m3_mol(T, 6e6, x);
      expect(Math.abs(v / before - 1)).toBeLessThan(0.012);
      before = v;
    }
    expect(model.liquidVolume_m3_mol(470, 6e6, x)).toBe(cubic.liquidVolume_m3_mol(470, 6e6, x));
    expect(cubic.liquidVolume_m3_mol(300, 6e6, x)).not.toBe(model.liquidVolume_m3_mol(300, 6e6, x));
  });

  test('gas dissolved far above its critical temperature leaves a volume between those of liquid and bulky gas', () => {
    const model = modelFor('Peng-Robinson 1976', ['methane', 'n-decane']);
    const neat = model.liquidVolume_m3_mol(310, 2e6, Float64Array.of(0, 1));
    for (const x of [0.02, 0.1, 0.3, 0.5]) {
      const v = model.liquidVolume_m3_mol(310, 1e7, Float64Array.of(x, 1 - x));
      // Derived bounds: more than a third of methane's volume as a cold liquid, less than its critical volume.
      const partial = (v - (1 - x) * neat) / x;
      if (x >= 0.1) {
        expect(partial).toBeGreaterThan(13e-6);
        expect(partial).toBeLessThan(98.6e-6);
      }
    }
  });
});

describe('volume of a pure liquid inside the models', () => {
  test('is smooth and bounded at every temperature, its slope is its slope', () => {
    for (const id of ['methane', 'hydrogen', 'n-hexane', 'water']) {
      const c = chemical(id);
      const v = pureVolume(preparePure(c));
      for (let Tr = 0.5; Tr < 12; Tr *= 1.01) {
        const T = Tr * c.Tc_K!;
        const h = 1e-4 * T;
        const slope = (v.at(T + h) - v.at(T - h)) / (2 * h);
        expect(Math.abs(v.slope(T) - slope)).toBeLessThan((1e-3 * v.at(T)) / c.Tc_K!);
        expect(v.at(T)).toBeLessThan(2 * v.at(0.8 * c.Tc_K!));
      }
    }
  });

  test('without critical constants and density 800 kg/m3 stand, and are said to be assumed', () => {
    const bare = { id: 'x', name: 'x', MW_g_mol: 160, corr: {}, sources: {} };
    expect(isVolumeAssumed(bare)).toBe(true);
    expect(isVolumeAssumed(chemical('propane'))).toBe(false);
    expect(pureVolume(preparePure(bare)).at(300)).toBeCloseTo(2e-4, 12);
  });
});
