import { describe, expect, test } from 'vitest';
import { makeModel, missingForModel } from '../../src/engine/thermo/model';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import { heatCapacityRatio } from '../../src/engine/thermo/transport';
import { R_J_molK } from '../../src/engine/thermo/types';
import { chemical, somePairs, specOf } from './thermoCases';

const ids = ['methane', 'propane', 'benzene', 'water'];
const all = ids.map(chemical);

describe('the model of those present', () => {
  const model = makeModel(specOf({ kind: 'peng-robinson', pairs: somePairs(4) }), all);

  test('is the same object for the same list', () => {
    expect(model.of([0, 2])).toBe(model.of([0, 2]));
    expect(model.of([0, 2])).not.toBe(model.of([0, 1]));
    expect(model.of([0, 2]).chemicals.map((c) => c.id)).toEqual(['methane', 'benzene']);
  });

  test('gives the numbers of the full list with nothing of the others', () => {
    const full = model.of([0, 1, 2, 3]);
    const some = model.of([1, 3]);
    const [a, b] = [full.makeProps(), some.makeProps()];
    full.evaluate('liquid', 330, 2e6, Float64Array.of(0, 0.6, 0, 0.4), 2, a);
    some.evaluate('liquid', 330, 2e6, Float64Array.of(0.6, 0.4), 2, b);
    expect(b.lnPhi[0]).toBeCloseTo(a.lnPhi[1]!, 12);
    expect(b.lnPhi[1]).toBeCloseTo(a.lnPhi[3]!, 12);
    expect(b.dN[1]).toBeCloseTo(a.dN[1 * 4 + 3]!, 10);
    expect(b.h_J_mol).toBeCloseTo(a.h_J_mol, 6);
    expect(b.s_J_molK).toBeCloseTo(a.s_J_molK, 9);
  });

  test('refuses an index outside the list', () => {
    expect(() => model.of([0, 7])).toThrow('no chemical 7');
  });
});

describe('what a chemical lacks for a model', () => {
  const bare = { id: 'x', name: 'x', MW_g_mol: 100, Tc_K: 500, corr: {}, sources: {} };
  test('is told by name', () => {
    expect(missingForModel({ kind: 'peng-robinson', liquidH: 'psat-slope' }, bare)).toEqual([
      'Pc_Pa',
      'omega',
      'ideal_gas_cp',
    ]);
    expect(missingForModel({ kind: 'raoult', liquidH: 'hvap' }, bare)).toEqual([
      'vapor_pressure',
      'ideal_gas_cp',
      'enthalpy_of_vaporization',
    ]);
    for (const kind of ['peng-robinson', 'raoult'] as const)
      expect(all.flatMap((c) => missingForModel({ kind, liquidH: 'hvap' }, c))).toEqual([]);
  });

  test('a model over a gap throws', () => {
    expect(() => makeModel(specOf({ kind: 'peng-robinson' }), [bare]).of([0])).toThrow();
    expect(() => makeModel(specOf({ kind: 'raoult' }), [bare]).of([0])).toThrow();
  });

  test('entropy is known when every chemical has its standard entropy', () => {
    const { S0_J_molK, ...without } = chemical('propane');
    expect(S0_J_molK).toBeGreaterThan(0);
    const some = makeModel(specOf({ kind: 'raoult' }), [without, chemical('benzene')]);
    expect(some.of([0, 1]).hasEntropy).toBe(false);
    expect(some.of([1]).hasEntropy).toBe(true);
  });
});

