/**
 * A column from what the headless command prints, and nothing else: every place closes chemicals and energy and stands at
 * equilibrium. Fugacities by the second Peng-Robinson, enthalpies from it by the Gibbs-Helmholtz relation, ideal-gas heat
 * capacities integrated by Simpson's rule from the bank's rows; no formula of the engine takes part.
 */
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { run } from '../../src/cli/run';
import { bank } from '../../src/data/bank';
import type { ChemicalData } from '../../src/engine/chemicals/types';
import { lnPhiOf } from './secondPengRobinson';

const IDS = ['propane', 'n-butane', 'n-pentane', 'n-hexane', 'benzene'];
const R = 8.314462618;
const share = (...x: number[]) => Object.fromEntries(IDS.map((id, i) => [id, `${x[i]} %`]));
const feed = (id: string, tag: string, state: object, flow: string, parts: object) => ({
  id,
  tag,
  kind: 'feed',
  settings: { state, flow, composition: { basis: 'mole', parts } },
});

/** Invented: two feeds, two draws, efficiencies, subcooled reflux, pressures of their own at the ends. */
const SKETCH = {
  format: 'splitwright.sketch',
  version: 1,
  chemicals: IDS,
  model: { kind: 'peng-robinson', alpha: '1976', bankPairs: false, pairs: [] },
  units: [
    feed('a', 'FEED-1', { T: '60 degC', P: '8 bar' }, '100 kmol/h', share(10, 25, 25, 20, 20)),
    feed('b', 'FEED-2', { P: '7 bar', vapourFraction: 0.5 }, '50 kmol/h', share(30, 40, 20, 5, 5)),
    {
      id: 'c',
      tag: 'C-1',
      kind: 'column',
      settings: {
        stages: 15,
        top: { distillate: 'liquid' },
        bottom: { reboiler: true },
        feeds: { feed1: { stage: 9 }, feed2: { stage: 4 } },
        pressure: { condenser: '6 bar', top: '6.2 bar', bottom: '6.6 bar', reboiler: '6.7 bar' },
        subcooling: '8 K',
        sides: {
          side1: { stage: 3, phase: 'liquid', flow: '5 kmol/h' },
          side2: { stage: 12, phase: 'vapour', flow: { share: '4 %', of: 'feed', basis: 'mass' } },
        },
        murphree: [{ from: 2, to: 14, value: '75 %' }],
        fixedBy: [
          { fix: 'refluxRatio', value: 2 },
          { fix: 'flow', product: 'liquidDistillate', value: '60 kmol/h' },
        ],
      },
    },
  ],
  streams: [
    { id: 's1', number: '1', from: ['a', 'out'], to: ['c', 'feed1'] },
    { id: 's2', number: '2', from: ['b', 'out'], to: ['c', 'feed2'] },
    { id: 's3', number: '3', from: ['c', 'liquidDistillate'] },
    { id: 's4', number: '4', from: ['c', 'bottoms'] },
    { id: 's5', number: '5', from: ['c', 'side1'] },
    { id: 's6', number: '6', from: ['c', 'side2'] },
  ],
};

let chemicals: readonly ChemicalData[];
// biome-ignore lint/suspicious/noExplicitAny: printed JSON, read as any script would
let printed: any;
beforeAll(async () => {
  const found = await bank.chemicals(IDS);
  chemicals = IDS.map((id) => found.get(id)!);
  const dir = mkdtempSync(join(tmpdir(), 'column-'));
  const [file, json] = [join(dir, 'column.sketch.json'), join(dir, 'column.json')];
  writeFileSync(file, JSON.stringify(SKETCH));
  const code = await run([file, '--json', json], { out: () => undefined, err: () => undefined });
  expect(code).toBe(0);
  printed = JSON.parse(readFileSync(json, 'utf8'));
});

type Side = 'liquid' | 'vapour';
const fugacities = (side: Side, T: number, P: number, x: readonly number[]): number[] =>
  lnPhiOf(
    side,
    T,
    P,
    x,
    chemicals.map((c) => ({ Tc_K: c.Tc_K!, Pc_Pa: c.Pc_Pa!, omega: c.omega! })),
    () => 0,
  );

/** Ideal-gas heat capacity [J/(mol K)]: R times the sum of c_k T^(k - 3), k from 1. */
function cp(c: ChemicalData, T: number): number {
  const row = c.corr.ideal_gas_cp!.find((r) => T >= (r.Tmin ?? 0) && T <= (r.Tmax ?? 1e9))!;
  expect(row.form).toBe('cp_nasa9');
  return R * row.c.slice(0, 7).reduce((sum, a, k) => sum + a * T ** (k - 2), 0);
}

/** Molar enthalpy over the elements [J/mol]: formation, heat capacity, and -R T^2 d(sum of x ln phi)/dT at constant x. */
function enthalpy(side: Side, T: number, P: number, x: readonly number[]): number {
  const steps = 40;
  const h = (T - 298.15) / steps;
  const ideal = chemicals.reduce((sum, c, i) => {
    let integral = 0;
    for (let k = 0; k <= steps; k++)
      integral += (k === 0 || k === steps ? 1 : k % 2 === 1 ? 4 : 2) * cp(c, 298.15 + k * h);
    return sum + x[i]! * (c.Hf_J_mol! + (integral * h) / 3);
  }, 0);
  const G = (t: number): number => fugacities(side, t, P, x).reduce((s, f, i) => s + f * x[i]!, 0);
  const d = 0.2;
  const slope = (8 * (G(T + d) - G(T - d)) - (G(T + 2 * d) - G(T - 2 * d))) / (12 * d);
  return ideal - R * T * T * slope;
}

