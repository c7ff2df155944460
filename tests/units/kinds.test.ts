/** What each kind does with its settings. Expected values are derived beside the check unless a source is named. */
import { beforeAll, describe, expect, test } from 'vitest';
import type { Basis, ProblemUnit } from '../../src/engine/network/types';
import {
  basisOf,
  fresh,
  LET_DOWN,
  molar,
  parts,
  problemOf,
  type SolvedStream,
  solvedStream,
  unit,
  unitResult,
} from '../network/fixtures';

let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(LET_DOWN);
});

const EQUAL = parts(1, 1, 1, 1, 1, 1, 1);
const feedOf = (more: object = {}): ProblemUnit =>
  unit('f feed > out=a', { state: { T: 320, P: 12e5 }, flow: molar(10), composition: EQUAL, ...more });
const solve = (units: ProblemUnit[], of: Basis = basis) => fresh(problemOf(of, units), of);
const reasonOf = (units: ProblemUnit[], id: string, of: Basis = basis) =>
  unitResult(solve(units, of), id)?.reasons?.[0];

describe('a feed', () => {
  test('is the same state whichever two of its five conditions fix it', () => {
    const reference = solvedStream(solve([feedOf()]), 'a');
    expect(reference.vapourFraction).toBeGreaterThan(0.1);
    expect(reference.vapourFraction).toBeLessThan(0.9);
    const known: Readonly<Record<string, number>> = {
      T: reference.T_K,
      P: reference.P_Pa,
      vapourFraction: reference.vapourFraction,
      enthalpy: reference.h_J_mol,
      entropy: reference.s_J_molK!,
    };
    const names = Object.keys(known);
    let pairs = 0;
    for (const [k, one] of names.entries())
      for (const two of names.slice(k + 1)) {
        const state = { [one]: known[one]!, [two]: known[two]! };
        const found = solvedStream(solve([feedOf({ state })]), 'a');
        expect([one, two, found.T_K]).toEqual([one, two, expect.closeTo(reference.T_K, 5)]);
        expect(found.P_Pa / reference.P_Pa).toBeCloseTo(1, 6);
        pairs++;
      }
    expect(pairs).toBe(10);
  });

  test('reports the phase that begins with fraction 0 at its bubble and dew point', () => {
    for (const vapourFraction of [0, 1]) {
      const { phases, n_mol_s } = solvedStream(solve([feedOf({ state: { P: 12e5, vapourFraction } })]), 'a');
      expect(phases.map((p) => [p.kind, p.fraction])).toEqual([
        ['vapour', vapourFraction],
        ['liquid', 1 - vapourFraction],
      ]);
      expect(n_mol_s).toBeCloseTo(10, 12);
      for (const phase of phases) expect(phase.x.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 10);
    }
  });

  test('takes mass parts, mass flows and component flows', () => {
    const MW = basis.chemicals.map((c) => c.MW_g_mol);
    const mass = {
      is: 'parts',
      basis: 'mass',
      parts: Float64Array.of(0.5, 0, 0, 0, 0, 0, 0.5),
    };
    const byMass = solvedStream(solve([feedOf({ composition: mass, flow: { is: 'mass', m_kg_s: 2 } })]), 'a');
    // Derived: half of 2 kg/s each, over the molar masses.
    expect(byMass.n_mol_s * byMass.z[0]!).toBeCloseTo(1000 / MW[0]!, 9);
    expect(byMass.n_mol_s * byMass.z[6]!).toBeCloseTo(1000 / MW[6]!, 9);
    expect(byMass.m_kg_s).toBeCloseTo(2, 12);
    const n_mol_s = Float64Array.of(1, 2, 0, 0, 3, 0, 0);
    const { flow: _, ...rest } = feedOf().settings as { flow: unknown };
    const settings = { ...rest, composition: { is: 'flows', n_mol_s } };
    const byFlows = solvedStream(solve([unit('f feed > out=a', settings)]), 'a');
    expect(byFlows.n_mol_s).toBeCloseTo(6, 12);
    expect(byFlows.z[1]!).toBeCloseTo(1 / 3, 12);
    expect(byFlows.z[2]).toBe(0);
  });

  test.each([
    ['feed/flow-not-positive', { flow: molar(0) }],
    ['feed/no-components', { composition: { is: 'flows', n_mol_s: new Float64Array(7) } }],
    ['feed/share-without-stream', { flow: { is: 'share', share: 0.1, of: 'feed', basis: 'mole' } }],
    ['equilibrium/no-such-state', { state: { P: 500e5, vapourFraction: 0.5 } }],
  ])('without an answer says %s', (code, settings) => {
    const reason = reasonOf([feedOf(settings)], 'f');
    expect(reason).toMatchObject({ code, at: { unit: 'f' } });
  });
});

