import { describe, expect, test } from 'vitest';
import { PengRobinson } from '../../src/engine/thermo/peng-robinson/model';
import { type PhaseProps, R_J_molK, type ThermoModel } from '../../src/engine/thermo/types';
import { CASES, MODELS, modelFor, STATES, type StateCase } from './thermoCases';

interface Seen {
  readonly lnPhi: Float64Array;
  readonly h: number;
  readonly s: number;
  readonly v: number;
  readonly g: number;
}

/** One evaluation, on the side that the state's own evaluation ended on, in fresh props. */
function look(
  model: ThermoModel,
  state: StateCase,
  T = state.T,
  P = state.P,
  x: Float64Array = Float64Array.from(state.x),
): Seen {
  const p = model.makeProps();
  model.evaluate(state.side, T, P, x, 1, p);
  return { lnPhi: p.lnPhi, h: p.h_J_mol, s: p.s_J_molK, v: p.v_m3_mol, g: p.h_J_mol - T * p.s_J_molK };
}

function full(model: ThermoModel, state: StateCase): PhaseProps {
  const p = model.makeProps();
  model.evaluate(state.side, state.T, state.P, Float64Array.from(state.x), 2, p);
  return p;
}

/** Derivative by a central difference, extrapolated once (error of fourth order). */
function slope(f: (d: number) => number, step: number): number {
  const one = (h: number): number => (f(h) - f(-h)) / (2 * h);
  return (4 * one(step / 2) - one(step)) / 3;
}

/** Composition after adding d moles of j to one mole. */
function added(x: readonly number[], j: number, d: number): Float64Array {
  return Float64Array.from(x, (xi, i) => (xi + (i === j ? d : 0)) / (1 + d));
}

const dot = (x: readonly number[], y: Float64Array): number => x.reduce((sum, xi, i) => sum + xi * y[i]!, 0);