interface PlaceHere {
  readonly T: number;
  readonly P: number;
  readonly L: number;
  readonly V: number;
  readonly x: number[];
  readonly y: number[];
}

/** Condenser, stages, reboiler with what goes on from each to the next. */
function placesOf(): PlaceHere[] {
  const { condenser: c, reboiler: b, stages: s } = printed.units['C-1'];
  const at = (of: Record<string, number>): number[] => IDS.map((id) => of[id]!);
  const end = (e: { T_K: number; P_Pa: number; x: never; y: never }, L: number, V: number) => ({
    T: e.T_K,
    P: e.P_Pa,
    L,
    V,
    x: at(e.x),
    y: at(e.y),
  });
  return [
    end(c, c.reflux_mol_s, 0),
    ...s.T_K.map((T: number, k: number) => ({
      T,
      P: s.P_Pa[k],
      L: s.L_mol_s[k],
      V: s.V_mol_s[k],
      x: IDS.map((id) => s.x[id][k]),
      y: IDS.map((id) => s.y[id][k]),
    })),
    end(b, b.bottoms_mol_s, b.boilup_mol_s),
  ];
}

describe('a column as printed', () => {
  test('closes every chemical and the energy at every place, by enthalpies of its own', () => {
    const u = printed.units['C-1'];
    const places = placesOf();
    const hL = places.map((p) => enthalpy('liquid', p.T, p.P, p.x));
    const hV = places.map((p) => (p.V > 0 ? enthalpy('vapour', p.T, p.P, p.y) : 0));
    const last = places.length - 1;
    for (const [j, p] of places.entries()) {
      const sum = IDS.map(() => 0);
      let heat = 0;
      let size = 0;
      const add = (n: number, z: readonly number[], h: number): void => {
        z.forEach((v, i) => {
          sum[i]! += n * v;
        });
        heat += n * h;
        size += Math.abs(n);
      };
      if (j > 0) add(places[j - 1]!.L, places[j - 1]!.x, hL[j - 1]!);
      if (j < last) add(places[j + 1]!.V, places[j + 1]!.y, hV[j + 1]!);
      for (const f of u.stages.feed)
        if (f.stage === j) {
          const s = printed.streams[f.stream];
          add(
            s.n_mol_s,
            IDS.map((id) => s.z[id]),
            s.H_W / s.n_mol_s,
          );
        }
      add(-p.L, p.x, hL[j]!);
      add(-p.V, p.y, hV[j]!);
      for (const d of u.stages.draw)
        if (d.stage === j) {
          const isLiquid = d.phase === 'liquid';
          add(-d.n_mol_s, isLiquid ? p.x : p.y, (isLiquid ? hL : hV)[j]!);
        }
      if (j === 0) {
        add(-u.condenser.distillate_mol_s, p.x, hL[j]!);
        heat += u.condenser.duty_W;
      }
      if (j === last) heat += u.reboiler.duty_W;
      for (const miss of sum) expect(Math.abs(miss) / size).toBeLessThan(1e-9);
      expect(Math.abs(heat) / (size * 1e4)).toBeLessThan(1e-8);
    }
  });

  test('stands at equilibrium, with Murphree’s relation where an efficiency is set', () => {
    const places = placesOf();
    const { subcooling_K } = printed.units['C-1'].condenser;
    expect(subcooling_K).toBe(8);
    for (const [j, p] of places.entries()) {
      const T = p.T + (j === 0 ? subcooling_K : 0);
      const [l, v] = [fugacities('liquid', T, p.P, p.x), fugacities('vapour', T, p.P, p.y)];
      const E = j >= 2 && j <= 14 ? 0.75 : 1;
      p.x.forEach((x, i) => {
        const below = places[j + 1]?.y[i] ?? 0;
        const y = E * Math.exp(l[i]! - v[i]!) * x + (1 - E) * below;
        expect(Math.abs(Math.log(p.y[i]! / y))).toBeLessThan(1e-8);
      });
    }
  });

  test('has the feeds’ enthalpies by the same sums, and the flows that were asked', () => {
    const s = printed.streams;
    const h = s['1'].H_W / s['1'].n_mol_s;
    const own = enthalpy('liquid', 333.15, 8e5, [0.1, 0.25, 0.25, 0.2, 0.2]);
    expect(Math.abs(h - own)).toBeLessThan(1e-3);
    expect(s['3'].n_mol_s * 3.6).toBeCloseTo(60, 9);
    expect(s['5'].n_mol_s * 3.6).toBeCloseTo(5, 9);
    expect(s['6'].m_kg_s / (s['1'].m_kg_s + s['2'].m_kg_s)).toBeCloseTo(0.04, 10);
    const { condenser, reboiler, boilup } = printed.units['C-1'];
    expect(condenser.reflux_mol_s / s['3'].n_mol_s).toBeCloseTo(2, 9);
    expect(reboiler.boilup_mol_s / s['4'].n_mol_s).toBeCloseTo(boilup, 9);
  });
});
