/** Laws that every solved column obeys, recomputed from its results and streams alone. */
import { describe, expect, test } from 'vitest';
import { closureData, closureOf, worstOf } from '../../src/engine/network/closure';
import type { ColumnResults } from '../../src/engine/units/column/results';
import { column } from '../../src/engine/units/column/solve';
import { type ColumnAnswer, freshWork, type Scenario, scenarios, solveCall } from '../column/fixtures';
import { lnPhiOf } from './secondPengRobinson';

const all = await scenarios();
const solved = all.map((s) => ({ s, a: solveCall(s.call) }));
const cases = solved.map(({ s, a }) => [s.name, s, a] as const);

interface PlaceFlow {
  readonly T_K: number;
  readonly P_Pa: number;
  readonly L: number;
  readonly V: number;
  readonly x: number[];
  readonly y: number[];
  readonly hL: number;
  readonly hV: number;
  /** A total condenser's vapour is in no balance. */
  readonly shadow: boolean;
}

/** All places from the top with what leaves them and goes on, from the results' record. */
function placesOf(r: ColumnResults, ids: readonly string[]): PlaceFlow[] {
  const at = (of: Readonly<Record<string, number>>): number[] => ids.map((id) => of[id]!);
  const ends = (
    end: NonNullable<ColumnResults['condenser'] | ColumnResults['reboiler']>,
    L: number,
    V: number,
  ) => ({
    T_K: end.T_K,
    P_Pa: end.P_Pa,
    L,
    V,
    x: at(end.x),
    y: at(end.y),
    hL: end.hL_J_mol,
    hV: end.hV_J_mol,
    shadow: false,
  });
  const s = r.stages;
  const stages = Array.from(s.T_K, (T_K, k) => ({
    T_K,
    P_Pa: s.P_Pa[k]!,
    L: s.L_mol_s[k]!,
    V: s.V_mol_s[k]!,
    x: ids.map((id) => s.x[id]![k]!),
    y: ids.map((id) => s.y[id]![k]!),
    hL: s.hL_J_mol[k]!,
    hV: s.hV_J_mol[k]!,
    shadow: false,
  }));
  const { condenser: c, reboiler: b } = r;
  return [
    ...(c
      ? [
          {
            ...ends(c, c.reflux_mol_s, c.distillate === 'vapour' ? c.distillate_mol_s : 0),
            shadow: c.distillate === 'liquid',
          },
        ]
      : []),
    ...stages,
    ...(b ? [ends(b, b.bottoms_mol_s, b.boilup_mol_s)] : []),
  ];
}

const indexOf = (r: ColumnResults, stage: number | 'condenser' | 'reboiler'): number => {
  const first = r.condenser ? 1 : 0;
  if (stage === 'condenser') return 0;
  return stage === 'reboiler' ? first + r.stages.T_K.length : first + stage - 1;
};

/** Worst relative misses of every place: total, each chemical, energy. */
function stageClosure({ call, chemicals }: Scenario, { results: r }: ColumnAnswer) {
  const ids = chemicals.map((c) => c.id);
  const places = placesOf(r, ids);
  let mass = 0;
  let parts = 0;
  let energy = 0;
  places.forEach((p, j) => {
    const inN = ids.map(() => 0);
    const outN = ids.map(() => 0);
    let inH = 0;
    let outH = 0;
    let scale = 0;
    const add = (to: number[], n: number, z: readonly number[]): void => {
      z.forEach((v, i) => {
        to[i]! += n * v;
      });
    };
    const enter = (n: number, z: readonly number[], h: number): void => {
      add(inN, n, z);
      inH += n * h;
      scale += n;
    };
    const leave = (n: number, z: readonly number[], h: number): void => {
      add(outN, n, z);
      outH += n * h;
      scale += n;
    };
    if (j > 0) enter(places[j - 1]!.L, places[j - 1]!.x, places[j - 1]!.hL);
    if (j + 1 < places.length) enter(places[j + 1]!.V, places[j + 1]!.y, places[j + 1]!.hV);
    for (const f of r.stages.feed)
      if (indexOf(r, f.stage) === j) {
        const stream = call.in[f.port]!;
        add(inN, 1, Array.from(stream.n_mol_s));
        inH += stream.H_W;
      }
    leave(p.L, p.x, p.hL);
    if (!p.shadow) leave(p.V, p.y, p.hV);
    else leave(r.condenser!.distillate_mol_s, p.x, p.hL);
    for (const d of r.stages.draw)
      if (indexOf(r, d.stage) === j)
        leave(d.n_mol_s, d.phase === 'liquid' ? p.x : p.y, d.phase === 'liquid' ? p.hL : p.hV);
    if (j === 0 && r.condenser) inH += r.condenser.duty_W;
    if (j === places.length - 1 && r.reboiler) inH += r.reboiler.duty_W;
    const total = inN.reduce((a, b) => a + b, 0);
    const out = outN.reduce((a, b) => a + b, 0);
    mass = Math.max(mass, Math.abs(total - out) / total);
    inN.forEach((n, i) => {
      parts = Math.max(parts, Math.abs(n - outN[i]!) / Math.max(n, outN[i]!, 1e-6 * total));
    });
    energy = Math.max(energy, Math.abs(inH - outH) / (scale * 1e4));
  });
  return { mass, parts, energy };
}