describe.each(CASES)('%s', (_title, name, state) => {
  const model = modelFor(name, state.ids);
  const { n } = model;
  const { T, P, x } = state;
  const at = full(model, state);
  const kind = MODELS[name]!;
  const isLiquid = at.side === 'liquid';
  const agrees = kind.enthalpyFromLnPhi || !isLiquid;

  test('every number is finite', () => {
    const all = [
      ...at.lnPhi,
      ...at.dT,
      ...at.dP,
      ...at.dN,
      at.h_J_mol,
      at.s_J_molK,
      at.v_m3_mol,
      at.cp_J_molK,
      at.Z,
    ];
    expect(all.filter((value) => !Number.isFinite(value))).toEqual([]);
    expect(at.v_m3_mol).toBeGreaterThan(0);
  });

  test('d ln phi / dT and / dP are the slopes of ln phi', () => {
    for (let i = 0; i < n; i++) {
      const byT = slope((d) => look(model, state, T * (1 + d)).lnPhi[i]!, 1e-3);
      const byP = slope((d) => look(model, state, T, P * (1 + d)).lnPhi[i]!, 1e-3);
      expect(Math.abs(at.dT[i]! * T - byT)).toBeLessThan(1e-7 * (1 + Math.abs(byT)));
      expect(Math.abs(at.dP[i]! * P - byP)).toBeLessThan(1e-8 * (1 + Math.abs(byP)));
    }
  });

  test('d ln phi_i / dn_j is the slope of ln phi_i as moles of j are added to one mole', () => {
    for (let j = 0; j < n; j++) {
      // An absent chemical is added from one side only: start a little above zero.
      const base = x[j]! > 1e-3 ? 0 : 2e-3;
      const from = base === 0 ? x : [...added(x, j, base)];
      const p = full(model, { ...state, x: from });
      for (let i = 0; i < n; i++) {
        const byN = slope((d) => look(model, state, T, P, added(from, j, d)).lnPhi[i]!, 5e-4);
        expect(Math.abs(p.dN[i * n + j]! - byN)).toBeLessThan(2e-7 * (1 + Math.abs(byN)));
      }
    }
  });

  test('the derivatives by amounts are symmetric and add up to nothing (Gibbs-Duhem, Euler)', () => {
    for (let i = 0; i < n; i++) {
      let sum = 0;
      let size = 1;
      for (let j = 0; j < n; j++) {
        expect(at.dN[i * n + j]).toBe(at.dN[j * n + i]);
        sum += x[j]! * at.dN[i * n + j]!;
        size += Math.abs(x[j]! * at.dN[i * n + j]!);
      }
      expect(Math.abs(sum)).toBeLessThan(1e-11 * size);
    }
  });

  test('cp is the slope of h, and cp / T that of s where h and g agree', () => {
    const cp = slope((d) => look(model, state, T * (1 + d)).h, 1e-3) / T;
    expect(Math.abs(at.cp_J_molK / cp - 1)).toBeLessThan(kind.cpTolerance);
    if (!agrees) return;
    const ds = slope((d) => look(model, state, T * (1 + d)).s, 1e-3);
    expect(Math.abs(at.cp_J_molK / ds - 1)).toBeLessThan(kind.cpTolerance);
  });

  if (agrees)
    test('h and ln phi agree (Gibbs-Helmholtz): h - h_ideal = -R T^2 sum x d ln phi / dT', () => {
      const ideal = x.reduce((sum, xi, i) => sum + xi * model.hIdeal_J_mol(i, T), 0);
      const residual = at.h_J_mol - ideal;
      expect(Math.abs(residual + R_J_molK * T * T * dot(x, at.dT))).toBeLessThan(
        1e-8 * (1e3 + Math.abs(residual)),
      );
    });

  test('g - g_ideal = R T sum x ln phi, so h, s and ln phi tell the same Gibbs energy', () => {
    // The same composition as an ideal gas: the vapour at a pressure too low for anything else, brought to P.
    const low = 1e-4;
    const p = model.makeProps();
    model.evaluate('vapour', T, low, Float64Array.from(x), 1, p);
    const ideal = p.h_J_mol - T * p.s_J_molK + R_J_molK * T * Math.log(P / low);
    const g = at.h_J_mol - T * at.s_J_molK;
    expect(Math.abs((g - ideal) / (R_J_molK * T) - dot(x, at.lnPhi))).toBeLessThan(1e-8);
  });

  test('the volume is the pressure slope of the Gibbs energy: v = (RT/P)(1 + P sum x d ln phi / dP)', () => {
    const v = R_J_molK * T * (1 / P + dot(x, at.dP));
    if (kind.liquidHasVolume || !isLiquid) expect(Math.abs(v / at.v_m3_mol - 1)).toBeLessThan(1e-9);
    else expect(Math.abs(v)).toBeLessThan(1e-12 * ((R_J_molK * T) / P));
  });

  if (!isLiquid || (kind.liquidHasVolume && kind.enthalpyFromLnPhi))
    test('dh/dP = v - T dv/dT (Maxwell)', () => {
      const dh = slope((d) => look(model, state, T, P * (1 + d)).h, 1e-3);
      const dv = slope((d) => look(model, state, T * (1 + d)).v, 1e-3);
      expect(Math.abs(dh - P * (at.v_m3_mol - dv))).toBeLessThan(1e-6 * R_J_molK * T * Math.max(at.Z, 0.1));
    });

  const isCubic = model instanceof PengRobinson;
  if (isCubic)
    test('a chemical listed twice with half the amount each changes nothing', () => {
      const twice = [...state.ids, ...state.ids];
      const spec = {
        ...model.spec,
        pairs: Array.from({ length: 2 * n }, (_, i) =>
          Array.from({ length: 2 * n - 1 - i }, (_, k) => {
            const j = i + 1 + k;
            const [a, b] = [Math.min(i % n, j % n), Math.max(i % n, j % n)];
            const kij = model.spec.pairs.find((pair) => pair.i === a && pair.j === b)?.kij ?? 0;
            return { i, j, kij, origin: 'given' as const, source: '' };
          }),
        ).flat(),
      };
      const double = new PengRobinson(
        spec,
        twice.map((_, i) => model.chemicals[i % n]!),
      );
      const p = double.makeProps();
      double.evaluate(
        state.side,
        T,
        P,
        Float64Array.from([...x, ...x], (v) => v / 2),
        2,
        p,
      );
      expect(p.Z).toBeCloseTo(at.Z, 12);
      expect(Math.abs(p.h_J_mol - at.h_J_mol)).toBeLessThan(1e-9 * Math.abs(at.h_J_mol));
      expect(p.cp_J_molK / at.cp_J_molK).toBeCloseTo(1, 10);
      for (let i = 0; i < 2 * n; i++) expect(p.lnPhi[i]).toBeCloseTo(at.lnPhi[i % n]!, 11);
    });

  const cv = at.cv_J_molK;
  if (cv !== undefined)
    test('cp - cv = -T (dv/dT)^2 / (dv/dP), never negative', () => {
      const byT = slope((d) => look(model, state, T * (1 + d)).v, 1e-3) / T;
      const byP = slope((d) => look(model, state, T, P * (1 + d)).v, 1e-3) / P;
      expect((at.cp_J_molK - cv) / ((-T * byT * byT) / byP)).toBeCloseTo(1, 6);
      expect(at.cp_J_molK).toBeGreaterThan(cv);
    });

  test('the partial molar enthalpies add up to h, and each is the slope of n h', () => {
    const h = dot(x, at.hPartial);
    expect(Math.abs(h - at.h_J_mol)).toBeLessThan(1e-9 * (1e3 + Math.abs(at.h_J_mol)));
    for (let j = 0; j < n; j++) {
      if (x[j]! < 1e-3) continue;
      const nh = slope((d) => (1 + d) * look(model, state, T, P, added(x, j, d)).h, 5e-4);
      expect(Math.abs(nh - at.hPartial[j]!)).toBeLessThan(1e-6 * (1e4 + Math.abs(nh)));
    }
  });

  test('used props give the same numbers to the last bit', () => {
    const p = model.makeProps();
    const y = Float64Array.from(x, () => 1 / n);
    const z = Float64Array.from(x);
    const read = (): number[] => [
      ...p.lnPhi,
      ...p.dT,
      ...p.dP,
      ...p.dN,
      ...p.hPartial,
      p.h_J_mol,
      p.s_J_molK,
      p.v_m3_mol,
      p.cp_J_molK,
      p.Z,
    ];
    model.evaluate(state.side, T, P, z, 2, p);
    const first = read();
    model.evaluate('liquid', T * 1.1, P * 2, y, 0, p);
    model.evaluate('vapour', T, P / 2, y, 1, p);
    model.evaluate(state.side, T, P, z, 2, p);
    expect(read()).toEqual(first);
  });
});