describe("Raoult's law", () => {
  const x = Float64Array.of(0.3, 0.7);
  const pair = [chemical('benzene'), chemical('toluene')];
  const T = 370;

  test('the bubble pressure is the mole-fraction mean of the vapour pressures', () => {
    const model = makeModel(specOf({ kind: 'raoult' }), pair).of([0, 1]);
    const out = model.makeProps();
    model.evaluate('liquid', T, 1e5, x, 0, out);
    const bubble = x[0]! * Math.exp(out.lnPhi[0]!) * 1e5 + x[1]! * Math.exp(out.lnPhi[1]!) * 1e5;
    const mean = x[0]! * preparePure(pair[0]!).psat!(T) + x[1]! * preparePure(pair[1]!).psat!(T);
    expect(bubble / mean).toBeCloseTo(1, 13);
    const K = new Float64Array(2);
    model.startK(T, 1e5, K);
    expect(K[0]).toBeCloseTo(Math.exp(out.lnPhi[0]!), 12);
  });

  test.each(['psat-slope', 'hvap'] as const)(
    'a pure chemical boils at T (s_vapour - s_liquid) = h_vapour - h_liquid, with %s',
    (liquidH) => {
      const model = makeModel(specOf({ kind: 'raoult', liquidH }), pair).of([0]);
      const pure = preparePure(pair[0]!);
      const P = model.saturationP_Pa(0, T)!;
      const [v, l] = [model.makeProps(), model.makeProps()];
      model.evaluate('vapour', T, P, Float64Array.of(1), 2, v);
      model.evaluate('liquid', T, P, Float64Array.of(1), 2, l);
      const heat = v.h_J_mol - l.h_J_mol;
      expect((T * (v.s_J_molK - l.s_J_molK)) / heat).toBeCloseTo(1, 12);
      const wanted = liquidH === 'hvap' ? pure.hvap!(T) : R_J_molK * T * T * pure.dlnPsat_dT!(T);
      expect(heat / wanted).toBeCloseTo(1, 12);
      expect(heatCapacityRatio(v)).toBeCloseTo(v.cp_J_molK / (v.cp_J_molK - R_J_molK), 12);
      expect(heatCapacityRatio(l)).toBeUndefined();
    },
  );

  test('a gas far above its critical temperature has a liquid fugacity that goes on straight in 1/T', () => {
    const model = makeModel(specOf({ kind: 'raoult' }), [chemical('methane')]).of([0]);
    const out = model.makeProps();
    const ln = (at: number): number => {
      model.evaluate('liquid', at, 1e5, Float64Array.of(1), 2, out);
      return out.lnPhi[0]!;
    };
    const [a, b, c] = [1 / 300, 1 / 350, 1 / 400];
    expect((ln(300) - ln(350)) / (a - b)).toBeCloseTo((ln(350) - ln(400)) / (b - c), 6);
    expect(out.cp_J_molK / model.cpIdeal_J_molK(0, 400)).toBeCloseTo(1, 6);
    expect(model.saturationP_Pa(0, 300)).toBeUndefined();
  });
});

describe('Peng-Robinson saturation of pure chemicals', () => {
  test.each(['methane', 'hydrogen', 'n-hexadecane', 'water', 'benzene'])(
    'equal fugacities for %s from Tr 0.25 to 1, pressure rising all the way to Pc, nothing above',
    (id) => {
      const model = makeModel(specOf({ kind: 'peng-robinson' }), [chemical(id)]).of([0]);
      const { Tc_K, Pc_Pa } = model.chemicals[0]!;
      const out = model.makeProps();
      const one = Float64Array.of(1);
      let before = 0;
      for (let k = 0; k < 400; k++) {
        const T = Tc_K! * (1 - 0.75 * (1 - k / 400) ** 2);
        const P = model.saturationP_Pa(0, T)!;
        expect(P).toBeGreaterThan(before);
        before = P;
        model.evaluate('vapour', T, P, one, 0, out);
        const vapour = out.lnPhi[0]!;
        model.evaluate('liquid', T, P, one, 0, out);
        expect(Math.abs(out.lnPhi[0]! - vapour)).toBeLessThan(1e-11);
      }
      expect(model.saturationP_Pa(0, Tc_K! * (1 - 1e-9))! / Pc_Pa!).toBeCloseTo(1, 7);
      expect(model.saturationP_Pa(0, Tc_K!)).toBeUndefined();
    },
  );

  test('every number stays finite at the critical point itself, where slopes have no bound', () => {
    for (const id of ['propane', 'water', 'hydrogen']) {
      const model = makeModel(specOf({ kind: 'peng-robinson' }), [chemical(id)]).of([0]);
      const { Tc_K, Pc_Pa } = model.chemicals[0]!;
      const out = model.makeProps();
      for (const side of ['vapour', 'liquid', 'stable'] as const) {
        model.evaluate(side, Tc_K!, Pc_Pa!, Float64Array.of(1), 2, out);
        for (const v of [out.Z, out.h_J_mol, out.s_J_molK, out.cp_J_molK, out.lnPhi[0], out.dT[0], out.dP[0]])
          expect(Number.isFinite(v)).toBe(true);
        expect(out.Z).toBeCloseTo(0.3074, 2);
      }
    }
  });
});