describe('every place of a column', () => {
  test.each(cases)('closes mass, chemicals and energy to 1e-9: %s', (_, s, a) => {
    const { mass, parts, energy } = stageClosure(s, a);
    expect(mass).toBeLessThan(1e-11);
    expect(parts).toBeLessThan(1e-9);
    expect(energy).toBeLessThan(1e-9);
  });

  test.each(cases)('is at equilibrium to 1e-8 by a second implementation: %s', (_, s, a) => {
    const { model, chemicals, call } = s;
    const ids = chemicals.map((c) => c.id);
    const places = placesOf(a.results, ids);
    const pure = chemicals.map((c) => ({ Tc_K: c.Tc_K!, Pc_Pa: c.Pc_Pa!, omega: c.omega! }));
    const kij = (i: number, j: number): number =>
      model.spec.pairs.find((p) => (p.i === i && p.j === j) || (p.i === j && p.j === i))?.kij ?? 0;
    const first = a.results.condenser ? 1 : 0;
    const E = places.map((_, j) => {
      const range = call.settings.murphree?.find((m) => j - first + 1 >= m.from && j - first + 1 <= m.to);
      return j >= first && range ? range.value : 1;
    });
    let worst = 0;
    places.forEach((p, j) => {
      const T = p.T_K + (j === 0 ? (a.results.condenser?.subcooling_K ?? 0) : 0);
      const K =
        model.spec.kind === 'raoult'
          ? chemicals.map((_, i) => model.of([i]).saturationP_Pa(0, T)! / p.P_Pa)
          : (() => {
              const l = lnPhiOf('liquid', T, p.P_Pa, p.x, pure, kij);
              const v = lnPhiOf('vapour', T, p.P_Pa, p.y, pure, kij);
              return l.map((_, i) => Math.exp(l[i]! - v[i]!));
            })();
      p.x.forEach((x, i) => {
        if (x === 0) return;
        const e = E[j]!;
        const below = places[j + 1]?.y[i] ?? 0;
        const want = e * K[i]! * x + (1 - e) * below;
        worst = Math.max(worst, Math.abs(Math.log(p.y[i]! / want)));
      });
    });
    expect(worst).toBeLessThan(1e-8);
  });
});