describe.each(Object.keys(MODELS))('%s', (name) => {
  test('becomes an ideal gas as the pressure goes to zero', () => {
    for (const state of STATES) {
      const model = modelFor(name, state.ids);
      const p = full(model, { ...state, side: 'vapour', P: 1e-3 });
      const ideal = state.x.reduce((sum, xi, i) => sum + xi * model.hIdeal_J_mol(i, state.T), 0);
      expect(p.Z).toBeCloseTo(1, 7);
      for (const value of p.lnPhi) expect(Math.abs(value)).toBeLessThan(1e-7);
      expect(Math.abs(p.h_J_mol - ideal)).toBeLessThan(1e-2);
    }
  });

  test("'stable' is the side of lower Gibbs energy", () => {
    for (const state of STATES)
      for (const P of [1e3, 1e5, 1e6, 1e7]) {
        const model = modelFor(name, state.ids);
        const [vapour, liquid, stable] = (['vapour', 'liquid', 'stable'] as const).map((side) =>
          dot(state.x, full(model, { ...state, side, P }).lnPhi),
        );
        expect(stable).toBe(Math.min(vapour!, liquid!));
      }
  });

  test('props of another model are refused', () => {
    const [a, b] = [modelFor(name, ['propane']), modelFor(name, ['n-butane'])];
    expect(() => a.evaluate('vapour', 300, 1e5, Float64Array.of(1), 0, b.makeProps())).toThrow(
      'another model',
    );
  });
});