describe('ready-made air', () => {
  const AIR = ['nitrogen', 'oxygen', 'argon', 'carbon-dioxide', 'water'];
  const at = { N2: 0, O2: 1, Ar: 2, CO2: 3, H2O: 4 };
  const airFeed = (preset: string, more: object = {}, state: object = { T: 297.15, P: 101300 }) =>
    feedOf({ state, composition: { is: 'preset', preset, relativeHumidity: 0.55, at, ...more } });

  test('holds what its names say', async () => {
    const air = await basisOf(AIR);
    const dry = solvedStream(solve([airFeed('dry air')], air), 'a');
    [0.7808, 0.2095, 0.0093, 0.0004, 0].map((x, i) => expect(dry.z[i]!).toBeCloseTo(x, 12));
    const simple = solvedStream(solve([airFeed('79/21')], air), 'a');
    [0.79, 0.21, 0, 0, 0].map((x, i) => expect(simple.z[i]!).toBeCloseTo(x, 12));
  });

  test('carries water by its vapour pressure and the relative humidity', async () => {
    const air = await basisOf(AIR, 'raoult');
    const humid = solvedStream(solve([airFeed('humid air')], air), 'a');
    // IAPWS R7-97(2012), region 4 equation: 2.986 kPa at 24 degC (figure recalled from memory). 0.55 * 2.986 / 101.3 = 0.01621.
    expect(humid.z[4]!).toBeCloseTo(0.01621, 4);
    expect(humid.z.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12);
    expect(humid.z[0]! / humid.z[1]!).toBeCloseTo(0.7808 / 0.2095, 10);
  });

  test('is refused where it cannot be', async () => {
    const air = await basisOf(AIR, 'raoult');
    expect(reasonOf([airFeed('humid air', {}, { P: 101300, vapourFraction: 1 })], 'f', air)?.code).toBe(
      'feed/air-needs-temperature-and-pressure',
    );
    expect(reasonOf([airFeed('humid air', {}, { T: 380, P: 50000 })], 'f', air)?.code).toBe(
      'feed/humidity-above-saturation',
    );
    const without = { at: { ...at, Ar: -1 } };
    expect(reasonOf([airFeed('dry air', without)], 'f', air)).toMatchObject({
      code: 'feed/air-component-missing',
      evidence: [{ text: 'Ar' }],
    });
  });
});