describe('a column as a whole', () => {
  test.each(cases)('closes to 1e-11: %s', (_, s, a) => {
    const closure = closureOf(
      Object.values(s.call.in),
      Object.values(a.out),
      a.heat_W,
      0,
      undefined,
      closureData(s.model),
    );
    expect(worstOf(closure)).toBeLessThan(1e-11);
    // The streams' enthalpy is that of their phase.
    for (const out of Object.values(a.out)) {
      const total = out.n_mol_s.reduce((x, y) => x + y, 0);
      expect(Math.abs(out.H_W / total - out.phases[0]!.h_J_mol)).toBeLessThan(
        1e-6 * Math.max(1e4, Math.abs(a.heat_W / total)),
      );
    }
  });

  // Derived: the model at the products' own temperatures, pressures and compositions.
  test.each(cases)('gives each product the properties of its own state: %s', (_, s, a) => {
    for (const stream of Object.values(a.out))
      for (const { kind, x, cp_J_molK, v_m3_mol, h_J_mol } of stream.phases) {
        const there = Array.from(x.keys()).filter((i) => x[i]! > 0);
        const model = s.model.of(there);
        const props = model.makeProps();
        if (kind !== 'vapour' && kind !== 'liquid')
          throw new Error('a product of a column is a vapour or a liquid');
        const here = Float64Array.from(there, (i) => x[i]!);
        model.evaluate(kind, stream.T_K, stream.P_Pa, here, 2, props);
        expect(Math.abs(cp_J_molK / props.cp_J_molK - 1)).toBeLessThan(1e-9);
        expect(Math.abs(v_m3_mol / props.v_m3_mol - 1)).toBeLessThan(1e-9);
        expect(Math.abs(h_J_mol - props.h_J_mol)).toBeLessThan(1e-6);
      }
  });

  test.each(cases)('ends where it was asked to: %s', (_, s, a) => {
    const { results: r, out } = a;
    const sum = (port: string, mass: boolean): number =>
      out[port]!.n_mol_s.reduce((t, n, i) => t + n * (mass ? s.chemicals[i]!.MW_g_mol * 1e-3 : 1), 0);
    const fed = (mass: boolean): number =>
      Object.values(s.call.in).reduce(
        (t, f) => t + f.n_mol_s.reduce((u, n, i) => u + n * (mass ? s.chemicals[i]!.MW_g_mol * 1e-3 : 1), 0),
        0,
      );
    for (const x of s.call.settings.fixedBy ?? []) {
      const have = (() => {
        switch (x.fix) {
          case 'refluxRatio':
            return r.refluxRatio! / x.value;
          case 'boilup':
            return r.boilup! / x.value;
          case 'flow': {
            const { value: v } = x;
            if (v.is === 'molar') return sum(x.product, false) / v.n_mol_s;
            if (v.is === 'mass') return sum(x.product, true) / v.m_kg_s;
            return sum(x.product, v.basis === 'mass') / (v.share * fed(v.basis === 'mass'));
          }
          case 'reflux':
            return x.value.is === 'molar' ? r.condenser!.reflux_mol_s / x.value.n_mol_s : Number.NaN;
          case 'purity': {
            const w = x.basis === 'mass' ? s.chemicals[x.chemical]!.MW_g_mol * 1e-3 : 1;
            return (out[x.product]!.n_mol_s[x.chemical]! * w) / sum(x.product, x.basis === 'mass') / x.value;
          }
          case 'recovery':
            return (
              out[x.product]!.n_mol_s[x.chemical]! /
              Object.values(s.call.in).reduce((t, f) => t + f.n_mol_s[x.chemical]!, 0) /
              x.value
            );
          case 'temperature':
            return typeof x.stage === 'number' ? r.stages.T_K[x.stage - 1]! / x.value : Number.NaN;
          case 'duty':
            return (x.at === 'condenser' ? r.condenser!.duty_W : r.reboiler!.duty_W) / x.value;
        }
      })();
      expect(Math.abs(have - 1)).toBeLessThan(1e-8);
    }
    for (const [port, side] of Object.entries(s.call.settings.sides ?? {})) {
      const mass = side.flow.is === 'mass';
      const asked =
        side.flow.is === 'mass' ? side.flow.m_kg_s : side.flow.is === 'molar' ? side.flow.n_mol_s : 0;
      expect(Math.abs(sum(port, mass) / asked - 1)).toBeLessThan(1e-8);
    }
  });

  test.each(cases)('is the same from its own answer, and in a used workspace bit for bit: %s', (_, s, a) => {
    const warm = solveCall({ ...s.call, warm: a.warm });
    for (const [port, stream] of Object.entries(a.out)) {
      expect(Math.abs(warm.out[port]!.T_K - stream.T_K)).toBeLessThan(1e-6);
      stream.n_mol_s.forEach((n, i) => {
        expect(Math.abs(warm.out[port]!.n_mol_s[i]! - n)).toBeLessThan(
          1e-8 * s.call.in.feed1!.n_mol_s.reduce((x, y) => x + y, 0),
        );
      });
    }
    const work = freshWork();
    const other = solved.find((o) => o.s.model === s.model && o.s !== s) ?? solved[0]!;
    column.solve({ ...other.s.call, work });
    column.solve({ ...s.call, work, warm: a.warm });
    const again = solveCall({ ...s.call, work });
    expect(again.out).toEqual(a.out);
    expect(again.results).toEqual(a.results);
  });

  test.each(cases)('does a thousand times as much with a thousand times the feed: %s', (_, s, a) => {
    const k = 1000;
    const inlets = Object.fromEntries(
      Object.entries(s.call.in).map(([port, f]) => [
        port,
        { ...f, n_mol_s: f.n_mol_s.map((n) => k * n), H_W: k * f.H_W },
      ]),
    );
    const { settings } = s.call;
    const flow = <F>(f: F): F => {
      const v = f as { is?: string; n_mol_s?: number; m_kg_s?: number };
      if (v.is === 'molar') return { ...v, n_mol_s: k * v.n_mol_s! } as F;
      return v.is === 'mass' ? ({ ...v, m_kg_s: k * v.m_kg_s! } as F) : f;
    };
    const fixedBy = (settings.fixedBy ?? []).map((x) =>
      x.fix === 'flow' || x.fix === 'reflux'
        ? { ...x, value: flow(x.value) }
        : x.fix === 'duty'
          ? { ...x, value: k * x.value }
          : x,
    );
    const sides = Object.fromEntries(
      Object.entries(settings.sides ?? {}).map(([port, side]) => [port, { ...side, flow: flow(side.flow) }]),
    );
    const big = solveCall({
      ...s.call,
      in: inlets,
      settings: { ...settings, fixedBy, ...(settings.sides ? { sides } : {}) },
    });
    expect(Math.abs(big.heat_W - k * a.heat_W)).toBeLessThan(1e-7 * Math.max(1, Math.abs(k * a.heat_W)));
    for (const [port, stream] of Object.entries(a.out)) {
      expect(Math.abs(big.out[port]!.T_K - stream.T_K)).toBeLessThan(1e-6);
      stream.n_mol_s.forEach((n, i) => {
        expect(Math.abs(big.out[port]!.n_mol_s[i]! / k - n)).toBeLessThan(1e-7 * Math.max(n, 1));
      });
    }
  });
});
