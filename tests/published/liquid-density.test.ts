import { describe, expect, test } from 'vitest';
import { bank, loadChemicals } from '../../src/data/bank';
import { LiquidVolume } from '../../src/engine/thermo/liquidVolume';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import { volumeConstant } from '../../src/engine/thermo/pure/volumeConstant';
import { pureVolume } from '../../src/engine/thermo/pureVolume';
import { chemical, modelFor } from '../laws/thermoCases';

const one = Float64Array.of(1);
/** Next to no pressure: the saturated liquid. */
const SATURATED_Pa = 1e-3;
const volume = (id: string): LiquidVolume => new LiquidVolume([chemical(id)]);
const density = (id: string, T: number): number =>
  chemical(id).MW_g_mol / 1e3 / volume(id).at(T, SATURATED_Pa, one, undefined);

// Published. Densities of saturated liquids [kg/m3], from memory: water, IAPWS formulation of 1995 (Wagner & Pruss, J. Phys.
// Chem. Ref. Data 31 (2002) 387, table of the saturation line); ammonia, Tillner-Roth et al. (1993); alcohols, acetone and
// glycol at 25 degC, CRC Handbook of Chemistry and Physics; at their boiling points, Yaws' handbook.
test.each([
  ['water', 298.15, 997.0, 0.001],
  ['water', 373.15, 958.35, 0.002],
  ['water', 450, 890.34, 0.002],
  ['water', 550, 755.8, 0.003],
  ['ethanol', 298.15, 785.1, 0.002],
  ['ethanol', 351.4, 736, 0.005],
  ['methanol', 298.15, 786.5, 0.002],
  ['methanol', 337.7, 748.5, 0.005],
  ['acetone', 298.15, 784.5, 0.002],
  ['ammonia', 239.82, 682, 0.002],
  ['ammonia', 300, 600, 0.002],
  ['ethylene-glycol', 298.15, 1109.9, 0.002],
  ['ethylene-glycol', 373.15, 1055, 0.004],
])('%s at %d K weighs %d kg/m3 within %d', (id, T, kg_m3, within) => {
  expect(Math.abs(density(id, T) / kg_m3 - 1)).toBeLessThan(within);
});

test('one constant would miss hot water by more than 3 % and 6 %, so that the temperature in it is needed', () => {
  const { corr: _, ...rest } = chemical('water');
  const plain = new LiquidVolume([{ ...rest, corr: {} }]);
  const weighs = (T: number): number => rest.MW_g_mol / 1e3 / plain.at(T, SATURATED_Pa, one, undefined);
  expect(weighs(373.15) / 958.35 - 1).toBeLessThan(-0.03);
  expect(weighs(450) / 890.34 - 1).toBeLessThan(-0.06);
});

describe('mixtures', () => {
  const molar = (ids: readonly string[], x: readonly number[]): number =>
    new LiquidVolume(ids.map(chemical)).at(298.15, 101325, Float64Array.from(x), undefined) * 1e6;
  const excess = (ids: readonly [string, string], x: number): number =>
    molar(ids, [x, 1 - x]) - x * molar([ids[0]], [1]) - (1 - x) * molar([ids[1]], [1]);

  // Published: excess volumes at 25 degC of equal parts, +0.40 cm3/mol and -1.0 cm3/mol (from memory, CRC Handbook; Letcher).
  test('n-hexane with benzene expands on mixing, within 0.3 cm3/mol of what is measured', () => {
    const v = excess(['n-hexane', 'benzene'], 0.5);
    expect(v).toBeGreaterThan(0);
    expect(Math.abs(v - 0.4)).toBeLessThan(0.3);
  });
  test('water with methanol comes within 4.5 % of the measured volume; its contraction is beyond the mixing rule', () => {
    const v = molar(['water', 'methanol'], [0.5, 0.5]);
    const measured = (molar(['water'], [1]) + molar(['methanol'], [1])) / 2 - 1.0;
    expect(Math.abs(v / measured - 1)).toBeLessThan(0.045);
  });

  test('a trace of another chemical moves nothing', () => {
    for (const other of ['methane', 'benzene', 'n-hexadecane'])
      expect(molar(['water', other], [1 - 1e-9, 1e-9]) / molar(['water'], [1])).toBeCloseTo(1, 7);
  });
});