describe('heater and cooler', () => {
  const heated = (kind: string, settings: object, feed = feedOf()) => {
    const batch = solve([feed, unit(`u ${kind} in=a > out=b`, { p: { drop: 1e5 }, ...settings })]);
    return {
      out: solvedStream(batch, 'b'),
      in: solvedStream(batch, 'a'),
      duty: unitResult(batch, 'u')!.heat_W!,
    };
  };
  const bubble = (side: 0 | 1): SolvedStream =>
    solvedStream(solve([feedOf({ state: { P: 11e5, vapourFraction: side } })]), 'a');

  test('meet the condition that is set', () => {
    expect(heated('heater', { T: 350 }).out.T_K).toBe(350);
    expect(heated('heater', { dT: 15 }).out.T_K).toBeCloseTo(335, 9);
    expect(heated('cooler', { dT: -15 }).out.T_K).toBeCloseTo(305, 9);
    expect(heated('heater', { vapourFraction: 0.75 }).out.vapourFraction).toBeCloseTo(0.75, 9);
    expect(heated('cooler', { subcooling: 12 }).out.T_K).toBeCloseTo(bubble(0).T_K - 12, 6);
    expect(heated('heater', { superheat: 12 }).out.T_K).toBeCloseTo(bubble(1).T_K + 12, 6);
    expect(heated('cooler', { subcooling: 0 }).out.vapourFraction).toBe(0);
    expect(heated('heater', { superheat: 0 }).out.vapourFraction).toBe(1);
    expect(heated('heater', { T: 350 }).out.P_Pa).toBe(11e5);
  });

  test('come back: the duty found for a temperature, given instead, finds the temperature', () => {
    for (const [kind, T] of [
      ['heater', 360],
      ['cooler', 280],
    ] as const) {
      const there = heated(kind, { T });
      expect(there.out.H_W - there.in.H_W).toBeCloseTo(there.duty, 6);
      expect(Math.sign(there.duty)).toBe(kind === 'heater' ? 1 : -1);
      const back = heated(kind, { duty: there.duty });
      expect(back.out.T_K).toBeCloseTo(T, 6);
      expect(back.duty).toBe(there.duty);
    }
  });

  test('with temperature and vapour fraction find the pressure', () => {
    const batch = solve([feedOf(), unit('u heater in=a > out=b', { T: 330, vapourFraction: 0.5 })]);
    const out = solvedStream(batch, 'b');
    expect([out.T_K, out.vapourFraction]).toEqual([330, expect.closeTo(0.5, 9)]);
    const again = solvedStream(solve([feedOf({ state: { T: 330, P: out.P_Pa } })]), 'a');
    expect(again.vapourFraction).toBeCloseTo(0.5, 7);
  });

  test('say why there is no answer', () => {
    const cold = unit('u cooler in=a > out=b', { p: { drop: 0 }, dT: -400 });
    expect(reasonOf([feedOf(), cold], 'u')).toMatchObject({
      code: 'temperature/not-positive',
      at: { path: 'dT' },
    });
    const empty = unit('u heater in=a > out=b', { p: { drop: 13e5 }, T: 300 });
    expect(reasonOf([feedOf(), empty], 'u')).toMatchObject({
      code: 'pressure/not-positive',
      at: { path: 'p.drop' },
    });
  });
});

describe('a drum', () => {
  const drum = (settings: object, feed = feedOf()) =>
    solve([feed, unit('d drum in1=a > vapour=v liquid=l', { p: { drop: 0 }, ...settings })]);

  test('parts what comes in without another flash: its outlets are the phases of its inlet', () => {
    const batch = drum({});
    const inlet = solvedStream(batch, 'a');
    const [vapour, liquid] = [solvedStream(batch, 'v'), solvedStream(batch, 'l')];
    expect(unitResult(batch, 'd')!.iterations).toBe(0);
    for (const [k, out] of [vapour, liquid].entries())
      for (const [i, x] of out.z.entries()) expect(x).toBeCloseTo(inlet.phases[k]!.x[i]!, 14);
    expect([vapour.vapourFraction, liquid.vapourFraction]).toEqual([1, 0]);
    expect(unitResult(batch, 'd')!.results).not.toHaveProperty('duty_W');
  });

  test('gives a stream without flow where a phase is missing', () => {
    const batch = drum({ h: { T: 230 }, p: { P: 40e5 } });
    const vapour = solvedStream(batch, 'v');
    expect([vapour.n_mol_s, vapour.H_W, vapour.phases.length]).toEqual([0, 0, 0]);
    expect([vapour.T_K, vapour.P_Pa]).toEqual([230, 40e5]);
    expect(solvedStream(batch, 'l').n_mol_s).toBeCloseTo(10, 12);
    expect(batch.findings.map((f) => f.code)).toContain('drum/one-phase');
  });

  test('with a stream without flow behind it leaves the units there solved, without flow', () => {
    const batch = solve([
      feedOf(),
      unit('d drum in1=a > vapour=v liquid=l', { p: { P: 40e5 }, h: { T: 230 } }),
      unit('w valve in=v > out=b', { p: { P: 1e5 } }),
      unit('h heater in=b > out=c', { p: { drop: 0 }, T: 300 }),
      unit('s divide in=c > out1=e out2=g', {
        shares: { out2: { is: 'share', share: 0.5, of: 'feed', basis: 'mole' } },
      }),
      unit('j join in1=e in2=g > out=k', { p: { drop: 0 } }),
      unit('d2 drum in1=k > vapour=m liquid=n', { p: { drop: 0 } }),
      unit('p product in=m', {}),
    ]);
    for (const [id, result] of batch.units) expect([id, result.state]).toEqual([id, 'solved']);
    expect(solvedStream(batch, 'm').n_mol_s).toBe(0);
    expect(batch.closure!.complete).toBe(true);
  });

  test('comes back: its duty at a temperature, given instead, finds the temperature', () => {
    const there = drum({ h: { T: 340 } });
    const duty = unitResult(there, 'd')!.heat_W!;
    expect(unitResult(there, 'd')!.results).toMatchObject({ duty_W: duty });
    expect(solvedStream(drum({ h: { duty } }), 'v').T_K).toBeCloseTo(340, 6);
    expect(there.findings.map((f) => f.code)).toContain('drum/has-duty');
  });

  test('with temperature and vapour fraction finds its pressure', () => {
    const batch = solve([
      feedOf(),
      unit('d drum in1=a > vapour=v liquid=l', { h: { T: 320, vapourFraction: 0.4 } }),
    ]);
    expect(solvedStream(batch, 'v').n_mol_s).toBeCloseTo(4, 8);
    expect(solvedStream(batch, 'v').T_K).toBe(320);
  });
});

