/** What a pump does. Expected values are derived beside the check unless a source is named. */
import { beforeAll, describe, expect, test } from 'vitest';
import type { Basis, ProblemUnit } from '../../src/engine/network/types';
import type { PumpResults } from '../../src/engine/units/pump/types';
import { basisOf, fresh, molar, parts, problemOf, solvedStream, unit, unitResult } from '../network/fixtures';

let basis: Basis;
let water: Basis;
beforeAll(async () => {
  basis = await basisOf(['propane', 'n-pentane', 'benzene', 'toluene']);
  water = await basisOf(['water'], 'raoult');
});

const feed = (state: object, x = [0, 0, 1, 1]): ProblemUnit =>
  unit('f feed > out=a', { state, flow: molar(20), composition: parts(...x) });
const COLD = { T: 300, P: 1.5e5 };

function pumped(settings: object, state: object = COLD, of: Basis = basis, x?: number[]) {
  const batch = fresh(
    problemOf(of, [feed(state, x), unit('p pump in=a > out=b', { efficiency: 0.7, ...settings })]),
    of,
  );
  const result = unitResult(batch, 'p')!;
  return {
    result,
    ...(result.results as unknown as PumpResults),
    codes: batch.findings.map((f) => f.code).filter((c) => c.startsWith('pump/')),
    in: () => solvedStream(batch, 'a'),
    out: () => solvedStream(batch, 'b'),
  };
}

describe('a pump', () => {
  test('puts volume flow times pressure rise over efficiency into the liquid', () => {
    const p = pumped({ p: { P: 11.5e5 } });
    // Derived from the definitions; the volume is the stream's own, as it is shown.
    expect(p.hydraulicPower_W).toBeCloseTo(p.in().volume_m3_s * 10e5, 9);
    expect(p.power_W).toBeCloseTo(p.hydraulicPower_W / 0.7, 9);
    expect(p.result.power_W).toBe(p.power_W);
    expect(p.result.heat_W).toBe(0);
    expect(p.out().H_W - p.in().H_W).toBeCloseTo(p.power_W, 4);
    expect(p.out().P_Pa).toBe(11.5e5);
    expect(p.out().T_K).toBeGreaterThan(300);
    expect(p).not.toHaveProperty('electric_W');
  });

  test('takes its outlet by pressure, rise, ratio or head alike', () => {
    const { head_m, power_W } = pumped({ p: { P: 11.5e5 } });
    for (const p of [{ drop: -10e5 }, { ratio: 11.5 / 1.5 }, { head: head_m }]) {
      const again = pumped({ p });
      expect(again.P_Pa / 11.5e5).toBeCloseTo(1, 12);
      expect(again.power_W / power_W).toBeCloseTo(1, 10);
    }
  });

  test('keeps electric power apart from what goes into the liquid', () => {
    const p = pumped({ p: { P: 11.5e5 }, drive: 0.9 });
    expect(p.electric_W).toBeCloseTo(p.power_W / 0.9, 9);
    expect(p.result.power_W).toBe(p.power_W);
  });

  test('needs the power of the textbooks: 50 m3/h of water by 40 m at 70 % take 7.8 kW', () => {
    // Derived, as in any pump book: rho g Q H / eta = 997 * 9.80665 * 50/3600 * 40 / 0.7 = 7.76 kW; density of water 997.05
    // kg/m3 at 25 degC (IAPWS R6-95, recalled from memory).
    const n_mol_s = (50 / 3600 / 18.015e-3) * 997.05;
    const units = [
      unit('f feed > out=a', {
        state: { T: 298.15, P: 101325 },
        flow: molar(n_mol_s),
        composition: parts(1),
      }),
      unit('p pump in=a > out=b', { p: { head: 40 }, efficiency: 0.7 }),
    ];
    const batch = fresh(problemOf(water, units), water);
    const results = unitResult(batch, 'p')!.results as unknown as PumpResults;
    // Power by head does not depend on the density: only the volume and with it the pressure do.
    expect(results.power_W).toBeCloseTo(7759, -1);
    expect(results.volume_m3_s * 3600).toBeGreaterThan(48);
    expect(results.volume_m3_s * 3600).toBeLessThan(52);
  });

  test('tells NPSH available from pressure, bubble pressure and static head', () => {
    const p = pumped({ p: { P: 5e5 }, staticHead: 2.5 });
    const bubble = solvedStream(
      fresh(problemOf(basis, [feed({ T: 300, vapourFraction: 0 })]), basis),
      'a',
    ).P_Pa;
    const density = p.in().m_kg_s / p.in().volume_m3_s;
    expect(p.npshAvailable_m).toBeCloseTo((1.5e5 - bubble) / density / 9.80665 + 2.5, 6);
    expect(p.codes).toEqual([]);
    // Derived: head is pressure rise over density and gravity.
    expect(p.head_m).toBeCloseTo(3.5e5 / density / 9.80665, 9);
  });

  test('at the bubble point has the static head only, and says so while it is not set', () => {
    const at = { T: 300, vapourFraction: 0 };
    const bare = pumped({ p: { P: 5e5 } }, at);
    expect(bare.npshAvailable_m).toBe(0);
    expect(bare.codes).toEqual(['pump/static-head-only']);
    const set = pumped({ p: { P: 5e5 }, staticHead: 4 }, at);
    expect(set.npshAvailable_m).toBe(4);
    expect(set.codes).toEqual([]);
    expect(pumped({ p: { P: 5e5 }, staticHead: 1 }, at).codes).toEqual(['pump/low-suction-head']);
  });

  test('below 3 m of NPSH available says so', () => {
    // Derived: 0.1 bar above the bubble pressure over 860 kg/m3 is about 1.2 m.
    const bubble = solvedStream(
      fresh(problemOf(basis, [feed({ T: 300, vapourFraction: 0 })]), basis),
      'a',
    ).P_Pa;
    expect(pumped({ p: { P: 5e5 } }, { T: 300, P: bubble + 0.1e5 }).codes).toEqual(['pump/low-suction-head']);
    expect(pumped({ p: { P: 5e5 } }, { T: 300, P: bubble + 0.5e5 }).codes).toEqual([]);
  });

  test('takes no vapour without a word', () => {
    const p = pumped({ p: { P: 20e5 } }, { P: 8e5, vapourFraction: 0.01 }, basis, [1, 1, 1, 1]);
    expect(p.codes).toEqual(['pump/vapour-enters']);
    expect(p.npshAvailable_m).toBeUndefined();
  });

  test('that lets the pressure down gives power, and that is said', () => {
    const p = pumped({ p: { P: 1.2e5 } });
    expect(p.power_W).toBeLessThan(0);
    expect(p.power_W).toBeCloseTo(0.7 * p.hydraulicPower_W, 9);
    expect(p.codes).toEqual(['pump/gives-power']);
  });

  test('without flow or without a positive pressure answers all the same', () => {
    const empty = fresh(
      problemOf(basis, [
        feed(COLD),
        unit('d drum in1=a > vapour=v liquid=l', { p: { drop: 0 } }),
        unit('p pump in=v > out=b', { p: { head: 10 }, efficiency: 0.7 }),
      ]),
      basis,
    );
    expect(unitResult(empty, 'p')).toMatchObject({ state: 'solved', power_W: 0 });
    const refused = pumped({ p: { head: -500 } });
    expect(refused.result.reasons?.[0]).toMatchObject({
      code: 'pressure/not-positive',
      at: { path: 'p.head' },
    });
  });
});