describe('every chemical of the bank', async () => {
  const all = await loadChemicals(bank.index.map((entry) => entry.id));

  // Derived: what the constant is made for. Two correlations end in a critical point of their own below that of the bank.
  const STEEP: ReadonlySet<string> = new Set(['cyclohexanone', 'acrylonitrile']);
  test('as a saturated liquid has the density of its correlation, within 3e-5, up to Tr 0.98 (two: 0.96)', () => {
    const off = all.map((c): [string, number] => {
      const pure = preparePure(c);
      const { Tmin, Tmax } = pure.range('liquid_density')!;
      const high = Math.min(Tmax!, (STEEP.has(c.id) ? 0.96 : 0.98) * c.Tc_K!);
      const liquid = new LiquidVolume([c]);
      const deviations = Array.from({ length: 201 }, (_, k) => {
        const T = Tmin! + ((high - Tmin!) * k) / 200;
        return Math.abs(liquid.at(T, SATURATED_Pa, one, undefined) * pure.rhoL!(T) - 1);
      });
      return [c.id, Math.max(...deviations)];
    });
    expect(off.length).toBeGreaterThan(150);
    expect(off.filter(([, d]) => !(d < 3e-5))).toEqual([]);
  });

  test('the constant has no step, no kink and no runaway from 100 to 1500 K, and its slope is its slope', () => {
    const h = 1e-3;
    const faults: string[] = [];
    for (const c of all) {
      const z = volumeConstant(c)!;
      let before = z.slope(100);
      for (let T = 100; T < 1500; T += 0.5) {
        const slope = z.slope(T);
        const right = Math.abs((z.ln(T + h) - z.ln(T - h)) / (2 * h) - slope) < 2e-6;
        // Derived: half a kelvin turns d ln Z/d Tr by a sixth of the steepest there is at most, at Tc 600 K.
        const smooth = Math.abs(slope - before) * c.Tc_K! < 0.5 * (600 / c.Tc_K!);
        const bounded = Math.abs(z.ln(T) - Math.log(c.zRA!)) < 0.17;
        if (!right || !smooth || !bounded) faults.push(`${c.id} ${T} ${right} ${smooth} ${bounded}`);
        before = slope;
      }
    }
    expect(faults.slice(0, 20)).toEqual([]);
  });

  test('the liquid volume is finite and bounded from 100 to 1500 K in both models', () => {
    const faults: string[] = [];
    for (const c of all) {
      const liquid = new LiquidVolume([c]);
      const inside = pureVolume(preparePure(c));
      const most = (0.6 * 8.314462618 * c.Tc_K!) / c.Pc_Pa!;
      for (let T = 100; T <= 1500; T += 7)
        for (const v of [liquid.at(T, 1e5, one, undefined), liquid.at(T, 1e8, one, undefined), inside.at(T)])
          if (!(v > 0 && v < most)) faults.push(`${c.id} at ${T} K: ${v}`);
    }
    expect(faults.slice(0, 20)).toEqual([]);
  });
});

test('a liquid of water and methanol heated at 100 bar has a volume without steps', () => {
  const model = modelFor("Raoult's law", ['water', 'methanol']);
  const x = Float64Array.of(0.6, 0.4);
  let before = model.liquidVolume_m3_mol(250, 1e7, x);
  for (let T = 250; T < 540; T += 0.25) {
    const v = model.liquidVolume_m3_mol(T, 1e7, x);
    expect(Math.abs(v / before - 1)).toBeLessThan(0.003);
    before = v;
  }
});

describe('without a density correlation, or with one that makes no sense', () => {
  const { corr: _, ...hexane } = chemical('n-hexane');
  test('the one constant given stands at every temperature', () => {
    const z = volumeConstant({ ...hexane, corr: {}, zRA: 0.2635 })!;
    for (const T of [100, 300, 900]) expect(Math.exp(z.ln(T))).toBeCloseTo(0.2635, 12);
  });
  test('a density that runs to zero below the critical point is followed as far as it makes sense', () => {
    // mol/m3, straight, zero at 400 K; n-hexane is critical at 508 K.
    const line = { form: 'powers', c: [30000, -75] } as const;
    const z = volumeConstant({ ...hexane, corr: { liquid_density: [line] } })!;
    for (let T = 100; T < 1500; T += 10) expect(Math.abs(Math.log(Math.exp(z.ln(T)) / 0.26))).toBeLessThan(1);
    expect(
      new LiquidVolume([{ ...hexane, corr: { liquid_density: [line] } }]).at(300, 1e3, one, undefined),
    ).toBeCloseTo(1 / 7500, 8);
  });
});