describe('join, divide, valve', () => {
  test('a join takes the lowest inlet pressure and mixes enthalpies', () => {
    const second = unit('g feed > out=b', { state: { T: 380, P: 9e5 }, flow: molar(4), composition: EQUAL });
    const batch = solve([feedOf(), second, unit('j join in1=a in7=b > out=c', { p: { drop: 0 } })]);
    const out = solvedStream(batch, 'c');
    expect(out.P_Pa).toBe(9e5);
    expect(out.H_W).toBe(solvedStream(batch, 'a').H_W + solvedStream(batch, 'b').H_W);
  });

  test('a join of one stream, a valve without a drop and a whole share change nothing', () => {
    const batch = solve([
      feedOf(),
      unit('j join in1=a > out=b', { p: { drop: 0 } }),
      unit('v valve in=b > out=c', { p: { ratio: 1 } }),
      unit('s divide in=c > out1=d', { shares: {} }),
    ]);
    for (const id of ['b', 'c', 'd']) expect(solvedStream(batch, id)).toEqual(solvedStream(batch, 'a'));
  });

  test('a valve from P1 to P3 ends where two valves by way of P2 end', () => {
    const once = solve([feedOf(), unit('v valve in=a > out=b', { p: { P: 2e5 } })]);
    const twice = solve([
      feedOf(),
      unit('v valve in=a > out=x', { p: { ratio: 0.5 } }),
      unit('w valve in=x > out=b', { p: { P: 2e5 } }),
    ]);
    expect(solvedStream(twice, 'b').T_K).toBeCloseTo(solvedStream(once, 'b').T_K, 7);
  });

  test('a divide takes flows by mole, by mass and of one chemical', () => {
    const split = (flow: unknown) => {
      const batch = solve([feedOf(), unit('s divide in=a > out1=b out2=c', { shares: { out2: flow } })]);
      return solvedStream(batch, 'c');
    };
    expect(split(molar(2.5)).n_mol_s).toBeCloseTo(2.5, 12);
    expect(split({ is: 'mass', m_kg_s: 0.1 }).m_kg_s).toBeCloseTo(0.1, 12);
    // Derived: 70 % of a seventh of 10 mol/s.
    expect(split({ is: 'share', share: 0.7, of: 'feed', basis: 'mole', chemical: 3 }).n_mol_s).toBeCloseTo(
      1,
      12,
    );
  });

  const share = (value: number) => ({ is: 'share', share: value, of: 'feed', basis: 'mole' });
  test.each([
    ['divide/no-rest-outlet', { out1: share(0.5), out2: share(0.5) }],
    ['divide/several-rest-outlets', {}],
    ['divide/unknown-outlet', { out9: share(0.1) }],
    ['divide/share-below-zero', { out1: share(-0.1) }],
    ['divide/shares-above-whole', { out1: molar(11) }],
  ])('a divide says %s', (code, shares) => {
    expect(reasonOf([feedOf(), unit('s divide in=a > out1=b out2=c', { shares })], 's')?.code).toBe(code);
  });
});