describe('Peng-Robinson', () => {
  test.each(STATES.map((s) => [`${s.ids.join(' + ')} at ${s.T} K`, s] as const))(
    'ln phi of %s is the integral of the residual partial volume over pressure',
    (_title, state) => {
      // ln phi_i(P) = int_0^P (V_i/RT - 1/P) dP along the vapour root, by Gauss-Legendre on panels.
      const model = modelFor('Peng-Robinson 1976', state.ids);
      const x = Float64Array.from(state.x);
      const p = model.makeProps();
      // Keep to pressures with one root from zero on, so that the path does not jump.
      let top = state.P;
      for (; top > 1; top /= 2) {
        const single = Array.from({ length: 4000 }, (_, k) => {
          model.evaluate('stable', state.T, (top * (k + 1)) / 4000, x, 0, p);
          return p.single;
        });
        if (single.every(Boolean)) break;
      }
      const nodes = [
        0.1488743389816312, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845, 0.9739065285171717,
      ];
      const weights = [
        0.2955242247147529, 0.2692667193099963, 0.219086362515982, 0.1494513491505806, 0.0666713443086881,
      ];
      const sum = new Float64Array(model.n);
      const panels = 60;
      for (let k = 0; k < panels; k++)
        for (let m = 0; m < 5; m++)
          for (const sign of [-1, 1]) {
            const P = (top / panels) * (k + 0.5 + (sign * nodes[m]!) / 2);
            model.evaluate('vapour', state.T, P, x, 2, p);
            for (let i = 0; i < model.n; i++) sum[i]! += (weights[m]! / 2) * (top / panels) * p.dP[i]!;
          }
      model.evaluate('vapour', state.T, top, x, 0, p);
      for (let i = 0; i < model.n; i++) expect(Math.abs(sum[i]! - p.lnPhi[i]!)).toBeLessThan(1e-9);
    },
  );

  test('the pressure that the volume gives back is the one asked for', () => {
    for (const state of STATES)
      for (const side of ['vapour', 'liquid'] as const)
        for (const P of [1, 1e3, 1e5, 1e7, 1e9]) {
          const model = modelFor('Peng-Robinson 1976', state.ids) as PengRobinson;
          const p = full(model, { ...state, side, P });
          // Independent sum over pairs with the published alpha.
          let a = 0;
          let b = 0;
          const { T } = state;
          const each = model.chemicals.map((c) => {
            const m = 0.37464 + 1.54226 * c.omega! - 0.26992 * c.omega! ** 2;
            const root = 1 + m * (1 - Math.sqrt(T / c.Tc_K!));
            return {
              root: Math.sqrt((0.4572355289213822 * (R_J_molK * c.Tc_K!) ** 2) / c.Pc_Pa!) * root,
              b: (0.07779607390388844 * R_J_molK * c.Tc_K!) / c.Pc_Pa!,
            };
          });
          each.forEach((ci, i) => {
            b += state.x[i]! * ci.b;
            each.forEach((cj, j) => {
              const pair = model.spec.pairs.find((q) => q.i === Math.min(i, j) && q.j === Math.max(i, j));
              a += state.x[i]! * state.x[j]! * ci.root * cj.root * (1 - (i === j ? 0 : (pair?.kij ?? 0)));
            });
          });
          const v = p.v_m3_mol;
          const [push, pull] = [(R_J_molK * T) / (v - b), a / (v * v + 2 * b * v - b * b)];
          expect(Math.abs(push - pull - P)).toBeLessThan(2e-13 * (push + pull) * (v / (v - b)));
        }
  });
});
